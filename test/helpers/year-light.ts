import type { Light } from '../../core/shade/exposure-light.ts';

const DEG = Math.PI / 180;

/**
 * Sun over a year for speed and geometry tests, by Cooper's declination and the hour angle (methods: Duffie and Beckman,
 * Solar Engineering of Thermal Processes, eq. 1.6.1 and 1.6.5), with a beam that fades with air mass. The real sun is
 * tested elsewhere.
 */
export function yearLight(latitude_deg: number, step_min: number, days: readonly number[] | null = null): Light {
  const sx: number[] = [];
  const sy: number[] = [];
  const sz: number[] = [];
  const beam: number[] = [];
  const phi = latitude_deg * DEG;
  const list = days ?? Array.from({ length: 365 }, (_, i) => i + 1);
  for (const day of list) {
    const decl = 23.45 * DEG * Math.sin(((284 + day) / 365) * 2 * Math.PI);
    for (let m = step_min / 2; m < 1440; m += step_min) {
      const omega = (m / 4 - 180) * DEG;
      const up = Math.sin(phi) * Math.sin(decl) + Math.cos(phi) * Math.cos(decl) * Math.cos(omega);
      if (up <= 0) continue;
      sx.push(-Math.cos(decl) * Math.sin(omega));
      sy.push(Math.cos(phi) * Math.sin(decl) - Math.sin(phi) * Math.cos(decl) * Math.cos(omega));
      sz.push(up);
      beam.push((1361 * 0.7 ** (1 / Math.max(up, 0.03)) * step_min) / 60);
    }
  }
  return {
    sx: Float64Array.from(sx),
    sy: Float64Array.from(sy),
    sz: Float64Array.from(sz),
    minutes: new Float64Array(sx.length).fill(step_min),
    beam: Float64Array.from(beam),
  };
}
