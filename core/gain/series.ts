/** The parts of the sun's heat that come in through a window, kept apart all the way to the report [W]. */
export type Part = 'beam' | 'circumsolar' | 'sky' | 'horizon' | 'ground';
export const PARTS: readonly Part[] = ['beam', 'circumsolar', 'sky', 'horizon', 'ground'];

/** One design day: its instants and the sky over it. Columns run together, one row a step, sampled at the middle of the step. */
export type DayGrid = {
  readonly key: string;
  readonly name: string;
  /** Civil date, YYYY-MM-DD. */
  readonly date: string;
  readonly step_min: number;
  /** UTC milliseconds of each sample. */
  readonly instant_ms: Float64Array;
  /** Minutes of the civil clock since midnight at each sample, as the clock shows them. */
  readonly clock_min: Float64Array;
  readonly azimuth_rad: Float64Array;
  /** True altitude. */
  readonly altitude_rad: Float64Array;
  readonly beamNormal_Wm2: Float64Array;
  readonly diffuse_Wm2: Float64Array;
  readonly global_Wm2: Float64Array;
  readonly tAir_C: Float64Array;
};

/** What one window takes in on one day: watts through the opening at each step, part by part, and what led there. */
export type WindowDay = {
  readonly window: string;
  readonly day: string;
  readonly sunlit: Float64Array;
  readonly cosIncidence: Float64Array;
  readonly parts: { readonly [P in Part]: Float64Array };
  readonly total_W: Float64Array;
};

/** What one room takes in on one day. */
export type RoomDay = {
  readonly room: string;
  readonly day: string;
  readonly total_W: Float64Array;
  readonly windows: readonly WindowDay[];
};
