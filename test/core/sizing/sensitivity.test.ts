import { describe, expect, it } from 'vitest';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import type { LimitSet } from '../../../core/limits/limit-set.ts';
import type { Scheme } from '../../../core/scheme/schema.ts';
import { sensitivity } from '../../../core/sizing/sensitivity.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { smallScheme } from '../../helpers/small-scheme.ts';

const set: LimitSet = {
  format: 'shadewright-limits',
  version: 1,
  id: 'S',
  name: 'S',
  example: false,
  note: '',
  close: 0.1,
  limits: [
    {
      id: 'L',
      name: '',
      metric: 'peak-gain',
      comparison: 'at-most',
      value: 50,
      unit: 'W/m²',
      source: 'test',
      checked: null,
    },
  ],
};
const found = async (scheme: Scheme) => {
  const finding = (await checkScheme(scheme, set, [], async () => 'go'))?.findings[0];
  if (!finding) throw new Error('a finding');
  return finding;
};

describe('which input moves the result most', () => {
  const block = { id: 'N1', standing: 'context', box: { at: [-3, -14], width: 12, depth: 4 }, height: 11 };
  const scheme = smallScheme({
    devices: [{ id: 'D1', kind: 'overhang', depth: 0.5, above: 0.1, left: 0.2, right: 0.2 }],
    windowDevices: ['D1'],
    blocks: [block],
  });
  it('lists what there is, longest first, each a bar about the result', async () => {
    const finding = await found(scheme);
    const bars = sensitivity(scheme, set, 'R1', finding, createCheckMemo());
    const names = bars.map((b) => b.input);
    expect(names).toContain('depth of the overhangs');
    expect(names).not.toContain('depth of the fins');
    expect(names).not.toContain('what comes through the trees');
    const swings = bars.map((b) => b.swing);
    expect(swings).toEqual([...swings].sort((a, b) => b - a));
  });
  it('moves by a tenth with a tenth of g, and by the frame’s share of the glass', async () => {
    const finding = await found(scheme);
    const bars = sensitivity(scheme, set, 'R1', finding, createCheckMemo());
    const g = bars.find((b) => b.input === 'g of the glass');
    expect(g?.low.value).toBeCloseTo(0.9 * finding.value, 9);
    expect(g?.high.value).toBeCloseTo(1.1 * finding.value, 9);
    const frame = bars.find((b) => b.input === 'frame share');
    expect(frame?.high.value).toBeCloseTo((0.75 / 0.8) * finding.value, 9);
  });
  it('gives for north, turbidity and neighbours what a fresh check of the changed scheme gives', async () => {
    const finding = await found(scheme);
    const memo = createCheckMemo();
    const bars = sensitivity(scheme, set, 'R1', finding, memo);
    const high = (input: string): number | undefined => bars.find((b) => b.input === input)?.high.value;
    expect(high('true north')).toBeCloseTo((await found({ ...scheme, site: { ...scheme.site, north: 5 } })).value, 9);
    expect(high('turbidity of the air')).toBeCloseTo(
      (await found({ ...scheme, site: { ...scheme.site, linkeTurbidity: 4 } })).value,
      9,
    );
    const taller = scheme.blocks.map((b) => (b.id === 'N1' ? { ...b, height: b.height + 1 } : b));
    const neighbours = high('height of the neighbours');
    if (neighbours !== undefined) expect(neighbours).toBeCloseTo((await found({ ...scheme, blocks: taller })).value, 9);
  });
});
