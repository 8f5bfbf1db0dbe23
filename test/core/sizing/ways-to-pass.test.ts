import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import type { Finding } from '../../../core/limits/finding.ts';
import type { Limit, LimitSet } from '../../../core/limits/limit-set.ts';
import { parseLimitSet } from '../../../core/limits/load-limits.ts';
import { applyEdit, type SchemeEdit } from '../../../core/scheme/edit.ts';
import { faultLine } from '../../../core/scheme/fault.ts';
import { loadScheme } from '../../../core/scheme/load.ts';
import type { Scheme } from '../../../core/scheme/schema.ts';
import { areaLever, blindLever, finLever, glassLever, type Lever, overhangLever } from '../../../core/sizing/lever.ts';
import type { WayThatPasses } from '../../../core/sizing/ways.ts';
import { waysToPass } from '../../../core/sizing/ways-to-pass.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { smallScheme } from '../../helpers/small-scheme.ts';

const read = (path: string): string => readFileSync(new URL(`../../../${path}`, import.meta.url), 'utf8');
const limit = (over: Partial<Limit>): Limit => ({
  id: 'L',
  name: '',
  metric: 'peak-gain',
  comparison: 'at-most',
  value: 40,
  unit: 'W/m²',
  source: 'test',
  checked: null,
  ...over,
});
const setOf = (...limits: Limit[]): LimitSet => ({
  format: 'shadewright-limits',
  version: 1,
  id: 'S',
  name: 'S',
  example: false,
  note: '',
  close: 0.1,
  limits,
});
const apply = (scheme: Scheme, edit: SchemeEdit): Scheme => {
  const done = applyEdit(scheme, edit);
  if (!done.ok) throw new Error(done.faults.map(faultLine).join('\n'));
  return done.value;
};
/** A finding of a whole, fresh check: nothing that sizing remembers or leaves out. */
async function found(scheme: Scheme, set: LimitSet, room = 'R1', id = 'L'): Promise<Finding> {
  const result = await checkScheme(scheme, set, [], async () => 'go');
  const finding = result?.findings.find((f) => f.room === room && f.limit === id);
  if (!finding) throw new Error(`no finding ${id} of ${room}`);
  return finding;
}
const passing = (ways: ReturnType<typeof waysToPass>): readonly WayThatPasses[] => ways.ways.filter((w) => w.passes);

/** The lever that a way came from, to set it a little short. */
function leverOf(scheme: Scheme, way: WayThatPasses): Lever {
  const windows = scheme.windows.filter((w) => way.windows.includes(w.id));
  const make = { overhang: overhangLever, fins: finLever, glass: glassLever, blind: blindLever };
  return way.lever === 'area' ? areaLever(windows, way.amount > 100) : make[way.lever](scheme, windows);
}
/** A hundredth less of the change: less depth, a clearer glass, a wider window, a blind that stays open longer. */
const short = (way: WayThatPasses): number => {
  const grows = way.lever === 'overhang' || way.lever === 'fins' || (way.lever === 'area' && way.amount > 100);
  return way.amount * (grows ? 0.99 : 1.01);
};

/** A set of one limit at a share of what the room has now, so that it is over by a stated part. */
async function shareOf(scheme: Scheme, share: number, over: Partial<Limit> = {}): Promise<LimitSet> {
  const free = await found(scheme, setOf(limit({ ...over, value: 1e6 })));
  return setOf(limit({ ...over, value: share * free.value }));
}

async function holdsAndNoLess(scheme: Scheme, set: LimitSet, way: WayThatPasses, room = 'R1', id = 'L'): Promise<void> {
  const after = await found(apply(scheme, way.edit), set, room, id);
  expect(after.verdict, `${way.text}: ${after.value}`).not.toBe('over');
  expect(after.value).toBeCloseTo(way.after.value, 9);
  const less = leverOf(scheme, way).edit(short(way)) as SchemeEdit;
  expect((await found(apply(scheme, less), set, room, id)).verdict, `a hundredth less of ${way.text}`).toBe('over');
}

describe('ways to pass', () => {
  it.each([
    ['south, peak', 0, 0.75, {}],
    ['south, day', 0, 0.7, { metric: 'day-gain', unit: 'Wh/m²' }],
    ['west, mean', 3, 0.7, { metric: 'mean-gain', clock: ['07:30', '17:30'] }],
    ['south, winter day', 0, 0.6, { days: ['december'] }],
    ['east, two days', 1, 0.8, { days: ['june', 'hottest'] }],
    ['south, season', 0, 0.7, { metric: 'season-gain', unit: 'kWh/m²' }],
  ] as const)(
    '%s: each one passes when applied and checked afresh, and a hundredth less does not',
    async (_, wall, share, over) => {
      const scheme = smallScheme({ wall });
      const set = await shareOf(scheme, share, over);
      const finding = await found(scheme, set);
      expect(finding.verdict).toBe('over');
      const ways = waysToPass(scheme, set, 'R1', finding, createCheckMemo());
      expect(ways.ways.map((w) => w.lever)).toEqual(['overhang', 'fins', 'glass', 'area', 'blind']);
      expect(passing(ways).length).toBeGreaterThanOrEqual(3);
      for (const way of passing(ways)) await holdsAndNoLess(scheme, set, way);
      for (const way of ways.ways)
        if (!way.passes) expect(way.best?.value ?? 0).toBeGreaterThan(finding.limitValue as number);
    },
  );

  it('allows just the g that the closed form gives, since gain is in proportion to it', async () => {
    const scheme = smallScheme();
    const set = await shareOf(scheme, 0.7);
    const finding = await found(scheme, set);
    const glass = passing(waysToPass(scheme, set, 'R1', finding, createCheckMemo())).find((w) => w.lever === 'glass');
    const exact = 0.6 * 0.7;
    expect(glass?.amount).toBeLessThanOrEqual(exact);
    expect(glass?.amount).toBeGreaterThan(exact * 0.995);
  });
  it('allows just the width that a share of the floor gives, and offers nothing else for it', async () => {
    const scheme = smallScheme();
    const set = setOf(limit({ metric: 'glazing-to-floor', unit: '%', value: 18 }));
    const ways = waysToPass(scheme, set, 'R1', await found(scheme, set), createCheckMemo());
    expect(ways.ways.map((w) => w.lever)).toEqual(['area']);
    const [way] = passing(ways);
    expect(way?.amount).toBeCloseTo((100 * 18) / 24, 1);
    await holdsAndNoLess(scheme, set, way as WayThatPasses);
  });
  it('widens where a limit asks for at least so much, as far as the wall has room', async () => {
    const scheme = smallScheme();
    const enough = setOf(limit({ metric: 'glazing-to-floor', unit: '%', comparison: 'at-least', value: 27 }));
    const [way] = passing(waysToPass(scheme, enough, 'R1', await found(scheme, enough), createCheckMemo()));
    expect(Math.abs((way?.amount ?? 0) - (100 * 27) / 24)).toBeLessThan(0.2);
    await holdsAndNoLess(scheme, enough, way as WayThatPasses);
    const tooMuch = setOf(limit({ metric: 'glazing-to-floor', unit: '%', comparison: 'at-least', value: 31 }));
    const [none] = waysToPass(scheme, tooMuch, 'R1', await found(scheme, tooMuch), createCheckMemo()).ways;
    expect(none).toMatchObject({ passes: false, lever: 'area' });
    expect(none?.passes === false ? none.reason : '').toContain('along a wall of 4 m');
  });
  it('says that no depth passes, and why, where sky and ground alone are too much', async () => {
    const scheme = smallScheme();
    const set = await shareOf(scheme, 0.1);
    const ways = waysToPass(scheme, set, 'R1', await found(scheme, set), createCheckMemo());
    const [overhang, fins] = ways.ways;
    expect(overhang).toMatchObject({ passes: false, best: { amount: 3, unit: 'm' } });
    expect(overhang?.passes === false ? overhang.reason : '').toMatch(
      /no depth passes: even 3 m deep.*light of sky and ground/,
    );
    expect(fins?.passes === false ? fins.reason : '').toMatch(/direct sun that comes in between them/);
  });
  it('says that rooflights take neither overhang nor fin', async () => {
    const base = smallScheme();
    const { wall: _, ...window } = base.windows[0]!;
    const scheme: Scheme = { ...base, windows: [{ ...window, roof: { at: [0.4, 1], turn: 0 } }] };
    const set = await shareOf(scheme, 0.7);
    const ways = waysToPass(scheme, set, 'R1', await found(scheme, set), createCheckMemo());
    for (const way of ways.ways.slice(0, 2)) expect(way.passes === false ? way.reason : '').toContain('rooflights');
    for (const way of passing(ways)) await holdsAndNoLess(scheme, set, way);
  });
  it('deepens a device that the window has for itself, and copies one that others share', async () => {
    const canopy = { id: 'D1', kind: 'overhang', depth: 0.3, above: 0.1, left: 0, right: 0 };
    const alone = smallScheme({ devices: [canopy], windowDevices: ['D1'] });
    const set = await shareOf(alone, 0.8);
    const [own] = passing(waysToPass(alone, set, 'R1', await found(alone, set), createCheckMemo()));
    const deepened = apply(alone, (own as WayThatPasses).edit);
    expect(deepened.devices).toHaveLength(1);
    expect(deepened.devices[0]).toMatchObject({ id: 'D1', depth: own?.amount, above: 0.1 });
    const other = {
      id: 'W2',
      room: 'R1',
      wall: 2,
      from: 0.4,
      sill: 0.9,
      width: 1,
      height: 1,
      glass: 'G1',
      devices: ['D1'],
    };
    const both = smallScheme({ devices: [canopy], windowDevices: ['D1'], windows: [other] });
    const [copied] = passing(waysToPass(both, set, 'R1', await found(both, set), createCheckMemo()));
    const after = apply(both, (copied as WayThatPasses).edit);
    expect(after.devices.map((d) => d.id)).toEqual(['D1', 'D1-W1']);
    expect(after.devices[0]).toMatchObject({ depth: 0.3 });
    expect(after.windows.map((w) => w.devices)).toEqual([['D1-W1'], ['D1']]);
  });
  it('goes to all windows of the room where the main one does not suffice', async () => {
    const second = {
      id: 'W2',
      room: 'R1',
      wall: 3,
      from: 0.5,
      sill: 0.9,
      width: 3.8,
      height: 1.5,
      glass: 'G1',
      devices: [],
    };
    const scheme = smallScheme({ wall: 1, windows: [second] });
    const set = await shareOf(scheme, 0.5);
    const finding = await found(scheme, set);
    const ways = waysToPass(scheme, set, 'R1', finding, createCheckMemo());
    const blind = ways.ways.find((w) => w.lever === 'blind');
    expect(blind?.windows).toEqual(['W1', 'W2']);
    for (const way of passing(ways)) await holdsAndNoLess(scheme, set, way);
  });

  it('costs what it costs: less winter sun behind an overhang, less daylight behind darker glass, neither behind an open blind', async () => {
    const scheme = smallScheme();
    const set = await shareOf(scheme, 0.75);
    const ways = waysToPass(scheme, set, 'R1', await found(scheme, set), createCheckMemo());
    const by = (lever: string): WayThatPasses => passing(ways).find((w) => w.lever === lever) as WayThatPasses;
    expect(by('overhang').price.winter_Whm2).toBeLessThan(ways.price.winter_Whm2);
    expect(by('overhang').price.daylight_m2).toBeLessThan(ways.price.daylight_m2);
    const share = by('glass').amount / 0.6;
    expect(by('glass').price.daylight_m2 / ways.price.daylight_m2).toBeCloseTo(share, 2);
    expect(by('glass').price.winter_Whm2 / ways.price.winter_Whm2).toBeCloseTo(share, 9);
    expect(by('blind').price.daylight_m2).toBe(ways.price.daylight_m2);
  });
  it('says what a pass rests on: a tree in front, or a neighbour', async () => {
    const tree = { id: 'T1', at: [2, -4], trunk: 0.5, height: 6, spread: 5, transmittance: new Array(12).fill(0.2) };
    const block = { id: 'N1', standing: 'context', box: { at: [-12, -2], width: 6, depth: 12 }, height: 12 };
    const scheme = smallScheme({ trees: [tree], blocks: [block] });
    const set = await shareOf(scheme, 0.8, { metric: 'day-gain', unit: 'Wh/m²' });
    const ways = waysToPass(scheme, set, 'R1', await found(scheme, set), createCheckMemo());
    expect(ways.restsOn.map((r) => r.on)).toEqual(['no-trees', 'no-neighbours']);
    for (const r of ways.restsOn) expect(r.value).toBeGreaterThan(ways.finding.value);
    const bare = await found({ ...scheme, trees: [] }, set);
    expect(ways.restsOn[0]?.value).toBeCloseTo(bare.value, 9);
    const lone = await found({ ...scheme, blocks: scheme.blocks.slice(0, 1) }, set);
    expect(ways.restsOn[1]?.value).toBeCloseTo(lone.value, 9);
    expect(passing(ways).some((w) => w.restsOn.some((r) => r.verdict === 'over'))).toBe(true);
  });
  it('offers none to a room that is not over', async () => {
    const scheme = smallScheme();
    const set = setOf(limit({ value: 500 }));
    expect(waysToPass(scheme, set, 'R1', await found(scheme, set), createCheckMemo()).ways).toEqual([]);
  });
});

describe('the demo scheme', () => {
  const loaded = loadScheme(read('assets/demo/tannery-yard.scheme.json'));
  const limits = parseLimitSet(read('assets/limits/example-gain.json'));
  if (!loaded.ok || !limits.ok) throw new Error('the demo reads');
  it('has ways for every room that is over, which hold in the whole scheme', async () => {
    const memo = createCheckMemo();
    const result = await checkScheme(loaded.value, limits.value, [], async () => 'go', { memo });
    const over = result?.findings.filter((f) => f.verdict === 'over') ?? [];
    expect(over.length).toBeGreaterThan(0);
    for (const finding of over.slice(0, 4)) {
      const ways = waysToPass(loaded.value, limits.value, finding.room, finding, memo);
      expect(passing(ways).length).toBeGreaterThan(0);
      for (const way of passing(ways))
        await holdsAndNoLess(loaded.value, limits.value, way, finding.room, finding.limit);
    }
  });
});
