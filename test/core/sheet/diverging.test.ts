import { describe, expect, it } from 'vitest';
import { divergingRgb } from '../../../core/sheet/diverging.ts';

const steps = Array.from({ length: 21 }, (_, i) => i / 20);

/** Lightness L* of CIE 1976 from sRGB (IEC 61966-2-1; CIE 015:2018). */
function lightness(rgb: readonly [number, number, number]): number {
  const [r, g, b] = rgb.map((v) => {
    const c = v / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  const y = 0.2126 * r + 0.7152 * g + 0.0722 * b;
  return y > 216 / 24389 ? 116 * Math.cbrt(y) - 16 : (24389 / 27) * y;
}

describe('the scale of differences', () => {
  it.each([
    [false, -1],
    [true, 1],
  ] as const)('tells greater from smaller by lightness alone on both sides (dark ground: %s)', (isOnDark, sign) => {
    for (const side of [-1, 1]) {
      const along = steps.map((t) => lightness(divergingRgb(side * t, isOnDark)) * sign);
      // On a dark ground the middle is a grey of its own; from the first step off it the side runs one way.
      for (let i = 5; i < along.length; i++) expect(along[i]).toBeGreaterThan(along[i - 1] as number);
    }
  });

  it('keeps loss and gain apart on the axis from yellow to blue, which red-green blindness leaves', () => {
    for (const isOnDark of [false, true])
      for (const t of steps.filter((s) => s >= 0.25)) {
        const blueness = (c: readonly [number, number, number]): number => c[2] - (c[0] + c[1]) / 2;
        expect(blueness(divergingRgb(t, isOnDark))).toBeGreaterThan(15);
        expect(blueness(divergingRgb(-t, isOnDark))).toBeLessThan(-15);
      }
  });

  it('has a grey in the middle, and holds beyond its ends', () => {
    const [r, g, b] = divergingRgb(0);
    expect(Math.max(r, g, b) - Math.min(r, g, b)).toBe(0);
    expect(divergingRgb(4)).toEqual(divergingRgb(1));
    expect(divergingRgb(-4)).toEqual(divergingRgb(-1));
  });
});
