import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decadeOf, tenTo } from '../../../core/maths/decade.ts';
import * as maths from '../../../core/maths/maths.ts';
import { sourceFiles } from '../../helpers/import-graph.ts';
import { seedOf } from '../../helpers/property-seed.ts';

const view = new DataView(new ArrayBuffer(8));
/** Distance from a double to the next one further from zero. */
function spacing(value: number): number {
  view.setFloat64(0, Math.abs(value));
  view.setBigInt64(0, view.getBigInt64(0) + 1n);
  return view.getFloat64(0) - Math.abs(value);
}

/** The engine's own function is the reference: within one unit of the last place of the true value, by its authors' word. */
const CASES = [
  ['sin', maths.sin, Math.sin, -1e3, 1e3, 2],
  ['sin of large angles', maths.sin, Math.sin, -1e6, 1e6, 2],
  ['cos', maths.cos, Math.cos, -1e3, 1e3, 2],
  ['tan', maths.tan, Math.tan, -30, 30, 4],
  ['atan', maths.atan, Math.atan, -20, 20, 3],
  ['asin', maths.asin, Math.asin, -1, 1, 3],
  ['acos', maths.acos, Math.acos, -1, 1, 3],
  ['exp', maths.exp, Math.exp, -700, 700, 2],
  ['log', maths.log, Math.log, 1e-9, 1e4, 2],
  ['log near 1', maths.log, Math.log, 0.98, 1.02, 2],
] as const;

describe('the functions, against the engine’s own', () => {
  it.each(CASES)('%s', (_name, own, engine, min, max, units) => {
    fc.assert(
      fc.property(fc.double({ min, max, noNaN: true }), (x) => {
        expect(Math.abs(own(x) - engine(x)) / spacing(engine(x))).toBeLessThanOrEqual(units);
      }),
      { seed: seedOf(20261201), numRuns: 5000 },
    );
  });

  it('the arc tangent of one number is that of two, bit for bit', () => {
    fc.assert(
      fc.property(fc.double(), (x) => {
        expect(maths.atan(x)).toBe(maths.atan2(x, 1));
      }),
      { seed: seedOf(20261210), numRuns: 5000 },
    );
  });

  it('atan2, in every quadrant', () => {
    const part = fc.double({ min: -1e3, max: 1e3, noNaN: true });
    fc.assert(
      fc.property(part, part, (y, x) => {
        const engine = Math.atan2(y, x);
        expect(Math.abs(maths.atan2(y, x) - engine)).toBeLessThanOrEqual(3 * spacing(engine));
      }),
      { seed: seedOf(20261202), numRuns: 5000 },
    );
  });

  it('powers as the methods use them', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-3, max: 100, noNaN: true }),
        fc.double({ min: -3, max: 6, noNaN: true }),
        (x, y) => {
          expect(Math.abs(maths.pow(x, y) / x ** y - 1)).toBeLessThan(1e-14);
        },
      ),
      { seed: seedOf(20261203), numRuns: 5000 },
    );
  });

  it('what is no number, no end and no sign', () => {
    const odd = [Number.NaN, 0, -0, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, 1, -1, 5e-324, 1.7e308];
    for (const [name, own, engine] of CASES.filter(([name]) => !name.includes(' '))) {
      // Of an angle of 1e308 rad no double knows the last turn.
      for (const x of odd.filter((value) => !(/sin|cos|tan/.test(name) && Math.abs(value) === 1.7e308)))
        expect(
          Math.abs(own(x) - engine(x)) <= 3 * spacing(engine(x)) || Object.is(own(x), engine(x)),
          `${name} of ${x}`,
        ).toBe(true);
    }
    for (const y of odd)
      for (const x of odd) {
        const engine = Math.atan2(y, x);
        const isSame = Math.abs(maths.atan2(y, x) - engine) <= 1e-15 || Object.is(maths.atan2(y, x), engine);
        expect(isSame, `atan2 of ${y} and ${x}`).toBe(true);
      }
    for (const y of [0, -0])
      for (const x of [0, -0, 1, -1]) expect(Object.is(maths.atan2(y, x), Math.atan2(y, x)), `${y}, ${x}`).toBe(true);
    expect(maths.pow(0, 2)).toBe(0);
    expect(maths.pow(0, -2)).toBe(Number.POSITIVE_INFINITY);
    expect(maths.pow(3, 0)).toBe(1);
    expect(maths.pow(-1, 0.5)).toBeNaN();
  });

  it('decades are exact at the powers of ten', () => {
    for (let n = -30; n <= 30; n++) {
      expect(decadeOf(tenTo(n))).toBe(n);
      expect(decadeOf(-9.99 * tenTo(n))).toBe(n);
    }
    expect(decadeOf(999.9999999999999)).toBe(2);
  });
});

/**
 * Our own sum, no source: the last bit is part of the promise, so that a change of method shows here. That the window's engine finds
 * the same bits is asked in test/browser/rooms.test.ts, by a whole check.
 */
describe('the same bits on every machine', () => {
  it('sums of many values', () => {
    let sum = 0;
    for (let i = 1; i <= 1000; i++) {
      const x = i / 37;
      sum += maths.sin(x) + maths.cos(x) * maths.tan(1 / x) + maths.atan2(x, i - 500) + maths.acos(1 / (x + 1));
      sum += maths.exp(-x) + maths.log(x) + maths.pow(x, 0.7) + maths.asin(1 / (x + 1));
    }
    expect(sum).toBe(11488.546579826141);
  });

  it('nothing in core asks the engine for what engines disagree on', () => {
    const root = resolve(import.meta.dirname, '../../..');
    const loose = /\bMath\.(a?sinh?|a?cosh?|a?tanh?|atan2|exp|expm1|log|log10|log1p|log2|pow|cbrt)\b|[\w)\]] \*\* /;
    const files = sourceFiles('core').filter((path) => !path.startsWith('core/maths/'));
    expect(files.length).toBeGreaterThan(100);
    const found = files.flatMap((path) =>
      readFileSync(resolve(root, path), 'utf8')
        .split('\n')
        .flatMap((line, i) => (loose.test(line) ? [`${path}:${i + 1}: ${line.trim()}`] : [])),
    );
    expect(found).toEqual([]);
  });
});
