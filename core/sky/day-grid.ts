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
  /** Facing the sun; 0 while its true altitude is at or below 0. */
  readonly beamNormal_Wm2: Float64Array;
  readonly diffuse_Wm2: Float64Array;
  /** On the level, as the clear-sky model gives it: with the apparent altitude of the sun, as the model was fitted. */
  readonly global_Wm2: Float64Array;
  /** Facing the sun outside the air: what Hay–Davies and Perez compare with. */
  readonly extraterrestrial_Wm2: Float64Array;
  /** Relative air mass at the apparent altitude; 0 with the sun below the horizon. */
  readonly airMass: Float64Array;
  readonly tAir_C: Float64Array;
};
