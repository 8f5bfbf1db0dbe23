import { describe, expect, it } from 'vitest';
import { relativeAirMass1966 } from '../../../core/sky/air-mass.ts';
import { DIRINT_FACTORS } from '../../../core/sky/dirint-factors.ts';
import { clearnessIndex, dirint, disc, erbs, type GlobalReading } from '../../../core/sky/split.ts';
import { DEG } from '../../../core/units/angle.ts';
import { cases, near } from './reference.ts';

/** Source of the cases: test/reference/decomposition.json (named in its head). Its pressure is in Pa. */
const reading = (ghi: number, zenith_deg: number, dayOfYear: number): GlobalReading => ({
  global_Wm2: ghi,
  zenith_rad: zenith_deg * DEG,
  dayOfYear,
});
type Inputs = { [key: string]: number };

describe('reference cases, relative 1e-9 or absolute 1e-9 W/m²', () => {
  it.each(cases('decomposition.json', 'erbs'))('$id', ({ inputs, expected }) => {
    const i = inputs as Inputs;
    const r = reading(i.ghi!, i.zenith!, i.day_of_year!);
    near(clearnessIndex(r, 1366.1), expected.kt, 1e-9, 1e-12, 'clearness');
    near(erbs(r).beamNormal_Wm2, expected.dni, 1e-9, 1e-9, 'beam');
    near(erbs(r).diffuse_Wm2, expected.dhi, 1e-9, 1e-9, 'diffuse');
  });
  it.each(cases('decomposition.json', 'disc'))('$id', ({ inputs, expected }) => {
    const i = inputs as Inputs & { pressure: number | null };
    const r = reading(i.ghi!, i.zenith!, i.day_of_year!);
    // A pressure of null in the reference means that the air mass is not corrected: sea level here.
    const pressure_hPa = (i.pressure ?? 101325) / 100;
    near(clearnessIndex(r, 1370), expected.kt, 1e-9, 1e-12, 'clearness');
    if (expected.airmass !== null) {
      near(
        Math.min(12, (relativeAirMass1966(r.zenith_rad) * pressure_hPa) / 1013.25),
        expected.airmass,
        1e-9,
        0,
        'air mass',
      );
    }
    near(disc(r, pressure_hPa).beamNormal_Wm2, expected.dni, 1e-9, 1e-9, 'beam');
    // The reference lets diffuse fall below 0 where the beam of a made-up hour outruns global; here it stops at 0.
    near(disc(r, pressure_hPa).diffuse_Wm2, Math.max(0, expected.dhi_by_closure as number), 1e-9, 1e-9, 'diffuse');
  });
  it.each(cases('decomposition.json', 'dirint'))('$id', ({ inputs, expected }) => {
    const i = inputs as {
      ghi: number[];
      zenith: number[];
      day_of_year: number[];
      pressure: number;
      use_delta_kt_prime: boolean;
      temp_dew: number[] | null;
    };
    const splits = dirint({
      readings: i.ghi.map((g, k) => reading(g, i.zenith[k]!, i.day_of_year[k]!)),
      pressure_hPa: i.pressure / 100,
      inOrder: i.use_delta_kt_prime,
      ...(i.temp_dew ? { dewPoint_C: i.temp_dew } : {}),
    });
    const want = expected as { dni: number[]; dhi_by_closure: number[] };
    splits.forEach((s, k) => {
      near(s.beamNormal_Wm2, want.dni[k], 1e-9, 1e-9, `beam ${k}`);
      near(s.diffuse_Wm2, Math.max(0, want.dhi_by_closure[k]!), 1e-9, 1e-9, `diffuse ${k}`);
    });
  });
});

describe('the table of DIRINT', () => {
  it('is whole: 6 × 6 classes of 7 × 5 positive factors', () => {
    expect(DIRINT_FACTORS.length).toBe(36);
    for (const row of DIRINT_FACTORS) {
      expect(row.length).toBe(35);
      for (const factor of row) expect(factor).toBeGreaterThan(0);
    }
  });
  it('tells which of its factors the reference cases reach', () => {
    const reached = new Set<string>();
    for (const { intermediate } of cases('decomposition.json', 'dirint')) {
      const bins = intermediate as { [key: string]: number[] };
      bins.kt_prime_bin!.forEach((k, n) => {
        reached.add([k, bins.zenith_bin![n], bins.delta_kt_prime_bin![n], bins.precipitable_water_bin![n]].join());
      });
    }
    // The rest of the 1260 rests on transcription alone.
    expect(reached.size).toBeGreaterThan(100);
  });
});

describe('splits keep to the light there is', () => {
  it('beam and diffuse close to global, none is negative, for any clearness and height of the sun', () => {
    for (let g = 0; g <= 1200; g += 37)
      for (let z = 0; z <= 95; z += 2.5) {
        const r = reading(g, z, 100);
        for (const s of [
          erbs(r),
          disc(r, 980),
          ...dirint({ readings: [r, reading(g * 0.9, z, 100)], pressure_hPa: 980 }).slice(0, 1),
        ]) {
          expect(s.beamNormal_Wm2).toBeGreaterThanOrEqual(0);
          expect(s.diffuse_Wm2).toBeGreaterThanOrEqual(0);
          if (s.diffuse_Wm2 > 0)
            near(s.beamNormal_Wm2 * Math.cos(r.zenith_rad) + s.diffuse_Wm2, g, 1e-12, 1e-9, `closure ${g} ${z}`);
        }
      }
  });
});
