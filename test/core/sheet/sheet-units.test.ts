import { expect, test } from 'vitest';
import {
  areaText,
  dimension,
  FOOT_m,
  IMPERIAL_SCALES,
  planHeight,
  readScale,
  scaleWords,
} from '../../../core/sheet/sheet-units.ts';

// An inch of paper to twenty feet of ground is 12 × 20 = 240 inches to one: arithmetic, no source needed.
test.each([
  ['500', 500],
  ['1:500', 500],
  ['1 : 1250', 1250],
  [`1"=20'`, 240],
  [`1" = 20'-0"`, 240],
  [`1/16"=1'-0"`, 192],
  [`1/8 in = 1 ft`, 96],
  [`1 1/2" = 1'-0"`, 8],
  [`1-1/2"=1'`, 8],
  [`3" = 1'-0"`, 4],
  [`1″ = 100′`, 1200],
])('%s is 1:%d', (text, ratio) => {
  expect(readScale(text)).toBeCloseTo(ratio, 6);
});

test.each(['', '1:', '0.5:100', `1"=`, `1/0"=1'`, `1"=0'`, '1"=20"', 'half', '-500', '1:1e3', 'NaN'])(
  '%s is no scale',
  (text) => {
    const ratio = readScale(text);
    expect(Number.isFinite(ratio) && ratio > 0).toBe(false);
  },
);

test('every scale of the foot rule reads back as it is written', () => {
  for (const ratio of IMPERIAL_SCALES) {
    const words = scaleWords(ratio, 'imperial');
    expect(words).toContain(`(1:${ratio})`);
    expect(readScale(words.replace(/ \(.*/u, ''))).toBe(ratio);
  }
});

test('lengths and areas turn into feet by the international foot', () => {
  expect(FOOT_m).toBe(0.3048);
  expect(planHeight(3.048, 'imperial')).toBe('10.0');
  expect(planHeight(3.048, 'metric')).toBe('3.0');
  expect(areaText(100 * 0.3048 ** 2, 'imperial')).toBe('100\u00a0sq\u00a0ft');
  expect(dimension(0.3048 * 6 + 0.0254 * 5.5, 'imperial')).toBe(`6'-5 1/2"`);
  expect(dimension(0.0254 * 0.625, 'imperial')).toBe(`0'-0 5/8"`);
  expect(dimension(0.0254 * 0.75, 'imperial')).toBe(`0'-0 3/4"`);
  expect(dimension(0.3048 * 2 - 0.0001, 'imperial')).toBe(`2'-0"`);
  expect(dimension(1.5, 'metric')).toBe('1.50');
});
