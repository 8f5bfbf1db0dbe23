import * as Astronomy from 'astronomy-engine';
import { describe, expect, it } from 'vitest';
import { buildModel } from '../../../core/form/build-model.ts';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import { overhangDepth_m } from '../../../core/sizing/cut-off.ts';
import { keptOff, squareSuns } from '../../../core/sizing/shaded-dates.ts';
import { applyEdit } from '../../../core/scheme/edit.ts';
import { sizeEdit } from '../../../core/sizing/size-edit.ts';
import { sweep, usualAmounts, windowsOfWall } from '../../../core/sizing/sweep.ts';
import { demoScheme } from '../../helpers/demo-scheme.ts';
import { smallScheme, type SmallScheme } from '../../helpers/small-scheme.ts';

const RAD = Math.PI / 180;
const canopy = (depth: number, above = 0.3) => ({ id: 'D1', kind: 'overhang', depth, above, left: 50, right: 50 });

describe('a sweep', () => {
  it('never takes in more behind a deeper device, in summer or in winter', () => {
    for (const swept of ['overhang', 'fins', 'both'] as const) {
      const { points } = sweep(smallScheme(), ['W1'], swept, createCheckMemo());
      expect(points.map((p) => p.amount)).toEqual(usualAmounts(swept));
      for (const [i, p] of points.entries()) {
        const before = points[i - 1];
        if (!before) continue;
        expect(p.summer_Wh).toBeLessThanOrEqual(before.summer_Wh * (1 + 1e-9));
        expect(p.winter_Wh).toBeLessThanOrEqual(before.winter_Wh * (1 + 1e-9));
        expect(p.summerPeak_W).toBeLessThanOrEqual(before.summerPeak_W * (1 + 1e-9));
      }
    }
  });
  it('of both together takes in no more than of either alone, and no less than nothing at all', () => {
    const memo = createCheckMemo();
    const of = (swept: 'overhang' | 'fins' | 'both') => sweep(smallScheme(), ['W1'], swept, memo).points;
    const [overhang, fins, both] = [of('overhang'), of('fins'), of('both')];
    for (const [i, p] of both.entries()) {
      expect(p.summer_Wh).toBeLessThanOrEqual(Math.min(overhang[i]!.summer_Wh, fins[i]!.summer_Wh) * (1 + 1e-9));
      expect(p.summer_Wh).toBeGreaterThan(0);
    }
    expect(both[0]).toEqual(overhang[0]);
  });
  it('of the glass is in proportion to g', () => {
    const { points, now, unit } = sweep(smallScheme(), ['W1'], 'glass', createCheckMemo());
    expect([now, unit]).toEqual([0.6, '']);
    const [first] = points;
    for (const p of points) expect(p.summer_Wh / p.amount).toBeCloseTo(first!.summer_Wh / first!.amount, 6);
  });
  it('keeps winter sun behind a south overhang that takes most of the summer’s: the point of an overhang', () => {
    const { points } = sweep(
      smallScheme({ devices: [canopy(0.5)], windowDevices: ['D1'] }),
      ['W1'],
      'overhang',
      createCheckMemo(),
    );
    const at = points.find((p) => p.amount === 1);
    const open = points[0];
    expect(at!.summer_Wh / open!.summer_Wh).toBeLessThan(0.55);
    expect(at!.winter_Wh / open!.winter_Wh).toBeGreaterThan(0.85);
  });
  it('meets a target at a depth that the engine confirms, and a centimetre less does not', () => {
    const memo = createCheckMemo();
    const scheme = smallScheme();
    const open = sweep(scheme, ['W1'], 'overhang', memo, { amounts: [0] }).points[0]!.summer_Wh;
    const found = sweep(scheme, ['W1'], 'overhang', memo, { target_Wh: 0.7 * open });
    const depth = found.meetsTarget as number;
    const [less, enough] = sweep(scheme, ['W1'], 'overhang', memo, { amounts: [depth - 0.01, depth] }).points;
    expect(enough!.summer_Wh).toBeLessThanOrEqual(0.7 * open);
    expect(less!.summer_Wh).toBeGreaterThan(0.7 * open);
    expect(sweep(scheme, ['W1'], 'overhang', memo, { target_Wh: 0 }).meetsTarget).toBeNull();
  });
  it('says beyond which depth nothing worth having is gained', () => {
    const scheme = smallScheme({ devices: [canopy(0.5)], windowDevices: ['D1'] });
    const found = sweep(scheme, ['W1'], 'overhang', createCheckMemo());
    expect(found.now).toBe(0.5);
    const after = found.points.filter((p) => p.amount >= (found.enough as number));
    const open = found.points[0]!.summer_Wh;
    for (let i = 1; i < after.length; i++)
      expect(after[i - 1]!.summer_Wh - after[i]!.summer_Wh).toBeLessThan(0.01 * open);
    expect(found.enough).toBeGreaterThan(0.5);
  });
  it('gives the days between which each depth keeps the squarely standing sun off: the longer the deeper', () => {
    const scheme = smallScheme({ devices: [canopy(0.5)], windowDevices: ['D1'] });
    const { points } = sweep(scheme, ['W1'], 'overhang', createCheckMemo(), { amounts: [0, 0.5, 1, 1.5, 2] });
    expect(points.map((p) => p.keptOff === null)).toEqual([true, true, false, false, false]);
    const days = points.slice(2).map((p) => (Date.parse(p.keptOff!.to) - Date.parse(p.keptOff!.from)) / 86_400_000);
    expect(days[0]).toBeLessThan(days[1] as number);
    expect(days[1]).toBeLessThan(days[2] as number);
    for (const p of points.slice(2)) {
      expect(Date.parse(p.keptOff!.from)).toBeLessThan(Date.parse('2025-06-21'));
      expect(Date.parse(p.keptOff!.to)).toBeGreaterThan(Date.parse('2025-06-21'));
    }
  });
  it('turns summer and winter over between the hemispheres', () => {
    const north = sweep(
      smallScheme({ latitude: 35, devices: [canopy(0.5)], windowDevices: ['D1'] }),
      ['W1'],
      'overhang',
      createCheckMemo(),
    );
    const south = sweep(
      smallScheme({ latitude: -35, wall: 2, devices: [canopy(0.5)], windowDevices: ['D1'] }),
      ['W1'],
      'overhang',
      createCheckMemo(),
    );
    for (const [i, p] of north.points.entries()) {
      // The same geometry six months apart. At perihelion the sun is ((1 + e)/(1 − e))² = 6.9 % stronger than at aphelion, and on
      // 21 January it stands half a degree lower than on 21 July, which upright glass likes: stronger summers, weaker winters.
      const summer = south.points[i]!.summer_Wh / p.summer_Wh;
      const winter = south.points[i]!.winter_Wh / p.winter_Wh;
      expect(summer).toBeGreaterThan(1.03);
      expect(summer).toBeLessThan(1.12);
      expect(winter).toBeLessThan(0.97);
      expect(winter).toBeGreaterThan(0.88);
    }
    expect(south.points[0]!.winter_Wh).toBeGreaterThan(south.points[0]!.summer_Wh);
  });
});

describe('when the sun stands squarely in front of a window', () => {
  const suns = (over: SmallScheme) => {
    const scheme = smallScheme(over);
    return squareSuns(scheme, buildModel(scheme).windows[0]!.bearing_deg);
  };
  const stretchOf = (over: SmallScheme) => {
    const model = buildModel(smallScheme(over));
    return keptOff(suns(over), model, model.windows[0]!);
  };
  it('it stands at noon altitude before south glass: 61.94°, 38.5° and 15.06° (90° − |φ − δ|)', () => {
    const days = suns({});
    const at = (date: string): number => days.find((d) => d.date === date)?.altitude_deg ?? Number.NaN;
    expect(at('2025-06-21')).toBeCloseTo(61.94, 1);
    expect(at('2025-12-21')).toBeCloseTo(15.06, 1);
    expect(Math.abs(at('2025-09-22') - 38.5)).toBeLessThan(0.4);
    expect(days).toHaveLength(365);
  });
  it('a depth for full shade on 21 May shades from then on for as long as the sun stands as high (declinations from an ephemeris)', () => {
    const may = suns({}).find((d) => d.date === '2025-05-21')?.altitude_deg as number;
    const depth = overhangDepth_m(1.5, 0.3, may * RAD);
    const stretch = stretchOf({ devices: [canopy(depth + 1e-6)], windowDevices: ['D1'] });
    expect(stretch?.from).toBe('2025-05-21');
    const observer = new Astronomy.Observer(51.5, 0, 0);
    const declination = (day: Date): number => Astronomy.Equator(Astronomy.Body.Sun, day, observer, true, true).dec;
    const noons = Array.from({ length: 100 }, (_, i) => new Date(Date.UTC(2025, 4, 21 + i, 12)));
    const least = declination(noons[0] as Date);
    const last = noons.filter((day) => declination(day) >= least).at(-1);
    expect(stretch?.to).toBe(last?.toISOString().slice(0, 10));
    // The hour that is meant: before south glass that of the sun’s transit, within the five minutes of a sample.
    const transit = Astronomy.SearchHourAngle(Astronomy.Body.Sun, observer, 0, new Date('2025-05-21T00:00:00Z')).time
      .date;
    const [hour, minute] = (stretch?.fromTime ?? '').split(':').map(Number) as [number, number];
    const clock = transit.getUTCHours() * 60 + transit.getUTCMinutes();
    expect(Math.abs(hour * 60 + minute - clock)).toBeLessThanOrEqual(5);
  });
  it('runs over the new year in the south', () => {
    const summer = suns({ latitude: -35, wall: 2 }).find((d) => d.date === '2025-11-20')?.altitude_deg as number;
    const depth = overhangDepth_m(1.5, 0.3, summer * RAD);
    const stretch = stretchOf({ latitude: -35, wall: 2, devices: [canopy(depth + 1e-6)], windowDevices: ['D1'] });
    expect(stretch?.from).toBe('2025-11-20');
    expect(stretch?.to.slice(5, 7)).toBe('01');
  });
  it('has no such day before north glass at 51.5° north, and none shaded without a device', () => {
    expect(suns({ wall: 2 }).every((d) => d.altitude_deg === null)).toBe(true);
    expect(stretchOf({})).toBeNull();
  });
});

describe('several windows together', () => {
  const yard = demoScheme('tannery-yard');
  const west = ['W4', 'W12', 'W20'];

  it('take in what each takes in alone, and their peak is that of the sum', () => {
    const memo = createCheckMemo();
    const amounts = [0, 0.5, 1];
    const all = sweep(yard, west, 'overhang', memo, { amounts });
    const alone = west.map((id) => sweep(yard, [id], 'overhang', memo, { amounts }));
    for (const [i, point] of all.points.entries()) {
      const sum = (of: 'summer_Wh' | 'winter_Wh' | 'summerPeak_W'): number =>
        alone.reduce((total, one) => total + (one.points[i]?.[of] ?? Number.NaN), 0);
      expect(Math.abs(point.summer_Wh / sum('summer_Wh') - 1)).toBeLessThan(1e-9);
      expect(Math.abs(point.winter_Wh / sum('winter_Wh') - 1)).toBeLessThan(1e-9);
      expect(point.summerPeak_W).toBeLessThanOrEqual(sum('summerPeak_W') * (1 + 1e-9));
    }
    expect(all.windows).toEqual(west);
  });

  it('set together take in what was said, and no other window changes', () => {
    const said = sweep(yard, west, 'fins', createCheckMemo(), { amounts: [0.7] }).points[0];
    const edit = sizeEdit(yard, west, 'fins', 0.7);
    const next = applyEdit(yard, edit as NonNullable<typeof edit>);
    if (!next.ok) throw new Error(JSON.stringify(next.faults));
    expect(sweep(next.value, west, 'fins', createCheckMemo(), { amounts: [0.7] }).points[0]).toEqual(said);
    expect(sizeEdit(next.value, west, 'fins', 0.7)).toBeNull();
    for (const w of yard.windows)
      if (!west.includes(w.id)) expect(next.value.windows.find((x) => x.id === w.id)).toEqual(w);
  });

  it('of a wall are those that stand in it', () => {
    expect(windowsOfWall(yard, '1.3', 3)).toEqual(['W4']);
    expect(windowsOfWall(yard, '1.5', 1)).toEqual(['W7']);
    expect(windowsOfWall(yard, '1.3', 0)).toEqual([]);
  });
});
