import type { Model } from '../form/model.ts';
import type { CheckMemo } from '../gain/gain-memo.ts';
import type { Finding } from '../limits/finding.ts';
import type { Limit, LimitSet } from '../limits/limit-set.ts';
import { needsWeather } from '../limits/metric.ts';
import type { SchemeEdit } from '../scheme/edit.ts';
import type { Checked } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { Under } from './room-facts-of.ts';
import { type RoomProbe, roomProbe } from './room-probe.ts';
import { roomTrials } from './room-trials.ts';

/** A room under an edit. */
export type Judged = {
  /** By the limit that was asked about. */
  readonly asked: Finding;
  /** By that of the limits which the room is over now that it is furthest past then, or nearest to. */
  readonly deciding: Finding;
};

/** A room and all that it is held to: a change brings it within only when it is over none of its limits. */
export type RoomBench = Pick<RoomProbe, 'price'> & {
  /** By the limit asked about alone. */
  readonly probe: RoomProbe;
  readonly judge: (edit: SchemeEdit | null) => Checked<Judged>;
  /** What the room is not over now and would be over under an edit. */
  readonly pushed: (edit: SchemeEdit) => readonly Finding[];
};

/** How far a finding is past its limit as a share of it, above 0 only where it is over; of a limit of 0, in its unit. */
export function excessOf(f: Finding): number {
  const limit = f.limitValue ?? 0;
  const past = ((f.value - limit) * (f.comparison === 'at-least' ? -1 : 1)) / (limit > 0 ? limit : 1);
  if (f.verdict === 'over') return past > 0 ? past : Number.MIN_VALUE;
  return Math.min(past, 0);
}

/** @param asked limit of the set that is asked about; the others are those that can be read and apply to the room */
export function roomBench(
  scheme: Scheme,
  model: Model,
  limitSet: LimitSet,
  asked: Limit,
  roomId: string,
  memo: CheckMemo,
  under: Under,
): RoomBench {
  const trials = roomTrials(scheme, model, roomId);
  const probeOf = (limit: Limit): RoomProbe => roomProbe(scheme, trials, limit, limitSet.close, memo, under);
  const isRead = (limit: Limit): boolean => !needsWeather(limit.metric) || (under.weather ?? null) !== null;
  const probe = probeOf(asked);
  const others = limitSet.limits
    .filter((limit) => limit !== asked && isRead(limit))
    .map(probeOf)
    .flatMap((other) => {
      const now = other.judge(null);
      return now.ok ? [{ other, isBroken: now.value.verdict === 'over' }] : [];
    });
  const broken = others.filter(({ isBroken }) => isBroken).map(({ other }) => other);
  const kept = others.filter(({ isBroken }) => !isBroken).map(({ other }) => other);
  return {
    probe,
    price: probe.price,
    judge: (edit) => {
      const own = probe.judge(edit);
      if (!own.ok) return own;
      let deciding = own.value;
      for (const other of broken) {
        const found = other.judge(edit);
        if (found.ok && excessOf(found.value) > excessOf(deciding)) deciding = found.value;
      }
      return { ok: true, value: { asked: own.value, deciding }, notes: [] };
    },
    pushed: (edit) =>
      kept.flatMap((other) => {
        const found = other.judge(edit);
        return found.ok && found.value.verdict === 'over' ? [found.value] : [];
      }),
  };
}
