import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  bondedFaceModifier,
  clearPanesCurve,
  clearPanesTransmittance,
  hemispherical,
  karlssonRoosCurve,
  oneParameterModifier,
  referencePane,
  schlickModifier,
} from '../../../core/gain/glass-angle.ts';
import { seedOf } from '../../helpers/property-seed.ts';

const cos = (deg: number): number => Math.cos((deg * Math.PI) / 180);
const ANGLES = [0, 30, 45, 60, 70, 80];

describe('clear panes by Fresnel (n 1.526, KL 0.04 a pane; table of Duffie and Beckman’s formula)', () => {
  const table: Record<number, readonly number[]> = {
    1: [0.8809, 0.8766, 0.8613, 0.8022, 0.6877, 0.4321],
    2: [0.7814, 0.7755, 0.758, 0.6885, 0.5468, 0.2788],
    3: [0.6973, 0.6912, 0.6768, 0.6111, 0.4573, 0.2018],
  };
  it.each([1, 2, 3])('%i panes', (panes) => {
    for (const [i, angle] of ANGLES.entries())
      expect(clearPanesTransmittance(cos(angle), panes)).toBeCloseTo(table[panes]?.[i] as number, 4);
  });
  it('spreads over the half space as integrated by hand: 0.9170, 0.8920, 0.8822', () => {
    expect(clearPanesCurve(1).hemispherical).toBeCloseTo(0.917, 4);
    expect(clearPanesCurve(2).hemispherical).toBeCloseTo(0.892, 4);
    expect(clearPanesCurve(3).hemispherical).toBeCloseTo(0.8822, 4);
  });
  it('matches the closed forms at normal incidence and at 60°, without loss', () => {
    const r0 = ((1.526 - 1) / (1.526 + 1)) ** 2;
    expect(clearPanesTransmittance(1, 1, 1.526, 0)).toBeCloseTo((1 - r0) / (1 + r0), 12);
    expect(clearPanesTransmittance(1, 1, 1.526, 0)).toBeCloseTo(0.91688, 5);
    expect(clearPanesTransmittance(1, 2, 1.526, 0)).toBeCloseTo(0.84652, 5);
    expect(clearPanesTransmittance(cos(60), 1, 1.526, 0)).toBeCloseTo(0.8421, 5);
  });
});

describe('Karlsson and Roos 2000, q 4', () => {
  const table: Record<number, readonly number[]> = {
    1: [1, 0.9925, 0.974, 0.8944, 0.7462, 0.4586],
    2: [1, 0.9924, 0.9711, 0.8744, 0.7002, 0.3914],
    3: [1, 0.9923, 0.9685, 0.8561, 0.6566, 0.3259],
  };
  it.each([1, 2, 3])('%i panes', (panes) => {
    for (const [i, angle] of ANGLES.entries())
      expect(karlssonRoosCurve(panes, 4).at(cos(angle))).toBeCloseTo(table[panes]?.[i] as number, 4);
  });
  it('spreads over the half space as 0.9067, 0.8931, 0.8804', () => {
    expect(karlssonRoosCurve(1, 4).hemispherical).toBeCloseTo(0.9067, 4);
    expect(karlssonRoosCurve(2, 4).hemispherical).toBeCloseTo(0.8931, 4);
    expect(karlssonRoosCurve(3, 4).hemispherical).toBeCloseTo(0.8804, 4);
  });
  it('gives the worked window: g 0.54212 at 60°, 585.491 W through 3.6 m² with a quarter of frame at 400 W/m²', () => {
    const g = 0.62 * karlssonRoosCurve(2, 4).at(cos(60));
    expect(g).toBeCloseTo(0.54212, 5);
    expect(3.6 * 0.75 * 400 * g).toBeCloseTo(585.491, 3);
  });
  it('is whole square on, nothing along the glass, and in between for every pane and coating', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 4 }), fc.double({ min: 1, max: 10, noNaN: true }), (p, q) => {
        const curve = karlssonRoosCurve(p, q);
        expect(curve.at(1)).toBe(1);
        expect(curve.at(0)).toBeCloseTo(0, 12);
        for (let d = 0; d <= 90; d += 3) {
          expect(curve.at(cos(d))).toBeGreaterThanOrEqual(0);
          expect(curve.at(cos(d))).toBeLessThanOrEqual(1.0001);
        }
        expect(curve.hemispherical).toBeLessThan(1);
      }),
      { seed: seedOf(61) },
    );
  });
});

it('averages exact powers of the cosine to 2/(k + 2)', () => {
  for (const k of [0, 1, 2, 5]) expect(hemispherical((c) => c ** k)).toBeCloseTo(2 / (k + 2), 10);
});

it('gives ASHRAE’s reference pane: 0.8703 square on, by angle, 0.79901 and 0.05436 diffuse, gain 0.8840', () => {
  const expected = [0.8703, 0.8709, 0.8487, 0.7962, 0.6785, 0.4147];
  for (const [i, angle] of ANGLES.entries())
    expect(referencePane(cos(angle)).transmittance).toBeCloseTo(expected[i] as number, 4);
  expect(hemispherical((c) => referencePane(c).transmittance)).toBeCloseTo(0.79901, 4);
  expect(hemispherical((c) => referencePane(c).absorptance)).toBeCloseTo(0.05436, 4);
  const pane = referencePane(1);
  expect(pane.transmittance + 0.267 * pane.absorptance).toBeCloseTo(0.884, 4);
});

describe('incidence modifiers against pvlib’s (test/reference/incidence-angle.json), absolute 1e-12', () => {
  type Case = {
    id: string;
    kind: string;
    inputs: { n?: number; K?: number; L?: number; n_ar?: number | null; b?: number; aoi: number[] };
    expected: { iam: number[] };
  };
  const file = new URL('../../reference/incidence-angle.json', import.meta.url);
  const cases = (JSON.parse(readFileSync(file, 'utf8')) as { cases: Case[] }).cases;
  it('has every kind', () =>
    expect(new Set(cases.map((c) => c.kind))).toEqual(new Set(['physical', 'ashrae', 'schlick'])));
  it.each(cases.map((c) => [c.id, c] as const))('%s', (_, { kind, inputs, expected }) => {
    for (const [i, angle] of inputs.aoi.entries()) {
      const c = cos(angle);
      const got =
        kind === 'physical'
          ? bondedFaceModifier(c, inputs.n as number, inputs.K as number, inputs.L as number, inputs.n_ar ?? undefined)
          : kind === 'ashrae'
            ? oneParameterModifier(c, inputs.b as number)
            : schlickModifier(c);
      expect(Math.abs(got - (expected.iam[i] as number))).toBeLessThanOrEqual(1e-12);
    }
  });
});
