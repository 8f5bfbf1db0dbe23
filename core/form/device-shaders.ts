import * as maths from '../maths/maths.ts';
import type { Device, Fin, Louvres, Overhang } from '../scheme/schema.ts';
import { DEG } from '../units/angle.ts';
import type { Panel, Shader } from './model.ts';
import { pointOn } from './panel.ts';

/**
 * The flat opaque pieces of a fixed device on a window's opening. In the axes of the opening: x to the right and y up from
 * its lower left corner seen from outside, z outwards from the face of the wall. Blinds are no geometry and give nothing;
 * nor does a device without depth.
 */
export function deviceShaders(device: Device, opening: Panel): Shader[] {
  switch (device.kind) {
    case 'overhang':
      return overhang(device, opening);
    case 'fin':
      return fins(device, opening);
    case 'louvres':
      return louvres(device, opening);
    case 'blind':
      return [];
  }
}

/**
 * A sheet that projects `depth` from the face of the wall whatever its tilt, as it would be measured on a section; its
 * root stands `above` the head, and its front edge is depth · tan(tilt) lower than its root.
 */
function overhang(d: Overhang, p: Panel): Shader[] {
  if (!(d.depth > 0)) return [];
  const root = p.height_m + d.above;
  const front = root - d.depth * maths.tan(d.tilt * DEG);
  const left = -d.left;
  const right = p.width_m + d.right;
  return [
    {
      device: d.id,
      kind: 'overhang',
      corners: [
        pointOn(p, left, root, 0),
        pointOn(p, right, root, 0),
        pointOn(p, right, front, d.depth),
        pointOn(p, left, front, d.depth),
      ],
    },
  ];
}

/** Upright sheets square to the wall, `gap` beside the jambs. */
function fins(d: Fin, p: Panel): Shader[] {
  const bottom = -d.below;
  const top = p.height_m + d.above;
  if (!(d.depth > 0) || !(top > bottom)) return [];
  const at = (x: number): Shader => ({
    device: d.id,
    kind: 'fin',
    corners: [
      pointOn(p, x, bottom, 0),
      pointOn(p, x, top, 0),
      pointOn(p, x, top, d.depth),
      pointOn(p, x, bottom, d.depth),
    ],
  });
  const out: Shader[] = [];
  if (d.side !== 'right') out.push(at(-d.gap));
  if (d.side !== 'left') out.push(at(p.width_m + d.gap));
  return out;
}

/**
 * Blades from the head down: the centre of the first stands level with the head, each next one `spacing` lower. A blade
 * turns about its centre line, which lies gap + depth / 2 in front of the wall.
 */
function louvres(d: Louvres, p: Panel): Shader[] {
  const c = (d.depth / 2) * maths.cos(d.tilt * DEG);
  const s = (d.depth / 2) * maths.sin(d.tilt * DEG);
  const z = d.gap + d.depth / 2;
  const left = -d.left;
  const right = p.width_m + d.right;
  return Array.from({ length: d.count }, (_, k): Shader => {
    const y = p.height_m - k * d.spacing;
    return {
      device: d.id,
      kind: 'louvres',
      corners: [
        pointOn(p, left, y + s, z - c),
        pointOn(p, right, y + s, z - c),
        pointOn(p, right, y - s, z + c),
        pointOn(p, left, y - s, z + c),
      ],
    };
  });
}
