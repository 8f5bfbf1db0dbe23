import { buildModel } from '../form/build-model.ts';
import { glazingToWall } from '../form/glazing-share.ts';
import type { Model, RoomForm, WindowForm } from '../form/model.ts';
import { checkDayList } from '../gain/check-days.ts';
import { type CheckMemo, createCheckMemo, nameOf, yearMemo } from '../gain/gain-memo.ts';
import { type GainRun, gainRun, weatherRun } from '../gain/gain-run.ts';
import { type RoomYear, roomYear } from '../gain/room-year.ts';
import { skyModelOf } from '../gain/open-light.ts';
import { CAUTIONS } from '../limits/cautions.ts';
import { countRooms, findingsOf } from '../limits/judge.ts';
import type { LimitSet } from '../limits/limit-set.ts';
import type { DayFacts, RoomFacts } from '../limits/room-facts.ts';
import type { Fault } from '../scheme/fault.ts';
import { schemeHash } from '../scheme/hash.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { SkyModel } from '../sky/transpose.ts';
import { checkNotes } from './check-notes.ts';
import type { CheckResult, RoomResult, WindowResult } from './check-result.ts';
import { ENGINE_VERSION } from './engine.ts';
import type { Pulse } from './job.ts';
import type { WeatherInput } from './weather-input.ts';

/** What a check may be told beyond scheme and limits. */
export type CheckOptions = {
  /** Remembers earlier checks; absent: everything is worked out. */
  readonly memo?: CheckMemo;
  /** A year of weather to look at besides the design days. */
  readonly weather?: WeatherInput | null;
  /** Absent: that of the scheme. */
  readonly skyModel?: SkyModel;
};

/** Windows worked out between two looks at whether the check should stop. */
const WINDOWS_A_SLICE = 8;

/**
 * Check a scheme as it will stand: what every room takes in on 21 March, 21 June, 23 September, 21 December and the hottest
 * design day, in five-minute steps under a clear sky, and what the limits say to it.
 * @param scheme    one that has passed its checks
 * @param limitSet  null: metrics without verdicts
 * @param notes     warnings of the loader, handed through
 * @param pulse     called between slices of windows
 * @returns         null when `pulse` said stop
 */
export async function checkScheme(
  scheme: Scheme,
  limitSet: LimitSet | null,
  notes: readonly Fault[],
  pulse: Pulse,
  options: CheckOptions = {},
): Promise<CheckResult | null> {
  const memo = options.memo ?? createCheckMemo(Math.max(600, scheme.windows.length));
  const model = buildModel(scheme);
  const season = limitSet?.limits.some((limit) => limit.metric === 'season-gain') ?? false;
  const dayList = checkDayList(scheme, season);
  const skyModel = options.skyModel ?? skyModelOf(scheme);
  const run = gainRun(scheme, model, dayList, memo, skyModel);
  const weather = options.weather ?? null;
  const yearOf = weather === null ? null : yearsOf(scheme, model, weather, memo, skyModel);
  const total = model.windows.length * (yearOf === null ? 1 : 2);
  const gains: RoomFacts[] = [];
  let done = 0;
  let next = WINDOWS_A_SLICE;
  for (const room of model.rooms) {
    gains.push({ ...run.roomGain(room), year: yearOf === null ? null : yearOf(room) });
    done += room.windows.length * (yearOf === null ? 1 : 2);
    if (done < next) continue;
    next = done + (yearOf === null ? WINDOWS_A_SLICE : 1);
    if ((await pulse(done, total)) === 'stop') return null;
  }
  return resultOf(scheme, model, limitSet, notes, run, gains, weather);
}

/** The year of a room, remembered by all that it depends on. */
function yearsOf(scheme: Scheme, model: Model, weather: WeatherInput, memo: CheckMemo, skyModel: SkyModel) {
  const run = weatherRun(scheme, model, weather.months, yearMemo(memo), skyModel);
  return (room: RoomForm): RoomYear =>
    memo.years.get(`${nameOf(memo, weather.months.key)} ${run.roomContent(room)}`, () => roomYear(run, room));
}

function resultOf(
  scheme: Scheme,
  model: Model,
  limitSet: LimitSet | null,
  notes: readonly Fault[],
  run: GainRun,
  gains: readonly RoomFacts[],
  weather: WeatherInput | null,
): CheckResult {
  const grids = weather === null ? run.grids : [...run.grids, ...weather.months.months];
  const days: DayFacts = { grids, zone: scheme.site.zone, latitude_deg: scheme.site.latitude };
  const findings = findingsOf(gains, days, limitSet);
  return {
    engine: ENGINE_VERSION,
    schemeHash: schemeHash(scheme),
    title: scheme.title,
    zone: scheme.site.zone,
    latitude_deg: scheme.site.latitude,
    skyModel: run.skyModel,
    limitSet,
    days: run.grids,
    weather: weather?.used ?? null,
    rooms: gains.map((g) => roomResult(g.room, g, run)),
    findings,
    counts: countRooms(findings),
    notes: [...notes, ...(weather?.notes ?? []), ...checkNotes(scheme, model, limitSet, weather !== null)],
    cautions: CAUTIONS,
  };
}

function roomResult(room: RoomForm, gain: RoomFacts, run: GainRun): RoomResult {
  const openings = gain.windows.reduce((sum, w) => sum + w.opening_m2, 0);
  return {
    room: room.id,
    name: room.name,
    use: room.use,
    block: room.block,
    floor_m2: room.floor_m2,
    glass_m2: gain.windows.reduce((sum, w) => sum + w.glass_m2, 0),
    glazingToFloor: room.floor_m2 > 0 ? openings / room.floor_m2 : 0,
    glazingToWall: glazingToWall(room, gain.windows),
    windows: gain.windows.map((w) => windowResult(w, run)),
    days: gain.days,
    year: gain.year ?? null,
  };
}

function windowResult(w: WindowForm, run: GainRun): WindowResult {
  const seen = run.windowSeen(w);
  return {
    window: w.id,
    bearing_deg: w.bearing_deg,
    tilt_deg: w.tilt_deg,
    opening_m2: w.opening_m2,
    glass_m2: w.glass_m2,
    g: w.glass.g,
    skyShare: seen.sky,
    horizonShare: seen.horizon,
    groundShare: seen.ground,
  };
}
