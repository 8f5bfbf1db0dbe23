import type { Model, RoomForm, Solid, WindowForm } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import type { Vec3 } from '../plane/vec.ts';
import { contentHash } from '../scheme/hash.ts';
import type { Scheme } from '../scheme/schema.ts';
import { windowSkies } from '../shade/sky-share.ts';
import { sunVector } from '../shade/sun-vector.ts';
import { sunlitFraction, type WindowShade, windowShade } from '../shade/sunlit-fraction.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import { monthly, monthOf } from '../sky/monthly.ts';
import type { SkyModel } from '../sky/transpose.ts';
import { checkDay, type DayOf, dayInput } from './check-days.ts';
import { type CheckMemo, nameOf } from './gain-memo.ts';
import { glassCurveName, glassLight } from './glass-light.ts';
import { openLight, viewOf } from './open-light.ts';
import { roomDay } from './room-day.ts';
import type { RoomDay, WindowDay, WindowSeen } from './series.ts';
import type { WeatherMonths } from './weather-run.ts';
import { windowDay } from './window-day.ts';

/** In place of a month, for trees: the mean of the year. */
const YEAR_MEAN = 0;
const MONTHS = Array.from({ length: 13 }, (_, month) => month);

/** A room with its windows and what it takes in on each day that was run. */
export type RoomGain = {
  readonly room: RoomForm;
  /** Its windows, in the order of the scheme. */
  readonly windows: readonly WindowForm[];
  /** One for each grid, in the same order. */
  readonly days: readonly RoomDay[];
};

/** The gain stage of one scheme, ready to be asked window by window. */
export type GainRun = {
  readonly grids: readonly DayGrid[];
  readonly skyModel: SkyModel;
  readonly windowDays: (window: WindowForm) => readonly WindowDay[];
  /** What a window sees; trees as in the mean of the year. */
  readonly windowSeen: (window: WindowForm) => WindowSeen;
  readonly roomGain: (room: RoomForm) => RoomGain;
  /** Names all that a room's gain depends on besides the days. */
  readonly roomContent: (room: RoomForm) => string;
};

/** A day with the sun's direction in drawing axes at every step above the horizon. */
type SunnyDay = {
  readonly grid: DayGrid;
  /** Short name of all that the day depends on. */
  readonly name: number;
  readonly month: number;
  readonly suns: readonly (Vec3 | null)[];
};

/** What a window's shade depends on: the opening, its devices, and all that stands around. */
const shadeKey = (w: WindowForm, surroundings: string): string =>
  JSON.stringify([
    w.origin,
    w.right,
    w.up,
    w.width_m,
    w.height_m,
    w.reveal_m,
    w.shaders.map((s) => s.corners),
    surroundings,
  ]);

/** What stands around, in one word. */
function surroundingsKey(model: Model, solids: readonly Solid[], memo: CheckMemo): string {
  const known = memo.surroundings.get(model.solids);
  if (known?.trees === model.trees) return known.key;
  const bare = solids.map((s) => [s.id, s.outline, s.base_m, s.top_m]);
  const key = contentHash(JSON.stringify([bare, model.trees]));
  memo.surroundings.set(model.solids, { trees: model.trees, key });
  return key;
}

function sunnyDay(scheme: Scheme, day: DayOf, north_rad: number, memo: CheckMemo): SunnyDay {
  const { key: _, name: __, ...content } = dayInput(scheme, day);
  const key = JSON.stringify(content);
  const found = memo.days.get(`${day.key} ${key}`, () => checkDay(scheme, day));
  const grid = found.name === day.name ? found : { ...found, name: day.name };
  return { grid, name: nameOf(memo, key), month: monthOf(day.date), suns: sunsOf(grid, north_rad, memo) };
}

/** The sun's direction in drawing axes at every step; null below the horizon. */
function sunsOf(grid: DayGrid, north_rad: number, memo: CheckMemo): readonly (Vec3 | null)[] {
  const known = memo.suns.get(grid);
  if (known?.north_rad === north_rad) return known.suns;
  const suns = Array.from(grid.altitude_rad, (altitude, i) =>
    altitude > 0 ? sunVector(grid.azimuth_rad[i]!, altitude, north_rad) : null,
  );
  memo.suns.set(grid, { north_rad, suns });
  return suns;
}

/** Share of a window's glass in direct sun at every step of a day; 0 with the sun down or behind it. */
function sunlitOver(shade: WindowShade, day: SunnyDay, cosIncidence: Float64Array): Float64Array {
  const sunlit = new Float64Array(cosIncidence.length);
  for (let i = 0; i < sunlit.length; i++) {
    const sun = day.suns[i];
    if (sun && cosIncidence[i]! > 0) sunlit[i] = sunlitFraction(shade, sun, day.month);
  }
  return sunlit;
}

/**
 * The gain stage over a scheme: what each window and room takes in on each of the days, as the scheme stands afterwards.
 * @param model    of the scheme; its solids may be those of a larger one that it is part of
 * @param dayList  from `checkDayList`
 */
export const gainRun = (
  scheme: Scheme,
  model: Model,
  dayList: readonly DayOf[],
  memo: CheckMemo,
  skyModel: SkyModel,
): GainRun =>
  runOver(
    scheme,
    model,
    dayList.map((day) => sunnyDay(scheme, day, model.north_rad, memo)),
    memo,
    skyModel,
  );

/**
 * The gain stage over a year of weather, month by month.
 * @param memo  what a year leaves in it is large: the caller gives one that forgets soon, or none of the check's
 */
export const weatherRun = (
  scheme: Scheme,
  model: Model,
  weather: WeatherMonths,
  memo: CheckMemo,
  skyModel: SkyModel,
): GainRun =>
  runOver(
    scheme,
    model,
    weather.months.map((grid) => ({
      grid,
      name: nameOf(memo, `${weather.key} ${grid.key}`),
      month: monthOf(grid.date),
      suns: sunsOf(grid, model.north_rad, memo),
    })),
    memo,
    skyModel,
  );

function runOver(
  scheme: Scheme,
  model: Model,
  days: readonly SunnyDay[],
  memo: CheckMemo,
  skyModel: SkyModel,
): GainRun {
  const solids = solidsAt(model.solids, 'after');
  const surroundings = surroundingsKey(model, solids, memo);
  const grids = days.map((d) => d.grid);
  const byId = new Map(model.windows.map((w) => [w.id, w]));
  const keys = new Map<string, string>();
  const keyOf = (w: WindowForm): string => {
    const known = keys.get(w.id);
    if (known !== undefined) return known;
    const key = String(nameOf(memo, shadeKey(w, surroundings)));
    keys.set(w.id, key);
    return key;
  };
  const shadeOf = (w: WindowForm): WindowShade => memo.shades.get(keyOf(w), () => windowShade(w, solids, model.trees));
  const seenIn = (w: WindowForm, month: number): WindowSeen =>
    memo.seen.get(keyOf(w), () => windowSkies(shadeOf(w), MONTHS))[month] as WindowSeen;

  const ownOf = (w: WindowForm): number =>
    nameOf(memo, JSON.stringify([w.id, w.bearing_deg, w.glass_m2, w.glass, w.blinds]));
  const windowDays = (w: WindowForm): readonly WindowDay[] => {
    const key = keyOf(w);
    const facing = { bearing_deg: w.bearing_deg, tilt_deg: w.tilt_deg };
    const own = ownOf(w);
    return days.map((day) => {
      const ground = monthly(scheme.site.groundReflectance, day.month);
      const sky = `${day.name} ${skyModel} ${ground}`;
      return memo.gains.get(`${day.grid.key} ${sky} ${model.north_rad} ${own} ${key}`, () => {
        const facingKey = `${sky} ${facing.bearing_deg} ${facing.tilt_deg}`;
        const { open, cosIncidence } = memo.facings.get(facingKey, () => openLight(day.grid, facing, skyModel, ground));
        const sunlit = memo.sunlit.get(`${day.name} ${model.north_rad} ${key}`, () =>
          sunlitOver(shadeOf(w), day, cosIncidence),
        );
        const seen = seenIn(w, day.month);
        const glass = memo.glassed.get(`${facingKey} ${glassCurveName(w.glass)}`, () =>
          glassLight(w.glass, cosIncidence),
        );
        return { ...windowDay(w, day.grid, open, { sunlit, cosIncidence }, viewOf(seen, w.tilt_deg), glass), seen };
      });
    });
  };

  const roomGain = (room: RoomForm): RoomGain => {
    const windows = room.windows.flatMap((id) => byId.get(id) ?? []);
    const each = windows.map(windowDays);
    const roomDays = grids.map((grid, d) =>
      roomDay(
        room.id,
        grid.key,
        each.map((w) => w[d] as WindowDay),
        grid.instant_ms.length,
      ),
    );
    return { room, windows, days: roomDays };
  };
  const roomContent = (room: RoomForm): string =>
    JSON.stringify([
      room.id,
      room.windows.map((id) => {
        const w = byId.get(id);
        return w === undefined ? id : [ownOf(w), keyOf(w)];
      }),
      skyModel,
      model.north_rad,
      scheme.site.groundReflectance,
    ]);
  return { grids, skyModel, windowDays, windowSeen: (w) => seenIn(w, YEAR_MEAN), roomGain, roomContent };
}
