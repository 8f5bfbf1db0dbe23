import { expect, test } from 'vitest';
import { solidWall } from '../../../core/shade/exposure-grid.ts';
import { panelGrid } from '../../../core/shade/exposure-grid.ts';
import { cividis } from '../../../core/sheet/cividis.ts';
import type { Mark } from '../../../core/sheet/drawing.ts';
import { NEVER } from '../../../core/sheet/colour-key.ts';
import { elevationSheet } from '../../../core/sheet/elevation-sheet.ts';
import { EXISTING_LINE } from '../../../core/sheet/ink.ts';
import { demoScheme, modelOf } from '../../helpers/demo-scheme.ts';

const scheme = demoScheme('tannery-yard');
const model = modelOf(scheme);
const flat = (marks: readonly Mark[]): Mark[] => marks.flatMap((m) => (m.kind === 'group' ? flat(m.marks) : [m]));

function wall(block: string, n: number) {
  const solid = model.solids.find((s) => s.id === block);
  const panel = solid ? solidWall(solid, n) : null;
  if (!panel) throw new Error('the demo has changed');
  const grid = panelGrid(panel, 1);
  const value = Float64Array.from(grid.cell, (_, i) => (i === 0 ? 0 : 6));
  return { title: `${block}, wall ${n}`, panel, grid, value, covered: null };
}

const sheet = (maps: ReturnType<typeof wall>[], scale: number | null) =>
  elevationSheet({
    scheme,
    model,
    maps,
    quantity: { name: 'sun hours', unit: 'h' },
    period: '21 March 2025',
    method: ['made up'],
    scale,
    paper: 'A3',
    drawn: '2026-03-02',
    engine: '0.1.0',
    hash: '0123456789abcdef',
  });

test('a wall is as wide and as high on paper as its scale says', () => {
  const made = sheet([wall('B1', 0)], 100);
  if (!made.ok) throw new Error(JSON.stringify(made.faults));
  const frames = flat(made.value.pages[0]?.marks ?? []).flatMap((m) =>
    m.kind === 'path' && m.stroke === EXISTING_LINE ? m.runs : [],
  );
  const [run] = frames;
  const block = scheme.blocks.find((b) => b.id === 'B1');
  const xs = (run ?? []).map((p) => p[0]);
  const ys = (run ?? []).map((p) => p[1]);
  expect(Math.max(...xs) - Math.min(...xs)).toBeCloseTo((block?.box?.width ?? 0) * 10, 6);
  expect(Math.max(...ys) - Math.min(...ys)).toBeCloseTo((block?.height ?? 0) * 10, 6);
});

test('no sun has a grey of its own and never a colour of the scale', () => {
  const made = sheet([wall('B1', 0)], 100);
  if (!made.ok) throw new Error('does not draw');
  const fills = flat(made.value.pages[0]?.marks ?? []).flatMap((m) => (m.kind === 'path' && m.fill ? [m.fill] : []));
  expect(fills.filter((f) => f === NEVER).length).toBe(2); // one cell, and the key
  for (let i = 0; i <= 100; i++) expect(cividis(i / 100)).not.toBe(NEVER);
});

test('the ends of the scale are those of the published table', () => {
  // matplotlib's cividis, first and last entry: (0, 0.135112, 0.304751) and (0.995737, 0.909344, 0.217772).
  expect(cividis(0)).toBe('#00224e');
  expect(cividis(1)).toBe('#fee838');
});

test('a wall too large for the paper is refused with a scale that fits', () => {
  const made = sheet([wall('B1', 0)], 10);
  expect(made).toMatchObject({ ok: false, faults: [{ code: 'scale-too-large' }] });
  const named = made.ok ? 0 : Number(/1:(\d+) fits/u.exec(made.faults[0]?.cure ?? '')?.[1]);
  expect(sheet([wall('B1', 0)], named).ok).toBe(true);
});

test('every wall asked for is drawn once, over as many pages as they need', () => {
  const maps = ['B1', 'N4', 'N7', 'N12'].flatMap((b) => [0, 1, 2, 3].map((n) => wall(b, n)));
  for (const scale of [100, 200, null]) {
    const made = sheet(maps, scale);
    if (!made.ok) throw new Error(JSON.stringify(made.faults));
    const labels = made.value.pages.flatMap((p) =>
      p.marks.flatMap((m) => (m.kind === 'group' && m.label?.includes('wall') ? [m.label] : [])),
    );
    expect(labels.toSorted()).toEqual(maps.map((m) => m.title).toSorted());
  }
});
