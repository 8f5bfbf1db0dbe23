import { describe, expect, test } from 'vitest';
import { faultLine } from '../../../core/scheme/fault.ts';
import { loadScheme } from '../../../core/scheme/load.ts';
import { smallScheme } from '../../helpers/small-scheme.ts';

type Loose = ReturnType<typeof JSON.parse>;
const BLIND = { id: 'D1', kind: 'blind', place: 'external', transmittance: 0.1, reflectance: 0.5, closedAbove: 200 };

/** What reading says of the small scheme with something changed: its faults, or its notes. */
function said(change: (scheme: Loose) => void): { readonly ok: boolean; readonly lines: readonly string[] } {
  const scheme: Loose = JSON.parse(JSON.stringify(smallScheme()));
  change(scheme);
  const read = loadScheme(JSON.stringify(scheme));
  return { ok: read.ok, lines: (read.ok ? read.notes : read.faults).map(faultLine) };
}
const withBlind = (over: Loose) =>
  said((s) => {
    s.devices = [{ ...BLIND, ...over }];
    s.windows[0].devices = ['D1'];
  });

describe('an entry of an unknown kind is told what stands there and what may', () => {
  test('devices', () => {
    const { lines } = said((s) => (s.devices = [{ id: 'D1', kind: 'overhangs', depth: 1 }]));
    expect(lines).toEqual([
      'devices[0].kind: must be one of "overhang", "fin", "louvres", "blind", got "overhangs"; choose one of these',
    ]);
  });

  test('receptors, with no kind at all', () => {
    const { lines } = said((s) => (s.receptors = [{ id: 'P1', at: [0, 0, 0] }]));
    expect(lines).toEqual([
      'receptors[0].kind: must be one of "point", "area", "window", got nothing; choose one of these',
    ]);
  });
});

describe('either, or', () => {
  test('a block with neither box nor outline is not told to keep one', () => {
    const { lines } = said((s) => delete s.blocks[0].box);
    expect(lines[0]).toBe('blocks[0]: needs a box or an outline, and has neither; add one of the two');
  });

  test('a block with both is', () => {
    const outline = [
      [0, 0],
      [4, 0],
      [4, 5],
    ];
    expect(said((s) => (s.blocks[0].outline = outline)).lines[0]).toBe(
      'blocks[0]: has both a box and an outline; keep one of the two',
    );
  });

  test('a window with neither wall nor roof', () => {
    expect(said((s) => delete s.windows[0].wall).lines[0]).toBe(
      'windows[0]: needs a wall or a roof, and has neither; add one of the two',
    );
  });

  test('a window with both', () => {
    expect(said((s) => (s.windows[0].roof = { at: [1, 1] })).lines[0]).toBe(
      'windows[0]: has both a wall and a roof; keep one of the two',
    );
  });
});

describe('fields that look misspelt are found inside entries too', () => {
  test.each([
    ['blocks[0].box.trun', 'turn', (s: Loose) => (s.blocks[0].box = { at: [0, 0], width: 4, depth: 5, trun: 0 })],
    ['rooms[0].box.Turn', 'turn', (s: Loose) => (s.rooms[0].box = { at: [0, 0], width: 4, depth: 5, Turn: 0 })],
  ])('%s', (place, meant, change) => {
    const { ok, lines } = said(change);
    expect(ok).toBe(true);
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatch(place);
    expect(lines[0]).toContain(`write "${meant}" if that was meant`);
  });
});

describe('a blind', () => {
  test.each([
    [{ closedFrom: '25:00', closedTo: '26:00' }, 'closedFrom'],
    [{ closedFrom: '10:00', closedTo: '10:75' }, 'closedTo'],
  ])('of hours that no clock shows is refused: %j', (hours, field) => {
    const { ok, lines } = withBlind(hours);
    expect(ok).toBe(false);
    expect(lines[0]).toMatch(
      new RegExp(`^devices\\[0\\]\\.${field}: must be a time of the clock from 00:00 to 24:00, got`),
    );
  });

  test('of ordinary hours, midnight by either name, is read', () => {
    expect(withBlind({ closedFrom: '00:00', closedTo: '24:00' })).toEqual({ ok: true, lines: [] });
  });

  test('that lets through and throws back more than it gets is refused', () => {
    const { ok, lines } = withBlind({ transmittance: 0.6, reflectance: 0.5 });
    expect(ok).toBe(false);
    expect(lines[0]).toMatch(/^devices\[0\]: transmittance 0\.6 and reflectance 0\.5 are together more than 1/);
    expect(withBlind({ transmittance: 0.3, reflectance: 0.7 }).ok).toBe(true);
  });
});

test('a tree that is all trunk is told to have no crown', () => {
  const tree = { id: 'T1', at: [20, 20], height: 2, trunk: 3, spread: 4, transmittance: Array(12).fill(0.2) };
  const { ok, lines } = said((s) => (s.trees = [tree]));
  expect(ok).toBe(true);
  expect(lines).toEqual([
    'trees[0]: its trunk of 3 m leaves no crown in a height of 2 m, so it shades nothing; check trunk and height',
  ]);
});
