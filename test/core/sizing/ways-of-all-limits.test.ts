import { describe, expect, it } from 'vitest';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import type { Finding } from '../../../core/limits/finding.ts';
import type { Limit, LimitSet } from '../../../core/limits/limit-set.ts';
import type { MetricId } from '../../../core/limits/metric-id.ts';
import { METRICS } from '../../../core/limits/metric.ts';
import { applyEdit, type SchemeEdit } from '../../../core/scheme/edit.ts';
import type { Scheme } from '../../../core/scheme/schema.ts';
import type { WayThatFails, WayThatPasses } from '../../../core/sizing/ways.ts';
import { waysToPass } from '../../../core/sizing/ways-to-pass.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { less } from '../../helpers/less-of.ts';
import { smallScheme } from '../../helpers/small-scheme.ts';

const scheme = smallScheme({ wall: 3 });
const limit = (id: string, metric: MetricId, value: number, comparison: Limit['comparison'] = 'at-most'): Limit => ({
  id,
  name: id,
  metric,
  comparison,
  value,
  unit: METRICS[metric].unit,
  source: 'a test',
  checked: null,
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
async function findings(of: Scheme, set: LimitSet): Promise<readonly Finding[]> {
  const result = await checkScheme(of, set, [], async () => 'go');
  if (result === null) throw new Error('nobody stopped it');
  return result.findings;
}
const changed = (edit: SchemeEdit): Scheme => {
  const next = applyEdit(scheme, edit);
  if (!next.ok) throw new Error(JSON.stringify(next.faults));
  return next.value;
};
const nowOf = async (metric: MetricId): Promise<number> =>
  (await findings(scheme, setOf(limit('v', metric, 0))))[0]?.value ?? Number.NaN;

describe('a room that is over more than one limit', () => {
  it('is within all of them by each way, whichever is asked about, and one per cent less is over one', async () => {
    const set = setOf(
      limit('peak', 'peak-gain', 0.9 * (await nowOf('peak-gain'))),
      limit('day', 'day-gain', 0.6 * (await nowOf('day-gain'))),
    );
    const now = await findings(scheme, set);
    expect(now.map((f) => f.verdict)).toEqual(['over', 'over']);
    for (const asked of now) {
      const passing = waysToPass(scheme, set, 'R1', asked, createCheckMemo()).ways.filter(
        (way): way is WayThatPasses => way.passes,
      );
      expect(passing.length).toBeGreaterThanOrEqual(3);
      for (const way of passing) {
        const then = await findings(changed(way.edit), set);
        expect(
          then.filter((f) => f.verdict === 'over'),
          way.text,
        ).toEqual([]);
        const short = await findings(changed(less(way)), set);
        expect(
          short.some((f) => f.verdict === 'over'),
          `less than ${way.text}`,
        ).toBe(true);
        // Told by the limit that was asked about; the day is what takes it so far.
        expect(way.after.limit).toBe(asked.limit);
        expect(way.decidedBy?.limit ?? asked.limit).toBe('day');
      }
    }
  });

  it('is not brought within one by a change that brings it over another', async () => {
    // To 60 % of their width at 60 % of the peak; openings of 4.8 m² on a floor of 20 m² are 24 %: narrower windows cool the room, and fall below 20 %.
    const set = setOf(
      limit('peak', 'peak-gain', 0.6 * (await nowOf('peak-gain'))),
      limit('openings', 'glazing-to-floor', 20, 'at-least'),
    );
    const peak = (await findings(scheme, set)).find((f) => f.limit === 'peak');
    if (peak === undefined) throw new Error('the peak is judged');
    const { ways } = waysToPass(scheme, set, 'R1', peak, createCheckMemo());
    const area = ways.find((way): way is WayThatFails => way.lever === 'area' && !way.passes);
    expect(area?.reason).toContain('brings the room over another limit: 14.4 % against 20.0 (openings)');
    expect(ways.some((way) => way.lever === 'glass' && way.passes)).toBe(true);
  });
});
