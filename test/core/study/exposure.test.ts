import { describe, expect, it } from 'vitest';
import { buildModel } from '../../../core/form/build-model.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { exposureJob, exposureSlice, joinSlices, SLICE, slicesOf } from '../../../core/shade/exposure-slice.ts';
import { designDay } from '../../../core/sky/design-day.ts';
import { type ExposureAsk, exposureStudy } from '../../../core/study/exposure.ts';
import { blockField, fieldReceptors } from '../../helpers/block-field.ts';
import { yearLight } from '../../helpers/year-light.ts';

const go = async () => 'go' as const;

function scheme(blocks: unknown[], receptors: unknown[], site: object = {}): Scheme {
  return Scheme.parse({
    format: 'shadewright',
    version: 1,
    site: { latitude: 51.45, longitude: -2.59, zone: 'Europe/London', elevation: 18, ...site },
    blocks,
    receptors,
  });
}

async function study(s: Scheme, ask: ExposureAsk) {
  const result = await exposureStudy(s, buildModel(s), ask, go);
  if (!result?.ok) throw new Error(JSON.stringify(result));
  return result.value;
}

const points = [
  { id: 'P1', kind: 'point', at: [0, 0, 1], normal: [0, 0, 2] },
  { id: 'P2', kind: 'point', at: [0, 0, 1], normal: [0, -1, 0] },
];

describe('in the open', () => {
  it('sums the design days: minutes, beam by the cosine, sky and ground by the tilt', async () => {
    const s = scheme([], points, { north: 0, linkeTurbidity: 3.2, groundReflectance: 0.25 });
    const got = await study(s, { dates: ['2025-06-21', '2025-12-21'] });
    const want = [0, 1].map(() => ({ minutes: 0, beam: 0, sky: 0, ground: 0 }));
    for (const date of ['2025-06-21', '2025-12-21']) {
      const day = designDay({
        key: '',
        name: '',
        date,
        zone: 'Europe/London',
        step_min: 5,
        observer: { latitude_deg: 51.45, longitude_deg: -2.59, elevation_m: 18 },
        linkeTurbidity: 3.2,
        maximum_C: 20,
        range_K: 0,
      });
      for (let i = 0; i < day.instant_ms.length; i++) {
        const up = Math.sin(day.altitude_rad[i]!);
        const south = -Math.cos(day.altitude_rad[i]!) * Math.cos(day.azimuth_rad[i]!);
        want.forEach((w, k) => {
          const cos = k === 0 ? up : south;
          if (up > 0 && cos > 0) {
            w.minutes += 5;
            w.beam += (day.beamNormal_Wm2[i]! * cos) / 12;
          }
          w.sky += (day.diffuse_Wm2[i]! * (k === 0 ? 1 : 0.5)) / 12;
          w.ground += (day.global_Wm2[i]! * (k === 0 ? 0 : 0.5) * 0.25) / 12;
        });
      }
    }
    got.receptors.forEach((r, k) => {
      const w = want[k]!;
      expect(r.sunMinutes).toBe(w.minutes);
      expect(r.beam).toBeCloseTo(w.beam, 6);
      expect(Math.abs(r.sky / w.sky - 1)).toBeLessThan(1e-4);
      if (k === 1) expect(Math.abs(r.ground / w.ground - 1)).toBeLessThan(1e-4);
      else expect(r.ground).toBeCloseTo(0, 9);
    });
  });

  it('a day of 23 or 25 h counts whole, and a step that does not divide it ends in a shorter one', async () => {
    // Beyond the polar circle in midsummer the sun is up all day: minutes are the length of the civil day.
    const s = scheme([], points, { latitude: 78, longitude: 15, zone: 'Arctic/Longyearbyen' });
    for (const step_min of [5, 7, 60])
      expect((await study(s, { dates: ['2025-06-21'], step_min })).receptors[0]!.sunMinutes).toBeCloseTo(1440, 9);
    const egypt = scheme([], points, { latitude: 78, longitude: 15, zone: 'Africa/Cairo' });
    // Clocks in Egypt go forward on the last Friday of April: 25 April 2025.
    expect((await study(egypt, { dates: ['2025-04-25'] })).receptors[0]!.sunMinutes).toBeCloseTo(1380, 9);
  });

  it('leaves low sun out where the scheme says so', async () => {
    const ask = { dates: ['2025-03-21'] };
    const all = (await study(scheme([], points), ask)).receptors[0]!;
    const high = (await study(scheme([], points, { lowSun: 10 }), ask)).receptors[0]!;
    // 51.5° N, equinox: 12.0000 h above 0°, 9.8404 h above 10° (methods dossier 2.4, 2c); the real day differs by minutes.
    expect(Math.abs(all.sunMinutes - 720)).toBeLessThan(12);
    expect(Math.abs(high.sunMinutes - 590)).toBeLessThan(12);
    expect(high.sky).toBe(all.sky);
  });
});

describe('periods', () => {
  const s = scheme([{ id: 'B', standing: 'context', box: { at: [-5, -20], width: 10, depth: 8 }, height: 12 }], points);

  it('a span sums its days, a year its 365', async () => {
    const days = ['2025-02-01', '2025-02-02', '2025-02-03'];
    const one = await Promise.all(days.map((d) => study(s, { dates: [d] })));
    const span = await study(s, { between: ['2025-02-01', '2025-02-03'] });
    for (const k of [0, 1]) {
      expect(span.receptors[k]!.sunMinutes).toBe(one.reduce((sum, o) => sum + o.receptors[k]!.sunMinutes, 0));
      expect(span.receptors[k]!.beam).toBeCloseTo(
        one.reduce((sum, o) => sum + o.receptors[k]!.beam, 0),
        6,
      );
    }
    const year = await study(s, { year: 2025, step_min: 30 });
    expect(year.dates).toHaveLength(365);
    expect(year.dates[364]).toBe('2025-12-31');
  });

  it('refuses what cannot be answered, naming the bound', async () => {
    const asks: readonly [ExposureAsk, string][] = [
      [{ dates: ['2025-02-30'] }, 'is not a date'],
      [{ dates: [] }, 'no date'],
      [{ between: ['2025-03-01', '2025-02-01'] }, 'comes before'],
      [{ between: ['1990-01-01', '2020-01-01'] }, 'more than 3660'],
      [{ year: 1850 }, '1900 to 2100'],
      [{ year: 2025, step_min: 0 }, 'from 1 to 60'],
      [{ year: 2025, step_min: 2.5 }, 'from 1 to 60'],
      [{ between: ['2020-01-01', '2022-01-01'], step_min: 1 }, 'more than 600000 samples'],
      [{ year: 2025, spacing_m: 0 }, 'more than 0 m'],
    ];
    for (const [ask, words] of asks) {
      const result = await exposureStudy(s, buildModel(s), ask, go);
      expect(result?.ok).toBe(false);
      if (result && !result.ok) expect(result.faults[0]!.message).toContain(words);
    }
    const wide = scheme(
      [],
      [
        {
          id: 'A',
          kind: 'area',
          outline: [
            [0, 0],
            [5000, 0],
            [5000, 5000],
            [0, 5000],
          ],
        },
      ],
    );
    const result = await exposureStudy(wide, buildModel(wide), { dates: ['2025-03-21'] }, go);
    expect(result && !result.ok && result.faults[0]!.message).toContain('more than 1000000');
  });

  it('stops when told to', async () => {
    expect(await exposureStudy(s, buildModel(s), { dates: ['2025-03-21'] }, async () => 'stop')).toBeNull();
  });
});

describe('areas, windows, before and after', () => {
  const blocks = [
    { id: 'O', standing: 'removed', box: { at: [0, -8], width: 10, depth: 8 }, height: 3 },
    { id: 'P', standing: 'proposed', box: { at: [0, -8], width: 10, depth: 10 }, height: 15 },
    { id: 'N', standing: 'context', box: { at: [0, 20], width: 10, depth: 8 }, height: 6 },
  ];
  const receptors = [
    {
      id: 'A',
      kind: 'area',
      outline: [
        [0, 0],
        [10, 0],
        [10, 12],
        [0, 12],
      ],
    },
    { id: 'V', kind: 'window', block: 'N', wall: 0, from: 4, sill: 1, width: 2, height: 1.4 },
  ];
  const s = scheme(blocks, receptors);

  it('compares a garden before and after, without the part that is built over', async () => {
    const ask = { dates: ['2025-03-21'] };
    const before = await study(s, { ...ask, stage: 'before' });
    const after = await study(s, { ...ask, stage: 'after' });
    const grid = after.receptors[0]!.grid!;
    expect(grid.layout.cell).toHaveLength(120);
    expect(grid.values.covered.reduce((a, b) => a + b, 0)).toBe(20);
    expect(after.receptors[0]!.sunMinutes).toBeLessThan(before.receptors[0]!.sunMinutes);
    let sum = 0;
    for (let i = 0; i < 120; i++) if (grid.values.covered[i] === 0) sum += grid.values.minutes[i]!;
    expect(after.receptors[0]!.sunMinutes).toBeCloseTo(sum / 100, 9);
  });

  it('asks a window at its centre, or on a grid with that mean', async () => {
    const ask = { dates: ['2025-03-21'], spacing_m: 0.1 };
    const centre = (await study(s, ask)).receptors[1]!;
    const grid = (await study(s, { ...ask, windows: 'grid' })).receptors[1]!;
    expect(centre.grid).toBeNull();
    expect(grid.grid!.layout.cell).toHaveLength(280);
    expect(Math.abs(grid.sunMinutes - centre.sunMinutes)).toBeLessThan(15);
    expect(Math.abs(grid.sky / centre.sky - 1)).toBeLessThan(0.01);
  });

  it('turning the drawing and north together changes no minute', async () => {
    const turned = scheme(
      [{ id: 'N', standing: 'context', box: { at: [0, 20], width: 10, depth: 8, turn: 30 }, height: 6 }],
      [{ id: 'P', kind: 'point', at: [0, 0, 0] }],
      { north: 30 },
    );
    // The block's corner stands where a turn of the drawing by 30° clockwise puts it.
    const c = Math.cos(Math.PI / 6);
    const half = Math.sin(Math.PI / 6);
    const moved = Scheme.parse({
      ...turned,
      blocks: [{ ...turned.blocks[0], box: { at: [20 * half, 20 * c], width: 10, depth: 8, turn: 30 } }],
    });
    const plain = scheme(
      [{ id: 'N', standing: 'context', box: { at: [0, 20], width: 10, depth: 8 }, height: 6 }],
      [{ id: 'P', kind: 'point', at: [0, 0, 0] }],
    );
    const ask = { between: ['2025-03-01', '2025-06-30'] as const, step_min: 10 };
    const one = (await study(plain, ask)).receptors[0]!;
    const two = (await study(moved, ask)).receptors[0]!;
    expect(Math.abs(one.sunMinutes - two.sunMinutes)).toBeLessThanOrEqual(10);
    expect(Math.abs(one.beam / two.beam - 1)).toBeLessThan(1e-4);
  });
});

describe('slices', () => {
  it('give the same bytes in whatever order and by however many they are worked out', () => {
    const field = blockField(3, 30, true);
    const r = fieldReceptors(field, 2 * SLICE + 100, 4);
    const job = exposureJob(field.solids, field.shaders, yearLight(51.5, 20, [80, 172]), r, {
      diffuse_Whm2: 1000,
      reflected_Whm2: 500,
    });
    expect(slicesOf(job)).toBe(3);
    const copy = structuredClone(job);
    const back = [2, 1, 0].map((i) => exposureSlice(copy, i)).reverse();
    const whole = joinSlices([0, 1, 2].map((i) => exposureSlice(job, i)));
    expect(joinSlices(back)).toEqual(whole);
    expect(whole.minutes).toHaveLength(2 * SLICE + 100);
    for (const column of [whole.minutes, whole.beam, whole.sky, whole.ground])
      expect(column.every((v) => Number.isFinite(v) && v >= 0)).toBe(true);
  });
});
