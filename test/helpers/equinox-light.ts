import type { Light } from '../../core/shade/exposure-light.ts';

const DEG = Math.PI / 180;

/**
 * The sun of a day without declination, for the closed forms of the equinox: up cos φ cos ω, north −sin φ cos ω, east −sin ω.
 * @param above_deg  only sun above this altitude
 */
export function equinoxLight(latitude_deg: number, step_min: number, above_deg = 0): Light {
  const phi = latitude_deg * DEG;
  const rows: [number, number, number][] = [];
  for (let m = step_min / 2; m < 1440; m += step_min) {
    const omega = (m / 4 - 180) * DEG;
    const up = Math.cos(phi) * Math.cos(omega);
    if (up > Math.sin(above_deg * DEG)) rows.push([-Math.sin(omega), -Math.sin(phi) * Math.cos(omega), up]);
  }
  return {
    sx: Float64Array.from(rows, (r) => r[0]),
    sy: Float64Array.from(rows, (r) => r[1]),
    sz: Float64Array.from(rows, (r) => r[2]),
    minutes: new Float64Array(rows.length).fill(step_min),
    beam: new Float64Array(rows.length).fill(step_min / 60),
  };
}
