import * as maths from '../maths/maths.ts';
import type { ClearSun, ModelNote } from './clear-sun.ts';

export const HAURWITZ_NOTE: ModelNote = {
  name: 'Haurwitz 1945',
  source:
    'B. Haurwitz, Insolation in relation to cloudiness and cloud density, Journal of Meteorology 2, 154–166 (1945); 3, 123–124 (1946)',
  gives: 'global only',
  needs: [],
  lowestAltitude_deg: 5,
  valid: 'a line to check others against: it knows nothing but the height of the sun',
};

/**
 * Global irradiance on the level under a cloudless sky, from the height of the sun alone [W/m²].
 * @see B. Haurwitz, Journal of Meteorology 2, 154–166 (1945)
 */
export function haurwitz(sun: Pick<ClearSun, 'apparentAltitude_rad'>): number {
  const up = maths.sin(sun.apparentAltitude_rad);
  return up > 0 ? 1098 * up * maths.exp(-0.059 / up) : 0;
}
