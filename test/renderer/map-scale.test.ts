import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { colourTable, NONE, NOTHING, scaleFor, shadeOf } from '../../renderer/maps/map-scale.ts';

const SEED = 20250621;

describe('the scale of a map', () => {
  it('reaches every number with three to six round steps, and with little to spare', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.51, max: 5000, noNaN: true }), fc.boolean(), (size, isChange) => {
        const scale = scaleFor('sun', isChange ? 'change' : 'after', size, 1);
        const steps = scale.ticks.length - 1;
        expect(scale.most).toBeGreaterThanOrEqual(size * (1 - 1e-9));
        expect(scale.most).toBeLessThanOrEqual(size * 1.34);
        expect(isChange ? steps / 2 : steps).toBeGreaterThanOrEqual(3);
        expect(isChange ? steps / 2 : steps).toBeLessThanOrEqual(6);
        // Written with its decimals, no number beside the scale is rounded.
        for (const t of scale.ticks) expect(Number(t.toFixed(scale.decimals))).toBeCloseTo(t, 9);
      }),
      { seed: SEED },
    );
  });

  it('shows 16.4 h on a scale to 18, in steps of 3', () => {
    expect(scaleFor('sun', 'after', 16.42, 1).ticks).toEqual([0, 3, 6, 9, 12, 15, 18]);
  });

  it('marks nothing in the middle of a scale of differences', () => {
    const { ticks } = scaleFor('sun', 'change', 10.8, 1);
    expect(ticks).toEqual([-12, -10, -8, -6, -4, -2, 0, 2, 4, 6, 8, 10, 12]);
  });

  it('turns to kWh/m² for long spans, and takes the mean of days where that is shown', () => {
    expect(scaleFor('energy', 'after', 6000, 1)).toMatchObject({ unit: 'Wh/m²', factor: 1 });
    expect(scaleFor('energy', 'after', 1_600_000, 1)).toMatchObject({ unit: 'kWh/m²', factor: 1e-3 });
    expect(scaleFor('sun', 'after', 40, 1 / 4)).toMatchObject({ unit: 'h', factor: 0.25, most: 10 });
  });

  it('gives no sun a grey of its own, and darkest blue to a little', () => {
    const scale = scaleFor('sun', 'after', 10, 1);
    expect(shadeOf(scale, null)).toBe(NOTHING);
    expect(shadeOf(scale, 0)).toBe(NONE);
    expect(shadeOf(scale, 1 / 60)).toBeGreaterThan(NONE);
    const table = colourTable(false, [1, 1, 1], [9, 9, 9], false);
    const colour = (v: number | null): readonly number[] => [
      ...table.slice(shadeOf(scale, v) * 4, shadeOf(scale, v) * 4 + 3),
    ];
    expect(colour(null)).toEqual([1, 1, 1]);
    expect(colour(0)).toEqual([9, 9, 9]);
    // The two ends of cividis as published.
    expect(colour(1e-6)).toEqual([0, 34, 78]);
    expect(colour(10)).toEqual([254, 232, 56]);
  });

  it('never turns a greater number into a lesser colour', () => {
    const scale = scaleFor('sun', 'change', 5, 1);
    for (let v = -5; v < 5; v += 0.01) expect(shadeOf(scale, v + 0.01)).toBeGreaterThanOrEqual(shadeOf(scale, v));
  });
});
