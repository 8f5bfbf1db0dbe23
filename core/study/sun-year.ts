import type { Model, Stage } from '../form/model.ts';
import type { Vec3 } from '../plane/vec.ts';
import type { Scheme } from '../scheme/schema.ts';
import { sunVector } from '../shade/sun-vector.ts';
import { daySamples } from '../sun/civil.ts';
import { sunTable } from '../sun/sun-table.ts';
import { DEG } from '../units/angle.ts';
import type { Pulse } from './job.ts';
import { shareInSun, type YearSubject } from './year-subject.ts';

/** Cells in which there is no share to state. */
export const SUN_DOWN = -1;
/** The clock shows no such time on that date: it was put forward. */
export const NO_SUCH_TIME = -2;

/** Direct sun on something through a year: one column a civil date, one row a step of the civil clock. */
export type SunYear = {
  readonly year: number;
  readonly zone: string;
  readonly step_min: number;
  /** Civil dates, YYYY-MM-DD. */
  readonly dates: readonly string[];
  /** Rows a column: 24 h over the step. */
  readonly rows: number;
  /**
   * Share in direct sun, 0..1 (see `year-subject.ts`), at the middle of each step, column after column; SUN_DOWN or
   * NO_SUCH_TIME where there is none. Where the clock is put back, the first of the two times counts.
   */
  readonly share: Float32Array;
  /** Minutes of the clock at which the sun rises and sets each date, to the step; NaN when it does not. */
  readonly sunrise_min: Float32Array;
  readonly sunset_min: Float32Array;
  /** UTC offset of each date at noon [min], in which clock changes show. */
  readonly offset_min: Float32Array;
};

const datesOf = (year: number): readonly string[] => {
  const dates: string[] = [];
  for (let t = Date.UTC(year, 0, 1); t < Date.UTC(year + 1, 0, 1); t += 86_400_000) {
    dates.push(new Date(t).toISOString().slice(0, 10));
  }
  return dates;
};

/**
 * The year of direct sun on something of a scheme.
 * @param subject   what is asked of the model does not hold is never in sun
 * @param stage     what stands while receptors and faces of blocks are asked; windows are those of the proposal
 * @param step_min  step of the clock [min], a divisor of 1440
 * @param pulse     asked every few dates
 * @returns null when told to stop
 */
export async function sunYear(
  scheme: Scheme,
  model: Model,
  subject: YearSubject,
  stage: Stage,
  year: number,
  step_min: number,
  pulse: Pulse,
): Promise<SunYear | null> {
  const { site } = scheme;
  const observer = {
    latitude_deg: site.latitude,
    longitude_deg: site.longitude,
    elevation_m: site.elevation,
  };
  const lowSun_rad = (site.lowSun ?? 0) * DEG;
  const shareOf = shareInSun(model, subject, stage);
  const dates = datesOf(year);
  const rows = Math.round(1440 / step_min);
  const share = new Float32Array(dates.length * rows).fill(NO_SUCH_TIME);
  const sunrise_min = new Float32Array(dates.length).fill(NaN);
  const sunset_min = new Float32Array(dates.length).fill(NaN);
  const offset_min = new Float32Array(dates.length);

  for (let d = 0; d < dates.length; d++) {
    if (d % 8 === 0 && (await pulse(d, dates.length)) === 'stop') return null;
    const date = dates[d] as string;
    const { instant_ms, clock_min } = daySamples(date, site.zone, step_min);
    const sun = sunTable(instant_ms, observer);
    offset_min[d] = offsetAtNoon(date, instant_ms, clock_min);
    const cells: number[] = [];
    const suns: Vec3[] = [];
    for (let i = 0; i < instant_ms.length; i++) {
      const row = Math.floor(clock_min[i]! / step_min);
      const cell = d * rows + row;
      const altitude_rad = sun.altitude_rad[i]!;
      if (altitude_rad > 0) {
        if (Number.isNaN(sunrise_min[d]!)) sunrise_min[d] = row * step_min;
        sunset_min[d] = (row + 1) * step_min;
      }
      if (share[cell] !== NO_SUCH_TIME) continue;
      share[cell] = altitude_rad <= 0 ? SUN_DOWN : 0;
      if (altitude_rad <= Math.max(0, lowSun_rad)) continue;
      cells.push(cell);
      suns.push(sunVector(sun.azimuth_rad[i]!, altitude_rad, model.north_rad));
    }
    const lit = shareOf(suns, Number(date.slice(5, 7)));
    cells.forEach((cell, i) => {
      share[cell] = lit[i]!;
    });
  }
  return { year, zone: site.zone, step_min, dates, rows, share, sunrise_min, sunset_min, offset_min };
}

/** The clock's lead over UTC at the sample nearest noon [min]. */
function offsetAtNoon(date: string, instant_ms: Float64Array, clock_min: Float64Array): number {
  let best = 0;
  for (let i = 1; i < clock_min.length; i++) {
    if (Math.abs(clock_min[i]! - 720) < Math.abs(clock_min[best]! - 720)) best = i;
  }
  return Math.round((Date.parse(`${date}T00:00:00Z`) + clock_min[best]! * 60_000 - instant_ms[best]!) / 60_000);
}
