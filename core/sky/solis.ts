import * as maths from '../maths/maths.ts';
import { SEA_LEVEL_hPa } from './air-mass.ts';
import { type ClearSun, type ModelNote, NO_SUN, type SplitSky } from './clear-sun.ts';

/** The air as the simplified Solis model sees it. */
export type SolisAir = {
  /** Aerosol optical depth at 700 nm. */
  readonly aerosol700: number;
  readonly water_cm: number;
};

export const SOLIS_NOTE: ModelNote = {
  name: 'simplified Solis 2008',
  source: 'P. Ineichen, A broadband simplified version of the Solis clear sky model, Solar Energy 82, 758–762 (2008)',
  gives: 'beam and diffuse',
  needs: [
    { key: 'aerosol700', name: 'aerosol optical depth at 700 nm', unit: '', min: 0, max: 0.45, usual: '0.08' },
    { key: 'water_cm', name: 'precipitable water', unit: 'cm', min: 0.2, max: 10, usual: '1.5' },
  ],
  lowestAltitude_deg: 3,
  valid: 'cloudless sky, sun at 3° or higher, aerosol optical depth at 700 nm up to 0.45, sites up to 7000 m',
};

/**
 * Cloudless sky from aerosol and water. Beam, diffuse and global are three fits of their own, so that global differs a little
 * from beam + diffuse on the level. Less than 0.2 cm of water counts as 0.2 cm, where the fit begins.
 * @returns beam facing the sun, diffuse and global on the level [W/m²]; zeros with the sun at or below the horizon
 * @see P. Ineichen, Solar Energy 82, 758–762 (2008)
 */
export function simplifiedSolis(sun: ClearSun, air: SolisAir): SplitSky {
  const up = maths.sin(sun.apparentAltitude_rad);
  if (!(up > 0)) return NO_SUN;
  const a = air.aerosol700;
  const w = Math.max(air.water_cm, 0.2);
  const lw = maths.log(w);
  const lp = maths.log(sun.pressure_hPa / SEA_LEVEL_hPa);
  const raised =
    sun.extraterrestrial_Wm2 *
    (0.12 * maths.pow(w, 0.56) * a * a + 0.97 * maths.pow(w, 0.032) * a + 1.08 * maths.pow(w, 0.0051) + 0.071 * lp);
  const tauBeam =
    (1.82 + 0.056 * lw + 0.0071 * lw * lw) * a + 0.33 + 0.045 * lw + 0.0096 * lw * lw + (0.0089 * w + 0.13) * lp;
  const powerBeam = (0.00925 * a * a + 0.0148 * a - 0.0172) * lw - 0.7565 * a * a + 0.5057 * a + 0.4557;
  const tauGlobal =
    (1.24 + 0.047 * lw + 0.0061 * lw * lw) * a + 0.27 + 0.043 * lw + 0.009 * lw * lw + (0.0079 * w + 0.1) * lp;
  const powerGlobal = -0.0147 * lw - 0.3079 * a * a + 0.2846 * a + 0.3798;
  const powerDiffuse = -0.337 * a * a + 0.63 * a + 0.116 + lp / (18 + 152 * a);
  return {
    beamNormal_Wm2: raised * maths.exp(-tauBeam / maths.pow(up, powerBeam)),
    diffuse_Wm2: raised * maths.exp(-tauDiffuse(a, w, lp) / maths.pow(up, powerDiffuse)),
    global_Wm2: raised * up * maths.exp(-tauGlobal / maths.pow(up, powerGlobal)),
  };
}

/** Optical depth for diffuse: one polynomial in the aerosol for very clean air, one for the rest. */
function tauDiffuse(a: number, w: number, lp: number): number {
  const clean = a < 0.05;
  const t4 = clean ? 86 * w - 13800 : -0.21 * w + 11.6;
  const t3 = clean ? -3.11 * w + 79.4 : 0.27 * w - 20.7;
  const t2 = clean ? -0.23 * w + 74.8 : -0.134 * w + 15.5;
  const t1 = clean ? 0.092 * w - 8.86 : 0.0554 * w - 5.71;
  const t0 = clean ? 0.0042 * w + 3.12 : 0.0057 * w + 2.94;
  const tp = clean ? -0.83 * maths.pow(1 + a, -17.2) : -0.71 * maths.pow(1 + a, -15);
  return (((t4 * a + t3) * a + t2) * a + t1) * a + t0 + tp * lp;
}
