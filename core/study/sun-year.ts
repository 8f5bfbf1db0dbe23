import type { Model, WindowForm } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import type { Scheme } from '../scheme/schema.ts';
import { sunVector } from '../shade/sun-vector.ts';
import { sunlitFraction, windowShade } from '../shade/sunlit-fraction.ts';
import { daySamples } from '../sun/civil.ts';
import { sunTable } from '../sun/sun-table.ts';
import { DEG } from '../units/angle.ts';
import type { Pulse } from './job.ts';

/** Cells in which there is no share to state. */
export const SUN_DOWN = -1;
/** The clock shows no such time on that date: it was put forward. */
export const NO_SUCH_TIME = -2;

/** Direct sun on some windows through a year: one column a civil date, one row a step of the civil clock. */
export type SunYear = {
  readonly year: number;
  readonly zone: string;
  readonly step_min: number;
  /** Civil dates, YYYY-MM-DD. */
  readonly dates: readonly string[];
  /** Rows a column: 24 h over the step. */
  readonly rows: number;
  /**
   * Share of the windows' glass area in direct sun, 0..1, at the middle of each step, column after column; SUN_DOWN or
   * NO_SUCH_TIME where there is none. Where the clock is put back, the first of the two times counts.
   */
  readonly share: Float32Array;
  /** Minutes of the clock at which the sun rises and sets each date, to the step; NaN when it does not. */
  readonly sunrise_min: Float32Array;
  readonly sunset_min: Float32Array;
  /** UTC offset of each date at noon [min], in which clock changes show. */
  readonly offset_min: Float32Array;
};

type Prepared = { readonly form: WindowForm; readonly shade: ReturnType<typeof windowShade> };

const datesOf = (year: number): readonly string[] => {
  const dates: string[] = [];
  for (let t = Date.UTC(year, 0, 1); t < Date.UTC(year + 1, 0, 1); t += 86_400_000) {
    dates.push(new Date(t).toISOString().slice(0, 10));
  }
  return dates;
};

/** Share of the prepared windows' glass that a sun direction reaches, weighted by glass area. @returns 0..1 */
function shareInSun(windows: readonly Prepared[], sun: readonly [number, number, number], month: number): number {
  let lit = 0;
  let all = 0;
  for (const { form, shade } of windows) {
    all += form.glass_m2;
    lit += form.glass_m2 * sunlitFraction(shade, sun, month);
  }
  return all > 0 ? Math.min(1, lit / all) : 0;
}

/**
 * The year of direct sun on some windows of a scheme as proposed.
 * @param windows   ids of windows; ids that the model does not know are left out
 * @param step_min  step of the clock [min], a divisor of 1440
 * @param pulse     asked every few dates
 * @returns null when told to stop
 */
export async function sunYear(
  scheme: Scheme,
  model: Model,
  windows: readonly string[],
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
  const solids = solidsAt(model.solids, 'after');
  const wanted = new Set(windows);
  const prepared = model.windows
    .filter((form) => wanted.has(form.id))
    .map((form): Prepared => ({ form, shade: windowShade(form, solids, model.trees) }));
  const dates = datesOf(year);
  const rows = Math.round(1440 / step_min);
  const share = new Float32Array(dates.length * rows).fill(NO_SUCH_TIME);
  const sunrise_min = new Float32Array(dates.length).fill(NaN);
  const sunset_min = new Float32Array(dates.length).fill(NaN);
  const offset_min = new Float32Array(dates.length);

  for (let d = 0; d < dates.length; d++) {
    if (d % 8 === 0 && (await pulse(d, dates.length)) === 'stop') return null;
    const date = dates[d] as string;
    const month = Number(date.slice(5, 7)) - 1;
    const { instant_ms, clock_min } = daySamples(date, site.zone, step_min);
    const sun = sunTable(instant_ms, observer);
    offset_min[d] = offsetAtNoon(date, instant_ms, clock_min);
    for (let i = 0; i < instant_ms.length; i++) {
      const row = Math.floor(clock_min[i]! / step_min);
      const cell = d * rows + row;
      const altitude_rad = sun.altitude_rad[i]!;
      if (altitude_rad > 0) {
        if (Number.isNaN(sunrise_min[d]!)) sunrise_min[d] = row * step_min;
        sunset_min[d] = (row + 1) * step_min;
      }
      if (share[cell] !== NO_SUCH_TIME) continue;
      if (altitude_rad <= 0) share[cell] = SUN_DOWN;
      else if (altitude_rad <= lowSun_rad) share[cell] = 0;
      else share[cell] = shareInSun(prepared, sunVector(sun.azimuth_rad[i]!, altitude_rad, model.north_rad), month);
    }
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
