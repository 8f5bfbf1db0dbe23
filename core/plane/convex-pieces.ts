import { SAME_POINT_m } from '../units/tolerance.ts';
import { anticlockwise, signedArea } from './ring.ts';
import type { Point, Ring } from './vec.ts';

/**
 * A simple outline cut into convex anticlockwise pieces that cover it without overlap and use only its own corners.
 * Ears are cut off to triangles, then triangles are joined again across every cut whose removal leaves a convex piece: at
 * most four times the fewest pieces possible.
 * @param ring  a simple outline [m], either way round; corners in a line or repeated are let be
 * @returns     the pieces; none for an outline without area
 * @see G. H. Meisters, Am. Math. Mon. 82, 648–651 (1975), ears; S. Hertel, K. Mehlhorn, FCT, LNCS 158, 207–218 (1983), joining
 */
export function convexPieces(ring: Ring): Ring[] {
  const corners = withoutIdleCorners(anticlockwise(ring));
  if (corners.length < 3 || !(signedArea(corners) > 0)) return [];
  if (isConvex(corners)) return [corners];
  return joined(triangles(corners), corners).map((piece) => piece.map((i) => corners[i] as Point));
}

/** Whether an anticlockwise ring never turns right. Says nothing about a ring that runs round more than once. */
export function isConvex(ring: Ring): boolean {
  const n = ring.length;
  for (let i = 0; i < n; i++)
    if (turn(ring[i] as Point, ring[(i + 1) % n] as Point, ring[(i + 2) % n] as Point) < 0) return false;
  return n >= 3;
}

/** Shapes flatter than this are three points in a line, up to rounding. */
const FLAT = 1e-12;

/** Corners that repeat their neighbour, or lie in a line between their neighbours, add nothing to a shape. */
function withoutIdleCorners(ring: Ring): Ring {
  const out = [...ring];
  for (let i = 0; i < out.length && out.length >= 3; ) {
    const a = out[(i + out.length - 1) % out.length] as Point;
    const b = out[i] as Point;
    const c = out[(i + 1) % out.length] as Point;
    const reach = Math.hypot(c[0] - a[0], c[1] - a[1]) + Math.hypot(b[0] - a[0], b[1] - a[1]);
    if (Math.abs(turn(a, b, c)) <= FLAT * reach * reach || Math.hypot(b[0] - a[0], b[1] - a[1]) <= SAME_POINT_m) {
      out.splice(i, 1);
      i = Math.max(0, i - 1);
    } else i++;
  }
  return out;
}

/** Ear clipping over corner numbers. Of the ears at hand the best shaped goes first, to avoid needles. */
function triangles(corners: Ring): [number, number, number][] {
  const left = corners.map((_, i) => i);
  let near = FLAT;
  let shapes = left.map((_, k) => earShape(corners, left, k, near));
  const out: [number, number, number][] = [];
  while (left.length > 3) {
    let best = 0;
    for (let k = 1; k < left.length; k++) if ((shapes[k] as number) > (shapes[best] as number)) best = k;
    if ((shapes[best] as number) < 0) {
      if (near === 0) break; // a self-crossing outline cannot be cut further; the loader refuses those
      near = 0;
      shapes = left.map((_, k) => earShape(corners, left, k, near));
      continue;
    }
    out.push(around(left, best));
    left.splice(best, 1);
    shapes.splice(best, 1);
    // Cutting off an ear changes the angle at its two neighbours and nowhere else.
    for (const k of [best % left.length, (best + left.length - 1) % left.length])
      shapes[k] = earShape(corners, left, k, near);
  }
  if (left.length === 3) out.push(around(left, 1));
  return out.filter(([a, b, c]) => shapeOf(corners[a] as Point, corners[b] as Point, corners[c] as Point) > FLAT);
}

const around = (left: readonly number[], k: number): [number, number, number] => [
  left[(k + left.length - 1) % left.length] as number,
  left[k] as number,
  left[(k + 1) % left.length] as number,
];

/**
 * The shape of the triangle at place k, or −1 when it is no ear. A corner on the cut, up to rounding, forbids it: what is left
 * would touch itself there, and in the end could not be cut.
 * @param near  how far outside a corner still counts as on the triangle, as a share of its squared longest side
 */
function earShape(corners: Ring, left: readonly number[], k: number, near: number): number {
  const [a, b, c] = around(left, k);
  const [pa, pb, pc] = [corners[a], corners[b], corners[c]] as [Point, Point, Point];
  if (turn(pa, pb, pc) < 0) return -1;
  const least = -near * Math.max(square(pa, pb), square(pb, pc), square(pc, pa));
  for (const i of left) {
    if (i === a || i === b || i === c) continue;
    const p = corners[i] as Point;
    if (turn(pa, pb, p) >= least && turn(pb, pc, p) >= least && turn(pc, pa, p) >= least) return -1;
  }
  return shapeOf(pa, pb, pc);
}

/** Twice the area over the squared longest side: 0.87 for an equilateral triangle, 0 for three points in a line. */
function shapeOf(a: Point, b: Point, c: Point): number {
  const longest = Math.max(square(a, b), square(b, c), square(c, a));
  return longest > 0 ? turn(a, b, c) / longest : 0;
}

/** Pieces joined across shared cuts while they stay convex, longest cut first. */
function joined(parts: readonly (readonly number[])[], corners: Ring): (readonly number[])[] {
  const pieces: (readonly number[] | null)[] = [...parts];
  const cuts: { a: number; b: number; length: number }[] = [];
  const n = corners.length;
  for (const part of parts)
    part.forEach((a, i) => {
      const b = part[(i + 1) % part.length] as number;
      if (a < b && b !== a + 1 && !(a === 0 && b === n - 1))
        cuts.push({ a, b, length: square(corners[a] as Point, corners[b] as Point) });
    });
  cuts.sort((p, q) => q.length - p.length || p.a - q.a || p.b - q.b);
  for (const { a, b } of cuts) {
    const i = pieces.findIndex((p) => p !== null && hasEdge(p, a, b));
    const j = pieces.findIndex((p) => p !== null && hasEdge(p, b, a));
    if (i < 0 || j < 0 || i === j) continue;
    const whole = [...fromEdge(pieces[i] as number[], a, b), ...fromEdge(pieces[j] as number[], b, a).slice(1, -1)];
    if (!isConvex(whole.map((k) => corners[k] as Point))) continue;
    pieces[i] = whole;
    pieces[j] = null;
  }
  return pieces.filter((p) => p !== null);
}

const hasEdge = (piece: readonly number[], a: number, b: number): boolean => {
  const i = piece.indexOf(a);
  return i >= 0 && piece[(i + 1) % piece.length] === b;
};

/** The piece's corners from b round to a, the edge a → b being the one left out. */
const fromEdge = (piece: readonly number[], a: number, b: number): number[] => {
  const i = piece.indexOf(b);
  const run = [...piece.slice(i), ...piece.slice(0, i)];
  if (run[run.length - 1] !== a) throw new Error('the pieces of an outline lost an edge');
  return run;
};

const turn = (a: Point, b: Point, c: Point): number => (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);
const square = (a: Point, b: Point): number => {
  const [x, y] = [b[0] - a[0], b[1] - a[1]];
  return x * x + y * y;
};
