import { describe, expect, it } from 'vitest';
import { checkScheme } from '../../../core/study/check.ts';
import { smallScheme, type SmallScheme } from '../../helpers/small-scheme.ts';

/** Notes of a check of the small scheme, whose window runs from x = 0.4 to 3.6 and z = 0.9 to 2.4 in the wall y = 0. */
async function notesOf(over: SmallScheme): Promise<readonly string[]> {
  const result = await checkScheme(smallScheme(over), null, [], async () => 'go');
  if (result === null) throw new Error('nothing stops the check');
  return result.notes.map((n) => `${n.place} ${n.code}: ${n.message}`);
}
const block = (over: Record<string, unknown>) => ({ id: 'C1', standing: 'context', height: 9, base: 0, ...over });
const south = (width: number, gap = 0) => ({ at: [0, -3 - gap], width, depth: 3 });

describe('glass that lies behind another block is spoken of, since a room without sun is always within', () => {
  it('wholly behind one that touches its wall', async () => {
    expect(await notesOf({ blocks: [block({ box: south(4) })] })).toEqual([
      'windows[0] window-covered: block C1 stands against window W1 and covers all of it',
    ]);
  });

  it('partly, by the share that it covers', async () => {
    expect(await notesOf({ blocks: [block({ box: south(2) })] })).toEqual([
      'windows[0] window-covered: block C1 stands against window W1 and covers about 50 % of it',
    ]);
  });

  it('also through a gap that is a slip of drawing, and where blocks reach into each other', async () => {
    expect(await notesOf({ blocks: [block({ box: south(4, 0.002) })] })).toHaveLength(1);
    expect(await notesOf({ blocks: [block({ box: south(4, -0.5) })] })).toHaveLength(1);
  });

  it('a rooflight under a block that stands on its roof', async () => {
    const light = { id: 'W2', room: 'R1', roof: { at: [1, 1] }, width: 1, height: 1, glass: 'G1' };
    const top = block({ box: { at: [0, 0], width: 4, depth: 5 }, base: 3, height: 3 });
    expect(await notesOf({ windows: [light], blocks: [top] })).toEqual([
      'windows[1] window-covered: block C1 stands against window W2 and covers all of it',
    ]);
  });

  it('not of a neighbour across a lane, a block above the head, or one that is removed', async () => {
    expect(await notesOf({ blocks: [block({ box: south(4, 0.5) })] })).toEqual([]);
    expect(await notesOf({ blocks: [block({ box: south(4), base: 2.5 })] })).toEqual([]);
    expect(await notesOf({ blocks: [block({ box: south(4), standing: 'removed' })] })).toEqual([]);
  });
});

it('glass under the ground is spoken of: level ground hides nothing', async () => {
  const scheme = smallScheme();
  const sunk = {
    ...scheme,
    blocks: scheme.blocks.map((b) => ({ ...b, base: -2 })),
    rooms: scheme.rooms.map((r) => ({ ...r, floor: -2 })),
  };
  const result = await checkScheme(sunk, null, [], async () => 'go');
  expect(result?.notes.map((n) => `${n.place} ${n.code}: ${n.message}`)).toEqual([
    'windows[0] under-ground: window W1 reaches 1.1 m under the ground, and the ground round it hides no light from it here',
  ]);
});
