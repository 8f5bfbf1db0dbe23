import type { Model } from '../form/model.ts';
import { type DayOf, warmMonths } from '../gain/check-days.ts';
import { type CheckMemo, trialMemo } from '../gain/gain-memo.ts';
import { gainRun, weatherRun } from '../gain/gain-run.ts';
import { skyModelOf } from '../gain/open-light.ts';
import { roomYear } from '../gain/room-year.ts';
import { onlyMonths, type WeatherMonths } from '../gain/weather-run.ts';
import type { Limit } from '../limits/limit-set.ts';
import { needsWeather } from '../limits/metric.ts';
import type { DayFacts, RoomFacts } from '../limits/room-facts.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { SkyModel } from '../sky/transpose.ts';

/** What a check was made with, and a trial of the same room is to be made with. */
export type Under = {
  /** Absent: that of the scheme. */
  readonly skyModel?: SkyModel;
  /** The year of weather; absent or null: limits that need one cannot be read. */
  readonly weather?: WeatherMonths | null;
};

/** The one room of a scheme with all that a limit may look at, and the days or the year that it was run over. */
export type RoomRead = { readonly facts: RoomFacts; readonly days: DayFacts };

/**
 * A reader of single rooms for one limit: what is run is what the limit looks at, days or a year of weather, and no more. Trials of
 * one room remember what they have in common.
 * @param scheme  the whole one, for its site
 * @param dayList days that the limit looks at
 */
export function roomReader(
  scheme: Scheme,
  limit: Limit,
  dayList: readonly DayOf[],
  windows: number,
  memo: CheckMemo,
  under: Under,
): (now: Scheme, model: Model) => RoomRead {
  const { latitude } = scheme.site;
  const year = needsWeather(limit.metric) ? (under.weather ?? null) : null;
  const months = year !== null && limit.metric === 'warm-gain' ? onlyMonths(year, warmMonths(latitude)) : year;
  const ofYear = months === null ? null : trialMemo(memo, windows);
  return (now, model) => {
    const [room] = model.rooms;
    if (!room) throw new Error('a trial holds one room');
    // An input that is moved may be the scheme's own model of the sky.
    const skyModel = under.skyModel ?? skyModelOf(now);
    const site = { zone: scheme.site.zone, latitude_deg: latitude };
    if (months === null || ofYear === null) {
      const run = gainRun(now, model, dayList, memo, skyModel);
      return { facts: run.roomGain(room), days: { grids: run.grids, ...site } };
    }
    const run = weatherRun(now, model, months, ofYear, skyModel);
    const { windows: own } = run.roomGain(room);
    return {
      facts: { room, windows: own, days: [], year: roomYear(run, room) },
      days: { grids: run.grids, ...site },
    };
  };
}
