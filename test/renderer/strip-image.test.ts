import { describe, expect, it } from 'vitest';
import { NO_SUCH_TIME, SUN_DOWN, type SunYear } from '../../core/study/sun-year.ts';
import { cividisRgb } from '../../core/sheet/cividis.ts';
import { clockMoves, shareAt, shownHours, stripPixels } from '../../renderer/year-strip/strip-image.ts';

/** Three dates of a day in 24 rows: sun from 8 to 17 h, on the glass from 12 h. */
const year: SunYear = {
  year: 2025,
  zone: 'Europe/London',
  step_min: 60,
  dates: ['2025-03-29', '2025-03-30', '2025-03-31'],
  rows: 24,
  share: Float32Array.from({ length: 72 }, (_, i) => {
    const [d, h] = [Math.floor(i / 24), i % 24];
    if (d === 1 && h === 1) return NO_SUCH_TIME;
    return h < 8 || h >= 17 ? SUN_DOWN : h < 12 ? 0 : (h - 11) / 5;
  }),
  sunrise_min: new Float32Array([480, 480, 480]),
  sunset_min: new Float32Array([1020, 1020, 1020]),
  offset_min: new Float32Array([0, 60, 60]),
};
const greys = { up: [1, 2, 3], down: [4, 5, 6] } as const;

describe('the year strip', () => {
  it('shows the hours of the light and a little more', () => {
    const { from_min, to_min } = shownHours(year);
    expect(from_min).toBeLessThanOrEqual(480);
    expect(to_min).toBeGreaterThanOrEqual(1020);
    expect([from_min % 60, to_min % 60]).toEqual([0, 0]);
  });

  it('shows whole days where the sun never rises', () => {
    const dark = { ...year, sunrise_min: new Float32Array(3).fill(NaN), sunset_min: new Float32Array(3).fill(NaN) };
    expect(shownHours(dark)).toEqual({ from_min: 0, to_min: 1440 });
  });

  it('gives no sun and sun down greys of their own, and a share its place on the scale', () => {
    const { data, width, height } = stripPixels(year, 0, 1440, greys);
    expect([width, height]).toEqual([3, 24]);
    const at = (d: number, h: number) => [...data.slice(((23 - h) * 3 + d) * 4, ((23 - h) * 3 + d) * 4 + 3)];
    expect(at(0, 3)).toEqual(greys.down);
    expect(at(1, 1)).toEqual(greys.down);
    expect(at(0, 9)).toEqual(greys.up);
    expect(at(2, 16)).toEqual([...cividisRgb(1)]);
    expect(at(2, 12)).toEqual([...cividisRgb(Math.fround(0.2))]);
  });

  it('finds the share of a moment and the moves of the clock', () => {
    expect(shareAt(year, '2025-03-31', 14 * 60 + 20)).toBeCloseTo(0.6, 6);
    expect(shareAt(year, '2024-03-31', 0)).toBeNull();
    expect(clockMoves(year)).toEqual([{ index: 1, by_min: 60 }]);
  });
});

describe('cividis', () => {
  // Entries of the published table of 256 (matplotlib, CC0), the middle one not among those that the scale is read from.
  it.each([
    [0, 0, 0.135112, 0.304751],
    [127 / 255, 0.485141, 0.482451, 0.470384],
    [1, 0.995737, 0.909344, 0.217772],
  ])('at %s', (t, ...published) => {
    cividisRgb(t).forEach((value, i) => {
      expect(Math.abs(value - 255 * (published[i] as number))).toBeLessThanOrEqual(1);
    });
  });

  it('grows lighter all the way', () => {
    const light = (t: number): number => {
      const [r, g, b] = cividisRgb(t);
      return 0.2126 * r + 0.7152 * g + 0.0722 * b;
    };
    for (let i = 1; i <= 50; i++) expect(light(i / 50)).toBeGreaterThan(light((i - 1) / 50));
  });
});
