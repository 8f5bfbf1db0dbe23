import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { applyEdit, editName, type SchemeEdit } from '../../../core/scheme/edit.ts';
import { loadScheme } from '../../../core/scheme/load.ts';
import type { Scheme } from '../../../core/scheme/schema.ts';
import { writeScheme } from '../../../core/scheme/write.ts';

const text = readFileSync(resolve(import.meta.dirname, '../../../assets/demo/tannery-yard.scheme.json'), 'utf8');
const loaded = loadScheme(text);
if (!loaded.ok) throw new Error('demo does not load');
const demo: Scheme = loaded.value;

const edited = (edit: SchemeEdit): Scheme => {
  const result = applyEdit(demo, edit);
  if (!result.ok) throw new Error(result.faults.map((f) => `${f.place} ${f.message}`).join('\n'));
  return result.value;
};
const refusal = (edit: SchemeEdit) => {
  const result = applyEdit(demo, edit);
  return result.ok ? [] : result.faults.map((f) => `${f.place} [${f.code}]`);
};

describe('an edit', () => {
  test('sets one field and shares everything else', () => {
    const next = edited({ kind: 'set', list: 'devices', id: 'D1', field: 'depth', value: 1.2 });
    expect(next.devices[0]).toMatchObject({ id: 'D1', depth: 1.2 });
    expect(demo.devices[0]).toMatchObject({ depth: 0.9 });
    expect(next.blocks).toBe(demo.blocks);
    expect(next.devices[1]).toBe(demo.devices[1]);
  });

  test('sets deep fields and fields of the site', () => {
    expect(
      edited({ kind: 'set', list: 'blocks', id: 'N1', field: 'box.width', value: 12 }).blocks.find((b) => b.id === 'N1')
        ?.box?.width,
    ).toBe(12);
    expect(edited({ kind: 'set-head', field: 'site.north', value: -3 }).site.north).toBe(-3);
    expect(edited({ kind: 'set-head', field: 'title', value: 'Another' }).title).toBe('Another');
  });

  test('carries a new id to everything that names it', () => {
    const next = edited({ kind: 'set', list: 'rooms', id: '1.1', field: 'id', value: 'shop' });
    expect(next.windows.filter((w) => w.room === 'shop').length).toBe(
      demo.windows.filter((w) => w.room === '1.1').length,
    );
    const device = edited({ kind: 'set', list: 'devices', id: 'D1', field: 'id', value: 'canopy' });
    expect(device.windows.filter((w) => w.devices.includes('canopy')).length).toBe(
      demo.windows.filter((w) => w.devices.includes('D1')).length,
    );
  });

  test('removes a block with its rooms and windows, a device from its windows, and keeps glass that is used', () => {
    const next = edited({ kind: 'remove', list: 'blocks', id: 'B2' });
    expect(next.rooms.some((r) => r.block === 'B2')).toBe(false);
    expect(next.windows.some((w) => w.room === '0.6')).toBe(false);
    expect(edited({ kind: 'remove', list: 'devices', id: 'D1' }).windows.some((w) => w.devices.includes('D1'))).toBe(
      false,
    );
    expect(refusal({ kind: 'remove', list: 'glass', id: 'G1' })).toEqual(['glass[0] [in-use]']);
  });

  test('that would contradict the rest is refused with its place', () => {
    expect(refusal({ kind: 'set', list: 'windows', id: 'W1', field: 'width', value: 90 })).toEqual([
      'windows[0] [window-outside-wall]',
    ]);
    expect(refusal({ kind: 'set', list: 'windows', id: 'W1', field: 'width', value: 'wide' })).toEqual([
      'windows[0].width [wrong-type]',
    ]);
    expect(refusal({ kind: 'set', list: 'blocks', id: 'B2', field: 'id', value: 'B1' })).toContain(
      'blocks[1].id [repeated-id]',
    );
    expect(refusal({ kind: 'set-head', field: 'site.latitude', value: 91 })).toEqual(['site.latitude [out-of-range]']);
    expect(refusal({ kind: 'set', list: 'blocks', id: 'nobody', field: 'height', value: 3 })).toEqual([
      'blocks [unknown-id]',
    ]);
    expect(refusal({ kind: 'set', list: 'blocks', id: 'B1', field: '__proto__.x', value: 3 })).toEqual([
      '__proto__ [forbidden-key]',
    ]);
  });

  test('several together are all or none', () => {
    const good: SchemeEdit = { kind: 'set', list: 'devices', id: 'D1', field: 'depth', value: 1.1 };
    const bad: SchemeEdit = { kind: 'set', list: 'devices', id: 'D1', field: 'depth', value: -1 };
    expect(refusal({ kind: 'together', edits: [good, bad], name: 'x' })).toEqual(['devices[0].depth [out-of-range]']);
    const added = edited({
      kind: 'together',
      name: 'fins on W4',
      edits: [
        { kind: 'add', list: 'devices', entry: { id: 'F9', kind: 'fin', depth: 0.4 } },
        { kind: 'set', list: 'windows', id: 'W4', field: 'devices', value: ['F9'] },
      ],
    });
    expect(added.windows.find((w) => w.id === 'W4')?.devices).toEqual(['F9']);
    expect(added.devices.at(-1)).toMatchObject({ side: 'both', gap: 0 });
  });

  test('has a name that can stand after "Undo"', () => {
    expect(editName({ kind: 'set', list: 'windows', id: 'W3', field: 'box.width', value: 1 })).toBe(
      'width of window W3',
    );
    expect(editName({ kind: 'remove', list: 'blocks', id: 'B2' })).toBe('remove block B2');
  });
});

test('whatever edit is tried, what comes back loads again from its file, or the scheme is untouched', () => {
  const before = writeScheme(demo);
  const value = fc.oneof(
    fc.double({ noNaN: true }),
    fc.string(),
    fc.constant(null),
    fc.integer({ min: -3, max: 30 }),
    fc.double({ min: 0.05, max: 3, noNaN: true }),
  );
  const edit = fc.oneof(
    fc.record({
      kind: fc.constant('set' as const),
      list: fc.constant('windows' as const),
      id: fc.constantFrom('W1', 'W2', 'W5', 'none'),
      field: fc.constantFrom('width', 'from', 'sill', 'height', 'wall', 'glass', 'id', 'reveal'),
      value,
    }),
    fc.record({
      kind: fc.constant('set' as const),
      list: fc.constant('blocks' as const),
      id: fc.constantFrom('B1', 'B2', 'N4'),
      field: fc.constantFrom('height', 'base', 'box.width', 'box.turn', 'standing', 'id'),
      value,
    }),
    fc.record({
      kind: fc.constant('remove' as const),
      list: fc.constantFrom('blocks' as const, 'rooms' as const, 'devices' as const, 'glass' as const),
      id: fc.constantFrom('B1', 'B2', 'N4', '1.1', 'D1', 'G1', 'G2'),
    }),
    fc.record({
      kind: fc.constant('set-head' as const),
      field: fc.constantFrom('title', 'site.latitude', 'site.zone', 'site.lowSun', 'limits'),
      value,
    }),
  );
  fc.assert(
    fc.property(edit, (one) => {
      const result = applyEdit(demo, one);
      if (result.ok) expect(loadScheme(writeScheme(result.value))).toMatchObject({ ok: true });
      else expect(result.faults.length).toBeGreaterThan(0);
    }),
    { numRuns: 200 },
  );
  expect(writeScheme(demo)).toBe(before);
});
