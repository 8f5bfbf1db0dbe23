import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { blindRangeNotes, glazingWithBlind } from '../../../core/gain/blind.ts';
import { BLIND_CONSTANTS_LATER } from '../../../core/gain/blind-constants.ts';
import { seedOf } from '../../helpers/property-seed.ts';

/** EN 14501 reference glazings (from memory): g and U. */
const A = [0.85, 5.8] as const;
const B = [0.76, 2.9] as const;
const C = [0.59, 1.2] as const;
const D = [0.32, 1.1] as const;
const PLACES = ['external', 'internal', 'between'] as const;

describe('closed blind and glazing, EN ISO 52022-1 simplified', () => {
  it.each([
    [0.05, 0.5, [0.07282, 0.40574, 0.13991], [0.05642, 0.39936, 0.13991]],
    [0.22, 0.58, [0.16336, 0.38356, 0.2036], [0.15457, 0.38073, 0.2036]],
  ] as const)('glazing C behind a blind of transmittance %f, reflectance %f (worked by hand)', (t, r, first, later) => {
    for (const [i, place] of PLACES.entries()) {
      const blind = { place, transmittance: t, reflectance: r };
      expect(glazingWithBlind(C[0], C[1], blind)).toBeCloseTo(first[i] as number, 5);
      expect(glazingWithBlind(C[0], C[1], blind, BLIND_CONSTANTS_LATER)).toBeCloseTo(later[i] as number, 5);
    }
  });
  it('stands within 0.03 of two fabrics’ published values inside glazings A to D', () => {
    const published = [
      [0.225, 0.577, [0.41, 0.41, 0.38, 0.26]],
      [0.147, 0.489, [0.42, 0.44, 0.41, 0.26]],
    ] as const;
    for (const [t, r, values] of published)
      for (const [i, [g, u]] of [A, B, C, D].entries()) {
        const got = glazingWithBlind(g, u, { place: 'internal', transmittance: t, reflectance: r });
        expect(Math.abs(got - (values[i] as number))).toBeLessThan(0.03);
      }
  });
  it('lets no more in than the bare glass, less outside than inside, and more the more the blind lets through', () => {
    const share = fc.double({ min: 0, max: 0.5, noNaN: true });
    fc.assert(
      fc.property(share, fc.double({ min: 0.1, max: 0.5, noNaN: true }), fc.constantFrom(B, C, D), (t, r, [g, u]) => {
        const at = (place: (typeof PLACES)[number], through = t): number =>
          glazingWithBlind(g, u, { place, transmittance: through, reflectance: r });
        expect(at('internal')).toBeLessThanOrEqual(g);
        expect(at('external')).toBeLessThan(at('internal'));
        expect(at('external', t / 2)).toBeLessThanOrEqual(at('external'));
      }),
      { seed: seedOf(63) },
    );
  });
  it('says where its range is left', () => {
    expect(blindRangeNotes(0.59, { place: 'external', transmittance: 0.05, reflectance: 0.5 })).toEqual([]);
    expect(blindRangeNotes(0.9, { place: 'external', transmittance: 0.6, reflectance: 0.05 })).toHaveLength(3);
  });
});
