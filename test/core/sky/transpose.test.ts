import { describe, expect, it } from 'vitest';
import { relativeAirMass } from '../../../core/sky/air-mass.ts';
import { extraterrestrialAshrae } from '../../../core/sky/extraterrestrial.ts';
import { perezBrightness } from '../../../core/sky/perez.ts';
import { type PlaneInput, planeIrradiance, planeTotal } from '../../../core/sky/transpose.ts';
import { DEG } from '../../../core/units/angle.ts';
import { cases, near } from './reference.ts';

/** Cosine between the sun and a plane's normal, written out from the two directions as unit vectors (east, north, up). */
function cosIncidence(tilt_deg: number, bearing_deg: number, zenith_deg: number, azimuth_deg: number): number {
  const v = (tilt: number, az: number): [number, number, number] => [
    Math.sin(tilt) * Math.sin(az),
    Math.sin(tilt) * Math.cos(az),
    Math.cos(tilt),
  ];
  const n = v(tilt_deg * DEG, bearing_deg * DEG);
  const s = v(zenith_deg * DEG, azimuth_deg * DEG);
  return n[0] * s[0] + n[1] * s[1] + n[2] * s[2];
}

type Inputs = { [key: string]: number };
const inputOf = (i: Inputs): PlaneInput => ({
  beamNormal_Wm2: i.dni!,
  diffuse_Wm2: i.dhi!,
  global_Wm2: i.ghi!,
  extraterrestrial_Wm2: i.dni_extra!,
  airMass: i.airmass_relative!,
  zenith_rad: i.solar_zenith! * DEG,
  cosIncidence: cosIncidence(i.surface_tilt!, i.surface_azimuth!, i.solar_zenith!, i.solar_azimuth!),
  tilt_rad: i.surface_tilt! * DEG,
  groundReflectance: i.albedo!,
});

describe('reference cases (test/reference/transposition.json), relative 1e-9 or absolute 1e-9 W/m²', () => {
  it.each(cases('transposition.json', 'transposition'))('$id', ({ inputs, expected }) => {
    const input = inputOf(inputs as Inputs);
    const want = expected as { [key: string]: number } & { [model in 'isotropic' | 'hay_davies' | 'perez']: Inputs };
    near(input.cosIncidence, want.cos_aoi, 1e-9, 1e-12, 'cos incidence');
    const even = planeIrradiance('isotropic', input);
    near(even.beam, want.beam, 1e-9, 1e-9, 'beam');
    near(even.ground, want.ground_diffuse, 1e-9, 1e-9, 'ground');
    near(even.sky, want.isotropic.sky_diffuse, 1e-9, 1e-9, 'even sky');
    near(planeTotal(even), want.isotropic.global, 1e-9, 1e-9, 'even total');
    const hay = planeIrradiance('hay-davies', input);
    near(hay.sky, want.hay_davies.isotropic_part, 1e-9, 1e-9, 'Hay–Davies dome');
    near(hay.circumsolar, want.hay_davies.circumsolar_part, 1e-9, 1e-9, 'Hay–Davies circumsolar');
    near(planeTotal(hay), want.hay_davies.global, 1e-9, 1e-9, 'Hay–Davies total');
    const { f1, f2, sky } = perezBrightness(input);
    near(sky.clearness, want.perez.epsilon, 1e-9, 0, 'clearness');
    near(sky.brightness, want.perez.delta, 1e-9, 0, 'brightness');
    expect(sky.bin).toBe(want.perez.bin);
    near(f1, want.perez.f1, 1e-9, 1e-12, 'f1');
    near(f2, want.perez.f2, 1e-9, 1e-12, 'f2');
    const perez = planeIrradiance('perez', input);
    near(perez.sky, want.perez.isotropic_part, 1e-9, 1e-9, 'Perez dome');
    near(perez.circumsolar, want.perez.circumsolar_part, 1e-9, 1e-9, 'Perez circumsolar');
    near(perez.horizon, want.perez.horizon_part, 1e-9, 1e-9, 'Perez horizon');
    near(planeTotal(perez), want.perez.global, 1e-9, 1e-9, 'Perez total');
  });
});

describe('worked numbers of the methods', () => {
  const e0 = extraterrestrialAshrae(172);
  const south = (zenith: number, azimuth: number, beamNormal_Wm2: number, diffuse_Wm2: number): PlaneInput => ({
    beamNormal_Wm2,
    diffuse_Wm2,
    global_Wm2: diffuse_Wm2 + beamNormal_Wm2 * Math.cos(zenith * DEG),
    extraterrestrial_Wm2: e0,
    airMass: relativeAirMass((90 - zenith) * DEG),
    zenith_rad: zenith * DEG,
    cosIncidence: cosIncidence(90, 180, zenith, azimuth),
    tilt_rad: 90 * DEG,
    groundReflectance: 0.2,
  });
  const rounded = (v: number): number => Number(v.toFixed(3));

  it('5b a south window in clear weather', () => {
    const input = south(40, 200, 700, 120);
    const even = planeIrradiance('isotropic', input);
    expect(rounded(even.beam)).toBe(422.816);
    expect(rounded(even.ground)).toBe(65.623);
    expect(rounded(even.sky)).toBe(60);
    const hay = planeIrradiance('hay-davies', input);
    expect([hay.sky, hay.circumsolar].map(rounded)).toEqual([28.256, 50.059]);
    const perez = planeIrradiance('perez', input);
    expect([perez.sky, perez.circumsolar, perez.horizon].map(rounded)).toEqual([22.793, 58.675, 26.657]);
    expect(rounded(planeTotal(perez))).toBe(596.564);
  });
  it('5d a south window under cloud', () => {
    const input = south(60, 180, 0, 150);
    const p = planeIrradiance('perez', input);
    expect(rounded(p.sky + p.circumsolar + p.horizon)).toBe(76.078);
    expect(rounded(planeIrradiance('isotropic', input).sky)).toBe(75);
  });
});

describe('what the parts must keep to', () => {
  const some: PlaneInput = {
    beamNormal_Wm2: 500,
    diffuse_Wm2: 100,
    global_Wm2: 400,
    extraterrestrial_Wm2: 1366.1,
    airMass: 2,
    zenith_rad: 60 * DEG,
    cosIncidence: 0.5,
    tilt_rad: 0,
    groundReflectance: 0.2,
  };
  it('a level plane gets beam and diffuse back, by every model (to 1e-12)', () => {
    for (const model of ['isotropic', 'hay-davies', 'perez'] as const) {
      const p = planeIrradiance(model, some);
      near(planeTotal(p), 500 * 0.5 + 100, 1e-12, 0, model);
      expect(p.ground).toBe(0);
    }
  });
  it('no light makes no light; without diffuse there is beam alone; below the horizon an even sky', () => {
    for (const model of ['isotropic', 'hay-davies', 'perez'] as const) {
      const dark = planeIrradiance(model, { ...some, beamNormal_Wm2: 0, diffuse_Wm2: 0, global_Wm2: 0 });
      expect(planeTotal(dark)).toBe(0);
      const bare = planeIrradiance(model, { ...some, diffuse_Wm2: 0, global_Wm2: 250 });
      expect([bare.beam, bare.circumsolar, bare.sky, bare.horizon]).toEqual([250, 0, 0, 0]);
      const dusk = planeIrradiance(model, { ...some, zenith_rad: 92 * DEG, airMass: Number.NaN, tilt_rad: 90 * DEG });
      expect([dusk.beam, dusk.circumsolar, dusk.sky, dusk.horizon]).toEqual([0, 0, expect.closeTo(50, 12), 0]);
    }
  });
});
