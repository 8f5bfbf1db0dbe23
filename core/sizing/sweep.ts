import { buildModel } from '../form/build-model.ts';
import type { Model } from '../form/model.ts';
import { checkDayList, type DayOf, solsticeKeys } from '../gain/check-days.ts';
import type { CheckMemo } from '../gain/gain-memo.ts';
import { gainRun } from '../gain/gain-run.ts';
import { skyModelOf } from '../gain/open-light.ts';
import { energy_Wh } from '../gain/room-day.ts';
import type { WindowDay } from '../gain/series.ts';
import type { Scheme, Window } from '../scheme/schema.ts';
import type { SkyModel } from '../sky/transpose.ts';
import { darker, freeId, NEW_OVERHANG } from './lever.ts';
import { keptOff, type Stretch, squareSuns } from './shaded-dates.ts';

/** What is swept: the depth of an overhang, of fins on both sides, of both together, or the g of the glass. */
export type Swept = 'overhang' | 'fins' | 'both' | 'glass';

/** One setting of a sweep, and what the window then takes in. */
export type SweepPoint = {
  /** Depth [m], or g. */
  readonly amount: number;
  /** Clear hottest design day [Wh through the windows]. */
  readonly summer_Wh: number;
  /** Highest step of that day [W]. */
  readonly summerPeak_W: number;
  /** Clear day of the winter solstice [Wh]. */
  readonly winter_Wh: number;
  /**
   * Days between which no sun reaches the glass when it stands squarely in front; null: none, all of the year, glass, or windows
   * that differ in it.
   */
  readonly keptOff: Stretch | null;
};

export type Sweep = {
  /** Ids of the windows that are sized together. */
  readonly windows: readonly string[];
  readonly swept: Swept;
  readonly unit: 'm' | '';
  /** What the windows have now; null: none, or several that differ. */
  readonly now: number | null;
  /** From no device (or the clearest glass) onwards. */
  readonly points: readonly SweepPoint[];
  /** The smallest amount that brings the summer's gain down to the target; null: none does, or no target was given. */
  readonly meetsTarget: number | null;
  /**
   * The amount beyond which nothing worth having is gained: a further step saves less than 1 % of the summer's gain without the
   * device. Null: still worth it at the end of the sweep.
   */
  readonly enough: number | null;
};

export type SweepOptions = {
  /** Amounts to try, in order; absent: 0 to 2 m by 0.1 m, or g 0.7 down to 0.15. */
  readonly amounts?: readonly number[];
  /** Summer gain to come down to [Wh through the window]. */
  readonly target_Wh?: number;
  readonly skyModel?: SkyModel;
};

/** A further step that saves less than this of the open window's summer gain is not worth having. Common practice, no source. */
const WORTH = 0.01;

const steps = (from: number, to: number, by: number): number[] =>
  Array.from(
    { length: Math.round(Math.abs(to - from) / by) + 1 },
    (_, i) => Math.round((from + Math.sign(to - from) * i * by) * 1e6) / 1e6,
  );

/** Amounts swept where none are asked for. */
export const usualAmounts = (swept: Swept): readonly number[] =>
  swept === 'glass' ? steps(0.7, 0.15, 0.05) : steps(0, 2, 0.1);

/** The scheme with one window alone, its device or glass set to an amount. */
function withAmount(scheme: Scheme, window: Window, swept: Swept, amount: number): Scheme {
  const room = scheme.rooms.find((r) => r.id === window.room);
  const base = {
    ...scheme,
    blocks: scheme.blocks.filter((b) => b.id === room?.block),
    rooms: scheme.rooms.filter((r) => r.id === window.room),
    receptors: [],
    sheets: [],
  };
  if (swept === 'glass') {
    const glass = scheme.glass.find((g) => g.id === window.glass);
    if (!glass) throw new RangeError(`the scheme holds no glass ${JSON.stringify(window.glass)}`);
    const id = freeId(scheme.glass, `${glass.id}-g${amount}`);
    return { ...base, glass: [...scheme.glass, darker(glass, id, amount)], windows: [{ ...window, glass: id }] };
  }
  const kinds = swept === 'overhang' ? ['overhang'] : swept === 'fins' ? ['fin'] : ['overhang', 'fin'];
  const own = scheme.devices.filter((d) => window.devices.includes(d.id));
  const kept = own.filter((d) => !kinds.includes(d.kind));
  const devices: Scheme['devices'] = [];
  if (amount > 0 && kinds.includes('overhang')) {
    const like = own.find((d) => d.kind === 'overhang');
    devices.push(
      like?.kind === 'overhang'
        ? { ...like, depth: amount }
        : { id: freeId(scheme.devices, 'swept-overhang'), kind: 'overhang', depth: amount, tilt: 0, ...NEW_OVERHANG },
    );
  }
  if (amount > 0 && kinds.includes('fin')) {
    const like = own.find((d) => d.kind === 'fin');
    devices.push(
      like?.kind === 'fin'
        ? { ...like, depth: amount }
        : {
            id: freeId(scheme.devices, 'swept-fin'),
            kind: 'fin',
            side: 'both',
            depth: amount,
            gap: 0,
            above: 0,
            below: 0,
          },
    );
  }
  const used = [...kept, ...devices];
  return { ...base, devices: used, windows: [{ ...window, devices: used.map((d) => d.id) }] };
}

/** What a window has now of what is swept; null where it has none, or devices that differ. */
function amountNow(scheme: Scheme, window: Window, swept: Swept): number | null {
  if (swept === 'glass') return scheme.glass.find((g) => g.id === window.glass)?.g ?? null;
  const own = scheme.devices.filter((d) => window.devices.includes(d.id));
  const depths = own.flatMap((d) =>
    (d.kind === 'overhang' && swept !== 'fins') || (d.kind === 'fin' && swept !== 'overhang') ? [d.depth] : [],
  );
  return depths.length > 0 && depths.every((d) => d === depths[0]) ? (depths[0] as number) : null;
}

/** What one window takes in under a setting. */
type WindowPoint = {
  readonly summer_W: Float64Array;
  readonly winter_W: Float64Array;
  readonly step_min: number;
  readonly keptOff: Stretch | null;
};

/** One window under a setting, with everything that stands round it. */
function probeOf(scheme: Scheme, model: Model, window: Window, swept: Swept, memo: CheckMemo, skyModel: SkyModel) {
  const winterKey = solsticeKeys(scheme.site.latitude).winter;
  const days: readonly DayOf[] = checkDayList(scheme, false).filter((d) => d.key === 'hottest' || d.key === winterKey);
  const bearing = model.windows.find((w) => w.id === window.id)?.bearing_deg ?? 0;
  const suns = swept === 'glass' || window.wall === undefined ? null : squareSuns(scheme, bearing);
  return (amount: number): WindowPoint => {
    const now = withAmount(scheme, window, swept, amount);
    const built = { ...buildModel(now), solids: model.solids, trees: model.trees };
    const run = gainRun(now, built, days, memo, skyModel);
    const [form] = built.windows;
    if (!form) throw new Error('a sweep has one window');
    const columns = run.windowDays(form);
    const day = (key: string): WindowDay => columns.find((c) => c.day === key) as WindowDay;
    return {
      summer_W: day('hottest').total_W,
      winter_W: day(winterKey).total_W,
      step_min: run.grids[0]?.step_min ?? 0,
      keptOff: suns ? keptOff(suns, built, form) : null,
    };
  };
}

const added = (columns: readonly Float64Array[]): Float64Array =>
  columns.reduce((sum, column) => sum.map((watts, i) => watts + column[i]!));

/** The windows together, step by step: their peaks need not fall together. */
function together(amount: number, points: readonly WindowPoint[]): SweepPoint {
  const [first] = points as readonly [WindowPoint, ...WindowPoint[]];
  const summer = added(points.map((p) => p.summer_W));
  const alike = points.every((p) => p.keptOff?.from === first.keptOff?.from && p.keptOff?.to === first.keptOff?.to);
  return {
    amount,
    summer_Wh: energy_Wh(summer, first.step_min),
    summerPeak_W: Math.max(...summer),
    winter_Wh: energy_Wh(added(points.map((p) => p.winter_W)), first.step_min),
    keptOff: alike ? first.keptOff : null,
  };
}

/** What all of some windows have now; null where one has none, or they differ. */
function sameNow(scheme: Scheme, windows: readonly Window[], swept: Swept): number | null {
  const all = windows.map((w) => amountNow(scheme, w, swept));
  const [first] = all;
  return first !== undefined && all.every((a) => a === first) ? first : null;
}

/** Ids of the windows in one wall of a room, in the order of the scheme. */
export const windowsOfWall = (scheme: Scheme, room: string, wall: number): readonly string[] =>
  scheme.windows.filter((w) => w.room === room && w.wall === wall).map((w) => w.id);

/**
 * Sweep the depth of the overhang, fins or both of some windows, or the g of their glass: what they take in together on the clear
 * hottest design day and on the clear day of the winter solstice, side by side. Each gets the device as its own; where windows
 * stand so close that one's device would shade another, that is left out.
 * @throws {RangeError} when no window is named, or the scheme holds no such window
 */
export function sweep(
  scheme: Scheme,
  windowIds: readonly string[],
  swept: Swept,
  memo: CheckMemo,
  options: SweepOptions = {},
): Sweep {
  if (windowIds.length === 0) throw new RangeError('a sweep needs a window');
  const windows = windowIds.map((id) => {
    const window = scheme.windows.find((w) => w.id === id);
    if (!window) throw new RangeError(`the scheme holds no window ${JSON.stringify(id)}`);
    return window;
  });
  const model = buildModel(scheme);
  const skyModel = options.skyModel ?? skyModelOf(scheme);
  const probes = windows.map((w) => probeOf(scheme, model, w, swept, memo, skyModel));
  const at = (amount: number): SweepPoint =>
    together(
      amount,
      probes.map((probe) => probe(amount)),
    );
  const points = (options.amounts ?? usualAmounts(swept)).map(at);
  return {
    windows: windowIds,
    swept,
    unit: swept === 'glass' ? '' : 'm',
    now: sameNow(scheme, windows, swept),
    points,
    meetsTarget: options.target_Wh === undefined ? null : targetOf(points, options.target_Wh, at),
    enough: swept === 'glass' ? null : enoughOf(points),
  };
}

/** Between the last point above the target and the first one that meets it, by bisection. */
function targetOf(points: readonly SweepPoint[], target_Wh: number, at: (amount: number) => SweepPoint): number | null {
  const meets = (p: SweepPoint): boolean => p.summer_Wh <= target_Wh;
  const first = points.findIndex(meets);
  if (first < 0) return null;
  let within = (points[first] as SweepPoint).amount;
  if (first === 0) return within;
  let over = (points[first - 1] as SweepPoint).amount;
  while (Math.abs(within - over) > 5e-4) {
    const middle = (within + over) / 2;
    if (meets(at(middle))) within = middle;
    else over = middle;
  }
  return within;
}

/** The first amount after which no further step is worth having. */
function enoughOf(points: readonly SweepPoint[]): number | null {
  const open = points[0]?.summer_Wh ?? 0;
  let last = points.length - 1;
  while (last > 0) {
    const saved = (points[last - 1] as SweepPoint).summer_Wh - (points[last] as SweepPoint).summer_Wh;
    if (saved >= WORTH * open) break;
    last--;
  }
  return last === points.length - 1 && points.length > 1 ? null : (points[last]?.amount ?? null);
}
