import * as maths from '../maths/maths.ts';
import { type ClearSun, type ModelNote, NO_SUN, type SplitSky } from './clear-sun.ts';

/**
 * Optical depths for beam and diffuse, from the design-conditions table of one edition. The editions do not mix: the tables
 * of 2013 were redone with new exponents, because those of 2009 gave too little beam and too much diffuse
 * (C. A. Gueymard, D. Thevenard, 2013).
 */
export type AshraeAir = { readonly edition: 2009 | 2013; readonly tauBeam: number; readonly tauDiffuse: number };

export const ASHRAE_NOTE: ModelNote = {
  name: 'ASHRAE two-depth',
  source: 'ASHRAE Handbook of Fundamentals, ch. 14, 2009 edition, and 2013 and later editions',
  gives: 'beam and diffuse',
  needs: [
    { key: 'tauBeam', name: 'optical depth for beam of the month', unit: '', min: 0.05, max: 3, usual: '0.4' },
    { key: 'tauDiffuse', name: 'optical depth for diffuse of the month', unit: '', min: 0.5, max: 5, usual: '2.2' },
  ],
  lowestAltitude_deg: 3,
  valid: 'cloudless sky of the 21st of the month, sun at 3° or higher; depths and exponents of one edition',
};

/** Exponents of the air mass for beam and diffuse, by edition. */
export function ashraeExponents({ edition, tauBeam: b, tauDiffuse: d }: AshraeAir): {
  readonly beam: number;
  readonly diffuse: number;
} {
  return edition === 2009
    ? { beam: 1.219 - 0.043 * b - 0.151 * d - 0.204 * b * d, diffuse: 0.202 + 0.852 * b - 0.007 * d - 0.357 * b * d }
    : { beam: 1.454 - 0.406 * b - 0.268 * d + 0.021 * b * d, diffuse: 0.507 + 0.205 * b - 0.08 * d - 0.19 * b * d };
}

/**
 * Cloudless sky from two optical depths of the month. The air mass is not corrected for pressure: the depths hold for the
 * height of their station.
 * @returns beam facing the sun, diffuse and global on the level [W/m²]; zeros with the sun at or below the horizon
 * @see ASHRAE Handbook of Fundamentals (2009), ch. 14; (2013), ch. 14, the same with new exponents
 */
export function ashraeTau(sun: ClearSun, air: AshraeAir): SplitSky {
  const up = maths.sin(sun.apparentAltitude_rad);
  if (!(up > 0)) return NO_SUN;
  const power = ashraeExponents(air);
  const beam = sun.extraterrestrial_Wm2 * maths.exp(-air.tauBeam * maths.pow(sun.airMass, power.beam));
  const diffuse = sun.extraterrestrial_Wm2 * maths.exp(-air.tauDiffuse * maths.pow(sun.airMass, power.diffuse));
  return { beamNormal_Wm2: beam, diffuse_Wm2: diffuse, global_Wm2: beam * up + diffuse };
}
