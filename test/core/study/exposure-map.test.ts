import { describe, expect, it } from 'vitest';
import { buildModel } from '../../../core/form/build-model.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { exposureMap, surfacesOf } from '../../../core/study/exposure-map.ts';
import { neighbourLight } from '../../../core/study/exposure-neighbours.ts';

const go = async () => 'go' as const;
const scheme = Scheme.parse({
  format: 'shadewright',
  version: 1,
  site: { latitude: 51.45, longitude: -2.59, zone: 'Europe/London' },
  blocks: [
    { id: 'O', standing: 'removed', box: { at: [0, -8], width: 10, depth: 6 }, height: 3 },
    { id: 'P', standing: 'proposed', box: { at: [0, -8], width: 10, depth: 8 }, height: 15 },
    { id: 'N', standing: 'context', box: { at: [0, 12], width: 10, depth: 8 }, height: 6 },
  ],
  receptors: [
    { id: 'V', kind: 'window', block: 'N', wall: 0, from: 4, sill: 1.5, width: 2, height: 1.4 },
    {
      id: 'A',
      kind: 'area',
      outline: [
        [0, 1],
        [10, 1],
        [10, 11],
        [0, 11],
      ],
    },
    { id: 'R', kind: 'point', at: [5, 16, 20] },
  ],
});
const model = buildModel(scheme);

describe('the map of surfaces', () => {
  it('covers what stands at each stage, and the change where a surface is there at both', async () => {
    const surfaces = [
      { kind: 'wall', block: 'N', wall: 0 },
      { kind: 'roof', block: 'P' },
      { kind: 'wall', block: 'O', wall: 2 },
      {
        kind: 'ground',
        outline: [
          [-5, -10],
          [15, -10],
          [15, 12],
          [-5, 12],
        ],
        level_m: 0,
      },
    ] as const;
    const result = await exposureMap(scheme, model, { dates: ['2025-03-21'], surfaces, step_min: 10 }, go);
    if (!result?.ok) throw new Error('refused');
    const [wall, roof, old, ground] = result.value.surfaces;
    expect(wall!.grid.cell).toHaveLength(60);
    expect(wall!.panel!.normal).toEqual([0, -1, 0]);
    expect(wall!.change!.minutes.every((v) => v <= 0)).toBe(true);
    expect(wall!.change!.minutes.some((v) => v < 0)).toBe(true);
    for (let i = 0; i < 60; i++) {
      expect(wall!.before!.beam[i]! + wall!.change!.beam[i]!).toBeCloseTo(wall!.after!.beam[i]!, 9);
      expect(wall!.after!.sky[i]!).toBeLessThan(wall!.before!.sky[i]!);
    }
    expect([roof!.before, old!.after]).toEqual([null, null]);
    expect(roof!.change).toBeNull();
    // Nothing stands over the roof: all of it has the sun of the open day.
    expect(new Set(roof!.after!.minutes).size).toBe(1);
    expect(ground!.before!.covered.reduce((a, b) => a + b, 0)).toBe(60);
    expect(ground!.after!.covered.reduce((a, b) => a + b, 0)).toBe(80);
  });

  it('of a moment is the shadow of that moment: lit or not, a step each', async () => {
    const noon = Date.UTC(2025, 5, 21, 12, 10);
    const surfaces = [
      {
        kind: 'ground',
        outline: [
          [-2, 0],
          [12, 0],
          [12, 12],
          [-2, 12],
        ],
        level_m: 0,
      },
    ] as const;
    const result = await exposureMap(scheme, model, { moments_ms: [noon], surfaces, step_min: 1, spacing_m: 0.5 }, go);
    if (!result?.ok) throw new Error('refused');
    const { after, grid } = result.value.surfaces[0]!;
    // At that minute the sun stands due south at 61.99° (51.45° N, midsummer): the edge of the 15 m shadow lies 7.98 m north.
    const edge = 15 / Math.tan((61.99 * Math.PI) / 180);
    for (let i = 0; i < grid.cell.length; i++) {
      const [x, y] = [grid.receptors.x[i]!, grid.receptors.y[i]!];
      if (x > 1 && x < 9 && Math.abs(y - edge) > 0.2) expect(after!.minutes[i]).toBe(y < edge ? 0 : 1);
    }
  });

  it('has the same sun without the light of sky and ground, and none of that light', async () => {
    const ask = { dates: ['2025-03-21'], surfaces: surfacesOf(model, 'after'), step_min: 20 };
    const all = await exposureMap(scheme, model, ask, go);
    const sun = await exposureMap(scheme, model, { ...ask, hasDiffuse: false }, go);
    if (!all?.ok || !sun?.ok) throw new Error('refused');
    all.value.surfaces.forEach(({ after }, i) => {
      const other = sun.value.surfaces[i]!.after!;
      expect(other.minutes).toEqual(after!.minutes);
      expect(other.beam).toEqual(after!.beam);
      expect(Math.max(...other.sky, ...other.ground)).toBe(0);
      expect(Math.max(...after!.sky)).toBeGreaterThan(0);
    });
  });

  it('lists every wall and roof of a stage', () => {
    expect(surfacesOf(model, 'before')).toHaveLength(10);
    expect(
      surfacesOf(model, 'after')
        .filter((s) => s.kind === 'roof')
        .map((s) => 'block' in s && s.block),
    ).toEqual(['P', 'N']);
  });

  it('refuses unknown blocks and walls', async () => {
    const surfaces = [
      { kind: 'roof', block: 'X' },
      { kind: 'wall', block: 'N', wall: 9 },
    ] as const;
    const result = await exposureMap(scheme, model, { dates: ['2025-03-21'], surfaces }, go);
    expect(result && !result.ok && result.faults.map((f) => f.place)).toEqual(['surfaces[0]', 'surfaces[1]']);
  });
});

describe('what neighbours keep', () => {
  it('of sky, probable sun and sun on the ground, before and after', async () => {
    const result = await neighbourLight(scheme, model, { hours: 8 }, go);
    if (!result?.ok) throw new Error('refused');
    const [v, a, r] = result.value.receptors;
    if (v?.kind !== 'window' || a?.kind !== 'area' || r?.kind !== 'point') throw new Error('out of order');
    expect(result.value.date).toBe('2025-03-21');
    // A roof of 10 m by 20 m up: nothing stands above it.
    expect(r.skyComponent).toEqual({
      before: expect.closeTo(1, 5),
      after: expect.closeTo(1, 5),
      kept: expect.closeTo(1, 9),
    });
    expect([r.annual.before, r.annual.after]).toEqual([1, 1]);
    expect(r.level).toEqual({ before: 'high', after: 'high' });
    for (const pair of [v.skyComponent, v.skyView, v.annual, v.winter, v.sunMinutes]) {
      expect(pair.after).toBeLessThan(pair.before);
      expect(pair.kept).toBeCloseTo(pair.after / pair.before, 12);
    }
    expect(v.skyComponent.before).toBeLessThan(0.3962);
    expect(v.winter.before).toBeLessThan(v.annual.before);
    expect(a.share.after).toBeLessThan(a.share.before);
    expect(a.share.before).toBeGreaterThan(0.5);
    // Half a year of day and night (methods dossier 10): 4380 h of sun above the horizon, to the asymmetry of the orbit.
    expect(Math.abs(result.value.openHours - 4380)).toBeLessThan(30);
  });

  it('weights hours with the sunshine of the months', async () => {
    const june = [0, 0, 0, 0, 0, 0.4, 0, 0, 0, 0, 0, 0];
    const result = await neighbourLight(scheme, model, { sunshine: june, step_min: 30 }, go);
    if (!result?.ok) throw new Error('refused');
    const v = result.value.receptors[0]!;
    expect(v.kind === 'window' && v.winter.before).toBe(0);
    expect(Math.abs(result.value.openHours - 0.4 * 493)).toBeLessThan(4);
  });
});
