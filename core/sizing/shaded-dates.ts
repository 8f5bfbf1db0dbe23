import type { Model, WindowForm } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import { DEFAULT_YEAR, type Scheme } from '../scheme/schema.ts';
import { sunVector } from '../shade/sun-vector.ts';
import { sunlitFraction, windowShade } from '../shade/sunlit-fraction.ts';
import { daySamples } from '../sun/civil.ts';
import { sunTable } from '../sun/sun-table.ts';
import { DEG, wrap180 } from '../units/angle.ts';

/** The sun of one day when it stands most squarely in front of a bearing. */
export type SquareSun = {
  readonly date: string;
  /** Time of the site's clock then, HH:MM, to five minutes; empty where it does not stand so. */
  readonly time: string;
  /** True altitude; null: on this day the sun does not stand squarely in front above the horizon. */
  readonly altitude_deg: number | null;
  readonly azimuth_deg: number;
};

/** A stretch of the year, first and last day, both counted, each with the hour that is meant. It may run over the new year. */
export type Stretch = {
  readonly from: string;
  readonly to: string;
  /** Times of the site's clock, HH:MM, at which the sun stands squarely in front on those days. */
  readonly fromTime: string;
  readonly toTime: string;
};

/** Minutes between the samples in which the squarest sun of a day is looked for. */
const STEP_MIN = 5;
/** A sun further off the bearing than this does not stand squarely in front [°]. */
const SQUARE_deg = 5;

const clockText = (minutes: number): string =>
  `${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(Math.floor(minutes % 60)).padStart(2, '0')}`;

/**
 * Day by day through the scheme's year: where the sun stands when its azimuth comes nearest to a bearing. Before glass that
 * faces the equator that is solar noon, before glass that faces west a time in the afternoon.
 */
export function squareSuns(scheme: Scheme, bearing_deg: number): readonly SquareSun[] {
  const year = scheme.year ?? DEFAULT_YEAR;
  const { latitude: latitude_deg, longitude: longitude_deg, elevation: elevation_m, zone } = scheme.site;
  const suns: SquareSun[] = [];
  const days = new Date(Date.UTC(year, 1, 29)).getUTCMonth() === 1 ? 366 : 365;
  for (let d = 0; d < days; d++) {
    const date = new Date(Date.UTC(year, 0, 1 + d)).toISOString().slice(0, 10);
    const { instant_ms, clock_min } = daySamples(date, zone, STEP_MIN);
    const table = sunTable(instant_ms, { latitude_deg, longitude_deg, elevation_m });
    let best = -1;
    let nearest = SQUARE_deg;
    for (let i = 0; i < instant_ms.length; i++) {
      const off = Math.abs(wrap180(table.azimuth_rad[i]! / DEG - bearing_deg));
      if (table.altitude_rad[i]! > 0 && off < nearest) {
        nearest = off;
        best = i;
      }
    }
    suns.push(
      best < 0
        ? { date, time: '', altitude_deg: null, azimuth_deg: bearing_deg }
        : {
            date,
            time: clockText(clock_min[best]!),
            altitude_deg: table.altitude_rad[best]! / DEG,
            azimuth_deg: table.azimuth_rad[best]! / DEG,
          },
    );
  }
  return suns;
}

/**
 * The longest stretch of the year in which a window's glass is wholly out of the sun whenever it stands squarely in front.
 * @param suns    from `squareSuns` for the window's bearing
 * @param window  with the devices that are to be judged
 * @returns       null when there is no such day, or when it is so all year
 */
export function keptOff(suns: readonly SquareSun[], model: Model, window: WindowForm): Stretch | null {
  const shade = windowShade(window, solidsAt(model.solids, 'after'), model.trees);
  const dark = suns.map((s) => {
    if (s.altitude_deg === null) return false;
    const sun = sunVector(s.azimuth_deg * DEG, s.altitude_deg * DEG, model.north_rad);
    return sunlitFraction(shade, sun, Number(s.date.slice(5, 7))) <= 1e-9;
  });
  const n = dark.length;
  if (n === 0 || dark.every(Boolean)) return null;
  let best = { at: 0, run: 0 };
  for (let start = 0; start < n; start++) {
    if (!dark[start] || dark[(start + n - 1) % n]) continue;
    let run = 0;
    while (dark[(start + run) % n]) run++;
    if (run > best.run) best = { at: start, run };
  }
  if (best.run === 0) return null;
  const [first, last] = [suns[best.at] as SquareSun, suns[(best.at + best.run - 1) % n] as SquareSun];
  return { from: first.date, to: last.date, fromTime: first.time, toTime: last.time };
}
