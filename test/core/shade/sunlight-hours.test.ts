import { describe, expect, it } from 'vitest';
import { facing } from '../../../core/shade/exposure-grid.ts';
import type { Light } from '../../../core/shade/exposure-light.ts';
import { makeOccluders } from '../../../core/shade/skyline-occluders.ts';
import {
  halfYears,
  inWinterHalf,
  keptShare,
  probableSunlight,
  sunlightLevel,
  sunlitShare,
  weighted,
} from '../../../core/shade/sunlight-hours.ts';
import { box } from '../../helpers/block-field.ts';
import { yearLight } from '../../helpers/year-light.ts';

/** A year of sun with its dates in words, 1 January the first day. */
function dated(latitude: number): { light: Light; winter: Uint8Array; month: Uint8Array } {
  const rows: { date: string; count: number }[] = [];
  const light = yearLight(latitude, 10);
  for (let day = 1; day <= 365; day++) {
    const date = new Date(Date.UTC(2025, 0, day)).toISOString().slice(0, 10);
    rows.push({ date, count: yearLight(latitude, 10, [day]).sx.length });
  }
  const each = rows.flatMap(({ date, count }) => Array.from({ length: count }, () => date));
  return {
    light,
    winter: Uint8Array.from(each, (d) => (inWinterHalf(d) ? 1 : 0)),
    month: Uint8Array.from(each, (d) => Number(d.slice(5, 7))),
  };
}

describe('probable sunlight hours', () => {
  const { light, winter, month } = dated(51.5);
  const year = halfYears(light, winter);

  it('an open level place has all of the year, its winter half somewhat under half', () => {
    const p = probableSunlight(makeOccluders([], []), year, facing([[0, 0, 0]], [0, 0, 1]));
    expect(p.annual[0]).toBe(1);
    // Half a year of day and night holds 4380 h of sun at any place (methods dossier 10); the winter half's share follows the day length.
    expect(Math.abs(p.openHours - 4380)).toBeLessThan(20);
    expect(p.winter[0]).toBeGreaterThan(0.35);
    expect(p.winter[0]).toBeLessThan(0.45);
  });

  it('walls that face opposite ways share the year between them, the south one having nearly all of winter', () => {
    const at = (n: readonly [number, number, number]) =>
      probableSunlight(makeOccluders([], []), year, facing([[0, 0, 0]], n));
    const south = at([0, -1, 0]);
    const north = at([0, 1, 0]);
    expect(south.annual[0]! + north.annual[0]!).toBeCloseTo(1, 9);
    expect(at([1, 0, 0]).annual[0]!).toBeCloseTo(0.5, 2);
    expect(south.winter[0]! / (south.winter[0]! + north.winter[0]!)).toBeGreaterThan(0.97);
  });

  it('a block to the south takes from winter first', () => {
    const o = makeOccluders([box('B', 0, -15, 100, 10, 0, 8)], []);
    const free = probableSunlight(makeOccluders([], []), year, facing([[0, 0, 2]], [0, -1, 0]));
    const held = probableSunlight(o, year, facing([[0, 0, 2]], [0, -1, 0]));
    expect(keptShare(free.winter[0]!, held.winter[0]!)).toBeLessThan(keptShare(free.annual[0]!, held.annual[0]!));
    expect(held.winter[0]!).toBeLessThanOrEqual(held.annual[0]!);
  });

  it('counts hours by how probable sunshine is', () => {
    const june = weighted(light, (row) => (month[row] === 6 ? 1 : 0));
    const p = probableSunlight(makeOccluders([], []), halfYears(june, winter), facing([[0, 0, 0]], [0, 0, 1]));
    expect([p.annual[0], p.winter[0]]).toEqual([1, 0]);
    expect(p.openHours).toBeGreaterThan(470);
    expect(p.openHours).toBeLessThan(500);
  });
});

describe('levels and shares', () => {
  it('1.5, 3 and 4 h are the lower ends of the levels of EN 17037', () => {
    expect([89, 90, 179, 180, 239, 240].map(sunlightLevel)).toEqual([
      'none',
      'minimum',
      'minimum',
      'medium',
      'medium',
      'high',
    ]);
  });

  it('21 March and 21 September belong to the winter half', () => {
    const dates = ['2025-03-21', '2025-03-22', '2025-09-20', '2025-09-21', '2025-12-31', '2025-01-01', '2025-07-01'];
    expect(dates.map((d) => inWinterHalf(d))).toEqual([true, false, false, true, true, true, false]);
    expect(dates.map((d) => inWinterHalf(d, true))).toEqual([true, true, true, true, false, false, true]);
  });

  it('a garden’s share leaves out what is built over', () => {
    expect(sunlitShare(Float64Array.of(0, 120, 119, 300), Uint8Array.of(1, 0, 0, 0), 2)).toBeCloseTo(2 / 3, 12);
    expect(sunlitShare(Float64Array.of(0), Uint8Array.of(1), 2)).toBe(0);
    expect(keptShare(0, 0)).toBe(1);
    expect(keptShare(27.4, 21.6)).toBeCloseTo(0.7883, 4);
  });
});
