import { columnOf } from './skyline-columns.ts';

/**
 * Where light comes from and how much of it: sun samples as unit vectors in drawing axes. One row a sample; only samples
 * that count (above the horizon or the scheme's low sun) belong here.
 */
export type Light = {
  readonly sx: Float64Array;
  readonly sy: Float64Array;
  readonly sz: Float64Array;
  /** What a sample adds to the sun time [min]. */
  readonly minutes: Float64Array;
  /** What a sample adds on a plane square to it [Wh/m²]. */
  readonly beam: Float64Array;
  /** Civil month of each sample, 1..12, for what comes through trees; absent, or 0: the mean of the year. */
  readonly month?: Uint8Array;
};

/** Light sorted into azimuth columns, within a column by altitude. */
export type LightColumns = Light & {
  readonly count: number;
  /** Column c holds the samples `start[c]` to `start[c + 1]` (exclusive). */
  readonly start: Uint32Array;
  /** Tangent of the altitude, rising within a column. */
  readonly tan: Float64Array;
  /** Row of each sample in the light that it came from. */
  readonly source: Uint32Array;
  /** Civil month of each sample; 0: the mean of the year. */
  readonly month: Uint8Array;
};

/**
 * Light on one plane: the samples in front of it (`start[count]` of them; the columns may be longer), with running sums so that a run of
 * samples costs one subtraction.
 */
export type PlaneLight = {
  readonly count: number;
  readonly start: Uint32Array;
  readonly tan: Float64Array;
  readonly sx: Float64Array;
  readonly sy: Float64Array;
  readonly sz: Float64Array;
  readonly source: Uint32Array;
  readonly month: Uint8Array;
  /** `minutesBefore[i]`: minutes of the samples before i; one entry more than samples. */
  readonly minutesBefore: Float64Array;
  /** The same for the beam on the plane, cosine of incidence included [Wh/m²]. */
  readonly beamBefore: Float64Array;
  /** First sample of column c whose altitude reaches level l: entry c · (LEVELS + 1) + l. @see levelOf */
  readonly level: Uint32Array;
  /** Tangent of the lowest altitude in each column; infinite where there is no sample. */
  readonly lowest: Float64Array;
};

/** Steps of altitude that shorten the search in a column. */
export const LEVELS = 64;

/** The level of an altitude, from its tangent: t / (1 + t) grows steadily from 0 to 1. */
export const levelOf = (tan: number): number => (tan < 1e9 ? Math.floor((tan / (1 + tan)) * LEVELS) : LEVELS);

/** Number of columns that suits a number of samples: few samples want few columns. A multiple of 16. */
export function columnsFor(samples: number): number {
  return Math.min(720, Math.max(16, 16 * Math.round(samples / 480)));
}

/** Stands for the tangent at the zenith: above every altitude that can be told from it, yet finite, so that it can be passed. */
const ZENITH = 1e15;

/** Sorts light into columns. @param count number of columns, a multiple of 8 @throws {RangeError} for a sample at or below the horizon */
export function sortLight(light: Light, count: number): LightColumns {
  const n = light.sx.length;
  const column = new Uint32Array(n);
  const rise = new Float64Array(n);
  const start = new Uint32Array(count + 1);
  for (let i = 0; i < n; i++) {
    if (!(light.sz[i]! > 0)) throw new RangeError('only light from above the horizon can be sorted into columns');
    const x = light.sx[i]!;
    const y = light.sy[i]!;
    const c = x === 0 && y === 0 ? 0 : columnOf(count, x, y);
    column[i] = c;
    rise[i] = Math.min(light.sz[i]! / Math.sqrt(x * x + y * y), ZENITH);
    start[c + 1]!++;
  }
  for (let c = 0; c < count; c++) start[c + 1]! += start[c]!;
  // Into the columns in the order given, then by altitude within each; equal altitudes keep their order.
  const order = new Uint32Array(n);
  const next = start.slice();
  for (let i = 0; i < n; i++) order[next[column[i]!]!++] = i;
  for (let c = 0; c < count; c++) sortByRise(order, rise, start[c]!, start[c + 1]!);
  const by = (values: Float64Array): Float64Array => {
    const sorted = new Float64Array(n);
    for (let i = 0; i < n; i++) sorted[i] = values[order[i]!]!;
    return sorted;
  };
  return {
    count,
    start,
    source: order,
    month: Uint8Array.from(order, (row) => light.month?.[row] ?? 0),
    tan: by(rise),
    sx: by(light.sx),
    sy: by(light.sy),
    sz: by(light.sz),
    minutes: by(light.minutes),
    beam: by(light.beam),
  };
}

/** Sorts a stretch of rows by rising altitude, then by row (shell sort: columns hold tens to hundreds). */
function sortByRise(order: Uint32Array, rise: Float64Array, from: number, to: number): void {
  for (let gap = (to - from) >> 1; gap > 0; gap = gap === 2 ? 1 : Math.floor(gap / 2.2)) {
    for (let i = from + gap; i < to; i++) {
      const row = order[i]!;
      const r = rise[row]!;
      let j = i;
      while (j >= from + gap) {
        const other = order[j - gap]!;
        if (rise[other]! < r || (rise[other] === r && other < row)) break;
        order[j] = other;
        j -= gap;
      }
      order[j] = row;
    }
  }
}

/** Room for the part of a light that stands in front of any one plane. */
export function makePlaneLight(light: LightColumns): PlaneLight {
  const { count } = light;
  const all = light.sx.length;
  return {
    count,
    start: new Uint32Array(count + 1),
    tan: new Float64Array(all),
    sx: new Float64Array(all),
    sy: new Float64Array(all),
    sz: new Float64Array(all),
    source: new Uint32Array(all),
    month: new Uint8Array(all),
    minutesBefore: new Float64Array(all + 1),
    beamBefore: new Float64Array(all + 1),
    level: new Uint32Array(count * (LEVELS + 1)),
    lowest: new Float64Array(count),
  };
}

/**
 * Writes the part of the light that stands in front of a plane. A town has a plane a wall, so the room is used again.
 * @param into    room for it; rows past its last sample keep what they hold
 * @param normal  unit normal of the plane in drawing axes
 */
export function lightOnPlane(into: PlaneLight, light: LightColumns, normal: readonly [number, number, number]): void {
  const [nx, ny, nz] = normal;
  const { count } = light;
  const { start, tan, sx, sy, sz, source, month, minutesBefore, beamBefore, level, lowest } = into;
  lowest.fill(Infinity);
  let k = 0;
  for (let c = 0; c < count; c++) {
    start[c] = k;
    let filled = 0;
    const row = c * (LEVELS + 1);
    for (let i = light.start[c]!; i < light.start[c + 1]!; i++) {
      const cosine = nx * light.sx[i]! + ny * light.sy[i]! + nz * light.sz[i]!;
      if (!(cosine > 0)) continue;
      tan[k] = light.tan[i]!;
      sx[k] = light.sx[i]!;
      sy[k] = light.sy[i]!;
      sz[k] = light.sz[i]!;
      source[k] = light.source[i]!;
      month[k] = light.month[i]!;
      minutesBefore[k + 1] = minutesBefore[k]! + light.minutes[i]!;
      beamBefore[k + 1] = beamBefore[k]! + light.beam[i]! * cosine;
      const l = levelOf(tan[k]!);
      while (filled <= l) level[row + filled++] = k;
      k++;
    }
    while (filled <= LEVELS) level[row + filled++] = k;
    if (k > start[c]!) lowest[c] = tan[start[c]!]!;
  }
  start[count] = k;
}
