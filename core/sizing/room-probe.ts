import { checkDayList, type DayOf, monthKey, solsticeKeys, warmMonths } from '../gain/check-days.ts';
import type { CheckMemo } from '../gain/gain-memo.ts';
import { gainRun, type RoomGain } from '../gain/gain-run.ts';
import { skyModelOf } from '../gain/open-light.ts';
import { energy_Wh } from '../gain/room-day.ts';
import type { Finding } from '../limits/finding.ts';
import { judgeRoom } from '../limits/judge.ts';
import type { Limit } from '../limits/limit-set.ts';
import { needsWeather } from '../limits/metric.ts';
import { daysOf } from '../limits/reading.ts';
import type { SchemeEdit } from '../scheme/edit.ts';
import type { Checked, Fault } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import { roomReader, type Under } from './room-facts-of.ts';
import type { Around, RoomTrials, Trial } from './room-trials.ts';

/** What a change costs besides: sun in winter and daylight. */
export type Price = {
  /** Clear day of the winter solstice [Wh per m² of floor]. */
  readonly winter_Whm2: number;
  /** Light let in of an evenly bright sky: Σ light transmittance × glass × share of the dome seen [m²]. */
  readonly daylight_m2: number;
};

/** One room of a scheme, ready to be judged by one limit under many edits. */
export type RoomProbe = {
  readonly judge: (edit: SchemeEdit | null, around?: Around) => Checked<Finding>;
  readonly price: (edit: SchemeEdit | null) => Price;
  /** What the room takes in on some days under an edit. */
  readonly gain: (edit: SchemeEdit | null, days: readonly DayOf[]) => Checked<RoomGain>;
};

/** Days that a limit looks at. */
export function daysForLimit(scheme: Scheme, limit: Limit): readonly DayOf[] {
  if (limit.metric === 'glazing-to-floor' || needsWeather(limit.metric)) return [];
  const season = limit.metric === 'season-gain';
  const wanted = season ? warmMonths(scheme.site.latitude).map(monthKey) : daysOf(limit);
  return checkDayList(scheme, season).filter((d) => wanted.includes(d.key));
}

/** @param trials of the room, which probes of several limits share */
export function roomProbe(
  scheme: Scheme,
  trials: RoomTrials,
  limit: Limit,
  close: number,
  memo: CheckMemo,
  under: Under = {},
): RoomProbe {
  const skyModel = under.skyModel ?? skyModelOf(scheme);
  const read = roomReader(scheme, limit, daysForLimit(scheme, limit), trials.windows, memo, {
    ...under,
    skyModel,
  });
  const winterKey = solsticeKeys(scheme.site.latitude).winter;
  const winterDays = checkDayList(scheme, false).filter((d) => d.key === winterKey);

  const runOf = ({ now, built }: Trial, days: readonly DayOf[]) => {
    const run = gainRun(now, built, days, memo, skyModel);
    const [room] = built.rooms;
    if (!room) throw new Error('a probe holds one room');
    return { run, gain: run.roomGain(room) };
  };
  const judge = (edit: SchemeEdit | null, around: Around = 'everything'): Checked<Finding> => {
    const trial = trials.of(edit, around);
    if (!trial.ok) return trial;
    const { facts, days } = read(trial.value.now, trial.value.built);
    const finding = judgeRoom(limit, close, facts, days);
    return finding ? { ok: true, value: finding, notes: [] } : { ok: false, faults: [unread(trials.room, limit)] };
  };
  return {
    judge,
    gain: (edit, days) => {
      const trial = trials.of(edit, 'everything');
      return trial.ok ? { ok: true, value: runOf(trial.value, days).gain, notes: [] } : trial;
    },
    price: (edit) => {
      const trial = trials.of(edit, 'everything');
      if (!trial.ok) return { winter_Whm2: Number.NaN, daylight_m2: Number.NaN };
      const { run, gain } = runOf(trial.value, winterDays);
      const [grid] = run.grids;
      const [day] = gain.days;
      return {
        winter_Whm2: grid && day ? energy_Wh(day.total_W, grid.step_min) / gain.room.floor_m2 : Number.NaN,
        daylight_m2: gain.windows.reduce((sum, w) => sum + w.glass.light * w.glass_m2 * run.windowSeen(w).sky, 0),
      };
    },
  };
}

const unread = (room: string, limit: Limit): Fault => ({
  level: 'error',
  code: 'limit-not-for-room',
  place: `limit ${limit.id}`,
  message: `the limit says nothing of room ${room}`,
  cure: 'choose a limit that applies to the room’s use, and a room with a window and a floor',
});
