import type { Finding } from '../limits/finding.ts';
import type { Limit } from '../limits/limit-set.ts';
import { compassWord } from '../limits/reason.ts';
import type { WayThatFails, WayThatPasses } from '../sizing/ways.ts';
import { dayCurve, type CurveLimit } from './day-curve.ts';
import { counted, figures, limitWords, margin, quantity, verdictWords } from './finding-words.ts';
import type { Flow } from './flow.ts';
import { SOFT } from './ink.ts';
import { READ } from './measure.ts';
import { fixed, percent } from './numerals.ts';
import type { Report, ReportRoom } from './report-input.ts';
import { table } from './table.ts';
import { verdictColour, verdictDisc } from './verdict-disc.ts';
import { waysOf, wayWords } from './way-words.ts';

/** The page of one room that is over: why, when, through what, how it was worked out and what would bring it within. */
export function roomPage(flow: Flow, report: Report, room: ReportRoom): void {
  const findings = report.result.findings.filter((f) => f.room === room.room);
  const [worst] = findings;
  if (!worst) return;
  flow.turn(`Room ${room.room} ${room.name}`.trim());
  flow.say(`Room ${room.room} ${room.name}`.trim(), { size: 6, face: 'semibold' });
  flow.say(
    `${room.use}, ${fixed(room.floor_m2, 1)} m² of floor, ${counted(room.windows.length, 'window', 'windows')}, openings ${percent(room.glazingToFloor)} of the floor`,
    { colour: SOFT },
  );
  flow.gap(3);
  for (const f of findings) verdictLine(flow, f);
  flow.gap(1);
  flow.say(worst.reason);
  flow.gap(3);
  curve(flow, report, room, worst);
  windowsTable(flow, room, worst);
  ways(flow, report, findings);
}

function verdictLine(flow: Flow, f: Finding): void {
  const colour = verdictColour(f.verdict);
  const y = flow.y + READ * 0.75;
  flow.put(verdictDisc(f.verdict, flow.x + 2, y - READ * 0.35), 0);
  const said = f.verdict === null ? '' : `, ${verdictWords[f.verdict]} (${margin(f)})`;
  flow.say(`${f.metricName}: ${quantity(f.value, f.unit)}, ${limitWords(f)}${said}`, { face: 'semibold', colour }, 6);
}

const minutes = (clock: string): number => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3, 5));

/** The limit as a line on a curve in W/m²; null where the limit is of another kind. */
function limitOnCurve(f: Finding, limit: Limit | undefined): CurveLimit | null {
  if (f.limitValue === null || f.unit !== 'W/m²') return null;
  const between = f.clock ? ([minutes(f.clock[0]), minutes(f.clock[1])] as const) : null;
  const kind = f.metric === 'mean-gain' ? 'limit of the mean' : 'limit';
  return {
    text: `${kind} ${figures(f.limitValue)} W/m²${limit ? ` (${limit.id})` : ''}`,
    value: f.limitValue,
    between,
  };
}

function curve(flow: Flow, report: Report, room: ReportRoom, f: Finding): void {
  const key = f.day ?? f.when?.day ?? 'hottest';
  const grid = report.result.days.find((d) => d.key === key);
  const day = room.days.find((d) => d.day === key);
  if (!grid || !day) return;
  flow.heading(`What it takes in on the ${grid.name}`.replace('the 2', '2'), 80);
  const limit = report.result.limitSet?.limits.find((l) => l.id === f.limit);
  const piece = dayCurve(flow.x, flow.y, flow.width, 72, grid, day, room.floor_m2, limitOnCurve(f, limit));
  flow.put(piece.marks, piece.height);
  flow.gap(2);
}

/** Share that each window has in what the room takes in at a step of a day. */
function sharesAt(room: ReportRoom, dayKey: string, step: number): ReadonlyMap<string, number> {
  const day = room.days.find((d) => d.day === dayKey);
  const total = day?.total_W[step] ?? 0;
  return new Map((day?.windows ?? []).map((w) => [w.window, total > 0 ? (w.total_W[step] as number) / total : 0]));
}

function windowsTable(flow: Flow, room: ReportRoom, f: Finding): void {
  const day = room.days.find((d) => d.day === (f.day ?? 'hottest'));
  let peak = 0;
  day?.total_W.forEach((w, i) => {
    if (w > (day.total_W[peak] as number)) peak = i;
  });
  const shares = sharesAt(room, day?.day ?? '', peak);
  flow.heading('Its windows', 20);
  table(
    flow,
    [
      { head: 'window', width: 26 },
      { head: 'faces', width: 44 },
      { head: 'opening', width: 24, align: 'end' },
      { head: 'glass', width: 24, align: 'end' },
      { head: 'g', width: 16, align: 'end' },
      { head: 'sees of sky', width: 24, align: 'end' },
      { head: 'at the peak', width: 22, align: 'end' },
    ],
    room.windows.map((w) => [
      w.window,
      w.tilt_deg < 1 ? 'up' : `${compassWord(w.bearing_deg)}, ${fixed(w.bearing_deg, 0)}°`,
      `${fixed(w.opening_m2, 2)} m²`,
      `${fixed(w.glass_m2, 2)} m²`,
      fixed(w.g, 2),
      percent(w.skyShare),
      percent(shares.get(w.window) ?? 0),
    ]),
  );
  flow.gap(2);
}

function ways(flow: Flow, report: Report, findings: readonly Finding[]): void {
  const over = findings.filter((f) => f.verdict === 'over');
  const given = over.flatMap((f) => {
    const w = waysOf(report.ways, f);
    return w ? [[f, w] as const] : [];
  });
  if (given.length === 0) return;
  flow.heading('Ways to pass, one change at a time', 20);
  for (const [f, all] of given) {
    if (given.length > 1) flow.say(f.metricName, { face: 'semibold' });
    const passing = all.ways.filter((w): w is WayThatPasses => w.passes);
    const failing = all.ways.filter((w): w is WayThatFails => !w.passes);
    for (const w of passing) flow.say(`${wayWords(w)}.`);
    for (const w of failing) flow.say(`${w.lever}: ${w.reason}`, { colour: SOFT });
    for (const r of all.restsOn) {
      flow.say(
        `Without the ${r.on === 'no-trees' ? 'trees' : 'neighbours'} it would be ${quantity(r.value, f.unit)}.`,
        { colour: SOFT },
      );
    }
  }
}
