import { describe, expect, it } from 'vitest';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import { applyEdit, type SchemeEdit } from '../../../core/scheme/edit.ts';
import type { Scheme } from '../../../core/scheme/schema.ts';
import { compareSchemes, type SchemeVariant } from '../../../core/study/compare-schemes.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { demoScheme } from '../../helpers/demo-scheme.ts';
import type { LimitSet } from '../../../core/limits/limit-set.ts';

const go = async () => 'go' as const;
const yard = demoScheme('tannery-yard');
const set: LimitSet = {
  format: 'shadewright-limits',
  version: 1,
  id: 'test',
  name: 'test',
  example: false,
  note: '',
  close: 0.1,
  limits: [
    {
      id: 'peak',
      name: 'peak',
      metric: 'peak-gain',
      comparison: 'at-most',
      value: 60,
      unit: 'W/m²',
      source: 'a test',
      checked: null,
    },
  ],
};

function edited(scheme: Scheme, edit: SchemeEdit): Scheme {
  const next = applyEdit(scheme, edit);
  if (!next.ok) throw new Error(JSON.stringify(next.faults));
  return next.value;
}
const variant = (name: string, scheme: Scheme, limitSet: LimitSet | null = set): SchemeVariant => ({
  name,
  scheme,
  limitSet,
});
const MOMENTS = { dates: ['2025-03-21'], times: ['12:00', '23:00'] };

async function compared(variants: readonly SchemeVariant[]) {
  const found = await compareSchemes(variants, MOMENTS, createCheckMemo(), go);
  if (found === null) throw new Error('nobody stopped it');
  return found;
}

describe('variants side by side', () => {
  it('a scheme beside itself shows no change in anything', async () => {
    const { rows, shadows, notes } = await compared([variant('a', yard), variant('b', yard)]);
    expect(rows).toHaveLength(yard.rooms.length);
    for (const row of rows) {
      expect(row.changes).toEqual([0, 0]);
      expect(row.verdicts[0]).toBe(row.verdicts[1]);
    }
    for (const s of shadows) expect(s.added_m2[0]).toBe(s.added_m2[1]);
    expect(notes).toEqual([]);
  });

  it('gives the values of each variant’s own check, and the change against the first', async () => {
    const darker = edited(yard, { kind: 'set', list: 'glass', id: 'G1', field: 'g', value: 0.3 });
    const { rows, variants } = await compared([variant('as drawn', yard), variant('darker', darker)]);
    const alone = await checkScheme(darker, set, [], go);
    for (const row of rows) {
      const own = alone?.findings.find((f) => f.room === row.room);
      expect(row.values[1]).toBe(own?.value);
      expect(row.changes[1]).toBe((row.values[1] ?? 0) - (row.values[0] ?? 0));
    }
    expect(variants[1]?.counts).toEqual(alone?.counts);
    expect(variants[0]?.counts.over).toBeGreaterThan(variants[1]?.counts.over ?? Number.NaN);
  });

  it('a lower block adds less shadow; with the sun down there is none to compare', async () => {
    const lower = edited(
      {
        ...yard,
        rooms: yard.rooms.filter((r) => r.floor < 3),
        windows: yard.windows.filter((w) => yard.rooms.some((r) => r.id === w.room && r.floor < 3)),
      },
      { kind: 'set', list: 'blocks', id: 'B1', field: 'height', value: 4 },
    );
    const { shadows } = await compared([variant('as drawn', yard), variant('lower', lower)]);
    expect(shadows).toHaveLength(1);
    const [before, after] = shadows[0]?.added_m2 ?? [];
    expect(after ?? Number.NaN).toBeLessThan(before ?? Number.NaN);
  });

  it('keeps a row for a room that only one of them has, and says when they are judged differently', async () => {
    const fewer = edited(yard, { kind: 'remove', list: 'rooms', id: '3.3' });
    const { rows, notes } = await compared([variant('a', yard), variant('b', fewer, { ...set, id: 'other' })]);
    const gone = rows.find((r) => r.room === '3.3');
    expect(gone?.values[1]).toBeNull();
    expect(gone?.changes[1]).toBeNull();
    expect(gone?.verdicts[1]).toBeNull();
    expect(notes).toEqual(['The variants are judged by different limit sets.']);
  });

  it('stops when told to', async () => {
    expect(await compareSchemes([variant('a', yard)], MOMENTS, createCheckMemo(), async () => 'stop')).toBeNull();
  });
});
