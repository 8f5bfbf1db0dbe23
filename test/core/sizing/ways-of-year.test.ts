import { describe, expect, it } from 'vitest';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import type { LimitSet } from '../../../core/limits/limit-set.ts';
import type { MetricId } from '../../../core/limits/metric-id.ts';
import { METRICS } from '../../../core/limits/metric.ts';
import { applyEdit, type SchemeEdit } from '../../../core/scheme/edit.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { sensitivity } from '../../../core/sizing/sensitivity.ts';
import type { WayThatPasses } from '../../../core/sizing/ways.ts';
import { waysToPass } from '../../../core/sizing/ways-to-pass.ts';
import { haurwitz } from '../../../core/sky/haurwitz.ts';
import { readWeather } from '../../../core/sky/weather/read-weather.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { waysOfOver } from '../../../core/study/ways-of-over.ts';
import { weatherInput } from '../../../core/study/weather-input.ts';
import { sunTable } from '../../../core/sun/sun-table.ts';
import { less } from '../../helpers/less-of.ts';
import { smallScheme } from '../../helpers/small-scheme.ts';
import { asText, MAPPING, madeYear } from '../sky/weather/made-year.ts';

/** A made-up year at 45° N, 15° E, every day of it clear (Haurwitz 1945, a twentieth taken off), read as any table is. */
function clearYear(): string {
  const rows = madeYear();
  const middle_ms = Float64Array.from(rows, (_, h) => Date.UTC(2023, 0, 1) + (h - 0.5) * 3_600_000);
  const { apparentAltitude_rad } = sunTable(middle_ms, { latitude_deg: 45, longitude_deg: 15, elevation_m: 100 });
  const sun = Array.from(apparentAltitude_rad, (altitude) => 0.95 * haurwitz({ apparentAltitude_rad: altitude }));
  return asText(rows.map((row, h) => ({ ...row, global: (sun[h] as number).toFixed(1) })));
}
const small = smallScheme({ latitude: 45, longitude: 15, wall: 3 });
const second = { id: 'W2', room: 'R1', wall: 0, from: 1, sill: 1, width: 2, height: 1, reveal: 0.1, glass: 'G1' };
const scheme = Scheme.parse({
  ...small,
  windows: [...small.windows, second],
  site: { ...small.site, zone: 'Europe/Zagreb' },
});
const read = weatherInput(scheme, { name: 'made.csv', hash: 'made' }, readWeather(clearYear(), MAPPING), MAPPING);
if (!read.ok) throw new Error(JSON.stringify(read.faults));
const weather = read.value;

const setOf = (metric: MetricId, value: number, more: object = {}): LimitSet => ({
  format: 'shadewright-limits',
  version: 1,
  id: 'test',
  name: 'test',
  example: false,
  note: '',
  close: 0.1,
  limits: [
    {
      id: 'a',
      name: 'a',
      metric,
      comparison: 'at-most',
      value,
      unit: METRICS[metric].unit,
      source: 'a test',
      checked: null,
      ...more,
    },
  ],
});
const check = async (of: Scheme, set: LimitSet) => {
  const result = await checkScheme(of, set, [], async () => 'go', { weather });
  const finding = result?.findings[0];
  if (!result || !finding) throw new Error('the room is judged');
  return { result, finding };
};
const changed = (edit: SchemeEdit): Scheme => {
  const next = applyEdit(scheme, edit);
  if (!next.ok) throw new Error(JSON.stringify(next.faults));
  return next.value;
};

describe.each<[MetricId, number, object]>([
  ['year-gain', 0.7, {}],
  ['warm-gain', 0.7, {}],
  ['year-peak', 0.6, {}],
  ['hours-above', 0.5, { above: 20 }],
])('ways to pass under a limit on %s', (metric, share, more) => {
  it('are within when they are made and the whole scheme is checked again, and one per cent less is over', async () => {
    const now = (await check(scheme, setOf(metric, 0, more))).finding.value;
    const set = setOf(metric, share * now, more);
    const { result, finding } = await check(scheme, set);
    expect(finding.verdict).toBe('over');
    const ways = waysToPass(scheme, set, 'R1', finding, createCheckMemo(), { weather: weather.months });
    const passing = ways.ways.filter((way): way is WayThatPasses => way.passes);
    expect(passing.map((way) => way.lever)).toEqual(expect.arrayContaining(['glass', 'area', 'blind']));
    for (const way of passing) {
      const then = (await check(changed(way.edit), set)).finding;
      expect(then.verdict, way.text).not.toBe('over');
      // The trial of one room and the check of the whole scheme are one and the same number.
      expect(then.value, way.text).toBe(way.after.value);
      const short = (await check(changed(less(way)), set)).finding;
      expect(short.verdict, `less than ${way.text}`).toBe('over');
    }
    const all = await waysOfOver(result, scheme, createCheckMemo(), async () => 'go', weather.months);
    expect(all?.[0]?.ways).toEqual(ways.ways);
  });

  it('and what moves the result most are those of the check', async () => {
    const set = setOf(metric, 1, more);
    const { finding } = await check(scheme, set);
    const bars = sensitivity(scheme, set, 'R1', finding, createCheckMemo(), { weather: weather.months });
    expect(bars.map((bar) => bar.input)).toEqual(expect.arrayContaining(['g of the glass', 'width of the windows']));
    // A clear sky has no part in measured weather.
    expect(bars.map((bar) => bar.input)).not.toContain('turbidity of the air');
    const glass = bars.find((bar) => bar.input === 'g of the glass');
    const darker = Scheme.parse({ ...scheme, glass: scheme.glass.map((g) => ({ ...g, g: g.g * 0.9 })) });
    expect(glass?.low.value).toBeCloseTo((await check(darker, set)).finding.value, 9);
    expect(sensitivity(scheme, set, 'R1', finding, createCheckMemo())).toEqual([]);
  });
});
