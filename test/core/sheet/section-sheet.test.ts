import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Document, Mark } from '../../../core/sheet/drawing.ts';
import { PROPOSED_LINE } from '../../../core/sheet/ink.ts';
import { sectionSheet } from '../../../core/sheet/section-sheet.ts';
import { litOnGlass, windowSection } from '../../../core/sheet/window-section.ts';
import { demoScheme, modelOf } from '../../helpers/demo-scheme.ts';

const FACTS = { scale: 50, paper: 'A3', drawn: '2026-03-02', engine: '0.1.0', hash: '0123456789abcdef' } as const;
const scheme = demoScheme('tannery-yard');
const model = modelOf(scheme);

const flat = (marks: readonly Mark[]): Mark[] => marks.flatMap((m) => (m.kind === 'group' ? flat(m.marks) : [m]));

function drawn(window: string): Document {
  const sheet = sectionSheet({ scheme, model, window, ...FACTS });
  if (!sheet.ok) throw new Error(JSON.stringify(sheet.faults));
  return sheet.value;
}

describe('sun on the glass of a section', () => {
  const overhang = (height_m: number, above: number, depth: number, reveal_m = 0) => ({
    height_m,
    reveal_m,
    blades: [
      {
        device: 'D',
        kind: 'overhang' as const,
        ends: [
          [0, height_m + above],
          [depth, height_m + above],
        ] as const,
      },
    ],
  });

  test('an overhang of depth P casts a shadow P·tan VSA − e below the head', () => {
    // Shadow-angle rule, e.g. S. V. Szokolay, Introduction to Architectural Science (2008), part 1; the numbers are ours.
    const [low, high] = litOnGlass(overhang(1.5, 0.2, 0.6), (40 * Math.PI) / 180)[0] ?? [];
    expect(low).toBe(0);
    expect(high).toBeCloseTo(1.5 - (0.6 * Math.tan((40 * Math.PI) / 180) - 0.2), 12);
  });

  test('deep enough it shades the whole window: P = (H + e) / tan VSA', () => {
    const profile = (55 * Math.PI) / 180;
    const depth = (1.5 + 0.2) / Math.tan(profile);
    expect(litOnGlass(overhang(1.5, 0.2, depth + 1e-6), profile)).toEqual([]);
    expect(litOnGlass(overhang(1.5, 0.2, depth - 0.01), profile).length).toBe(1);
  });

  test('a reveal of depth r takes r·tan VSA off the head', () => {
    const [, high] = litOnGlass({ height_m: 1.2, reveal_m: 0.15, blades: [] }, Math.PI / 4)[0] ?? [];
    expect(high).toBeCloseTo(1.2 - 0.15, 12);
  });

  test('whatever projects, the lit stretches lie on the glass, apart and in order', () => {
    fc.assert(
      fc.property(
        fc.array(
          fc.tuple(
            fc.double({ min: 0, max: 2, noNaN: true }),
            fc.double({ min: -1, max: 4, noNaN: true }),
            fc.double({ min: 0.01, max: 1, noNaN: true }),
          ),
          { maxLength: 8 },
        ),
        fc.double({ min: 0.02, max: 1.5, noNaN: true }),
        (list, profile) => {
          const blades = list.map(([out, up, width]) => ({
            device: 'L',
            kind: 'louvres' as const,
            ends: [
              [out, up],
              [out + width, up],
            ] as const,
          }));
          let last = 0;
          for (const [a, b] of litOnGlass({ height_m: 2, reveal_m: 0.1, blades }, profile)) {
            expect(a).toBeGreaterThanOrEqual(last);
            expect(b).toBeGreaterThan(a);
            expect(b).toBeLessThanOrEqual(2);
            last = b;
          }
        },
      ),
    );
  });
});

test('the overhang of the demo is cut where the scheme puts it', () => {
  const window = model.windows.find((w) => w.id === 'W10');
  const device = scheme.devices.find((d) => d.id === 'D1');
  if (!window || device?.kind !== 'overhang') throw new Error('the demo has changed');
  const [blade] = windowSection(window).blades;
  expect(blade?.ends[1][0]).toBeCloseTo(device.depth, 9);
  expect(blade?.ends[0][1]).toBeCloseTo(window.height_m + device.above, 9);
});

test('it is drawn to scale: an overhang of 0.90 m is 18 mm long at 1:50', () => {
  const marks = flat(drawn('W10').pages[0]?.marks ?? []);
  const device = scheme.devices.find((d) => d.id === 'D1');
  const lines = marks.flatMap((m) =>
    m.kind === 'path' && m.stroke?.colour === PROPOSED_LINE.colour && m.stroke.width === 0.9 ? [m.runs[0] ?? []] : [],
  );
  expect(lines.length).toBe(2);
  for (const run of lines) {
    const [a, b] = run as [readonly [number, number], readonly [number, number]];
    expect(Math.hypot(b[0] - a[0], b[1] - a[1])).toBeCloseTo(
      ((device?.kind === 'overhang' ? device.depth : 0) * 1000) / 50,
      6,
    );
  }
});

test('it states both noons, their profile angles and the structural caution', () => {
  const text = flat(drawn('W10').pages[0]?.marks ?? [])
    .flatMap((m) => (m.kind === 'text' ? [m.text] : []))
    .join(' ');
  expect(text).toMatch(/21 June 2025, 13:1\d \(UTC\+01:00\), sun at its highest/u);
  expect(text).toMatch(/21 December 2025, 12:0\d \(UTC\+00:00\), sun at its highest/u);
  expect(text).toMatch(/profile angle \d+\.\d°/u);
  expect(text).toContain('need an engineer');
});

test('a window that is not there, or has no upright section, is a fault', () => {
  expect(sectionSheet({ scheme, model, window: 'nowhere', ...FACTS })).toMatchObject({
    ok: false,
    faults: [{ code: 'no-such-window' }],
  });
});
