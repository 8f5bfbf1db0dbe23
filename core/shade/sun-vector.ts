import type { Vec3 } from '../plane/vec.ts';

/**
 * Unit vector towards the sun in drawing axes (x east, y north of the drawing, z up).
 * @param azimuth_rad   from true north, clockwise
 * @param altitude_rad  true altitude
 * @param north_rad     `Model.north_rad`: true north, clockwise from +y
 */
export function sunVector(azimuth_rad: number, altitude_rad: number, north_rad: number): Vec3 {
  const bearing = azimuth_rad + north_rad;
  const c = Math.cos(altitude_rad);
  return [c * Math.sin(bearing), c * Math.cos(bearing), Math.sin(altitude_rad)];
}
