import { describe, expect, it } from 'vitest';
import { relativeAirMass } from '../../../core/sky/air-mass.ts';
import { daylightEfficacy, waterFromDewPoint_cm } from '../../../core/sky/efficacy.ts';
import { extraterrestrialAshrae } from '../../../core/sky/extraterrestrial.ts';
import {
  generalSky,
  levelShare_sr,
  OVERCAST_LEVEL_sr,
  OVERCAST_VERTICAL,
  overcastLuminance,
  verticalShare_sr,
} from '../../../core/sky/luminance.ts';
import { DEG } from '../../../core/units/angle.ts';
import { near } from './reference.ts';

const rounded = (v: number, digits: number): number => Number(v.toFixed(digits));

describe('traditional overcast sky, closed forms', () => {
  it('horizontal 7π/9 and vertical over horizontal 3/14 + 4/(7π) = 0.39618, by summing the dome', () => {
    near(levelShare_sr(overcastLuminance), OVERCAST_LEVEL_sr, 1e-4, 0, 'horizontal');
    near(OVERCAST_VERTICAL, 0.39618, 0, 5e-6, 'ratio');
    near(
      verticalShare_sr(overcastLuminance, 1) / levelShare_sr(overcastLuminance),
      OVERCAST_VERTICAL,
      1e-4,
      0,
      'vertical',
    );
  });
});

describe('CIE general skies (worked numbers from the formulas of ISO 15469, to the digits shown)', () => {
  it('3g', () => {
    expect(rounded(generalSky(1, 0.5)(30 * DEG, 2), 5)).toBe(0.66516);
    expect(rounded(overcastLuminance(30 * DEG, 2), 5)).toBe(0.66667);
    expect(rounded(generalSky(1, 0.5)(0, 2), 5)).toBe(0.33486);
    const clear = generalSky(12, 40 * DEG);
    expect(rounded(clear(30 * DEG, 0), 5)).toBe(3.45614);
    expect(rounded(clear(30 * DEG, Math.PI), 5)).toBe(0.70099);
    expect(rounded(clear(50 * DEG, 0), 5)).toBe(5.88805);
    for (const [h, a] of [
      [0, 0],
      [0.3, 1],
      [1.5, 3],
    ] as const)
      expect(generalSky(5, 1)(h, a)).toBe(1);
  });
  it('type 1 gives 37.918 % on an open vertical, an even sky 50 %', () => {
    const steep = generalSky(1, 0.5);
    near(verticalShare_sr(steep, 0) / levelShare_sr(steep), 0.37918, 2e-4, 0, 'type 1');
    const even = generalSky(5, 0.5);
    near(levelShare_sr(even), Math.PI, 1e-4, 0, 'even, level');
    near(verticalShare_sr(even, 2), Math.PI / 2, 1e-4, 0, 'even, vertical');
  });
  it('every type is 1 at the zenith, brightest towards the sun among bearings, and nowhere negative', () => {
    for (let type = 1; type <= 15; type++) {
      const sky = generalSky(type, 50 * DEG);
      near(sky(Math.PI / 2, 0), 1, 1e-12, 0, `type ${type}`);
      for (let h = 0; h <= 90; h += 5)
        for (let a = 0; a <= 180; a += 15) {
          const l = sky(h * DEG, a * DEG);
          expect(l).toBeGreaterThan(0);
          expect(l).toBeLessThanOrEqual(sky(h * DEG, 0) + 1e-12);
        }
    }
    expect(() => generalSky(16, 0)).toThrow(RangeError);
  });
});

describe('luminous efficacy (worked numbers from Perez 1990, eqs 6–8 and table 4)', () => {
  const e0 = extraterrestrialAshrae(172);
  it('3h clear, and under cloud', () => {
    const clear = {
      beamNormal_Wm2: 700,
      diffuse_Wm2: 120,
      extraterrestrial_Wm2: e0,
      airMass: relativeAirMass(50 * DEG),
      zenith_rad: 40 * DEG,
    };
    const k = daylightEfficacy(clear, 10);
    expect(rounded(waterFromDewPoint_cm(10), 4)).toBe(1.8682);
    expect([k.global, k.diffuse, k.beam].map((v) => rounded(v, 3))).toEqual([109.424, 134.594, 102.651]);
    const global = 120 + 700 * Math.cos(40 * DEG);
    expect([k.global * global, k.diffuse * 120, k.beam * 700].map((v) => Math.round(v))).toEqual([71807, 16151, 71856]);
    const cloud = {
      ...clear,
      beamNormal_Wm2: 0,
      diffuse_Wm2: 150,
      airMass: relativeAirMass(30 * DEG),
      zenith_rad: 60 * DEG,
    };
    expect(rounded(daylightEfficacy(cloud, 10).diffuse, 3)).toBe(115.628);
    expect(Math.round(daylightEfficacy(cloud, 10).diffuse * 150)).toBe(17344);
  });
  it('is finite with no light at all, with beam alone and with the sun down', () => {
    for (const [beam, diffuse, z] of [
      [0, 0, 100],
      [500, 0, 30],
      [0, 5, 92],
    ] as const) {
      const k = daylightEfficacy(
        { beamNormal_Wm2: beam, diffuse_Wm2: diffuse, extraterrestrial_Wm2: e0, airMass: 2, zenith_rad: z * DEG },
        5,
      );
      for (const v of [k.global, k.diffuse, k.beam]) expect(Number.isFinite(v)).toBe(true);
    }
  });
});
