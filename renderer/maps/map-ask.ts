import type { Model, Solid } from '../../core/form/model.ts';
import type { Ring } from '../../core/plane/vec.ts';
import { cellsOfOutline, cellsOfPanel, solidWall } from '../../core/shade/exposure-grid.ts';
import type { Surface } from '../../core/study/exposure-map.ts';

/** Whose walls and roofs a map covers, and which ground. */
export type MapFaces = 'none' | 'proposal' | 'neighbours' | 'all';
export type MapGround = 'none' | 'areas' | 'site' | 'around';

/** Ground shown round everything that is drawn [m]. */
const AROUND_m = 6;

const isWanted = (solid: Solid, faces: MapFaces): boolean => {
  if (faces === 'all') return true;
  const isNeighbour = solid.standing === 'context' || solid.standing === 'existing';
  return faces === 'neighbours' ? isNeighbour : faces === 'proposal' && solid.standing === 'proposed';
};

/** The surfaces of a map in the order of the scheme, the ground first. */
export function mapSurfaces(model: Model, faces: MapFaces, ground: MapGround): Surface[] {
  const walls = model.solids
    .filter((solid) => isWanted(solid, faces))
    .flatMap((solid): Surface[] => [
      ...solid.outline.flatMap((_, wall): Surface[] =>
        solidWall(solid, wall) === null ? [] : [{ kind: 'wall', block: solid.id, wall }],
      ),
      { kind: 'roof', block: solid.id },
    ]);
  return [...groundSurfaces(model, ground), ...walls];
}

function groundSurfaces(model: Model, ground: MapGround): Surface[] {
  if (ground === 'none') return [];
  if (ground === 'areas')
    return model.receptors.flatMap((r): Surface[] =>
      r.kind === 'area' ? [{ kind: 'ground', outline: r.outline, level_m: r.level }] : [],
    );
  const outline = ground === 'site' && model.boundary !== null ? model.boundary : around(model);
  return [{ kind: 'ground', outline, level_m: 0 }];
}

function around({ extent: [x0, y0, x1, y1] }: Model): Ring {
  const [a, b, c, d] = [x0 - AROUND_m, y0 - AROUND_m, x1 + AROUND_m, y1 + AROUND_m];
  return [
    [a, b],
    [c, b],
    [c, d],
    [a, d],
  ];
}

/** The outline of a level surface; of a wall, none. */
export function outlineOf(model: Model, surface: Surface): Ring {
  if (surface.kind === 'ground') return surface.outline;
  if (surface.kind === 'wall') return [];
  return model.solids.find((s) => s.id === surface.block)?.outline ?? [];
}

/** About how many cells a map has: cheap, so that it can be said before the map is asked for. */
export function cellCount(model: Model, surfaces: readonly Surface[], spacing_m: number): number {
  const solids = new Map(model.solids.map((s) => [s.id, s]));
  return surfaces.reduce((sum, surface) => {
    if (surface.kind !== 'wall') {
      const outline = surface.kind === 'ground' ? surface.outline : (solids.get(surface.block)?.outline ?? []);
      return sum + (outline.length === 0 ? 0 : cellsOfOutline(outline, spacing_m));
    }
    const solid = solids.get(surface.block);
    const panel = solid === undefined ? null : solidWall(solid, surface.wall);
    return sum + (panel === null ? 0 : cellsOfPanel(panel.width_m, panel.height_m, spacing_m));
  }, 0);
}
