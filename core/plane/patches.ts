import type { Point, Ring } from './vec.ts';

/** Corners nearer to a cutting line than this lie on it [m]: far below anything drawn, far above rounding. */
const ON_LINE_m = 1e-11;

/** The most corners that an outline to cut with may have: twice what the scheme file lets an outline have. */
export const MOST_CUT_CORNERS = 4096;

/**
 * Convex patches that do not overlap, each with a weight, from which convex outlines are cut one after another: what is
 * left of a glass pane, a roof or a lawn once every shadow has been taken off it. Exact up to rounding, in any order.
 *
 * Built for loops that run hundreds of thousands of times a second: it keeps its store between runs (`clear`), takes the
 * cutting outline from `cutX` and `cutY`, and allocates nothing but when the store has to grow.
 */
export class Patches {
  /** Corners of the outline to cut with, for the caller to fill: convex, anticlockwise. */
  readonly cutX = new Float64Array(MOST_CUT_CORNERS);
  readonly cutY = new Float64Array(MOST_CUT_CORNERS);
  /** How many patches there are. */
  count = 0;

  #x = new Float64Array(512);
  #y = new Float64Array(512);
  #used = 0;
  #first = new Int32Array(64);
  #size = new Int32Array(64);
  #weight = new Float64Array(64);
  /** Four a patch: least x, least y, greatest x, greatest y. */
  #box = new Float64Array(4 * 64);
  /** Five an edge of the outline to cut with: start x, y, run x, y, and how near counts as on it. */
  #edge = new Float64Array(5 * MOST_CUT_CORNERS);
  /** Corners of the part inside, of the patch last split. */
  #inner = 0;
  /** Signed distances of the corners of one patch from one cutting line, times the line's length. */
  #side = new Float64Array(256);

  /** Nothing left, everything to be used again. */
  clear(): void {
    this.count = 0;
    this.#used = 0;
  }

  /** One patch of weight 1: the rectangle from (x0, y0) to (x1, y1), x0 < x1, y0 < y1. */
  addRectangle(x0: number, y0: number, x1: number, y1: number): void {
    const k = this.#used;
    this.#reserve(4);
    const x = this.#x;
    const y = this.#y;
    x[k] = x0;
    y[k] = y0;
    x[k + 1] = x1;
    y[k + 1] = y0;
    x[k + 2] = x1;
    y[k + 2] = y1;
    x[k + 3] = x0;
    y[k + 3] = y1;
    this.#used = k + 4;
    this.#add(k, 4, 1);
  }

  /** One patch of weight 1: a convex ring. */
  addRing(ring: Ring): void {
    const k = this.#used;
    this.#reserve(ring.length);
    ring.forEach((p, i) => {
      this.#x[k + i] = p[0];
      this.#y[k + i] = p[1];
    });
    this.#used = k + ring.length;
    this.#add(k, ring.length, 1);
  }

  /**
   * Cut with the first `corners` of `cutX`, `cutY`: what lies inside has its weight multiplied by `factor`. Factor 0 drops
   * it, unless `keep` is set; kept patches of weight 0 are not cut again.
   */
  cut(corners: number, factor: number, keep = false): void {
    const cutX = this.cutX;
    const cutY = this.cutY;
    let x0 = Infinity;
    let y0 = Infinity;
    let x1 = -Infinity;
    let y1 = -Infinity;
    for (let k = 0; k < corners; k++) {
      const x = cutX[k]!;
      const y = cutY[k]!;
      if (x < x0) x0 = x;
      if (x > x1) x1 = x;
      if (y < y0) y0 = y;
      if (y > y1) y1 = y;
    }
    let edges = -1;
    // Downwards, so that the patches that a cut adds at the end are not met again.
    for (let i = this.count - 1; i >= 0; i--) {
      const box = this.#box;
      const k = 4 * i;
      if (box[k + 1]! >= y1 || box[k + 3]! <= y0 || box[k]! >= x1 || box[k + 2]! <= x0) continue;
      if (!(this.#weight[i]! > 0)) continue;
      if (edges < 0) edges = this.#readEdges(corners, (x1 - x0 + y1 - y0) / 2);
      if (edges < 3) return;
      this.#cutOne(i, edges, factor, keep);
    }
  }

  /**
   * The edges of the outline to cut with, the long ones first: a row of blades then splits a pane into plain strips, and
   * the splinters at their ends stay short.
   * @returns how many
   */
  #readEdges(corners: number, long_m: number): number {
    const { cutX, cutY } = this;
    const edge = this.#edge;
    let n = 0;
    for (let round = 0; round < 2; round++) {
      let ax = cutX[corners - 1]!;
      let ay = cutY[corners - 1]!;
      for (let k = 0; k < corners; k++) {
        const bx = cutX[k]!;
        const by = cutY[k]!;
        const ex = bx - ax;
        const ey = by - ay;
        const run = Math.abs(ex) + Math.abs(ey);
        if (run >= long_m === (round === 0) && run > 0) {
          edge[n] = ax;
          edge[n + 1] = ay;
          edge[n + 2] = ex;
          edge[n + 3] = ey;
          edge[n + 4] = ON_LINE_m * run;
          n += 5;
        }
        ax = bx;
        ay = by;
      }
    }
    return n / 5;
  }

  /** Sum of area times weight [m²]. */
  area(): number {
    let sum = 0;
    for (let i = 0; i < this.count; i++) {
      const w = this.#weight[i]!;
      if (w > 0) sum += w * this.areaOf(i);
    }
    return sum;
  }

  /** Area of patch i, whatever its weight [m²]. */
  areaOf(i: number): number {
    const x = this.#x;
    const y = this.#y;
    const first = this.#first[i]!;
    const end = first + this.#size[i]!;
    // From the first corner, so that patches far from the origin lose no digits.
    const x0 = x[first]!;
    const y0 = y[first]!;
    let twice = 0;
    for (let k = first + 2; k < end; k++) twice += (x[k - 1]! - x0) * (y[k]! - y0) - (x[k]! - x0) * (y[k - 1]! - y0);
    return twice / 2;
  }

  /** Weight of patch i, 0..1. */
  weightOf(i: number): number {
    return this.#weight[i]!;
  }

  /** Corners of patch i, anticlockwise. Allocates. */
  ringOf(i: number): Ring {
    const first = this.#first[i]!;
    return Array.from({ length: this.#size[i]! }, (_, k): Point => [this.#x[first + k]!, this.#y[first + k]!]);
  }

  /**
   * Patch i against one outline. Each edge of the outline splits off what lies outside it as a patch of its own; what is
   * left after the last edge lies inside. A patch that turns out to lie wholly outside one edge is put back as it was, so
   * that an outline that misses it leaves it in one piece.
   */
  #cutOne(i: number, edges: number, factor: number, keep: boolean): void {
    const edge = this.#edge;
    const count = this.count;
    const used = this.#used;
    const weight = this.#weight[i]!;
    let first = this.#first[i]!;
    let size = this.#size[i]!;
    const x0 = this.#box[4 * i]!;
    const y0 = this.#box[4 * i + 1]!;
    const x1 = this.#box[4 * i + 2]!;
    const y1 = this.#box[4 * i + 3]!;
    for (let e = 0; e < 5 * edges; e += 5) {
      const ax = edge[e]!;
      const ay = edge[e + 1]!;
      const ex = edge[e + 2]!;
      const ey = edge[e + 3]!;
      const near = edge[e + 4]!;
      // The corner of the patch's box that lies furthest out: where even that is inside, so is the patch.
      if (ex * ((ex > 0 ? y0 : y1) - ay) - ey * ((ey > 0 ? x1 : x0) - ax) >= -near) continue;
      const x = this.#x;
      const y = this.#y;
      const side = this.#side;
      let inside = false;
      let outside = false;
      for (let k = 0; k < size; k++) {
        const d = ex * (y[first + k]! - ay) - ey * (x[first + k]! - ax);
        side[k] = d;
        if (d > near) inside = true;
        else if (d < -near) outside = true;
      }
      if (!outside) continue;
      if (!inside) {
        this.count = count;
        this.#used = used;
        return;
      }
      this.#reserve(2 * size + 4);
      const split = this.#split(first, size, near);
      this.#add(this.#used, split, weight);
      first = this.#used + size + 2;
      size = this.#inner;
      this.#used = first + size;
    }
    this.#settle(i, first, size, weight * factor, keep);
  }

  /**
   * Write both parts of a patch that the line crosses from which `#side` was measured: the part outside (right of it) from the
   * end of what is used on, the part inside (left of it) from `size + 2` places further on. Corners on the line go to both.
   * @returns how many corners the part outside has; `#inner` says how many the part inside has
   */
  #split(first: number, size: number, near: number): number {
    const x = this.#x;
    const y = this.#y;
    const side = this.#side;
    const outStart = this.#used;
    const inStart = outStart + size + 2;
    let out = outStart;
    let inn = inStart;
    let px = x[first + size - 1]!;
    let py = y[first + size - 1]!;
    let before = side[size - 1]!;
    for (let k = 0; k < size; k++) {
      const here = side[k]!;
      const cx = x[first + k]!;
      const cy = y[first + k]!;
      if (here > near) {
        if (before < -near) {
          // Always from the inner corner to the outer one, whichever way round.
          const t = here / (here - before);
          const qx = cx + t * (px - cx);
          const qy = cy + t * (py - cy);
          x[out] = qx;
          y[out++] = qy;
          x[inn] = qx;
          y[inn++] = qy;
        }
        x[inn] = cx;
        y[inn++] = cy;
      } else if (here < -near) {
        if (before > near) {
          const t = before / (before - here);
          const qx = px + t * (cx - px);
          const qy = py + t * (cy - py);
          x[out] = qx;
          y[out++] = qy;
          x[inn] = qx;
          y[inn++] = qy;
        }
        x[out] = cx;
        y[out++] = cy;
      } else {
        x[out] = cx;
        y[out++] = cy;
        x[inn] = cx;
        y[inn++] = cy;
      }
      px = cx;
      py = cy;
      before = here;
    }
    this.#inner = inn - inStart;
    return out - outStart;
  }

  /** Patch i becomes what the cut left of it, or goes; the last patch then takes its place. */
  #settle(i: number, first: number, size: number, weight: number, keep: boolean): void {
    if (weight > 0 || keep) {
      this.#put(i, first, size, weight);
      return;
    }
    const last = --this.count;
    this.#first[i] = this.#first[last]!;
    this.#size[i] = this.#size[last]!;
    this.#weight[i] = this.#weight[last]!;
    for (let k = 0; k < 4; k++) this.#box[4 * i + k] = this.#box[4 * last + k]!;
  }

  #add(first: number, size: number, weight: number): void {
    if (this.count === this.#first.length) {
      this.#first = grown(this.#first, new Int32Array(2 * this.count));
      this.#size = grown(this.#size, new Int32Array(2 * this.count));
      this.#weight = grown(this.#weight, new Float64Array(2 * this.count));
      this.#box = grown(this.#box, new Float64Array(8 * this.count));
    }
    this.#put(this.count++, first, size, weight);
  }

  #put(i: number, first: number, size: number, weight: number): void {
    this.#first[i] = first;
    this.#size[i] = size;
    this.#weight[i] = weight;
    const x = this.#x;
    const y = this.#y;
    let x0 = x[first]!;
    let y0 = y[first]!;
    let x1 = x0;
    let y1 = y0;
    for (let k = first + 1; k < first + size; k++) {
      if (x[k]! < x0) x0 = x[k]!;
      else if (x[k]! > x1) x1 = x[k]!;
      if (y[k]! < y0) y0 = y[k]!;
      else if (y[k]! > y1) y1 = y[k]!;
    }
    const box = this.#box;
    box[4 * i] = x0;
    box[4 * i + 1] = y0;
    box[4 * i + 2] = x1;
    box[4 * i + 3] = y1;
  }

  /** Room for so many more corners. */
  #reserve(corners: number): void {
    const needed = this.#used + corners;
    if (needed > this.#x.length) {
      this.#x = grown(this.#x, new Float64Array(2 * needed));
      this.#y = grown(this.#y, new Float64Array(2 * needed));
    }
    if (corners > this.#side.length) this.#side = grown(this.#side, new Float64Array(2 * corners));
  }
}

function grown<T extends Int32Array | Float64Array>(from: T, into: T): T {
  into.set(from);
  return into;
}
