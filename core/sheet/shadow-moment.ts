import type { ShadowChange } from '../shade/shadow.ts';

/** How much of an amenity area lies in sun at a moment, before and after; ground under buildings is not part of it. */
export type AreaSun = {
  readonly id: string;
  readonly name: string;
  /** Open ground of the area, before and after [m²]. */
  readonly openBefore_m2: number;
  readonly openAfter_m2: number;
  /** Share of the open ground of its own stage that lies in sun, 0..1. */
  readonly sunlitBefore: number;
  readonly sunlitAfter: number;
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
  /** Null when the sun is at or below the horizon, or below the altitude under which the scheme leaves it out. */
  readonly change: ShadowChange | null;
  readonly areas: readonly AreaSun[];
  /** How an ambiguous or skipped wall time was read, where it was. */
  readonly note?: string;
};
