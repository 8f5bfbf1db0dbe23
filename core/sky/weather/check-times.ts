import type { FaultList } from './fault-list.ts';

type Times = {
  readonly label_ms: Float64Array;
  readonly month: Uint8Array;
  readonly day: Uint8Array;
  /** Line of each row in the file. */
  readonly line: Int32Array;
  readonly rows: number;
  readonly step_min: number;
};

const DAY_ms = 86_400_000;
const text = (ms: number): string => new Date(ms).toISOString().slice(0, 16).replace('T', ' ');

/**
 * Whether the rows follow each other as the steps of one whole year: 365 days, or 366 with a 29 February. Where a month ends the
 * calendar may jump, for the months of a typical year come from different years.
 */
export function checkTimes(times: Times, faults: FaultList): void {
  const { label_ms, month, day, line, rows, step_min } = times;
  const step_ms = step_min * 60_000;
  for (let i = 1; i < rows; i++) {
    const gone = label_ms[i]! - label_ms[i - 1]!;
    if (gone === step_ms) continue;
    const place = `line ${line[i]}`;
    const monthEnds = month[i] !== month[i - 1] && day[i] === 1 && isLastDay(month[i - 1]!, day[i - 1]!);
    if (monthEnds && (gone <= 0 || gone > 2 * DAY_ms || (month[i] === 3 && gone === step_ms + DAY_ms))) continue;
    const from = text(label_ms[i - 1]!);
    const to = text(label_ms[i]!);
    if (gone === 0) faults.add('error', 'repeated', place, `${to} UTC stands twice`, 'take one of the two rows out');
    else if (gone < 0)
      faults.add(
        'error',
        'order',
        place,
        `time runs back from ${from} to ${to} UTC`,
        'sort the rows, or use the file’s standard time without daylight saving',
      );
    else
      faults.add(
        'error',
        'gap',
        place,
        `nothing between ${from} and ${to} UTC, where rows come every ${step_min} min`,
        'put the missing rows in, marked as missing where nothing was measured',
      );
  }
  if (!faults.failed) checkWhole(times, faults);
}

/** The step that most of the first hundred rows keep [min], or null when it is none that divides an hour. */
export function usualStep_min(label_ms: Float64Array): number | null {
  const counts = new Map<number, number>();
  for (let i = 1; i < Math.min(label_ms.length, 100); i++) {
    const gone = label_ms[i]! - label_ms[i - 1]!;
    counts.set(gone, (counts.get(gone) ?? 0) + 1);
  }
  const [best] = [...counts].sort((a, b) => b[1] - a[1]);
  if (!best) return null;
  const [step] = best;
  return step >= 60_000 && step <= 3_600_000 && 3_600_000 % step === 0 ? step / 60_000 : null;
}

/** 28 February counts as the last day of its month: files of typical years leave the 29th out. */
const isLastDay = (month: number, day: number): boolean =>
  day >= ([31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][month - 1] as number);

function checkWhole({ label_ms, month, day, rows, line, step_min }: Times, faults: FaultList): void {
  let leap = 0;
  for (let i = 0; i < rows; i++) if (month[i] === 2 && day[i] === 29) leap++;
  const perDay = 1440 / step_min;
  const wanted = (leap > 0 ? 366 : 365) * perDay;
  if (rows !== wanted) {
    const place = `line ${line[rows - 1]}`;
    const days = (rows / perDay).toFixed(1);
    const message = `${rows} rows, which are ${days} days; a year of steps of ${step_min} min has ${365 * perDay}, or ${366 * perDay} with a 29 February`;
    if (rows < wanted)
      faults.add(
        'error',
        'not-a-year',
        place,
        `${message}; the last is ${text(label_ms[rows - 1]!)} UTC`,
        'the file is cut short or holds part of a year; fetch the whole',
      );
    else faults.add('error', 'not-a-year', place, message, 'give one year');
    return;
  }
  if (leap > 0)
    faults.add(
      'warning',
      'leap-day',
      '',
      'the year has a 29 February, which is kept: sums are over 366 days',
      'nothing to do',
    );
}
