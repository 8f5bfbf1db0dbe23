import type { MetricId } from './metric-id.ts';

/** One limit of a set: data, never code. */
export type Limit = {
  readonly id: string;
  readonly name: string;
  readonly metric: MetricId;
  readonly comparison: 'at-most' | 'at-least';
  readonly value: number;
  readonly unit: string;
  /** Values by true bearing of the most glazed wall: N, E, S, W; overrides `value` where given. */
  readonly byBearing?: { readonly N: number; readonly E: number; readonly S: number; readonly W: number };
  /**
   * Values by openings as a share of the floor [%], smallest first: the first whose `upTo` is not less counts, above all of them
   * `value`. By bearing, where the entry says so.
   */
  readonly byGlazing?: readonly {
    readonly upTo: number;
    readonly value: number;
    readonly byBearing?: Limit['byBearing'];
  }[];
  /** Uses it applies to; absent: every room with a window. */
  readonly uses?: readonly string[];
  /** Design days it looks at, by key; absent: the hottest design day. */
  readonly days?: readonly string[];
  /** Civil clock window for means, such as ["07:30", "17:30"]. */
  readonly clock?: readonly [string, string];
  /** Threshold of hours-above [W per m² of floor]. */
  readonly above?: number;
  readonly source: string;
  /** When someone last compared it with its source, YYYY-MM-DD; null: never. */
  readonly checked: string | null;
};

export type LimitSet = {
  readonly format: 'shadewright-limits';
  readonly version: 1;
  readonly id: string;
  readonly name: string;
  /** True for the sets that ship with the program: every page that uses one says so. */
  readonly example: boolean;
  readonly note: string;
  /** Width of the band under a limit that counts as close, as a share of the limit, such as 0.1. */
  readonly close: number;
  readonly limits: readonly Limit[];
};
