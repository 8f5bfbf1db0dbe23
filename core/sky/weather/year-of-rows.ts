import type { Checked } from '../../scheme/fault.ts';
import { checkTimes, usualStep_min } from './check-times.ts';
import { checkValues } from './check-values.ts';
import type { FaultList } from './fault-list.ts';
import { fillGaps } from './fill-gaps.ts';
import type { RowPlan } from './plan.ts';
import type { Raw } from './row-scan.ts';
import type { Quantity, WeatherYear } from './weather-year.ts';

/**
 * The year that the rows of a file come to, checked: times, whole year, units, gaps.
 * @param faults of its cells, which come first
 */
export function yearOfRows(plan: RowPlan, raw: Raw, faults: FaultList): Checked<WeatherYear> {
  if (faults.failed) return { ok: false, faults: faults.all() };
  const step_min = usualStep_min(raw.label_ms);
  if (step_min === null) {
    const message = 'the rows do not follow each other in even steps of 1 to 60 minutes';
    faults.add('error', 'step', '', message, 'give hourly or sub-hourly rows in order');
    return { ok: false, faults: faults.all() };
  }
  const dates = datesOf(plan, raw.label_ms, step_min);
  checkTimes({ ...raw, ...dates, step_min }, faults);
  if (faults.failed) return { ok: false, faults: faults.all() };
  const none = { global_Wm2: null, beamNormal_Wm2: null, diffuse_Wm2: null, tAir_C: null, dewPoint_C: null };
  const columns: { [Q in Quantity]: Float64Array | null } = {
    ...none,
    relativeHumidity_pct: null,
    pressure_hPa: null,
    windSpeed_ms: null,
    groundReflectance: null,
  };
  plan.columns.forEach(({ quantity, index, conversion }, k) => {
    const column = raw.values[k] as Float64Array;
    const factor = conversion.factor(step_min);
    for (let i = 0; i < column.length; i++) column[i] = (column[i]! + conversion.shift) * factor;
    const head = plan.heads[index] ?? quantity;
    const usable =
      checkValues(quantity, column, head, raw.line, faults) && fillGaps(quantity, column, head, raw.line, faults);
    columns[quantity] = usable ? column : null;
  });
  if (faults.failed) return { ok: false, faults: faults.all() };
  return { ok: true, value: { ...intervals(plan, raw, step_min), ...dates, columns }, notes: faults.all() };
}

/**
 * Month and day that a row belongs to, by the clock of the file: those of the start of its interval, so that the hour that ends
 * at midnight belongs to the day before, whether it is printed as 24:00 or as 00:00. A value read at one instant belongs to the
 * day of its label.
 */
function datesOf(plan: RowPlan, label_ms: Float64Array, step_min: number): { month: Uint8Array; day: Uint8Array } {
  const moved_min = plan.label === 'instant' ? 0 : plan.shift_min - (plan.label === 'end' ? step_min : 0);
  const month = new Uint8Array(label_ms.length);
  const day = new Uint8Array(label_ms.length);
  for (let i = 0; i < label_ms.length; i++) {
    const date = new Date(label_ms[i]! + (moved_min + plan.time.ahead_min) * 60_000);
    month[i] = date.getUTCMonth() + 1;
    day[i] = date.getUTCDate();
  }
  return { month, day };
}

/** From printed times to the intervals that they stand for. */
function intervals(plan: RowPlan, raw: Raw, step_min: number): Omit<WeatherYear, 'columns' | 'month' | 'day'> {
  const step_ms = step_min * 60_000;
  // Minutes from the printed time to the start of the interval.
  const before_min =
    plan.shift_min - { start: 0, middle: step_min / 2, instant: step_min / 2, end: step_min }[plan.label];
  const start_ms = raw.label_ms.map((t) => t + before_min * 60_000);
  return {
    kind: plan.kind,
    place: plan.place,
    rows: raw.rows,
    step_min,
    label: plan.label,
    start_ms,
    end_ms: start_ms.map((t) => t + step_ms),
    airOffset_min: plan.air === 'mean' ? null : -before_min - step_min / 2,
  };
}
