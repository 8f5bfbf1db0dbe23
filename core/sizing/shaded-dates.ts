import type { Model, WindowForm } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import { DEFAULT_YEAR, type Scheme } from '../scheme/schema.ts';
import { sunVector } from '../shade/sun-vector.ts';
import { sunlitFraction, windowShade } from '../shade/sunlit-fraction.ts';
import { daySamples } from '../sun/civil.ts';
import { sunTable } from '../sun/sun-table.ts';
import { DEG, wrap180 } from '../units/angle.ts';

/** A day of the year when the sun stands squarely in front of a window: how high, and how much of the glass it then reaches. */
export type SquareSun = {
  readonly date: string;
  /** Null: on this day the sun does not stand squarely in front of it above the horizon. */
  readonly altitude_deg: number | null;
  readonly sunlit: number;
};

/** A stretch of the year, first and last day, both counted. It may run over the new year. */
export type Stretch = { readonly from: string; readonly to: string };

/** Minutes between the samples in which the squarest sun of a day is looked for. */
const STEP_MIN = 5;

/**
 * Day by day through the scheme's year: how much of the glass is in direct sun when the sun's azimuth comes nearest to the
 * window's bearing. For a window that faces the equator that is solar noon, for one that faces west a time in the afternoon.
 * @param window  with the devices that are to be judged
 */
export function squareSuns(scheme: Scheme, model: Model, window: WindowForm): readonly SquareSun[] {
  const year = scheme.year ?? DEFAULT_YEAR;
  const observer = {
    latitude_deg: scheme.site.latitude,
    longitude_deg: scheme.site.longitude,
    elevation_m: scheme.site.elevation,
  };
  const shade = windowShade(window, solidsAt(model.solids, 'after'), model.trees);
  const suns: SquareSun[] = [];
  const days = new Date(Date.UTC(year, 1, 29)).getUTCMonth() === 1 ? 366 : 365;
  for (let d = 0; d < days; d++) {
    const date = new Date(Date.UTC(year, 0, 1 + d)).toISOString().slice(0, 10);
    const table = sunTable(daySamples(date, scheme.site.zone, STEP_MIN).instant_ms, observer);
    let best = -1;
    let nearest = 5;
    for (let i = 0; i < table.azimuth_rad.length; i++) {
      const off = Math.abs(wrap180(table.azimuth_rad[i]! / DEG - window.bearing_deg));
      if (table.altitude_rad[i]! > 0 && off < nearest) {
        nearest = off;
        best = i;
      }
    }
    if (best < 0) suns.push({ date, altitude_deg: null, sunlit: 0 });
    else {
      const sun = sunVector(table.azimuth_rad[best]!, table.altitude_rad[best]!, model.north_rad);
      const sunlit = sunlitFraction(shade, sun, Number(date.slice(5, 7)));
      suns.push({ date, altitude_deg: table.altitude_rad[best]! / DEG, sunlit });
    }
  }
  return suns;
}

/**
 * The longest stretch of the year in which the glass is wholly out of the sun when it stands squarely in front.
 * @returns  null when there is no such day, or when it is so all year
 */
export function longestShaded(suns: readonly SquareSun[]): Stretch | null {
  const dark = suns.map((s) => s.altitude_deg !== null && s.sunlit <= 1e-9);
  const n = dark.length;
  if (n === 0 || dark.every(Boolean) || !dark.some(Boolean)) return null;
  let best = { at: 0, run: 0 };
  for (let start = 0; start < n; start++) {
    if (!dark[start] || dark[(start + n - 1) % n]) continue;
    let run = 0;
    while (dark[(start + run) % n]) run++;
    if (run > best.run) best = { at: start, run };
  }
  const dateAt = (i: number): string => (suns[i % n] as SquareSun).date;
  return { from: dateAt(best.at), to: dateAt(best.at + best.run - 1) };
}
