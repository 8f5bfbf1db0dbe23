import { expect, test } from 'vitest';
import { parseLatitude, parseLongitude, parsePair } from '../../renderer/place/parse-degrees.ts';

test.each([
  ['51.45', 51.45],
  ['51,45', 51.45],
  ['51.45 N', 51.45],
  ['51.45° s', -51.45],
  ['-33.9', -33.9],
  ['−33.9', -33.9],
  ['S 33.9', -33.9],
  ['51°27′N', 51.45],
  ['51° 27\' 0" N', 51.45],
  ['0', 0],
  ['90', 90],
])('%s is a latitude', (text, value) => {
  expect(parseLatitude(text)).toBeCloseTo(value, 9);
});

test.each(['', 'x', '91', '51.45 E', '-51 N', '51°60′', '51.5°30′', 'N 51 N', '51 27', '1e3'])(
  '“%s” is none',
  (text) => {
    expect(parseLatitude(text)).toBeNull();
  },
);

test('longitudes reach to 180° and carry east and west', () => {
  expect(parseLongitude('2°35′24″W')).toBeCloseTo(-2.59, 9);
  expect(parseLongitude('180')).toBe(180);
  expect(parseLongitude('180.1')).toBeNull();
  expect(parseLongitude('2 N')).toBeNull();
});

test('both at once, as maps give them', () => {
  for (const text of [
    '51.45, -2.59',
    '51.45 -2.59',
    '51.45,-2.59',
    '51.45 N 2.59 W',
    '51°27′N, 2°35′24″W',
    '51,45; -2,59',
  ]) {
    const pair = parsePair(text);
    expect(pair?.[0]).toBeCloseTo(51.45, 6);
    expect(pair?.[1]).toBeCloseTo(-2.59, 6);
  }
  for (const text of ['51.45', '51.45, 200', '1 2 3', '']) expect(parsePair(text)).toBeNull();
});
