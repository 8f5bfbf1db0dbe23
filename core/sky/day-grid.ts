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
