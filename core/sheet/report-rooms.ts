import type { Finding } from '../limits/finding.ts';
import type { LimitSet } from '../limits/limit-set.ts';
import { found, margin, quantity, shortWhen } from './finding-words.ts';
import type { Flow } from './flow.ts';
import { SOFT } from './ink.ts';
import { percent } from './numerals.ts';
import type { Report } from './report-input.ts';
import { type Cell, type Column, table } from './table.ts';

/** Columns of a table of findings; the moment stands only where the limit has one. */
const columns = (moments: boolean): readonly Column[] => [
  { head: '', width: 6 },
  { head: 'room', width: 18 },
  { head: 'name', width: moments ? 36 : 62 },
  { head: 'value', width: 26, align: 'end' },
  { head: 'limit', width: 16, align: 'end' },
  { head: 'margin', width: 16, align: 'end' },
  ...(moments ? [{ head: 'when', width: 38 } as const] : []),
  { head: 'most through', width: moments ? 24 : 36 },
];

const row = (f: Finding, moments: boolean): readonly Cell[] => [
  { disc: f.verdict },
  f.room,
  f.roomName,
  { text: found(f), verdict: f.verdict },
  f.limitValue === null ? '–' : (quantity(f.limitValue, f.unit).split('\u00a0')[0] ?? ''),
  margin(f),
  ...(moments ? [shortWhen(f)] : []),
  f.through ? `${f.through.window}, ${percent(f.through.share)}` : '–',
];

/** Every room under every limit, one table a limit, worst first. */
export function roomsPages(flow: Flow, report: Report): void {
  const { findings, limitSet, rooms } = report.result;
  flow.turn('All rooms');
  if (findings.length === 0) {
    flow.say(rooms.length === 0 ? 'The scheme has no rooms.' : 'No room has a window whose sun could be worked out.');
    return;
  }
  for (const [id, name] of limitsOf(findings, limitSet)) {
    const rows = findings.filter((f) => f.limit === id);
    flow.heading(name, 40);
    const moments = rows.some((f) => f.when !== null);
    table(
      flow,
      columns(moments),
      rows.map((f) => row(f, moments)),
    );
    const notes = [...new Set(rows.flatMap((f) => f.notes.map((n) => `${f.room}: ${n}`)))];
    for (const note of notes) flow.say(note, { colour: SOFT });
    flow.gap(4);
  }
  flow.say('Disc: full is over, half is close to the limit, empty is within. Times are civil time of the site.', {
    colour: SOFT,
  });
}

/** Limits of the findings in the order of their set, with the name that heads their table. */
function limitsOf(findings: readonly Finding[], set: LimitSet | null): readonly (readonly [string, string])[] {
  const names = new Map(findings.map((f) => [f.limit, f.metricName]));
  for (const limit of set?.limits ?? []) if (names.has(limit.id)) names.set(limit.id, limit.name);
  const order = (set?.limits ?? []).map((l) => l.id);
  return [...names].sort((a, b) => order.indexOf(a[0]) - order.indexOf(b[0]));
}
