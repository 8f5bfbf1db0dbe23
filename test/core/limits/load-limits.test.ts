import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { checkLimitSet, parseLimitSet } from '../../../core/limits/load-limits.ts';
import { METRIC_IDS } from '../../../core/limits/metric.ts';
import { faultLine } from '../../../core/scheme/fault.ts';

const folder = new URL('../../../assets/limits/', import.meta.url);
const set = (limit: Record<string, unknown>, head: Record<string, unknown> = {}): string =>
  JSON.stringify({
    format: 'shadewright-limits',
    version: 1,
    id: 'own',
    name: 'our brief',
    close: 0.1,
    ...head,
    limits: [
      {
        id: 'L1',
        name: 'peak',
        metric: 'peak-gain',
        comparison: 'at-most',
        value: 50,
        unit: 'W/m²',
        source: 'our own brief',
        ...limit,
      },
    ],
  });
const faultsOf = (text: string) => {
  const read = parseLimitSet(text);
  return read.ok ? [] : read.faults;
};

describe('the sets that ship', () => {
  const files = readdirSync(folder).filter((f) => f.endsWith('.json'));
  it('are there, example-gain among them', () => expect(files).toContain('example-gain.json'));
  it.each(files)('%s reads without a fault, is marked as an example and says so with every value', (file) => {
    const read = parseLimitSet(readFileSync(new URL(file, folder), 'utf8'));
    if (!read.ok) throw new Error(read.faults.map(faultLine).join('\n'));
    expect(read.value.example).toBe(true);
    expect(`${read.value.id}.json`).toBe(file);
    expect(read.value.note).toContain('Example: check your local code');
    for (const limit of read.value.limits) expect(limit.source).toContain('example: check your local code');
  });
  it('hold 25 W/m² as the mean of 07:30 to 17:30 (Approved Document L2, 2002, appendix H)', () => {
    const read = parseLimitSet(readFileSync(new URL('example-gain.json', folder), 'utf8'));
    const limit = read.ok ? read.value.limits.find((l) => l.metric === 'mean-gain') : undefined;
    expect(limit).toMatchObject({ value: 25, unit: 'W/m²', clock: ['07:30', '17:30'], comparison: 'at-most' });
  });
  it('hold the room column of Approved Document O (2021), section 1, moderate risk', () => {
    const byBearing = (file: string) => {
      const read = parseLimitSet(readFileSync(new URL(file, folder), 'utf8'));
      return read.ok ? read.value.limits[0]?.byBearing : undefined;
    };
    expect(byBearing('example-glazing-cross-ventilated.json')).toEqual({ N: 37, E: 37, S: 30, W: 22 });
    expect(byBearing('example-glazing-one-sided.json')).toEqual({ N: 26, E: 26, S: 15, W: 11 });
  });
});

describe('a limit set that is wrong', () => {
  it('names a metric that does not exist, its place and the ones that do', () => {
    const [fault] = faultsOf(set({ metric: 'peak-gian' }));
    expect(fault).toMatchObject({ place: 'limits[0].metric', code: 'unknown-metric' });
    expect(fault?.message).toContain('"peak-gian"');
    for (const id of METRIC_IDS) expect(fault?.cure).toContain(id);
  });
  it.each([
    ['a unit of another metric', { unit: 'kWh/m²' }, 'limits[0].unit', 'wrong-unit'],
    ['a day that is none', { days: ['july'] }, 'limits[0].days[0]', 'unknown-day'],
    ['a use that is none', { uses: ['living', 'attic'] }, 'limits[0].uses[1]', 'unknown-use'],
    ['a mean without hours', { metric: 'mean-gain' }, 'limits[0]', 'missing'],
    [
      'hours that begin and end together',
      { metric: 'mean-gain', clock: ['09:00', '09:00'] },
      'limits[0].clock',
      'empty-stretch',
    ],
    ['a time that is none', { metric: 'mean-gain', clock: ['07:30', '25:00'] }, 'limits[0].clock[1]', 'wrong-form'],
    ['a value below nothing', { value: -1 }, 'limits[0].value', 'out-of-range'],
    ['a value that is no number', { value: '50' }, 'limits[0].value', 'wrong-type'],
    ['no source', { source: ' ' }, 'limits[0].source', 'missing'],
    ['days for what has none', { metric: 'glazing-to-floor', unit: '%', days: ['june'] }, 'limits[0].days', 'no-days'],
    ['hours above nothing', { metric: 'hours-above', unit: 'h' }, 'limits[0]', 'missing'],
    [
      'steps of openings that fall',
      {
        byGlazing: [
          { upTo: 30, value: 5 },
          { upTo: 20, value: 4 },
        ],
      },
      'limits[0].byGlazing[1].upTo',
      'not-ascending',
    ],
    ['a comparison that is none', { comparison: 'below' }, 'limits[0].comparison', 'not-a-choice'],
  ])('with %s is refused at its place', (_, limit, place, code) => {
    const faults = faultsOf(set(limit));
    expect(faults.map((f) => [f.place, f.code])).toContainEqual([place, code]);
    for (const f of faults) expect(f.cure).not.toBe('');
  });
  it('with one id twice names both places', () => {
    const twice = JSON.parse(set({}));
    twice.limits.push(twice.limits[0]);
    const [fault] = faultsOf(JSON.stringify(twice));
    expect(fault).toMatchObject({ place: 'limits[1].id', code: 'same-id' });
    expect(fault?.message).toContain('limits[0]');
  });
  it('lists every fault, not the first alone', () => {
    const two = JSON.parse(set({ metric: 'peak' }));
    two.limits.push({ ...two.limits[0], id: 'L2', metric: 'mean' });
    expect(faultsOf(JSON.stringify(two)).map((f) => f.place)).toEqual(['limits[0].metric', 'limits[1].metric']);
  });
  it('is refused when it is no JSON, no object, of another format, empty or from a later version', () => {
    expect(faultsOf('{')[0]?.code).toBe('not-json');
    expect(faultsOf('[]')[0]?.code).toBe('not-a-limit-set');
    expect(faultsOf('{}').map((f) => f.place)).toContain('format');
    expect(faultsOf(set({}, { version: 2 }))[0]?.place).toBe('version');
    expect(faultsOf(JSON.stringify({ ...JSON.parse(set({})), limits: [] }))[0]?.place).toBe('limits');
  });
  it('inside a scheme is placed there', () => {
    const read = checkLimitSet(JSON.parse(set({ metric: 'x' })), 'limits');
    expect(read.ok ? '' : read.faults[0]?.place).toBe('limits.limits[0].metric');
  });
});
