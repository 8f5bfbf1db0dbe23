import { buildModel } from '../form/build-model.ts';
import type { CheckMemo } from '../gain/gain-memo.ts';
import type { Finding } from '../limits/finding.ts';
import type { LimitSet } from '../limits/limit-set.ts';
import { shown } from '../limits/reason.ts';
import type { SchemeEdit } from '../scheme/edit.ts';
import { type Fault, faultLine } from '../scheme/fault.ts';
import type { Scheme, Window } from '../scheme/schema.ts';
import type { SkyModel } from '../sky/transpose.ts';
import { areaLever, blindLever, finLever, glassLever, type Lever, overhangLever } from './lever.ts';
import { type RoomProbe, roomProbe } from './room-probe.ts';
import type { RestsOn, Way, Ways, WayThatFails } from './ways.ts';

/** Bisection stops when the bracket is this share of the lever's amount wide. */
const TIGHT = 5e-4;

/** A lever with the windows it is done to. */
type Trial = { readonly lever: Lever; readonly windows: readonly Window[] };

/**
 * For a room that is over a limit: the smallest single change of each lever (overhang, fins, glass, area, external blind) that
 * brings it within, found by bisection on the engine itself. A lever is first tried on the window that brings most, then on all
 * windows of the room. The change ends just at the limit, which counts as close, not as over; levers that cannot do it by
 * themselves say why.
 * @param roomId   of the room
 * @param finding  of the check: which limit is meant
 * @returns        no ways for a finding that is not over, or has no limit; what it rests on all the same
 * @throws {RangeError} when the set holds no such limit, or the scheme no such room
 */
export function waysToPass(
  scheme: Scheme,
  limitSet: LimitSet,
  roomId: string,
  finding: Finding,
  memo: CheckMemo,
  skyModel?: SkyModel,
): Ways {
  const limit = limitSet.limits.find((l) => l.id === finding.limit);
  if (!limit) throw new RangeError(`the limit set holds no limit ${JSON.stringify(finding.limit)}`);
  const probe = roomProbe(scheme, buildModel(scheme), limit, limitSet.close, roomId, memo, skyModel);
  const price = probe.price(null);
  const windows = scheme.windows.filter((w) => w.room === roomId);
  const over = finding.verdict === 'over';
  const ways = over ? leversFor(scheme, windows, finding).map((trials) => bestOf(probe, trials)) : [];
  return { finding, price, restsOn: restsOn(probe, null, finding), ways };
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
function bestOf(probe: RoomProbe, trials: readonly Trial[]): Way {
  let last: Way | null = null;
  for (const trial of trials) {
    if (trial.windows.length === 0) return rooflightsOnly(trial);
    last = wayOf(probe, trial);
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

function wayOf(probe: RoomProbe, { lever, windows }: Trial): Way {
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
  const furthest = probe.judge(edit);
  if (!furthest.ok) return asFarAsItGoes(probe, { lever, windows }, furthest.faults);
  if (furthest.value.verdict === 'over') {
    const best = { amount: lever.most, unit: lever.unit, value: furthest.value.value };
    return failed(whyNot(lever, furthest.value), best);
  }
  const amount = bisect(lever, (x) => passes(probe, lever.edit(x)));
  return passing(probe, lever, ids, amount);
}

/** Whether a room is not over under an edit. An edit that changes nothing leaves it over; one that is refused counts as over. */
function passes(probe: RoomProbe, edit: SchemeEdit | null): boolean {
  if (!edit) return false;
  const found = probe.judge(edit);
  return found.ok && found.value.verdict !== 'over';
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
function asFarAsItGoes(probe: RoomProbe, { lever, windows }: Trial, faults: readonly Fault[]): Way {
  const allowed = (x: number): boolean => {
    const edit = lever.edit(x);
    return edit === null || probe.judge(edit).ok;
  };
  const most = bisect({ ...lever, least: lever.most, most: lever.least, round: (x) => x }, allowed);
  const edit = lever.edit(most);
  const found = edit ? probe.judge(edit) : null;
  if (found?.ok && found.value.verdict !== 'over') return wayOf(probe, { lever: { ...lever, most }, windows });
  const reason = `there is no room for it: ${faults.map(faultLine).join('; ')}`;
  const best = found?.ok ? { amount: most, unit: lever.unit, value: found.value.value } : null;
  return { passes: false, lever: lever.kind, windows: windows.map((w) => w.id), reason, best };
}

function passing(probe: RoomProbe, lever: Lever, windows: readonly string[], amount: number): Way {
  const edit = lever.edit(amount);
  const after = edit ? probe.judge(edit) : null;
  if (!edit || !after?.ok) throw new Error('bisection ended on an amount that does not pass');
  return {
    passes: true,
    lever: lever.kind,
    windows,
    amount,
    unit: lever.unit,
    text: edit.kind === 'together' ? edit.name : '',
    edit,
    after: after.value,
    price: probe.price(edit),
    restsOn: restsOn(probe, edit, after.value),
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

/** Why a lever does not suffice at the furthest it goes. */
function whyNot(lever: Lever, left: Finding): string {
  const reach =
    lever.kind === 'overhang' || lever.kind === 'fins'
      ? `no depth passes: even ${lever.most} m deep`
      : lever.kind === 'glass'
        ? `no glass passes: even with g ${lever.most}`
        : lever.kind === 'area'
          ? `no width passes: even at ${lever.most} %`
          : `no setting passes: even closed above ${lever.most} W/m²`;
  const direct = left.parts.beam + left.parts.circumsolar;
  const rest = `it leaves ${shown(left.value)} ${left.unit} against ${shown(left.limitValue ?? 0)}`;
  if (!(direct + left.parts.sky + left.parts.ground > 0)) return `${reach}, ${rest}`;
  const cause =
    direct < 0.5
      ? `${Math.round(100 * (1 - direct))} % of that is light of sky and ground, which comes from all sides`
      : `${Math.round(100 * direct)} % of that is direct sun that ${lever.kind === 'overhang' ? 'comes in under it' : lever.kind === 'fins' ? 'comes in between them' : `${NAMES[lever.kind]} alone does not keep out`}`;
  const through =
    left.through && left.through.share < 0.999 ? `, most of it through window ${left.through.window}` : '';
  return `${reach}, ${rest}; ${cause}${through}`;
}
