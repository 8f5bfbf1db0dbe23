import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { buildModel } from '../../../core/form/build-model.ts';
import { glazingToWall } from '../../../core/form/glazing-share.ts';
import { loadScheme } from '../../../core/scheme/load.ts';
import { writeScheme } from '../../../core/scheme/write.ts';
import { seedOf } from '../../helpers/property-seed.ts';
import { smallScheme } from '../../helpers/small-scheme.ts';

/** The small scheme's file with its window changed: the room is 4 × 5 m and 2.7 m high, wall 0 is 4 m long. */
const read = (change: Record<string, unknown>, without: readonly string[] = ['width', 'from']) => {
  const file = JSON.parse(writeScheme(smallScheme()));
  for (const field of without) delete file.windows[0][field];
  Object.assign(file.windows[0], change);
  return loadScheme(JSON.stringify(file));
};
const faults = (...of: Parameters<typeof read>): readonly string[] => {
  const loaded = read(...of);
  return loaded.ok ? [] : loaded.faults.map((fault) => `${fault.place} ${fault.code}`);
};

describe('a window that says its share of the wall in place of a width', () => {
  test('takes up that share, in the middle of the wall, and is saved as a width', () => {
    // 0.5 · 4 m · 2.7 m / 1.5 m = 3.6 m, worked by hand.
    const loaded = read({ share: 0.5 });
    if (!loaded.ok) throw new Error(JSON.stringify(loaded.faults));
    expect(loaded.value.windows[0]).toMatchObject({ width: 3.6, from: 0.2, height: 1.5 });
    expect(loaded.notes).toEqual([]);
    const saved = JSON.parse(writeScheme(loaded.value)).windows[0];
    expect(saved.share).toBeUndefined();
    const { rooms, windows } = buildModel(loaded.value);
    // Of the four walls, 2 · (4 + 5) m · 2.7 m, it is 5.4 m².
    expect(glazingToWall(rooms[0]!, windows)).toBeCloseTo(5.4 / 48.6, 12);
  });

  test('begins where it is said to', () => {
    const loaded = read({ share: 0.25, from: 0.4 });
    expect(loaded.ok && loaded.value.windows[0]).toMatchObject({ width: 1.8, from: 0.4 });
  });

  test('has its share to the tenth of a millimetre of its width, whatever the wall', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 0.5, noNaN: true }), fc.constantFrom(0, 1, 2, 3), (share, wall) => {
        const loaded = read({ share, wall });
        if (!loaded.ok) throw new Error(JSON.stringify(loaded.faults));
        const { width, height, from } = loaded.value.windows[0]!;
        const run = wall % 2 === 0 ? 4 : 5;
        expect(Math.abs((width * height) / (run * 2.7) - share)).toBeLessThan((1e-4 * height) / (run * 2.7));
        expect(Math.abs(from + width / 2 - run / 2)).toBeLessThan(1e-4);
      }),
      { seed: seedOf(20261209) },
    );
  });

  test.each<[string, Parameters<typeof read>, readonly string[]]>([
    ['wider than the wall', [{ share: 0.9 }], ['windows[0].share share']],
    ['more than all of it', [{ share: 1.2 }], ['windows[0].share share']],
    ['a word', [{ share: 'half' }], ['windows[0].share share']],
    ['beside a width', [{ share: 0.4 }, []], ['windows[0].share one-size']],
    ['of no wall', [{ share: 0.4, wall: 9 }], ['windows[0].share share']],
    ['of a room that is not there', [{ share: 0.4, room: 'R9' }], ['windows[0].share share']],
    ['neither', [{}], [expect.stringMatching(/^windows\[0\]\.width /) as unknown as string]],
  ])('%s is refused at its place', (_, of, told) => {
    expect(faults(...of)).toEqual(told);
  });
});
