import type { AreaSun } from '../shade/area-sunlit.ts';
import type { ShadowChange } from '../shade/shadow.ts';

/** How much of an amenity area lies in sun at a moment, before and after; ground under buildings is not part of it. */
export type AreaBeforeAfter = {
  readonly id: string;
  readonly name: string;
  readonly before: AreaSun;
  readonly after: AreaSun;
};

/** One diagram of a shadow study: worked out elsewhere, drawn here. */
export type ShadowMoment = {
  readonly instant_ms: number;
  /** Civil date, YYYY-MM-DD. */
  readonly date: string;
  /** Civil time with its offset, such as `21 March 2025, 09:00 (UTC+00:00)`. */
  readonly text: string;
  /** From true north, clockwise. */
  readonly azimuth_deg: number;
  /** True altitude, without refraction. */
  readonly altitude_deg: number;
  /** Null when the sun is at or below the horizon. */
  readonly change: ShadowChange | null;
  readonly areas: readonly AreaBeforeAfter[];
  /** How an ambiguous or skipped wall time was read; that the sun stands lower than the scheme counts. */
  readonly notes: readonly string[];
};
