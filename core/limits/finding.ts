import type { Part } from '../gain/series.ts';
import type { MetricId } from './metric-id.ts';

export type Verdict = 'within' | 'close' | 'over';

/** How one number was reached: opens from the desk, prints in the annex, copies as text. */
export type Working = {
  /** What the number is, such as `peak solar gain per m² of floor`. */
  readonly title: string;
  readonly method: string;
  /** Author, title, year, equation or page; or `common practice, no source`. */
  readonly source: string;
  readonly steps: readonly WorkingStep[];
};

export type WorkingStep = {
  readonly label: string;
  /** The formula with its symbols, where there is one. */
  readonly formula?: string;
  readonly value: number | string;
  readonly unit: string;
  /** Place in the scheme that an input comes from, such as `windows[2].width`. */
  readonly place?: string;
  readonly note?: string;
};

/** A limit applied to a room. */
export type Finding = {
  readonly room: string;
  readonly roomName: string;
  /** Id of the limit in its set. */
  readonly limit: string;
  readonly metric: MetricId;
  readonly metricName: string;
  readonly unit: string;
  readonly value: number;
  /** Null, with the margin, when the scheme has chosen no limit set. */
  readonly limitValue: number | null;
  readonly comparison: 'at-most' | 'at-least';
  /** Value minus limit for an upper limit, limit minus value for a lower one: above 0 is over. */
  readonly margin: number | null;
  /** Null when the scheme has chosen no limit set: a metric without a verdict. */
  readonly verdict: Verdict | null;
  /** When it happens, where it is a moment: UTC ms and the civil text. */
  readonly when: { readonly instant_ms: number; readonly text: string; readonly day: string } | null;
  /** The window that brings most, and its share 0..1. */
  readonly through: { readonly window: string; readonly share: number } | null;
  /** Key of the design day it was read on; null where it is of no single day. */
  readonly day: string | null;
  /** Clock hours that a mean was taken over. */
  readonly clock: readonly [string, string] | null;
  /** Shares of the parts at that moment (or over that period), summing to 1; all 0 where nothing comes in. */
  readonly parts: { readonly [P in Part]: number };
  /** One sentence: why. */
  readonly reason: string;
  /** Validity notes: where a method's range was left. */
  readonly notes: readonly string[];
};
