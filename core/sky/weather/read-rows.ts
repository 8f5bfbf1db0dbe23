import type { Checked } from '../../scheme/fault.ts';
import { cellText, cutCells } from './cells.ts';
import { checkTimes, usualStep_min } from './check-times.ts';
import { checkValues } from './check-values.ts';
import { FaultList } from './fault-list.ts';
import { fillGaps } from './fill-gaps.ts';
import type { RowPlan } from './plan.ts';
import { stampInstant_ms } from './time-form.ts';
import type { Quantity, WeatherYear } from './weather-year.ts';

/** A year in steps of a minute; more is no year of weather. */
const MOST_ROWS = 366 * 24 * 60;

/** The rows as they stand in the file, before they are checked against each other. */
type Raw = {
  readonly label_ms: Float64Array;
  readonly line: Int32Array;
  readonly values: readonly Float64Array[];
  readonly rows: number;
};

/** Reads the rows of a file by its plan and checks them: cells, times, whole year, units, gaps. */
export function readRows(plan: RowPlan): Checked<WeatherYear> {
  const faults = new FaultList();
  const raw = scan(plan, faults);
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

function scan(plan: RowPlan, faults: FaultList): Raw {
  const { lines, firstRow, columns } = plan;
  const most = Math.min(MOST_ROWS, Math.max(0, lines.length - firstRow));
  const label_ms = new Float64Array(most);
  const line = new Int32Array(most);
  const values = columns.map(() => new Float64Array(most));
  const row = rowReader(plan, faults);
  let rows = 0;
  for (let at = firstRow; at < lines.length && !faults.hopeless; at++) {
    if ((lines[at] as string).trim() === '' && (plan.endsAtBlank || isRestBlank(lines, at))) break;
    if (rows >= most) {
      const message = `more than ${MOST_ROWS} rows`;
      faults.add('error', 'too-long', `line ${at + 1}`, message, 'give one year, in steps of a minute or longer');
      break;
    }
    const label = row(at, values, rows);
    if (label === null) continue;
    label_ms[rows] = label;
    line[rows] = at + 1;
    rows++;
  }
  if (rows === 0 && !faults.failed) {
    faults.add('error', 'empty', '', 'there are no rows', 'choose a file with a year of rows below its heads');
  }
  return {
    label_ms: label_ms.subarray(0, rows),
    line: line.subarray(0, rows),
    values: values.map((v) => v.subarray(0, rows)),
    rows,
  };
}

/**
 * A reader of single rows: puts the numbers of a line into a row of the columns.
 * @returns the instant printed in the line [UTC ms], or null when the line is no row (a fault was told)
 */
function rowReader(
  plan: RowPlan,
  faults: FaultList,
): (at: number, values: readonly Float64Array[], row: number) => number | null {
  const { lines, heads, time, columns } = plan;
  const starts = new Int32Array(heads.length + 2);
  const delimiter = plan.delimiter.charCodeAt(0);
  const missing = new Set(['', ...plan.missing]);
  return (at, values, row) => {
    const line = lines[at] as string;
    const place = `line ${at + 1}`;
    const cells = cutCells(line, delimiter, starts);
    if (cells !== heads.length) {
      const message = `${cells} cells where the head has ${heads.length}`;
      const cut = cells < heads.length && isRestBlank(lines, at + 1);
      if (cut) faults.add('error', 'cut-short', place, `the last row breaks off: ${message}`, 'fetch the file again');
      else faults.add('error', 'cells', place, message, 'mend the row, or check the delimiter');
      return null;
    }
    const text = time.columns.map((c) => cellText(line, starts, c)).join(' ');
    const stamp = time.form.read(text, time.year);
    if (!stamp) {
      const message = `\`${text}\` is no time of the form that was given`;
      faults.add('error', 'time', place, message, 'check the form and the columns of the time');
      return null;
    }
    columns.forEach(({ index }, k) => {
      const cell = cellText(line, starts, index);
      const value = missing.has(cell) ? Number.NaN : Number(plan.decimal === ',' ? cell.replace(',', '.') : cell);
      if (Number.isNaN(value) && !missing.has(cell)) {
        const message = `\`${cell}\` is not a number`;
        faults.add(
          'error',
          'number',
          `${place}, ${heads[index]}`,
          message,
          'mend the cell, or name the mark for missing values',
        );
      }
      values[k]![row] = value;
    });
    return stampInstant_ms(stamp, time.ahead_min);
  };
}

const isRestBlank = (lines: readonly string[], from: number): boolean => {
  for (let i = from; i < lines.length; i++) if ((lines[i] as string).trim() !== '') return false;
  return true;
};

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
