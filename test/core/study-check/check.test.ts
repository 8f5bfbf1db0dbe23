import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import { PARTS } from '../../../core/gain/series.ts';
import type { LimitSet } from '../../../core/limits/limit-set.ts';
import { parseLimitSet } from '../../../core/limits/load-limits.ts';
import { workingAt, workingOf } from '../../../core/limits/working.ts';
import { applyEdit } from '../../../core/scheme/edit.ts';
import { faultLine } from '../../../core/scheme/fault.ts';
import { loadScheme } from '../../../core/scheme/load.ts';
import type { Scheme } from '../../../core/scheme/schema.ts';
import { checkScheme } from '../../../core/study/check.ts';
import type { CheckResult } from '../../../core/study/check-result.ts';
import { ENGINE_VERSION } from '../../../core/study/engine.ts';

const read = (path: string): string => readFileSync(new URL(`../../../${path}`, import.meta.url), 'utf8');
const go = async (): Promise<'go'> => 'go';

function schemeOf(text: string): Scheme {
  const loaded = loadScheme(text);
  if (!loaded.ok) throw new Error(loaded.faults.map(faultLine).join('\n'));
  return loaded.value;
}
function limitsOf(text: string): LimitSet {
  const loaded = parseLimitSet(text);
  if (!loaded.ok) throw new Error(loaded.faults.map(faultLine).join('\n'));
  return loaded.value;
}
const edited = (
  scheme: Scheme,
  list: 'devices' | 'windows' | 'glass' | 'blocks',
  id: string,
  field: string,
  value: unknown,
): Scheme => {
  const done = applyEdit(scheme, { kind: 'set', list, id, field, value });
  if (!done.ok) throw new Error(done.faults.map(faultLine).join('\n'));
  return done.value;
};
const checked = async (scheme: Scheme, set: LimitSet | null, memo = createCheckMemo()): Promise<CheckResult> =>
  (await checkScheme(scheme, set, [], go, { memo })) as CheckResult;

const yard = schemeOf(read('assets/demo/tannery-yard.scheme.json'));
const limits = limitsOf(read('assets/limits/example-gain.json'));
const sum = (column: Float64Array): number => column.reduce((a, b) => a + b, 0);

describe('the check of the demo scheme', () => {
  let result: CheckResult;
  beforeAll(async () => {
    result = await checked(yard, limits);
  });

  it('looks at four days of the year and the hottest design day, in five-minute steps of the civil day', () => {
    expect(result.days.map((d) => [d.key, d.date])).toEqual([
      ['march', '2025-03-21'],
      ['june', '2025-06-21'],
      ['september', '2025-09-23'],
      ['december', '2025-12-21'],
      ['hottest', '2025-07-21'],
    ]);
    for (const day of result.days) expect([day.step_min, day.instant_ms.length]).toEqual([5, 288]);
    expect(Number.isNaN(result.days[0]?.tAir_C[0])).toBe(true);
    expect(Math.max(...(result.days[4]?.tAir_C ?? []))).toBeCloseTo(30.5, 1);
  });
  it('finds rooms over, close and within, worst first, and counts each room once', () => {
    const shares = result.findings.map((f) => (f.margin as number) / (f.limitValue as number));
    expect(shares).toEqual([...shares].sort((a, b) => b - a));
    expect(result.findings.length).toBe(3 * yard.rooms.length);
    const { over, close, within } = result.counts;
    expect(over).toBeGreaterThan(0);
    expect(within).toBeGreaterThan(0);
    expect(over + close + within).toBe(yard.rooms.length);
  });
  it('balances: parts sum to windows, windows to rooms, on every day (to 1e-9)', () => {
    for (const room of result.rooms)
      for (const day of room.days) {
        const byWindow = day.windows.reduce((t, w) => t + sum(w.total_W), 0);
        const byPart = day.windows.reduce((t, w) => t + PARTS.reduce((u, p) => u + sum(w.parts[p]), 0), 0);
        const total = sum(day.total_W);
        expect(Math.abs(byWindow - total)).toBeLessThanOrEqual(1e-9 * Math.max(1, total));
        expect(Math.abs(byPart - total)).toBeLessThanOrEqual(1e-9 * Math.max(1, total));
      }
  });
  it('peaks west rooms in the afternoon and east-lit ones in the morning', () => {
    const peak = (room: string): string =>
      result.findings.find((f) => f.room === room && f.limit === 'peak-day')?.when?.text ?? '';
    expect(peak('2.3')).toMatch(/1[67]:\d\d/);
    expect(peak('1.5')).toMatch(/0[789]:\d\d/);
  });
  it('is the same again, to the last digit, with and without memory', async () => {
    const memo = createCheckMemo();
    const first = await checked(yard, limits, memo);
    expect(JSON.stringify(await checked(yard, limits, memo))).toBe(JSON.stringify(first));
    expect(JSON.stringify(first)).toBe(JSON.stringify(result));
  });
  it('carries version, hash, sky model, cautions and the warning that the limits are an example', () => {
    expect(result.engine).toBe((JSON.parse(read('package.json')) as { version: string }).version);
    expect(result.engine).toBe(ENGINE_VERSION);
    expect(result.schemeHash).toMatch(/^[0-9a-f]{64}$/);
    expect(result.skyModel).toBe('perez');
    expect(result.cautions.length).toBeGreaterThan(2);
    expect(result.notes.map((n) => n.code)).toContain('example-limits');
  });

  it('opens every finding: the steps of its working multiply out to its number', () => {
    for (const finding of result.findings) {
      const working = workingOf(result, yard, finding);
      const value = (label: string): number => working.steps.find((s) => s.label === label)?.value as number;
      const floor = value('floor of the room');
      expect(value('room, all windows') / floor).toBeCloseTo(finding.value, 9);
      expect(working.source).toContain('Karlsson');
      for (const step of working.steps) {
        const at = /^(windows|glass|rooms)\[(\d+)\]/.exec(step.place ?? '');
        if (at) expect((yard[at[1] as 'windows'] as unknown[])[Number(at[2])]).toBeDefined();
      }
    }
  });
  it('opens any step of any day: A × g(θ) × blind × sunlit × E gives the watts shown', () => {
    const room = result.rooms.find((r) => r.room === '2.1');
    const day = room?.days.find((d) => d.day === 'june');
    const step = 160;
    const working = workingAt(result, yard, '2.1', 'june', step);
    const value = (label: string): number => working.steps.find((s) => s.label === label)?.value as number;
    for (const w of day?.windows ?? []) {
      const id = w.window;
      const area = value(`${id}: opening`) * (1 - value(`${id}: frame`));
      expect(area).toBeCloseTo(value(`${id}: glass`), 12);
      const beam =
        area *
        value(`${id}: g at this angle`) *
        value(`${id}: sunlit share of the glass`) *
        (value(`${id}: beam on the open plane`) || 0);
      expect(beam).toBeCloseTo(w.parts.beam[step] as number, 6);
      const dome =
        area *
        value(`${id}: g for light from all round`) *
        (value(`${id}: seen of the dome`) / 0.5) *
        value(`${id}: light of the dome on the open plane`);
      expect(dome).toBeCloseTo(w.parts.sky[step] as number, 6);
    }
    expect(value('per m² of floor')).toBeCloseTo((day?.total_W[step] as number) / 42, 9);
  });
});

describe('memory', () => {
  it('works out only the window whose overhang was edited', async () => {
    const memo = createCheckMemo();
    await checked(yard, limits, memo);
    const days = 5;
    const before = { shades: memo.shades.made, sunlit: memo.sunlit.made };
    expect(before).toEqual({ shades: yard.windows.length, sunlit: yard.windows.length * days });
    await checked(edited(yard, 'devices', 'D3', 'depth', 1.5), limits, memo);
    expect(memo.shades.made - before.shades).toBe(1);
    expect(memo.sunlit.made - before.sunlit).toBe(days);
    await checked(yard, limits, memo);
    expect(memo.shades.made - before.shades).toBe(1);
  });
  it('works out no shade again for another glass, and all of it when a neighbour moves', async () => {
    const memo = createCheckMemo();
    await checked(yard, limits, memo);
    const shades = memo.shades.made;
    const gains = memo.gains.made;
    await checked(edited(yard, 'glass', 'G2', 'g', 0.3), limits, memo);
    expect(memo.shades.made).toBe(shades);
    expect(memo.gains.made - gains).toBe(5 * yard.windows.filter((w) => w.glass === 'G2').length);
    await checked(edited(yard, 'blocks', 'N1', 'height', 9), limits, memo);
    expect(memo.shades.made - shades).toBe(yard.windows.length);
  });
  it('gives what a fresh check gives after every edit', async () => {
    const memo = createCheckMemo();
    await checked(yard, limits, memo);
    for (const now of [
      edited(yard, 'devices', 'D2', 'depth', 0.8),
      edited(yard, 'windows', 'W4', 'width', 3),
      edited(yard, 'glass', 'G1', 'g', 0.4),
      { ...yard, site: { ...yard.site, north: 40 } },
      { ...yard, site: { ...yard.site, groundReflectance: 0.5 } },
      { ...yard, site: { ...yard.site, linkeTurbidity: 5 } },
      { ...yard, trees: [] },
      { ...yard, year: 2024 },
    ])
      expect(JSON.stringify((await checked(now, limits, memo)).findings)).toBe(
        JSON.stringify((await checked(now, limits)).findings),
      );
  });
});

describe('a check', () => {
  it('stops when it is told to', async () => {
    let calls = 0;
    const stop = async (): Promise<'go' | 'stop'> => (++calls > 1 ? 'stop' : 'go');
    expect(await checkScheme(yard, limits, [], stop)).toBeNull();
    expect(calls).toBe(2);
  });
  it('without limits gives values without verdicts', async () => {
    const result = await checked(yard, null);
    expect(result.limitSet).toBeNull();
    expect(result.counts).toEqual({ over: 0, close: 0, within: 0 });
    for (const f of result.findings) expect(f.verdict).toBeNull();
  });
  it('takes January for the hottest day in the south, and the clear 21sts of October to March for a season', async () => {
    const south = schemeOf(read('assets/demo/jacaranda-clinic.scheme.json'));
    const season = limitsOf(
      JSON.stringify({
        ...limits,
        limits: [{ id: 'S', name: 's', metric: 'season-gain', value: 100, unit: 'kWh/m²', source: 'test' }],
      }),
    );
    const result = await checked(south, season);
    expect(result.days.find((d) => d.key === 'hottest')?.date.slice(5)).toBe('01-21');
    expect(result.days.slice(5).map((d) => d.key)).toEqual([
      'month-10',
      'month-11',
      'month-12',
      'month-1',
      'month-2',
      'month-3',
    ]);
    expect(result.findings.length).toBeGreaterThan(0);
    for (const f of result.findings) {
      const working = workingOf(result, south, f);
      const months = working.steps
        .filter((s) => s.label.startsWith('its month'))
        .reduce((t, s) => t + (s.value as number), 0);
      const floor = working.steps.find((s) => s.label === 'floor of the room')?.value as number;
      expect(months / floor).toBeCloseTo(f.value, 9);
    }
  });
  it('says which rooms no limit can be set against, and why', async () => {
    const odd = schemeOf(
      JSON.stringify({
        ...yard,
        rooms: [
          ...yard.rooms,
          {
            id: '9.9',
            name: 'Core',
            use: 'circulation',
            block: 'B1',
            box: { at: [-4, -4], width: 2, depth: 2 },
            floor: 0.3,
            height: 2.5,
          },
        ],
        devices: [
          ...yard.devices,
          { id: 'D9', kind: 'blind', place: 'external', transmittance: 0.1, reflectance: 0.5 },
        ],
      }),
    );
    const result = await checked({ ...odd, site: { ...odd.site, hottest: undefined } } as Scheme, {
      ...limits,
      limits: [{ ...limits.limits[0]!, uses: ['ward'] }],
    });
    const codes = result.notes.map((n) => [n.code, n.place]);
    expect(codes).toContainEqual(['no-outside-wall', `rooms[${yard.rooms.length}]`]);
    expect(codes).toContainEqual(['blind-open', `devices[${yard.devices.length}]`]);
    expect(codes).toContainEqual(['limit-unused', 'limits[0].uses']);
    expect(codes).toContainEqual(['assumed', 'site.hottest']);
    for (const n of result.notes) expect(n.cure).not.toBe('');
  });

  it('says that the site is at a pole, or that its clock is not that of its longitude, and nothing of an ordinary place', async () => {
    const at = async (site: object): Promise<(string | undefined)[][]> => {
      const scheme = schemeOf(JSON.stringify({ ...yard, site: { ...yard.site, ...site } }));
      const { notes } = await checked(scheme, null);
      return notes.filter((n) => n.place.startsWith('site.')).map((n) => [n.code, n.place]);
    };
    expect(await at({})).toEqual([]);
    expect(await at({ latitude: 90 })).toEqual([['at-a-pole', 'site.latitude']]);
    expect(await at({ latitude: -90, longitude: 0, zone: 'Etc/UTC' })).toEqual([['at-a-pole', 'site.latitude']]);
    // The sun moves 15° an hour: 44° is 2.9 h, 46° is 3.1 h.
    expect(await at({ longitude: -151, zone: 'Australia/Sydney' })).toEqual([['odd-zone', 'site.zone']]);
    expect(await at({ longitude: 44, zone: 'Etc/UTC' })).toEqual([]);
    expect(await at({ longitude: 46, zone: 'Etc/UTC' })).toEqual([['odd-zone', 'site.zone']]);
  });
});
