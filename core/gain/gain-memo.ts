import type { Solid } from '../form/model.ts';
import type { Vec3 } from '../plane/vec.ts';
import type { Tree } from '../scheme/schema.ts';
import type { WindowShade } from '../shade/sunlit-fraction.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import { ContentMemo } from './content-memo.ts';
import type { GlassLight } from './glass-light.ts';
import type { FacingLight } from './open-light.ts';
import type { RoomYear } from './room-year.ts';
import type { WindowDay, WindowSeen } from './series.ts';

/**
 * What a check remembers between runs, so that an edit to one overhang works out that window again and nothing else. It is
 * handed in by whoever runs the checks; core keeps no state of its own. Results share their columns with it: post copies to
 * other threads, never transfer them.
 */
export type CheckMemo = {
  /** Short names for long contents, so that the keys of everything below stay short. */
  readonly names: ContentMemo<number>;
  readonly days: ContentMemo<DayGrid>;
  readonly facings: ContentMemo<FacingLight>;
  readonly shades: ContentMemo<WindowShade>;
  /** What a window sees, by month; the mean of the year first. Without trees all are one. */
  readonly seen: ContentMemo<readonly WindowSeen[]>;
  /** What a glass lets through at the sun’s angle, step by step. */
  readonly glassed: ContentMemo<GlassLight>;
  /** Sunlit share of a window over a day: the costly part. */
  readonly sunlit: ContentMemo<Float64Array>;
  readonly gains: ContentMemo<WindowDay>;
  /** Years of weather by room: a room that an edit leaves alone is not worked out again. */
  readonly years: ContentMemo<RoomYear>;
  /** Hashes of what stands around, by the list of solids. */
  readonly surroundings: WeakMap<readonly Solid[], { readonly trees: readonly Tree[]; readonly key: string }>;
  /** The sun's direction at every step of a grid, by the north it was drawn for. */
  readonly suns: WeakMap<DayGrid, { readonly north_rad: number; readonly suns: readonly (Vec3 | null)[] }>;
};

/** A short name for a content: the same as long as it is remembered, and never one that another content had. */
export const nameOf = (memo: CheckMemo, content: string): number => memo.names.get(content, () => memo.names.made);

/** An empty memory. @param windows about how many windows it should hold the days of */
export const createCheckMemo = (windows = 600): CheckMemo => ({
  names: new ContentMemo(windows * 4),
  days: new ContentMemo(64),
  facings: new ContentMemo(1000),
  shades: new ContentMemo(windows),
  seen: new ContentMemo(windows),
  glassed: new ContentMemo(1000),
  sunlit: new ContentMemo(windows * 6),
  gains: new ContentMemo(windows * 6),
  years: new ContentMemo(200),
  surroundings: new WeakMap(),
  suns: new WeakMap(),
});

/** A memory for trials of one room over a year of weather: what a trial leaves alone is not worked out again. @param windows of the room */
export const trialMemo = (memo: CheckMemo, windows: number): CheckMemo => ({
  ...yearMemo(memo),
  // Twelve months a window, and as many of a trial that changes every window.
  sunlit: new ContentMemo(24 * Math.max(2, windows)),
  gains: new ContentMemo(24 * Math.max(2, windows)),
});

/**
 * A memory for one pass over a year of weather: it shares what a window's shade is with the checks' memory, and soon forgets the
 * hours, which would push everything else out.
 */
export const yearMemo = (memo: CheckMemo): CheckMemo => ({
  ...createCheckMemo(16),
  names: memo.names,
  shades: memo.shades,
  seen: memo.seen,
  surroundings: memo.surroundings,
  suns: memo.suns,
});
