/**
 * Axes and angles, stated once for the whole house.
 *
 * Drawing axes: x east, y north *of the drawing*, z up, in metres. `site.north` turns true north clockwise from +y, so a
 * true azimuth A lies at the drawing bearing A + north. Azimuths and bearings run clockwise from north. Core computes in
 * radians (`_rad`); degrees (`_deg`) stand only in files, on screens and on sheets. A bare number carries its unit in its
 * name, which serves us better than branded numbers: kernels hold their angles in typed arrays, where a brand is lost.
 */
export const DEG = Math.PI / 180;

/** Degrees to radians. @param deg any finite angle [°] @returns the same angle [rad] */
export const toRadians = (deg: number): number => deg * DEG;

/** Radians to degrees. @param rad any finite angle [rad] @returns the same angle [°] */
export const toDegrees = (rad: number): number => rad / DEG;

/** An angle brought into [0, 360). @param deg any finite angle [°] */
export const wrap360 = (deg: number): number => {
  const r = deg % 360;
  return r < 0 ? r + 360 : r === 0 ? 0 : r;
};

/** An angle brought into (−180, 180]. @param deg any finite angle [°] */
export const wrap180 = (deg: number): number => {
  const r = wrap360(deg);
  return r > 180 ? r - 360 : r;
};
