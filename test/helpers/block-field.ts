import type { Shader, Solid } from '../../core/form/model.ts';
import type { Point, Ring } from '../../core/plane/vec.ts';
import type { Receptors } from '../../core/shade/skyline-groups.ts';
import { seeded } from './seeded.ts';

/** A town of boxes on plots of 30 m, each turned a little, none touching another: repeatable from its start number. */
export type BlockField = { readonly solids: Solid[]; readonly shaders: Shader[]; readonly side_m: number };

export function prism(id: string, outline: Ring, base_m: number, top_m: number): Solid {
  return { id, name: '', standing: 'context', outline, pieces: [outline], base_m, top_m };
}

export function box(
  id: string,
  x: number,
  y: number,
  width: number,
  depth: number,
  base_m: number,
  top_m: number,
  turn = 0,
): Solid {
  const c = Math.cos(turn);
  const s = Math.sin(turn);
  const at = (u: number, v: number): Point => [x + u * c - v * s, y + u * s + v * c];
  const w = width / 2;
  const d = depth / 2;
  return prism(id, [at(-w, -d), at(w, -d), at(w, d), at(-w, d)], base_m, top_m);
}

/**
 * @param blocks    how many standing blocks
 * @param detailed  whether every second block carries overhangs and fins on one face, and every fourth has a block floating over it
 */
export function blockField(start: number, blocks: number, detailed = false): BlockField {
  const next = seeded(start);
  const across = Math.ceil(Math.sqrt(blocks));
  const solids: Solid[] = [];
  const shaders: Shader[] = [];
  for (let i = 0; i < blocks; i++) {
    const x = (i % across) * 30 + 15;
    const y = Math.floor(i / across) * 30 + 15;
    const width = 10 + 9 * next();
    const depth = 10 + 9 * next();
    const top = 5 + 20 * next() * next() + 3 * next();
    const solid = box(`B${i}`, x, y, width, depth, 0, top, (next() - 0.5) * 0.5);
    solids.push(solid);
    if (!detailed) continue;
    if (i % 4 === 0) solids.push(box(`F${i}`, x, y, width * 0.8, depth * 0.5, top + 3, top + 6 + 4 * next(), next()));
    if (i % 2 === 0) shaders.push(...faceDevices(solid, 0, `D${i}`));
  }
  return { solids, shaders, side_m: across * 30 };
}

/** An overhang with a fin either side over each of two windows on one wall of a box. */
function faceDevices(solid: Solid, wall: number, name: string): Shader[] {
  const a = solid.outline[wall] as Point;
  const b = solid.outline[(wall + 1) % solid.outline.length] as Point;
  const run = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const ux = (b[0] - a[0]) / run;
  const uy = (b[1] - a[1]) / run;
  const at = (u: number, out: number, z: number): [number, number, number] => [
    a[0] + ux * u + uy * out,
    a[1] + uy * u - ux * out,
    z,
  ];
  const shaders: Shader[] = [];
  for (const middle of [run * 0.3, run * 0.7]) {
    const l = middle - 1.2;
    const r = middle + 1.2;
    const head = Math.min(3.2, solid.top_m - 1);
    shaders.push({
      device: name,
      kind: 'overhang',
      corners: [at(l, 0, head), at(r, 0, head), at(r, 0.9, head), at(l, 0.9, head)],
    });
    for (const u of [l, r])
      shaders.push({
        device: name,
        kind: 'fin',
        corners: [at(u, 0, 1), at(u, 0.5, 1), at(u, 0.5, head), at(u, 0, head)],
      });
  }
  return shaders;
}

/** Receptors of a map of the field: a third on the ground, a third on roofs, a third on walls that face every way. */
export function fieldReceptors(field: BlockField, count: number, start: number): Receptors {
  const next = seeded(start);
  const blocks = field.solids.filter((s) => s.base_m === 0);
  const r: Receptors = {
    x: new Float64Array(count),
    y: new Float64Array(count),
    z: new Float64Array(count),
    nx: new Float64Array(count),
    ny: new Float64Array(count),
    nz: new Float64Array(count),
  };
  const third = Math.floor(count / 3);
  const faces = 12;
  for (let i = 0; i < count; i++) {
    if (i < third) {
      const across = Math.ceil(Math.sqrt(third));
      r.x[i] = ((i % across) + 0.5) * (field.side_m / across);
      r.y[i] = (Math.floor(i / across) + 0.5) * (field.side_m / across);
      r.nz[i] = 1;
      continue;
    }
    const face = Math.floor(((i - third) * faces) / (count - third));
    const solid = blocks[Math.floor(((face + 0.5) * blocks.length) / faces)] as Solid;
    const [a, b, , d] = solid.outline as [Point, Point, Point, Point];
    const u = next();
    const v = next();
    if (face % 2 === 0) {
      r.x[i] = a[0] + u * (b[0] - a[0]) + v * (d[0] - a[0]);
      r.y[i] = a[1] + u * (b[1] - a[1]) + v * (d[1] - a[1]);
      r.z[i] = solid.top_m;
      r.nz[i] = 1;
    } else {
      const wall = ((face - 1) / 2) % 4;
      const p = solid.outline[wall] as Point;
      const q = solid.outline[(wall + 1) % 4] as Point;
      const run = Math.hypot(q[0] - p[0], q[1] - p[1]);
      r.x[i] = p[0] + u * (q[0] - p[0]);
      r.y[i] = p[1] + u * (q[1] - p[1]);
      r.z[i] = v * solid.top_m;
      r.nx[i] = (q[1] - p[1]) / run;
      r.ny[i] = -(q[0] - p[0]) / run;
    }
  }
  return r;
}
