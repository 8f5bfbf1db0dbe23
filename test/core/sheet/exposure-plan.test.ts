import { expect, test } from 'vitest';
import { levelGrid } from '../../../core/shade/exposure-grid.ts';
import { colourKey, NEVER } from '../../../core/sheet/colour-key.ts';
import type { Mark } from '../../../core/sheet/drawing.ts';
import { exposurePlan } from '../../../core/sheet/exposure-plan.ts';
import { levelMapMarks, mapColour } from '../../../core/sheet/level-map.ts';
import type { Ring } from '../../../core/plane/vec.ts';
import { demoScheme, modelOf } from '../../helpers/demo-scheme.ts';

const flat = (marks: readonly Mark[]): Mark[] => marks.flatMap((m) => (m.kind === 'group' ? flat(m.marks) : [m]));
const signed = (run: readonly (readonly [number, number])[]): number =>
  run.reduce((sum, [x, y], i) => {
    const [u, v] = run[(i + 1) % run.length] as readonly [number, number];
    return sum + (x * v - u * y) / 2;
  }, 0);

const map = (outline: Ring, value: (x: number) => number, covered = (_: number) => 0) => {
  const grid = levelGrid(outline, 0, 1);
  return {
    outline,
    grid,
    value: Float64Array.from(grid.receptors.x, value),
    covered: Uint8Array.from(grid.receptors.x, covered),
  };
};
const view = { frame: { x: 0, y: 0, width: 200, height: 200 }, scale: 100, centre: [0, 0] as const };
const turned: Ring = [
  [-4, -3],
  [4, -5],
  [6, 3],
  [-2, 5],
];

test('the cells of a turned roof fill its outline and nothing beside it', () => {
  const [base, ...cells] = levelMapMarks(
    view,
    map(turned, (x) => 5 + x),
    12,
  );
  const area = Math.abs(signed(turned)) * 100; // 1:100: a square metre is 100 mm²
  if (base?.kind !== 'path') throw new Error('no ground');
  expect(Math.abs(signed(base.runs[0] ?? []))).toBeCloseTo(area, 6);
  const filled = cells.reduce(
    (sum, m) => sum + (m.kind === 'path' ? m.runs.reduce((s, r) => s + Math.abs(signed(r)), 0) : 0),
    0,
  );
  expect(filled).toBeCloseTo(area, 6);
});

test('a cell that is built over takes the colour of a neighbour, so that no white shows beside a wall', () => {
  const square: Ring = [
    [0, 0],
    [4, 0],
    [4, 4],
    [0, 4],
  ];
  const [, ...cells] = levelMapMarks(
    view,
    map(
      square,
      () => 6,
      (x) => (x > 3 ? 1 : 0),
    ),
    12,
  );
  const fills = new Set(cells.map((m) => (m.kind === 'path' ? m.fill : '')));
  expect([...fills]).toEqual([mapColour(6, 12)]);
});

test('no sun has a grey of its own', () => {
  expect(mapColour(0, 12)).toBe(NEVER);
  for (let v = 0.01; v <= 12; v += 0.01) expect(mapColour(v, 12)).not.toBe(NEVER);
  const greys = flat(colourKey(0, 0, 90, 12, { name: 'sun', unit: 'h' }).marks).filter(
    (m) => m.kind === 'path' && m.fill === NEVER,
  );
  expect(greys).toHaveLength(1);
});

test('every page of a plan has north, scale, period, caution and each block in its place and size', () => {
  const scheme = demoScheme('tannery-yard');
  const model = modelOf(scheme);
  const [x0, y0, x1, y1] = model.extent;
  const ground = map(
    [
      [x0, y0],
      [x1, y0],
      [x1, y1],
      [x0, y1],
    ],
    () => 4,
  );
  const made = exposurePlan({
    scheme,
    model,
    stages: [
      { stage: 'before', ground, roofs: [] },
      { stage: 'after', ground, roofs: [] },
    ],
    quantity: { name: 'sun hours a day', unit: 'h' },
    period: '21 March 2025.',
    method: ['Made up.'],
    scale: 500,
    paper: 'A3',
    landscape: true,
    drawn: '2026-12-01',
    engine: '0.1.0',
    hash: '0123456789abcdef',
  });
  if (!made.ok) throw new Error(JSON.stringify(made.faults));
  expect(made.value.pages).toHaveLength(2);
  for (const page of made.value.pages) {
    const text = flat(page.marks)
      .flatMap((m) => (m.kind === 'text' ? [m.text] : []))
      .join(' ');
    for (const needed of ['N', 'Scale 1:500 on A3', '21 March 2025.', 'Local building code', 'page'])
      expect(text).toContain(needed);
  }
  const block = scheme.blocks.find((b) => b.id === 'B1');
  const width_mm = ((block?.box?.width ?? 0) * 1000) / 500;
  const outlines = flat(made.value.pages[1]?.marks ?? []).flatMap((m) =>
    m.kind === 'path' && m.closed && m.stroke && !m.fill ? m.runs : [],
  );
  const wide = outlines.map((run) => Math.max(...run.map((p) => p[0])) - Math.min(...run.map((p) => p[0])));
  expect(Math.min(...wide.map((w) => Math.abs(w - width_mm)))).toBeLessThan(1e-9);
});
