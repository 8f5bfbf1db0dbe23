/** What every clear-sky model may ask of a moment and a place. */
export type ClearSun = {
  /** Altitude of the sun with refraction [rad]; at or below 0 every model gives nothing. */
  readonly apparentAltitude_rad: number;
  /** Irradiance facing the sun outside the air [W/m²]. */
  readonly extraterrestrial_Wm2: number;
  /** Relative air mass, not corrected for pressure. */
  readonly airMass: number;
  /** Station pressure [hPa]. */
  readonly pressure_hPa: number;
  /** Height of the place above the sea [m]. */
  readonly elevation_m: number;
};

/** A cloudless sky, split: beam on a plane facing the sun, diffuse and global on a level plane [W/m²]. */
export type SplitSky = { readonly beamNormal_Wm2: number; readonly diffuse_Wm2: number; readonly global_Wm2: number };

export const NO_SUN: SplitSky = { beamNormal_Wm2: 0, diffuse_Wm2: 0, global_Wm2: 0 };

/** One number that a model needs of the air, with the span in which the model may be used. */
export type Need = {
  readonly key: string;
  readonly name: string;
  readonly unit: string;
  readonly min: number;
  readonly max: number;
  /** What to enter where nothing is known, and what that stands for. */
  readonly usual: string;
};

/** What a model is, what it needs and how far it may be trusted. */
export type ModelNote = {
  readonly name: string;
  readonly source: string;
  readonly gives: 'beam and diffuse' | 'global only';
  readonly needs: readonly Need[];
  /** Below this altitude of the sun its result is formal only [°]. */
  readonly lowestAltitude_deg: number;
  readonly valid: string;
};
