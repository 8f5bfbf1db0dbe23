import { pointOn } from '../form/panel.ts';
import type { Model, Solid, WindowForm } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import { contains } from '../plane/ring.ts';
import type { Vec3 } from '../plane/vec.ts';
import type { Fault } from '../scheme/fault.ts';
import { DRAWN_m } from '../units/tolerance.ts';

/** How far in front of the wall is looked: a block nearer than a hand's breadth was hardly meant to leave the window its light [m]. */
const IN_FRONT_m = [0.005, 0.05] as const;
/** Points a side of the opening. */
const POINTS = 10;
/** Less than this is a slab or a post drawn as a block, and meant [share]. */
const LEAST = 0.1;

/** Smallest and largest x, y and z of some points. */
function boundsOf(points: readonly Vec3[]): readonly (readonly [number, number])[] {
  return [0, 1, 2].map((axis) => {
    const along = points.map((p) => p[axis as 0 | 1 | 2]);
    return [Math.min(...along), Math.max(...along)] as const;
  });
}

type Boxed = { readonly solid: Solid; readonly bounds: ReturnType<typeof boundsOf> };

const boxed = (solid: Solid): Boxed => ({
  solid,
  bounds: boundsOf(
    solid.outline.flatMap(([x, y]): Vec3[] => [
      [x, y, solid.base_m],
      [x, y, solid.top_m],
    ]),
  ),
});

const holds = ({ outline, base_m, top_m }: Solid, [x, y, z]: Vec3): boolean =>
  z > base_m && z < top_m && contains(outline, x, y);

/** The points of an opening, a little before the face of its wall. */
const pointsBefore = (w: WindowForm, out_m: number): readonly Vec3[] =>
  Array.from({ length: POINTS * POINTS }, (_, k) =>
    pointOn(
      w,
      ((k % POINTS) + 0.5) * (w.width_m / POINTS),
      (Math.floor(k / POINTS) + 0.5) * (w.height_m / POINTS),
      out_m,
    ),
  );

const cornersBefore = (w: WindowForm, out_m: number): readonly Vec3[] =>
  [0, w.width_m].flatMap((x) => [0, w.height_m].map((y) => pointOn(w, x, y, out_m)));

function covered(w: WindowForm, solids: readonly Boxed[]): Fault[] {
  const around = boundsOf(IN_FRONT_m.flatMap((out_m) => cornersBefore(w, out_m)));
  const near = solids.filter(
    ({ solid, bounds }) =>
      solid.id !== w.block && bounds.every(([low, high], axis) => low <= around[axis]![1] && high >= around[axis]![0]),
  );
  if (near.length === 0) return [];
  const layers = IN_FRONT_m.map((out_m) => pointsBefore(w, out_m));
  return near.flatMap(({ solid }): Fault[] => {
    let hidden = 0;
    for (let k = 0; k < POINTS * POINTS; k++) if (layers.some((layer) => holds(solid, layer[k]!))) hidden++;
    const share = hidden / (POINTS * POINTS);
    if (share < LEAST) return [];
    const much = share === 1 ? 'all of it' : `about ${Math.round(100 * share)} % of it`;
    return [
      {
        level: 'warning',
        code: 'window-covered',
        place: w.place,
        message: `block ${solid.id} stands against window ${w.id} and covers ${much}`,
        cure: 'no light comes in there: check where both stand',
      },
    ];
  });
}

function underGround(w: WindowForm): Fault[] {
  const lowest_m = w.origin[2];
  if (lowest_m >= -DRAWN_m) return [];
  return [
    {
      level: 'warning',
      code: 'under-ground',
      place: w.place,
      message: `window ${w.id} reaches ${Number((-lowest_m).toPrecision(3))} m under the ground, and the ground round it hides no light from it here`,
      cure: 'draw what stands before it as blocks, or check floor and sill',
    },
  ];
}

/** Windows that lie behind a block which touches their wall, or under the ground: the first get too little, the others too much. */
export function windowPlaceNotes(model: Model): readonly Fault[] {
  const standing = solidsAt(model.solids, 'after').map(boxed);
  return model.windows.flatMap((w) => [...covered(w, standing), ...underGround(w)]);
}
