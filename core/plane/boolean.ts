import { ClipType, Clipper64, FillRule, type Path64, type Paths64, type PolyPath64, PolyTree64 } from 'clipper2-ts';
import { SLIVER_m2, UNION_GRID_m } from '../units/tolerance.ts';
import { fromFirstCorner, type Region } from './region.ts';
import { signedArea } from './ring.ts';
import type { Point, Ring } from './vec.ts';

/**
 * Union, difference and intersection of outlines. Rings may run either way and may overlap: whatever lies inside any of
 * them counts, and holes are not taken as input (a ring inside another is part of it).
 *
 * The work is done in whole numbers on a grid of `UNION_GRID_m`, from an origin near the shapes. Drawings too wide for
 * the grid (a shadow at sunset) get one ten, a hundred … times coarser, so that products stay exact: see `gridFor`.
 * Results hold no slivers, run anticlockwise outside and clockwise round holes, start at their lowest leftmost corner
 * and come in the order of those corners, so that equal input gives equal output.
 */
export const unionOf = (rings: readonly Ring[]): Region[] => combine(ClipType.Union, rings, []);

/** What lies inside any of `rings` and outside all of `less`; see `unionOf`. */
export const differenceOf = (rings: readonly Ring[], less: readonly Ring[]): Region[] =>
  combine(ClipType.Difference, rings, less);

/** What lies inside any of `rings` and inside any of `others`; see `unionOf`. */
export const intersectionOf = (rings: readonly Ring[], others: readonly Ring[]): Region[] =>
  combine(ClipType.Intersection, rings, others);

/** Regions with holes as the subject of a difference or an intersection: their rings keep their direction. */
export const regionsLess = (regions: readonly Region[], less: readonly Ring[]): Region[] =>
  combine(
    ClipType.Difference,
    regions.flatMap((r) => [r.outer, ...r.holes]),
    less,
    true,
  );

/** The part of regions with holes that lies inside any of `others`. */
export const regionsWithin = (regions: readonly Region[], others: readonly Ring[]): Region[] =>
  combine(
    ClipType.Intersection,
    regions.flatMap((r) => [r.outer, ...r.holes]),
    others,
    true,
  );

/** Differences of whole-number coordinates below this keep the library's products exact in doubles. */
const EXACT_SPAN = 9e7;

/** Steps a metre, and the origin in steps. */
type Grid = { readonly perMetre: number; readonly x: number; readonly y: number };

function combine(type: ClipType, subject: readonly Ring[], clip: readonly Ring[], directed = false): Region[] {
  const grid = gridFor(subject, clip);
  if (grid === null) return [];
  const engine = new Clipper64();
  engine.addSubject(onGrid(subject, grid, directed));
  if (clip.length > 0) engine.addClip(onGrid(clip, grid, false));
  const tree = new PolyTree64();
  if (!engine.execute(type, FillRule.NonZero, tree)) throw new Error('the union of outlines failed');
  const regions: Region[] = [];
  collect(tree, grid, regions);
  return regions.sort((a, b) => compareCorners(a.outer[0] as Point, b.outer[0] as Point));
}

/**
 * Origin and step of the grid, or null when there is nothing on it.
 * @throws {RangeError} when a corner is not a finite number
 */
function gridFor(subject: readonly Ring[], clip: readonly Ring[]): Grid | null {
  let [x0, y0, x1, y1] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const rings of [subject, clip])
    for (const ring of rings)
      for (const p of ring) {
        if (!Number.isFinite(p[0] + p[1])) throw new RangeError(`an outline has a corner at ${p[0]}, ${p[1]}`);
        if (p[0] < x0) x0 = p[0];
        if (p[0] > x1) x1 = p[0];
        if (p[1] < y0) y0 = p[1];
        if (p[1] > y1) y1 = p[1];
      }
  if (!(x1 > x0) || !(y1 > y0)) return null;
  const span = Math.max(x1 - x0, y1 - y0);
  const coarser = Math.max(0, Math.ceil(Math.log10(span / UNION_GRID_m / EXACT_SPAN)));
  const perMetre = 10 ** (Math.round(-Math.log10(UNION_GRID_m)) - coarser);
  // The origin lies on the grid itself, so that the grid stays where it is when a shape moves.
  return { perMetre, x: Math.round(((x0 + x1) / 2) * perMetre), y: Math.round(((y0 + y1) / 2) * perMetre) };
}

/** Rings in whole numbers, without repeated corners; all anticlockwise unless their direction is to be kept. */
function onGrid(rings: readonly Ring[], grid: Grid, directed: boolean): Paths64 {
  const out: Paths64 = [];
  for (const ring of rings) {
    const path: Path64 = [];
    for (const p of ring) {
      // `+ 0` turns a negative zero into zero.
      const x = Math.round(p[0] * grid.perMetre) - grid.x + 0;
      const y = Math.round(p[1] * grid.perMetre) - grid.y + 0;
      const last = path[path.length - 1];
      if (last === undefined || last.x !== x || last.y !== y) path.push({ x, y });
    }
    if (path.length < 3) continue;
    if (!directed && signedArea(ring) < 0) path.reverse();
    out.push(path);
  }
  return out;
}

/** The tree of outer rings, their holes, and what lies in those, as a flat list of regions in metres. */
function collect(node: PolyPath64, grid: Grid, regions: Region[]): void {
  for (let i = 0; i < node.count; i++) {
    const child = node.child(i);
    const outer = offGrid(child.poly ?? [], grid, 1);
    const holes: Ring[] = [];
    for (let k = 0; k < child.count; k++) {
      const hole = child.child(k);
      const ring = offGrid(hole.poly ?? [], grid, -1);
      if (-signedArea(ring) >= SLIVER_m2) holes.push(ring);
      collect(hole, grid, regions);
    }
    if (signedArea(outer) < SLIVER_m2) continue;
    holes.sort((a, b) => compareCorners(a[0] as Point, b[0] as Point));
    regions.push({ outer, holes });
  }
}

/** A ring in metres that runs anticlockwise (sense 1) or clockwise (−1). The library's stray z is left behind. */
function offGrid(path: Path64, grid: Grid, sense: 1 | -1): Ring {
  const ring = path.map((p): Point => [(grid.x + p.x) / grid.perMetre, (grid.y + p.y) / grid.perMetre]);
  if (signedArea(ring) * sense < 0) ring.reverse();
  return fromFirstCorner(ring);
}

const compareCorners = (p: Point, q: Point): number => p[0] - q[0] || p[1] - q[1];
