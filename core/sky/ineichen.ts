import * as maths from '../maths/maths.ts';
import { absoluteAirMass } from './air-mass.ts';
import { type ClearSun, type ModelNote, NO_SUN, type SplitSky } from './clear-sun.ts';

export const INEICHEN_NOTE: ModelNote = {
  name: 'Ineichen–Perez 2002',
  source:
    'P. Ineichen, R. Perez, A new airmass independent formulation for the Linke turbidity coefficient, Solar Energy 73, 151–157 (2002)',
  gives: 'beam and diffuse',
  needs: [
    {
      key: 'linkeTurbidity',
      name: 'Linke turbidity',
      unit: '',
      min: 1,
      max: 15,
      usual: '3 (2 very clean air, 3 clean temperate, 4 to 5 humid or urban summer, above 6 polluted)',
    },
  ],
  lowestAltitude_deg: 3,
  valid: 'cloudless sky, sun at 3° or higher, sites up to about 3000 m (heights of the sites it was fitted on)',
};

/**
 * Cloudless sky from one number for the haze of the air.
 * @param linkeTurbidity  1 (pure air) to 15, referred to an air mass of 2
 * @returns beam facing the sun, diffuse and global on the level [W/m²]; zeros with the sun at or below the horizon. With a
 *          turbidity below about 1.3 the published fits give more beam than global; the lesser is taken, as in the paper.
 * @param raiseLowSun  true: global raised by exp(0.01·m^1.8), the companion paper's correction for low sun; the design days go without
 * @see P. Ineichen, R. Perez, Solar Energy 73, 151–157 (2002); R. Perez et al., Solar Energy 73, 307–317 (2002)
 */
export function ineichenPerez(sun: ClearSun, linkeTurbidity: number, raiseLowSun = false): SplitSky {
  const up = maths.sin(sun.apparentAltitude_rad);
  if (!(up > 0)) return NO_SUN;
  const z = sun.elevation_m;
  const m = absoluteAirMass(sun.airMass, sun.pressure_hPa);
  const f1 = maths.exp(-z / 8000);
  const f2 = maths.exp(-z / 1250);
  const c1 = 5.09e-5 * z + 0.868;
  const c2 = 3.92e-5 * z + 0.0387;
  const raise = raiseLowSun ? maths.exp(0.01 * maths.pow(m, 1.8)) : 1;
  const global = raise * c1 * sun.extraterrestrial_Wm2 * up * maths.exp(-c2 * m * (f1 + f2 * (linkeTurbidity - 1)));
  const fromTurbidity = sun.extraterrestrial_Wm2 * (0.664 + 0.163 / f1) * maths.exp(-0.09 * m * (linkeTurbidity - 1));
  const fromGlobal = (global * Math.max(0, 1 - (0.1 - 0.2 * maths.exp(-linkeTurbidity)) / (0.1 + 0.882 / f1))) / up;
  const beam = Math.min(fromTurbidity, fromGlobal);
  return { beamNormal_Wm2: beam, diffuse_Wm2: global - beam * up, global_Wm2: global };
}
