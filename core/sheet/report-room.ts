import type { Finding } from '../limits/finding.ts';
import type { Limit } from '../limits/limit-set.ts';
import { toDegrees } from '../units/angle.ts';
import { compassWord } from '../limits/reason.ts';
import { dayCurve, type CurveLimit } from './day-curve.ts';
import { counted, figures, found, limitWords, margin, verdictWords } from './finding-words.ts';
import type { Flow } from './flow.ts';
import { SOFT } from './ink.ts';
import { READ } from './measure.ts';
import { fixed, percent } from './numerals.ts';
import type { Report, ReportRoom } from './report-input.ts';
import { roomPlan } from './room-plan.ts';
import { table } from './table.ts';
import { verdictColour, verdictDisc } from './verdict-disc.ts';
import { waysTable } from './report-ways.ts';

/** The page of one room that is over: why, when, through what, how it was worked out and what would bring it within. */
export function roomPage(flow: Flow, report: Report, room: ReportRoom): void {
  const findings = report.result.findings.filter((f) => f.room === room.room);
  const [worst] = findings;
  if (!worst) return;
  flow.turn(`Room ${room.room} ${room.name}`.trim());
  flow.say(`Room ${room.room} ${room.name}`.trim(), { size: 6, face: 'semibold' }, 0, 2);
  flow.say(
    `${room.use}, ${fixed(room.floor_m2, 1)} m² of floor, ${counted(room.windows.length, 'window', 'windows')}, openings ${percent(room.glazingToFloor)} of the floor${room.glazingToWall === null ? '' : ` and, in walls, ${percent(room.glazingToWall)} of the outside walls`}`,
    { colour: SOFT },
  );
  flow.gap(3);
  for (const f of findings) verdictLine(flow, f);
  flow.gap(1);
  flow.say(worst.reason);
  flow.gap(3);
  curve(flow, report, room, worst);
  windowsTable(flow, room, worst);
  waysTable(flow, report, findings);
  whereItIs(flow, report, room, worst);
}

function verdictLine(flow: Flow, f: Finding): void {
  const colour = verdictColour(f.verdict);
  const y = flow.y + READ * 0.75;
  flow.put(verdictDisc(f.verdict, flow.x + 2, y - READ * 0.35), 0);
  const said = f.verdict === null ? '' : `, ${verdictWords[f.verdict]} (${margin(f)})`;
  flow.say(`${f.metricName}: ${found(f)}, ${limitWords(f)}${said}`, { face: 'semibold', colour }, 6);
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
  // A page a room: where the tables below are long, the curve makes way.
  const height = room.windows.length > 3 ? 56 : 72;
  const piece = dayCurve(flow.x, flow.y, flow.width, height, grid, day, room.floor_m2, limitOnCurve(f, limit));
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

/** Plan of the storey with the room, its windows and the sun at the worst moment. */
function whereItIs(flow: Flow, report: Report, room: ReportRoom, f: Finding): void {
  const form = report.model.rooms.find((r) => r.id === room.room);
  if (!form) return;
  const grid = report.result.days.find((d) => d.key === (f.when?.day ?? f.day));
  const step = f.when && grid ? nearest(grid.instant_ms, f.when.instant_ms) : null;
  const sun = grid && step !== null ? toDegrees(grid.azimuth_rad[step] as number) : null;
  const height = 58;
  if (flow.left < height + 14) return;
  flow.heading('Where it is', height + 10);
  const piece = roomPlan(flow.x, flow.y, flow.width, height, report.model, form, sun);
  if (piece) flow.put(piece.marks, piece.height);
  flow.gap(3);
}

function nearest(instants: Float64Array, instant_ms: number): number {
  let best = 0;
  instants.forEach((t, i) => {
    if (Math.abs(t - instant_ms) < Math.abs((instants[best] as number) - instant_ms)) best = i;
  });
  return best;
}
