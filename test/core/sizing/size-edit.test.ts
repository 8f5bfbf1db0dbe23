import { describe, expect, test } from 'vitest';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import { applyEdit, type SchemeEdit } from '../../../core/scheme/edit.ts';
import type { Scheme } from '../../../core/scheme/schema.ts';
import { sizeEdit } from '../../../core/sizing/size-edit.ts';
import { type Swept, sweep } from '../../../core/sizing/sweep.ts';
import { demoScheme } from '../../helpers/demo-scheme.ts';

const yard = demoScheme('tannery-yard');

function made(scheme: Scheme, edit: SchemeEdit | null): Scheme {
  if (edit === null) throw new Error('there is an edit to make');
  const next = applyEdit(scheme, edit);
  if (!next.ok) throw new Error(JSON.stringify(next.faults));
  return next.value;
}

const devicesOf = (scheme: Scheme, id: string): Scheme['devices'] => {
  const hung = scheme.windows.find((w) => w.id === id)?.devices ?? [];
  return scheme.devices.filter((d) => hung.includes(d.id));
};

describe('the edit that sets what was swept', () => {
  // W4 is bare, W20 has fins of its own, W9 shares its overhang with others.
  test.each<[string, Swept, number]>([
    ['W4', 'overhang', 0.8],
    ['W4', 'both', 0.5],
    ['W20', 'fins', 0.9],
    ['W20', 'fins', 0],
    ['W9', 'overhang', 1.3],
    ['W4', 'glass', 0.35],
  ])('%s, %s at %f: the window then takes in what the sweep said it would', (window, swept, amount) => {
    const said = sweep(yard, [window], swept, createCheckMemo(), { amounts: [amount] }).points[0];
    const then = made(yard, sizeEdit(yard, [window], swept, amount));
    const found = sweep(then, [window], swept, createCheckMemo(), { amounts: [amount] });
    expect(found.points[0]).toEqual(said);
    if (amount > 0) expect(found.now).toBe(amount);
    expect(sizeEdit(then, [window], swept, amount), 'a second time there is nothing to do').toBeNull();
  });

  test('a device that other windows share is left to them', () => {
    const others = yard.windows.filter(
      (w) => w.id !== 'W9' && w.devices.some((d) => devicesOf(yard, 'W9')[0]?.id === d),
    );
    expect(others.length).toBeGreaterThan(0);
    const then = made(yard, sizeEdit(yard, ['W9'], 'overhang', 1.3));
    for (const w of others) expect(devicesOf(then, w.id)).toEqual(devicesOf(yard, w.id));
  });

  test('at depth 0 the device comes off the window', () => {
    const then = made(yard, sizeEdit(yard, ['W20'], 'fins', 0));
    expect(devicesOf(then, 'W20')).toEqual([]);
  });

  test('a window that is not there is our own fault', () => {
    expect(() => sizeEdit(yard, ['nosuch'], 'fins', 1)).toThrow(RangeError);
  });
});
