import { CAUTIONS } from '../limits/cautions.ts';
import type { Finding } from '../limits/finding.ts';
import type { WayThatFails, WayThatPasses, Ways } from '../sizing/ways.ts';
import { quantity } from './finding-words.ts';
import type { Flow } from './flow.ts';
import { SOFT } from './ink.ts';
import { percent } from './numerals.ts';
import type { Report } from './report-input.ts';
import { table } from './table.ts';
import { waysOf } from './way-words.ts';

/** The smallest single changes that bring a room within, with what each costs in winter sun and daylight. */
export function waysTable(flow: Flow, report: Report, findings: readonly Finding[]): void {
  const given = findings.flatMap((f) => {
    const ways = f.verdict === 'over' ? waysOf(report.ways, f) : null;
    return ways ? [[f, ways] as const] : [];
  });
  if (given.length === 0) return;
  flow.heading('Ways to pass, one change at a time', 40);
  for (const [f, ways] of given) one(flow, f, ways, given.length > 1);
  const projects = given.some(([, w]) =>
    w.ways.some((way) => way.passes && (way.lever === 'overhang' || way.lever === 'fins')),
  );
  if (projects) flow.say(CAUTIONS[2] as string, { face: 'italic' });
}

function one(flow: Flow, f: Finding, ways: Ways, named: boolean): void {
  if (named) flow.say(f.metricName, { face: 'semibold' });
  const passing = ways.ways.filter((w): w is WayThatPasses => w.passes);
  const failing = ways.ways.filter((w): w is WayThatFails => !w.passes);
  if (passing.length > 0) {
    table(
      flow,
      [
        { head: 'change', width: 84 },
        { head: 'value then', width: 30, align: 'end' },
        { head: 'winter sun kept', width: 34, align: 'end' },
        { head: 'daylight kept', width: 32, align: 'end' },
      ],
      passing.map((w) => [
        w.text,
        { text: quantity(w.after.value, w.after.unit), verdict: w.after.verdict },
        share(w.price.winter_Whm2, ways.price.winter_Whm2),
        share(w.price.daylight_m2, ways.price.daylight_m2),
      ]),
    );
  }
  for (const line of decidedBy(passing)) flow.say(line, { colour: SOFT });
  for (const w of failing) flow.say(`${w.lever}: ${w.reason}.`, { colour: SOFT });
  for (const on of ['no-neighbours', 'no-trees'] as const) {
    const lost = passing.filter((w) => w.restsOn.some((r) => r.on === on && r.verdict === 'over')).map((w) => w.lever);
    const what = on === 'no-trees' ? 'trees' : 'neighbours';
    if (lost.length > 0)
      flow.say(`Were the ${what} not there, these would not do: ${lost.join(', ')}.`, { colour: SOFT });
  }
  flow.gap(1);
}

/** Which of the other limits that the room is over takes how many of the changes as far as they go. */
function decidedBy(passing: readonly WayThatPasses[]): readonly string[] {
  const names = [...new Set(passing.flatMap((w) => w.decidedBy?.metricName ?? []))];
  return names.map((name) => {
    const levers = passing.filter((w) => w.decidedBy?.metricName === name).map((w) => w.lever);
    return `How far it has to go is decided by another limit, ${name}: ${levers.join(', ')}.`;
  });
}

const share = (then: number, now: number): string => (now > 0 ? percent(then / now) : '–');
