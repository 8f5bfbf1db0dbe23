import { describe, expect, it } from 'vitest';
import { buildModel } from '../../../core/form/build-model.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { momentStudy } from '../../../core/study/moment.ts';
import { resolveCivil } from '../../../core/sun/civil.ts';

const scheme = Scheme.parse({
  format: 'shadewright',
  version: 1,
  site: { latitude: 51.5, longitude: 0, zone: 'Europe/London', north: 20, lowSun: 10 },
  blocks: [
    { id: 'new', standing: 'proposed', box: { at: [0, 0], width: 10, depth: 10, turn: 20 }, height: 12 },
    { id: 'old', standing: 'removed', box: { at: [0, 0], width: 10, depth: 10, turn: 20 }, height: 4 },
    { id: 'next', standing: 'context', box: { at: [8, 25], width: 10, depth: 8, turn: 20 }, height: 7 },
  ],
  rooms: [
    { id: 'R', use: 'living', block: 'new', box: { at: [0, 0], width: 10, depth: 10, turn: 20 }, floor: 0, height: 3 },
  ],
  windows: [
    { id: 'south', room: 'R', wall: 0, from: 2, sill: 0.8, width: 2, height: 1.5, glass: 'G', devices: ['O'] },
    { id: 'north', room: 'R', wall: 2, from: 2, sill: 0.8, width: 2, height: 1.5, glass: 'G' },
  ],
  glass: [{ id: 'G', g: 0.6, u: 1.2, light: 0.7 }],
  devices: [{ id: 'O', kind: 'overhang', depth: 0.6 }],
  receptors: [
    { id: 'N', kind: 'window', block: 'next', wall: 0, from: 1, sill: 1, width: 2, height: 1.5 },
    {
      id: 'A',
      kind: 'area',
      outline: [
        [3, 13],
        [12, 13],
        [12, 22],
        [3, 22],
      ],
    },
    { id: 'P', kind: 'point', at: [3, 20, 1.6] },
  ],
});
const model = buildModel(scheme);
const at = (date: string, time: string) =>
  momentStudy(scheme, model, resolveCivil(date, time, 'Europe/London').instant_ms);

describe('momentStudy', () => {
  it('at midwinter noon: sun in the south at 90° − φ + δ, shadows due true north, the taller block taking sun from its neighbour', () => {
    const m = at('2025-12-21', '12:00');
    expect(m.civil.text).toBe('21 December 2025, 12:00 (UTC+00:00)');
    expect(m.sun.altitude_deg).toBeCloseTo(90 - 51.5 - 23.44, 1);
    expect(Math.abs(m.sun.azimuth_deg - 180)).toBeLessThan(1);
    expect(m.isLowSun).toBe(false);
    // Drawn with true north 20° clockwise of up: the tip of the shadow lies that way from the block.
    const tip = m.shadows?.after.regions.flatMap((r) => r.outer).reduce((p, q) => (q[1] > p[1] ? q : p)) as readonly [
      number,
      number,
    ];
    expect(tip[0]).toBeGreaterThan(10);
    // By hand, across the shadow 10 m wide: old reach 10 + 4·3.71 = 24.9 m, new 54.6 m; the next block and its own shadow take
    // 26.2 to 60.2 m of all but 1.03 m of it. Added 8.97·1.37 + 1.03·29.7 = 43 m² with the sun due south; it stands 0.5° past.
    expect(Math.abs((m.shadows?.added.area_m2 ?? 0) - 43)).toBeLessThan(8);
    expect(m.shadows?.gained.area_m2).toBe(0);
    // The wall that was turned by 20° with north faces due south; the sun meets it square: overhang 0.6·tan 15.06° of 1.5.
    const south = m.windows.find((w) => w.window === 'south');
    expect(south?.sunlit).toBeCloseTo(1 - (0.6 * Math.tan((m.sun.altitude_deg * Math.PI) / 180)) / 1.5, 2);
    expect(m.windows.find((w) => w.window === 'north')?.sunlit).toBe(0);
    expect(m.neighbours).toHaveLength(1);
    expect(m.neighbours[0]?.after).toBeLessThan(m.neighbours[0]?.before as number);
    expect(m.areas[0]?.after.share).toBeLessThanOrEqual((m.areas[0]?.before.share as number) + 1e-12);
    // Ten faces of two standing blocks: 4 walls and a roof each.
    expect(m.faces).toHaveLength(10);
    expect(m.faces.some((f) => f.solid === 'old')).toBe(false);
  });
  it('says so when the sun is low, and draws no ground shadow when it is down', () => {
    expect(at('2025-12-21', '09:00').isLowSun).toBe(true);
    const night = at('2025-06-21', '23:30');
    expect(night.civil.text).toBe('21 June 2025, 23:30 (UTC+01:00)');
    expect(night.shadows).toBeNull();
    expect(night.isLowSun).toBe(false);
    for (const w of night.windows) expect(w.sunlit).toBe(0);
    for (const f of night.faces) expect(f.shaded_m2).toBe(f.area_m2);
    expect(night.areas[0]?.after.share).toBe(0);
  });
  it('shows the faces of the stage asked for', () => {
    const before = momentStudy(
      scheme,
      model,
      resolveCivil('2025-06-21', '12:00', 'Europe/London').instant_ms,
      'before',
    );
    expect(new Set(before.faces.map((f) => f.solid))).toEqual(new Set(['old', 'next']));
  });
  it('is plain data, and the same for a model built anew', () => {
    const m = at('2025-03-20', '10:00');
    expect(structuredClone(m)).toEqual(m);
    expect(momentStudy(scheme, buildModel(scheme), m.instant_ms)).toEqual(m);
  });
  it('takes an empty scheme', () => {
    const empty = Scheme.parse({ format: 'shadewright', version: 1, site: { latitude: 0, longitude: 0, zone: 'UTC' } });
    const m = momentStudy(empty, buildModel(empty), Date.UTC(2025, 2, 20, 12));
    expect(m.shadows?.after).toEqual({ regions: [], area_m2: 0 });
    expect([m.faces, m.windows, m.neighbours, m.areas]).toEqual([[], [], [], []]);
  });
});
