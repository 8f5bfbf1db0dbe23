import { buildModel } from '../form/build-model.ts';
import type { Model } from '../form/model.ts';
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
import { applyEdit, type SchemeEdit } from '../scheme/edit.ts';
import type { Checked, Fault } from '../scheme/fault.ts';
import type { Scheme, Tree } from '../scheme/schema.ts';
import { roomReader, type Under } from './room-facts-of.ts';

/** What stands around the room in a trial: everything, or all but the trees or the neighbours. */
export type Around = 'everything' | 'no-trees' | 'no-neighbours';

/** What a change costs besides: sun in winter and daylight. */
export type Price = {
  /** Clear day of the winter solstice [Wh per m² of floor]. */
  readonly winter_Whm2: number;
  /** Light let in of an evenly bright sky: Σ light transmittance × glass × share of the dome seen [m²]. */
  readonly daylight_m2: number;
};

/**
 * One room of a scheme, ready to be judged under many edits. Only the room, its windows and its block are built anew; what
 * stands around is shared, so that a trial costs what its own windows cost.
 */
export type RoomProbe = {
  readonly judge: (edit: SchemeEdit | null, around?: Around) => Checked<Finding>;
  readonly price: (edit: SchemeEdit | null) => Price;
  /** What the room takes in on some days under an edit. */
  readonly gain: (edit: SchemeEdit | null, days: readonly DayOf[]) => Checked<RoomGain>;
};

const NO_TREES: Tree[] = [];

/** The scheme with nothing of its rooms but one, its windows and its block. Other entries keep their ids and their order. */
function onlyRoom(scheme: Scheme, roomId: string): Scheme {
  const room = scheme.rooms.find((r) => r.id === roomId);
  if (!room) throw new RangeError(`the scheme holds no room ${JSON.stringify(roomId)}`);
  const windows = scheme.windows.filter((w) => w.room === roomId);
  return {
    ...scheme,
    blocks: scheme.blocks.filter((b) => b.id === room.block),
    rooms: [room],
    windows,
    receptors: [],
    sheets: [],
  };
}

/** Days that a limit looks at. */
export function daysForLimit(scheme: Scheme, limit: Limit): readonly DayOf[] {
  if (limit.metric === 'glazing-to-floor' || needsWeather(limit.metric)) return [];
  const season = limit.metric === 'season-gain';
  const wanted = season ? warmMonths(scheme.site.latitude).map(monthKey) : daysOf(limit);
  return checkDayList(scheme, season).filter((d) => wanted.includes(d.key));
}

/** @param model of the whole scheme */
export function roomProbe(
  scheme: Scheme,
  model: Model,
  limit: Limit,
  close: number,
  roomId: string,
  memo: CheckMemo,
  under: Under = {},
): RoomProbe {
  const skyModel = under.skyModel ?? skyModelOf(scheme);
  const small = onlyRoom(scheme, roomId);
  const own = small.blocks[0]?.id;
  const noNeighbours = model.solids.filter((s) => s.id === own || s.standing === 'proposed');
  const read = roomReader(scheme, limit, daysForLimit(scheme, limit), small.windows.length, memo, {
    ...under,
    skyModel,
  });
  const winterKey = solsticeKeys(scheme.site.latitude).winter;
  const winterDays = checkDayList(scheme, false).filter((d) => d.key === winterKey);

  const edited = (edit: SchemeEdit | null): Checked<Scheme> =>
    edit ? applyEdit(small, edit) : { ok: true, value: small, notes: [] };

  const modelOf = (now: Scheme, around: Around): Model => {
    const built = buildModel(now);
    const solids = around === 'no-neighbours' ? noNeighbours : model.solids;
    return { ...built, solids, trees: around === 'no-trees' ? NO_TREES : scheme.trees };
  };
  const runOf = (now: Scheme, days: readonly DayOf[]) => {
    const built = modelOf(now, 'everything');
    const run = gainRun(now, built, days, memo, skyModel);
    const [room] = built.rooms;
    if (!room) throw new Error('a probe holds one room');
    return { run, gain: run.roomGain(room) };
  };
  const judge = (edit: SchemeEdit | null, around: Around = 'everything'): Checked<Finding> => {
    const now = edited(edit);
    if (!now.ok) return now;
    const { facts, days } = read(now.value, modelOf(now.value, around));
    const finding = judgeRoom(limit, close, facts, days);
    return finding ? { ok: true, value: finding, notes: [] } : { ok: false, faults: [unread(roomId, limit)] };
  };
  return {
    judge,
    gain: (edit, days) => {
      const now = edited(edit);
      return now.ok ? { ok: true, value: runOf(now.value, days).gain, notes: [] } : now;
    },
    price: (edit) => {
      const now = edited(edit);
      if (!now.ok) return { winter_Whm2: Number.NaN, daylight_m2: Number.NaN };
      const { run, gain } = runOf(now.value, winterDays);
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
