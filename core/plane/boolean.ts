import { Clipper64, ClipType, FillRule, type Path64, type Paths64, type PolyPath64, PolyTree64 } from 'clipper2-ts';
import { decadeOf, tenTo } from '../maths/decade.ts';
import { SLIVER_m2, UNION_GRID_m } from '../units/tolerance.ts';
import { fromFirstCorner, type Region } from './region.ts';
import { contains, signedArea } from './ring.ts';
import type { Point, Ring } from './vec.ts';

/** What the operations below take: an outline that runs either way, or a region with its holes. */
export type Shape = Ring | Region;

/**
 * Union, difference and intersection of shapes. Shapes may overlap: whatever lies inside any of them counts. A bare ring
 * inside another is part of it; holes come as regions only.
 *
 * The work is done in whole numbers on a grid of `UNION_GRID_m`, from an origin near the shapes. Drawings too wide for
 * the grid (a shadow at sunset) get one ten, a hundred … times coarser, so that products stay exact: see `gridFor`.
 * Results hold no slivers, run anticlockwise outside and clockwise round holes, start at their lowest leftmost corner
 * and come in the order of those corners, so that equal input gives equal output.
 * @throws {RangeError} when a corner is not a finite number
 */
export const unionOf = (shapes: readonly Shape[]): Region[] => combine(ClipType.Union, shapes, []);

/** What lies inside any of `shapes` and outside all of `less`; see `unionOf`. */
export const differenceOf = (shapes: readonly Shape[], less: readonly Shape[]): Region[] =>
  combine(ClipType.Difference, shapes, less);

/** What lies inside any of `shapes` and inside any of `others`; see `unionOf`. */
export const intersectionOf = (shapes: readonly Shape[], others: readonly Shape[]): Region[] =>
  combine(ClipType.Intersection, shapes, others);

/** Differences of whole-number coordinates below this keep the library's products exact in doubles. */
const EXACT_SPAN = 9e7;

/** Steps a metre, and the origin in steps. */
type Grid = { readonly perMetre: number; readonly x: number; readonly y: number };

function combine(type: ClipType, subject: readonly Shape[], clip: readonly Shape[]): Region[] {
  const grid = gridFor([...subject, ...clip]);
  if (grid === null) return [];
  const engine = new Clipper64();
  engine.addSubject(onGrid(subject, grid));
  if (clip.length > 0) engine.addClip(onGrid(clip, grid));
  const tree = new PolyTree64();
  if (!engine.execute(type, FillRule.NonZero, tree)) throw new Error('the union of outlines failed');
  const regions: Region[] = [];
  collect(tree, grid, regions);
  return regions.sort((a, b) => compareCorners(a.outer[0] as Point, b.outer[0] as Point));
}

const isRegion = (shape: Shape): shape is Region => 'outer' in shape;

/** Origin and step of the grid, or null when there is nothing on it. */
function gridFor(shapes: readonly Shape[]): Grid | null {
  let [x0, y0, x1, y1] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const shape of shapes)
    for (const p of isRegion(shape) ? shape.outer : shape) {
      if (!Number.isFinite(p[0] + p[1])) throw new RangeError(`an outline has a corner at ${p[0]}, ${p[1]}`);
      if (p[0] < x0) x0 = p[0];
      if (p[0] > x1) x1 = p[0];
      if (p[1] < y0) y0 = p[1];
      if (p[1] > y1) y1 = p[1];
    }
  if (!(x1 > x0) || !(y1 > y0)) return null;
  const span = Math.max(x1 - x0, y1 - y0);
  const beyond = span / UNION_GRID_m / EXACT_SPAN;
  const coarser = beyond > 1 ? decadeOf(beyond) + (beyond > tenTo(decadeOf(beyond)) ? 1 : 0) : 0;
  const perMetre = tenTo(-decadeOf(UNION_GRID_m) - coarser);
  // The origin lies on the grid itself, so that the grid stays where it is when a shape moves.
  return { perMetre, x: Math.round(((x0 + x1) / 2) * perMetre), y: Math.round(((y0 + y1) / 2) * perMetre) };
}

/** Shapes in whole numbers: outlines anticlockwise, holes clockwise, so that they cancel what they lie in. */
function onGrid(shapes: readonly Shape[], grid: Grid): Paths64 {
  const out: Paths64 = [];
  for (const shape of shapes) {
    if (isRegion(shape)) {
      addPath(out, shape.outer, grid, 1);
      for (const hole of shape.holes) addPath(out, hole, grid, -1);
    } else addPath(out, shape, grid, 1);
  }
  return out;
}

function addPath(out: Paths64, ring: Ring, grid: Grid, sense: 1 | -1): void {
  const path: Path64 = [];
  for (const p of ring) {
    // `+ 0` turns a negative zero into zero.
    const x = Math.round(p[0] * grid.perMetre) - grid.x + 0;
    const y = Math.round(p[1] * grid.perMetre) - grid.y + 0;
    const last = path[path.length - 1];
    if (last === undefined || last.x !== x || last.y !== y) path.push({ x, y });
  }
  if (path.length < 3) return;
  if (signedArea(ring) * sense < 0) path.reverse();
  out.push(path);
}

/** The tree of outer rings, their holes, and what lies in those, as a flat list of regions in metres. */
function collect(node: PolyPath64, grid: Grid, regions: Region[]): void {
  const own: { readonly outer: Ring; readonly holes: Ring[] }[] = [];
  const strays: Ring[] = [];
  for (let i = 0; i < node.count; i++) {
    const child = node.child(i);
    // A hole that touches its outer ring at a corner may come beside it in the tree instead of in it; its sense tells it.
    if (runsClockwise(child.poly ?? [])) {
      strays.push(offGrid(child.poly ?? [], grid, -1));
      collect(child, grid, regions);
      continue;
    }
    const outer = offGrid(child.poly ?? [], grid, 1);
    const holes: Ring[] = [];
    for (let k = 0; k < child.count; k++) {
      const hole = child.child(k);
      const ring = offGrid(hole.poly ?? [], grid, -1);
      if (-signedArea(ring) >= SLIVER_m2) holes.push(ring);
      collect(hole, grid, regions);
    }
    if (signedArea(outer) >= SLIVER_m2) own.push({ outer, holes });
  }
  for (const hole of strays) {
    if (-signedArea(hole) < SLIVER_m2) continue;
    const [x, y] = middleOf(hole);
    own.find(({ outer }) => contains(outer, x, y))?.holes.push(hole);
  }
  for (const region of own) {
    region.holes.sort((a, b) => compareCorners(a[0] as Point, b[0] as Point));
    regions.push(region);
  }
}

/** Twice the area of a path in whole numbers is below zero. */
function runsClockwise(path: Path64): boolean {
  let twice = 0;
  for (let i = 0; i < path.length; i++) {
    const [p, q] = [path[i]!, path[(i + 1) % path.length]!];
    twice += p.x * q.y - q.x * p.y;
  }
  return twice < 0;
}

/** A point within a ring: the middle of the first ear whose middle lies inside. */
function middleOf(ring: Ring): Point {
  for (let i = 0; i < ring.length; i++) {
    const [a, b, c] = [ring[i]!, ring[(i + 1) % ring.length]!, ring[(i + 2) % ring.length]!];
    const at: Point = [(a[0] + b[0] + c[0]) / 3, (a[1] + b[1] + c[1]) / 3];
    if (contains(ring, at[0], at[1])) return at;
  }
  return ring[0] as Point;
}

/** A ring in metres that runs anticlockwise (sense 1) or clockwise (−1). The library's stray z is left behind. */
function offGrid(path: Path64, grid: Grid, sense: 1 | -1): Ring {
  const ring = path.map((p): Point => [(grid.x + p.x) / grid.perMetre, (grid.y + p.y) / grid.perMetre]);
  if (signedArea(ring) * sense < 0) ring.reverse();
  return fromFirstCorner(ring);
}

const compareCorners = (p: Point, q: Point): number => p[0] - q[0] || p[1] - q[1];
