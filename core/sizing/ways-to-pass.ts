import { buildModel } from '../form/build-model.ts';
import type { CheckMemo } from '../gain/gain-memo.ts';
import type { Finding } from '../limits/finding.ts';
import type { LimitSet } from '../limits/limit-set.ts';
import { needsWeather } from '../limits/metric.ts';
import { shown } from '../limits/reason.ts';
import type { SchemeEdit } from '../scheme/edit.ts';
import { type Fault, faultLine } from '../scheme/fault.ts';
import type { Scheme, Window } from '../scheme/schema.ts';
import { areaLever, blindLever, finLever, glassLever, type Lever, overhangLever } from './lever.ts';
import type { Under } from './room-facts-of.ts';
import { excessOf, type RoomBench, roomBench } from './room-bench.ts';
import type { RoomProbe } from './room-probe.ts';
import type { RestsOn, Way, Ways, WayThatFails } from './ways.ts';

/** Bisection stops when the bracket is this share of the lever's amount wide. */
const TIGHT = 5e-4;

/** A lever with the windows it is done to. */
type Trial = { readonly lever: Lever; readonly windows: readonly Window[] };

/**
 * For a room that is over a limit: the smallest single change of each lever (overhang, fins, glass, area, external blind) that
 * brings it within every limit that it is over, and over no other, found by bisection on the engine itself. A lever is first tried on the window that brings most, then on all
 * windows of the room. The change ends just at the limit, which counts as close, not as over; levers that cannot do it by
 * themselves say why.
 * @param roomId   of the room
 * @param finding  of the check: which limit is meant
 * @param under    what the check was made with: the ways hold under the same sky and the same year of weather
 * @returns        no ways for a finding that is not over or has no limit, nor for one of a year of weather that is not given
 * @throws {RangeError} when the set holds no such limit, or the scheme no such room
 */
export function waysToPass(
  scheme: Scheme,
  limitSet: LimitSet,
  roomId: string,
  finding: Finding,
  memo: CheckMemo,
  under: Under = {},
): Ways {
  const limit = limitSet.limits.find((l) => l.id === finding.limit);
  if (!limit) throw new RangeError(`the limit set holds no limit ${JSON.stringify(finding.limit)}`);
  const bench = roomBench(scheme, buildModel(scheme), limitSet, limit, roomId, memo, under);
  const price = bench.price(null);
  const windows = scheme.windows.filter((w) => w.room === roomId);
  const isRead = !needsWeather(limit.metric) || (under.weather ?? null) !== null;
  const over = finding.verdict === 'over' && isRead;
  const ways = over ? leversFor(scheme, windows, finding).map((trials) => bestOf(bench, trials)) : [];
  return { finding, price, restsOn: restsOn(bench.probe, null, finding), ways };
}

/** The trials of each lever, in the order they are made: the main window alone, then all. */
function leversFor(scheme: Scheme, windows: readonly Window[], finding: Finding): readonly (readonly Trial[])[] {
  const main = windows.filter((w) => w.id === finding.through?.window);
  const inTurn = (make: (chosen: readonly Window[]) => Lever, among: readonly Window[]): Trial[] => {
    const first = among.filter((w) => main.includes(w));
    const groups = first.length > 0 && among.length > 1 ? [first, among] : [among];
    return groups.map((chosen) => ({ lever: make(chosen), windows: chosen }));
  };
  const wider = finding.comparison === 'at-least';
  const area = inTurn((w) => areaLever(w, wider), windows);
  if (finding.metric === 'glazing-to-floor') return [area];
  if (wider) return [area];
  const walls = windows.filter((w) => w.wall !== undefined);
  return [
    inTurn((w) => overhangLever(scheme, w), walls),
    inTurn((w) => finLever(scheme, w), walls),
    [{ lever: glassLever(scheme, windows), windows }],
    area,
    inTurn((w) => blindLever(scheme, w), windows),
  ];
}

/** The first trial of a lever that passes, or the last one's failure. */
function bestOf(bench: RoomBench, trials: readonly Trial[]): Way {
  let last: Way | null = null;
  for (const trial of trials) {
    if (trial.windows.length === 0) return rooflightsOnly(trial);
    last = wayOf(bench, trial);
    if (last.passes) return last;
  }
  if (!last) throw new Error('a lever has at least one trial');
  return last;
}

const rooflightsOnly = (trial: Trial): WayThatFails => ({
  passes: false,
  lever: trial.lever.kind,
  windows: [],
  reason: 'the room has rooflights alone, which overhangs and fins do not shade',
  best: null,
});

function wayOf(bench: RoomBench, { lever, windows }: Trial): Way {
  const ids = windows.map((w) => w.id);
  const edit = lever.edit(lever.most);
  const failed = (reason: string, best: WayThatFails['best'] = null): WayThatFails => ({
    passes: false,
    lever: lever.kind,
    windows: ids,
    reason,
    best,
  });
  if (!edit) return failed(lever.kind === 'blind' ? 'it has external blinds already' : 'it is there already');
  const furthest = bench.judge(edit);
  if (!furthest.ok) return asFarAsItGoes(bench, { lever, windows }, furthest.faults);
  const { asked, deciding } = furthest.value;
  if (deciding.verdict === 'over') {
    const best = { amount: lever.most, unit: lever.unit, value: asked.value };
    return failed(whyNot(lever, deciding, asked), best);
  }
  const amount = closest(lever, excessOf(deciding), (x) => excess(bench, lever.edit(x)));
  const then = lever.edit(amount);
  const [pushed] = then === null ? [] : bench.pushed(then);
  if (pushed !== undefined) {
    const reached = bench.judge(then);
    const value = reached.ok ? reached.value.asked.value : Number.NaN;
    return failed(pushesOver(lever, amount, pushed, asked), { amount, unit: lever.unit, value });
  }
  return passing(bench, lever, ids, amount);
}

/** How far a room is past its limits under an edit; NaN, which counts as over, where the edit changes nothing or is refused. */
function excess(bench: RoomBench, edit: SchemeEdit | null): number {
  const found = edit ? bench.judge(edit) : null;
  return found?.ok ? excessOf(found.value.deciding) : Number.NaN;
}

/** Trials by the straight line between the bracket's ends; after so many that did not halve it, its middle is tried. */
const PATIENCE = 2;

/**
 * The amount nearest to `least` at which a room is not over, from the passing side: a bracket, narrowed where the straight line
 * between its ends says that the limit is met, now a little to this side of it and now to that, so that both ends close in. It
 * takes a third of the trials of halving, and is as tight.
 */
function closest(lever: Lever, furthestBy: number, by: (amount: number) => number): number {
  let [over, overBy] = [lever.least, Number.NaN];
  let [within, withinBy] = [lever.most, furthestBy];
  let [wide, tries, side] = [Math.abs(within - over), 0, 1];
  const tight = (): number => TIGHT * Math.max(Math.abs(within), 0.02);
  while (Math.abs(within - over) > tight()) {
    const line = over + ((within - over) * overBy) / (overBy - withinBy);
    const isStuck = tries >= PATIENCE && Math.abs(within - over) > wide / 2;
    const aside = 0.4 * tight() * Math.sign(within - over) * side;
    const aimed = line + aside;
    const isInside = (aimed - over) * (within - aimed) > 0;
    const at = !isStuck && isInside ? aimed : (within + over) / 2;
    if (isStuck || Math.abs(within - over) <= wide / 2) [wide, tries] = [Math.abs(within - over), 0];
    const found = by(at);
    if (found <= 0) [within, withinBy] = [at, found];
    else [over, overBy] = [at, found];
    tries++;
    side = -side;
  }
  // Where the line meets the limit lies nearer to it than the bracket's passing end; a breath to the side of less change keeps a
  // round amount that just passes from being rounded away.
  const met = over + ((within - over) * overBy) / (overBy - withinBy);
  const nearest = met + Math.sign(over - within) * 1e-6 * Math.abs(met);
  const rounded = [nearest, within].filter(Number.isFinite).map(lever.round);
  return rounded.find((amount) => by(amount) <= 0) ?? within;
}

/** The amount nearest to `least` at which the test still passes, from the passing side. */
function bisect(lever: Lever, test: (amount: number) => boolean): number {
  let over = lever.least;
  let within = lever.most;
  while (Math.abs(within - over) > TIGHT * Math.max(Math.abs(within), 0.02)) {
    const middle = (within + over) / 2;
    if (test(middle)) within = middle;
    else over = middle;
  }
  const rounded = lever.round(within);
  return test(rounded) ? rounded : within;
}

/** A lever whose furthest setting contradicts the scheme, such as a window wider than its wall: as far as it can go. */
function asFarAsItGoes(bench: RoomBench, { lever, windows }: Trial, faults: readonly Fault[]): Way {
  const allowed = (x: number): boolean => {
    const edit = lever.edit(x);
    return edit === null || bench.probe.judge(edit).ok;
  };
  const most = bisect({ ...lever, least: lever.most, most: lever.least, round: (x) => x }, allowed);
  const edit = lever.edit(most);
  const found = edit ? bench.judge(edit) : null;
  if (found?.ok && found.value.deciding.verdict !== 'over') return wayOf(bench, { lever: { ...lever, most }, windows });
  const reason = `there is no room for it: ${faults.map(faultLine).join('; ')}`;
  const best = found?.ok ? { amount: most, unit: lever.unit, value: found.value.asked.value } : null;
  return { passes: false, lever: lever.kind, windows: windows.map((w) => w.id), reason, best };
}

function passing(bench: RoomBench, lever: Lever, windows: readonly string[], amount: number): Way {
  const edit = lever.edit(amount);
  const after = edit ? bench.judge(edit) : null;
  if (!edit || !after?.ok) throw new Error('bisection ended on an amount that does not pass');
  return {
    passes: true,
    lever: lever.kind,
    windows,
    amount,
    unit: lever.unit,
    text: edit.kind === 'together' ? edit.name : '',
    edit,
    after: after.value.asked,
    decidedBy: after.value.deciding.limit === after.value.asked.limit ? null : after.value.deciding,
    price: bench.price(edit),
    restsOn: restsOn(bench.probe, edit, after.value.asked),
  };
}

/** The values without trees and without neighbours, where they differ. */
function restsOn(probe: RoomProbe, edit: SchemeEdit | null, now: Finding): readonly RestsOn[] {
  const found: RestsOn[] = [];
  for (const on of ['no-trees', 'no-neighbours'] as const) {
    const other = probe.judge(edit, on);
    if (other.ok && Math.abs(other.value.value - now.value) > 1e-6 * Math.max(1, Math.abs(now.value)))
      found.push({ on, value: other.value.value, verdict: other.value.verdict });
  }
  return found;
}

const NAMES: { readonly [K in Lever['kind']]: string } = {
  overhang: 'overhang',
  fins: 'fins',
  glass: 'glass',
  area: 'narrower windows',
  blind: 'external blind',
};

/** A value against its limit; named where it is not the one that was asked about. */
const against = (left: Finding, asked: Finding): string => {
  const value = `${shown(left.value)} ${left.unit} against ${shown(left.limitValue ?? 0)}`;
  return left.limit === asked.limit ? value : `${value} (${left.metricName})`;
};

/** Why a change that would do for what the room is over does not count: it brings it over another limit. */
const pushesOver = ({ unit }: Lever, amount: number, pushed: Finding, asked: Finding): string =>
  `at ${shown(amount)}${unit === '' ? '' : ` ${unit}`} it would do, but brings the room over another limit: ${against(pushed, asked)}`;

/** Why a lever does not suffice at the furthest it goes. @param left what is still over, most */
function whyNot(lever: Lever, left: Finding, asked: Finding): string {
  const reach =
    lever.kind === 'overhang' || lever.kind === 'fins'
      ? `no depth passes: even ${lever.most} m deep`
      : lever.kind === 'glass'
        ? `no glass passes: even with g ${lever.most}`
        : lever.kind === 'area'
          ? `no width passes: even at ${lever.most} %`
          : `no setting passes: even closed above ${lever.most} W/m²`;
  const direct = left.parts.beam + left.parts.circumsolar;
  const rest = `it leaves ${against(left, asked)}`;
  if (!(direct + left.parts.sky + left.parts.ground > 0)) return `${reach}, ${rest}`;
  const cause =
    direct < 0.5
      ? `${Math.round(100 * (1 - direct))} % of that is light of sky and ground, which comes from all sides`
      : `${Math.round(100 * direct)} % of that is direct sun that ${lever.kind === 'overhang' ? 'comes in under it' : lever.kind === 'fins' ? 'comes in between them' : `${NAMES[lever.kind]} alone does not keep out`}`;
  const through =
    left.through && left.through.share < 0.999 ? `, most of it through window ${left.through.window}` : '';
  return `${reach}, ${rest}; ${cause}${through}`;
}
