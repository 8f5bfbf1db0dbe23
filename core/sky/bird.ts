import * as maths from '../maths/maths.ts';
import { absoluteAirMass } from './air-mass.ts';
import { type ClearSun, type ModelNote, NO_SUN, type SplitSky } from './clear-sun.ts';

/** The air as the Bird model sees it. Depths of ozone and water are in centimetres, of all of it brought down to the ground. */
export type BirdAir = {
  /** Aerosol optical depth at 380 nm and 500 nm. */
  readonly aerosol380: number;
  readonly aerosol500: number;
  readonly ozone_cm: number;
  readonly water_cm: number;
  /** Of the ground round about, 0..1. */
  readonly groundReflectance: number;
  /** Share of scattered light that goes forward; absent: 0.85 (rural aerosol). */
  readonly forward?: number;
};

export const BIRD_NOTE: ModelNote = {
  name: 'Bird–Hulstrom 1981',
  source:
    'R. E. Bird, R. L. Hulstrom, A simplified clear sky model for direct and diffuse insolation on horizontal surfaces, SERI/TR-642-761 (1981)',
  gives: 'beam and diffuse',
  needs: [
    { key: 'aerosol380', name: 'aerosol optical depth at 380 nm', unit: '', min: 0, max: 3, usual: '0.15' },
    { key: 'aerosol500', name: 'aerosol optical depth at 500 nm', unit: '', min: 0, max: 3, usual: '0.10' },
    { key: 'ozone_cm', name: 'ozone', unit: 'cm', min: 0, max: 1, usual: '0.3' },
    { key: 'water_cm', name: 'precipitable water', unit: 'cm', min: 0, max: 10, usual: '1.5' },
    { key: 'groundReflectance', name: 'reflectance of the ground', unit: '', min: 0, max: 1, usual: '0.2' },
  ],
  lowestAltitude_deg: 3,
  valid: 'cloudless sky, sun at 3° or higher, moderate haze (optical depths below about 0.5)',
};

/**
 * Cloudless sky from the parts of the air that dim it: molecules, ozone, mixed gases, water vapour, aerosol.
 * @returns beam facing the sun, diffuse and global on the level [W/m²]; zeros with the sun at or below the horizon
 * @see R. E. Bird, R. L. Hulstrom, SERI/TR-642-761 (1981). The exponent of the ozone term is −0.3034 here; some prints have
 *      −0.3035, which changes results by less than 0.02 %. The level planes take the sun's height as it is given.
 */
export function birdHulstrom(sun: ClearSun, air: BirdAir): SplitSky {
  const up = maths.sin(sun.apparentAltitude_rad);
  if (!(up > 0)) return NO_SUN;
  const m = sun.airMass;
  const mp = absoluteAirMass(m, sun.pressure_hPa);
  const forward = air.forward ?? 0.85;
  const molecules = maths.exp(-0.0903 * maths.pow(mp, 0.84) * (1 + mp - maths.pow(mp, 1.01)));
  const xo = air.ozone_cm * m;
  const ozone =
    1 - 0.1611 * xo * maths.pow(1 + 139.48 * xo, -0.3034) - (0.002715 * xo) / (1 + 0.044 * xo + 0.0003 * xo * xo);
  const gases = maths.exp(-0.0127 * maths.pow(mp, 0.26));
  const xw = air.water_cm * m;
  const water = 1 - (2.4959 * xw) / (maths.pow(1 + 79.034 * xw, 0.6828) + 6.385 * xw);
  const depth = 0.27583 * air.aerosol380 + 0.35 * air.aerosol500;
  const aerosol = maths.exp(-maths.pow(depth, 0.873) * (1 + depth - maths.pow(depth, 0.7088)) * maths.pow(m, 0.9108));
  const absorbed = 1 - 0.1 * (1 - m + maths.pow(m, 1.06)) * (1 - aerosol);
  const scattered = aerosol / absorbed;
  const skyReflectance = 0.0685 + (1 - forward) * (1 - scattered);
  const e0 = sun.extraterrestrial_Wm2;
  const beam = 0.9662 * e0 * aerosol * water * gases * ozone * molecules;
  const once =
    (0.79 * e0 * up * ozone * gases * water * absorbed * (0.5 * (1 - molecules) + forward * (1 - scattered))) /
    (1 - m + maths.pow(m, 1.02));
  const global = (beam * up + once) / (1 - air.groundReflectance * skyReflectance);
  return { beamNormal_Wm2: beam, diffuse_Wm2: global - beam * up, global_Wm2: global };
}
