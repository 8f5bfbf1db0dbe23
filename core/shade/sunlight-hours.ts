import { sunOnReceptors } from './exposure.ts';
import { columnsFor, type Light, type LightColumns, sortLight } from './exposure-light.ts';
import type { Receptors } from './skyline-groups.ts';
import type { Occluders } from './skyline-occluders.ts';

/** Probable sunlight of places over a year, as shares of what an open place has in the whole year. */
export type ProbableSunlight = {
  readonly annual: Float64Array;
  /** Of the winter half (see `inWinterHalf`); also over the open place's whole year. */
  readonly winter: Float64Array;
  /** Hours of the open place over the year, weighted as the light is [h]. */
  readonly openHours: number;
};

/**
 * Whether a civil date lies in the winter half: 21 September to 21 March north of the equator, 21 March to 21 September
 * south of it, both ends included.
 * @param date YYYY-MM-DD
 */
export function inWinterHalf(date: string, southern = false): boolean {
  const monthDay = date.slice(5);
  return southern ? monthDay >= '03-21' && monthDay <= '09-21' : monthDay <= '03-21' || monthDay >= '09-21';
}

/** A year of light in its two halves, sorted once for any number of receptors. */
export type HalfYears = {
  readonly winter: LightColumns;
  readonly summer: LightColumns;
  /** Minutes of an open place over the year, as weighted. */
  readonly open_min: number;
};

/** @param year a year of light, in rows @param winter 1 for each row of the winter half */
export function halfYears(year: Light, winter: Uint8Array): HalfYears {
  const half = (which: number): LightColumns => {
    const light = rowsWhere(year, (row) => winter[row] === which);
    return sortLight(light, columnsFor(light.sx.length));
  };
  return { winter: half(1), summer: half(0), open_min: year.minutes.reduce((sum, m) => sum + m, 0) };
}

/**
 * Annual and winter probable sunlight hours. Sunshine is as probable as the light's minutes say: weighted with long-run
 * sunshine records, these are the hours of the guidance; unweighted, every hour of sun above the horizon counts alike.
 * @see P. Littlefair, S. King, G. Howlett, C. Ticleanu, A. Longfield, Site layout planning for daylight and sunlight (BR 209, 2022)
 */
export function probableSunlight(o: Occluders, year: HalfYears, r: Receptors): ProbableSunlight {
  const summer = sunOnReceptors(o, year.summer, r).minutes;
  const winter = sunOnReceptors(o, year.winter, r).minutes;
  const share = (minutes: number): number => (year.open_min > 0 ? minutes / year.open_min : 0);
  return {
    annual: summer.map((m, i) => share(m + winter[i]!)),
    winter: winter.map(share),
    openHours: year.open_min / 60,
  };
}

/** The rows of a light that a test picks, in their order. */
export function rowsWhere(light: Light, keep: (row: number) => boolean): Light {
  const rows: number[] = [];
  for (let i = 0; i < light.sx.length; i++) if (keep(i)) rows.push(i);
  const pick = (column: Float64Array): Float64Array => Float64Array.from(rows, (i) => column[i]!);
  return {
    sx: pick(light.sx),
    sy: pick(light.sy),
    sz: pick(light.sz),
    minutes: pick(light.minutes),
    beam: pick(light.beam),
    ...(light.month === undefined ? {} : { month: Uint8Array.from(rows, (i) => light.month?.[i] ?? 0) }),
  };
}

/** The light with each row's minutes weighted, as by the long-run share of possible sunshine of its month, 0..1. */
export const weighted = (light: Light, weight: (row: number) => number): Light => ({
  ...light,
  minutes: light.minutes.map((m, i) => m * weight(i)),
});

/**
 * Share of an amenity area that has at least so many hours of sun. Cells under a building that stands are not ground and
 * count neither way; an area wholly built over has share 0.
 * @param minutes  sun time of each cell of the area's grid, all of equal size
 * @param covered  1 for a cell inside a solid
 */
export function sunlitShare(minutes: Float64Array, covered: Uint8Array, hours: number): number {
  let open = 0;
  let lit = 0;
  for (let i = 0; i < minutes.length; i++) {
    if (covered[i] === 1) continue;
    open++;
    if (minutes[i]! >= hours * 60 - 1e-9) lit++;
  }
  return open > 0 ? lit / open : 0;
}

/** Levels of exposure to sunlight. */
export type SunlightLevel = 'none' | 'minimum' | 'medium' | 'high';

/**
 * The level that a sun time on one chosen date between 1 February and 21 March reaches: 1.5, 3 and 4 h. The sun counts above
 * the lowest altitude that the country sets, and the point is the one in the plane of the window's inner face; both are the
 * caller's.
 * @see EN 17037:2018, table A.6 (1.5 h seen in published summaries; 3 and 4 h from memory of the standard)
 */
export function sunlightLevel(minutes: number): SunlightLevel {
  const reached = (hours: number): boolean => minutes >= hours * 60 - 1e-9;
  return reached(4) ? 'high' : reached(3) ? 'medium' : reached(1.5) ? 'minimum' : 'none';
}

/** After as a share of before; 1 where there was nothing to lose. */
export const keptShare = (before: number, after: number): number => (before > 0 ? after / before : 1);
