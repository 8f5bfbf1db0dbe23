import * as maths from '../maths/maths.ts';

/** How bright the dome is taken to be: alike all over, or the traditional CIE overcast sky, (1 + 2 sin γ)/3 of its zenith. */
export type Dome = 'uniform' | 'overcast';

/** Light of one ray from the horizon up to an altitude of tangent t, on a plane whose normal has the parts a along the ray and b upwards. @see domeShare */
export function lightBelow(t: number, a: number, b: number, dome: Dome): number {
  if (t <= 0) return 0;
  const cos = 1 / Math.sqrt(1 + t * t);
  const sin = t === Infinity ? 1 : t * cos;
  const uniform = (a * (maths.atan(t) + sin * cos) + b * sin * sin) / 2;
  return dome === 'uniform' ? uniform : uniform + (2 / 3) * (a * (1 - cos * cos * cos) + b * sin * sin * sin);
}
