import type { Finding } from '../limits/finding.ts';
import { workingOf } from '../limits/working.ts';
import { decadeOf } from '../maths/decade.ts';
import { found } from './finding-words.ts';
import type { Flow } from './flow.ts';
import { SOFT } from './ink.ts';
import { fixed } from './numerals.ts';
import type { Report } from './report-input.ts';
import { worstOfRooms } from './report-summary.ts';
import { table } from './table.ts';

/** The annex: the worst finding of every room that is over, step by step, with the places in the scheme that its inputs come from. */
export function workingPages(flow: Flow, report: Report): void {
  const over = worstOfRooms(report.result.findings).filter((f) => f.verdict === 'over');
  for (const f of over) {
    flow.turn(`Working: room ${f.room} ${f.roomName}`.trim());
    working(flow, report, f);
  }
}

function working(flow: Flow, report: Report, f: Finding): void {
  const w = workingOf(report.result, report.scheme, f);
  flow.say(`Room ${f.room} ${f.roomName}: ${f.metricName}, ${found(f)}`, {
    size: 4.6,
    face: 'semibold',
  });
  flow.gap(1);
  flow.say(w.method);
  flow.gap(1);
  flow.say(w.source, { colour: SOFT });
  flow.gap(2);
  table(
    flow,
    [
      { head: 'step', width: 74 },
      { head: 'value', width: 46, align: 'end' },
      { head: 'note and place in the scheme', width: 60 },
    ],
    w.steps.map((s) => [
      s.formula ? `${s.label}, ${s.formula}` : s.label,
      withUnit(typeof s.value === 'number' ? precise(s.value) : s.value, s.unit),
      [s.note, s.place].filter((t) => t !== undefined && t !== '').join('; '),
    ]),
  );
}

/** A degree sign stands close, every other unit apart. */
const withUnit = (value: string, unit: string): string =>
  (/^°(?!C)/u.test(unit) ? `${value}${unit}` : `${value} ${unit}`).trim();

/** Four figures: a working is there to be recomputed. */
function precise(value: number): string {
  if (value === 0) return '0';
  const digits = Math.max(0, Math.min(6, 3 - decadeOf(value)));
  return fixed(value, Number.isInteger(value) ? 0 : digits);
}
