import * as maths from '../maths/maths.ts';
import type { Vec3 } from '../plane/vec.ts';

/**
 * Unit vector towards the sun in drawing axes (x east, y north of the drawing, z up).
 * @param azimuth_rad   from true north, clockwise
 * @param altitude_rad  true altitude
 * @param north_rad     `Model.north_rad`: true north, clockwise from +y
 */
export function sunVector(azimuth_rad: number, altitude_rad: number, north_rad: number): Vec3 {
  const bearing = azimuth_rad + north_rad;
  const c = maths.cos(altitude_rad);
  return [c * maths.sin(bearing), c * maths.cos(bearing), maths.sin(altitude_rad)];
}
