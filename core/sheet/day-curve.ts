import type { Part, RoomDay } from '../gain/series.ts';
import { decadeOf, tenTo } from '../maths/decade.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import type { Mark, Mm } from './drawing.ts';
import { BEAM, GROUND, INK, OVER, RULE, SKY, SOFT, THIN } from './ink.ts';
import { line, type Piece, rect, words } from './marks.ts';
import { measure, READ } from './measure.ts';
import { fixed } from './numerals.ts';

/** The layers of a curve from the bottom up: what stands all round first, the sun on top of it. */
const LAYERS: readonly { readonly name: string; readonly parts: readonly Part[]; readonly fill: string }[] = [
  { name: 'ground', parts: ['ground'], fill: GROUND },
  { name: 'sky', parts: ['sky', 'horizon'], fill: SKY },
  { name: 'direct sun', parts: ['beam', 'circumsolar'], fill: BEAM },
];

export type CurveLimit = {
  readonly text: string;
  /** In W/m², as the curve. */
  readonly value: number;
  /** Minutes of the clock between which it holds; null: all day. */
  readonly between: readonly [number, number] | null;
};

/** A round step for an axis so that it has at most so many parts. */
export function niceStep(top: number, parts: number): number {
  const rough = Math.max(top, 1e-6) / parts;
  const ten = tenTo(decadeOf(rough));
  return ([1, 2, 5, 10].find((k) => k * ten >= rough - 1e-12) ?? 10) * ten;
}

/**
 * What a room takes in over a day, per m² of floor: ground, sky and direct sun stacked, with the limit dashed and named where
 * it runs.
 */
export function dayCurve(
  x: Mm,
  top: Mm,
  width: Mm,
  height: Mm,
  grid: DayGrid,
  day: RoomDay,
  floor_m2: number,
  limit: CurveLimit | null,
): Piece {
  const layers = stacked(day, floor_m2);
  const peak = Math.max(...(layers.at(-1) as number[]), limit?.value ?? 0, 1);
  const step = niceStep(peak * 1.08, 5);
  const most = Math.ceil((peak * 1.08) / step) * step;
  const [first, last] = lightHours(grid);
  const plot = { x: x + 14, y: top + 6, width: width - 14, height: height - 13 };
  const at = (minute: number, value: number): readonly [Mm, Mm] => [
    plot.x + ((minute - first) / (last - first)) * plot.width,
    plot.y + plot.height * (1 - value / most),
  ];
  const marks: Mark[] = [words('W per m² of floor', x, top + READ * 0.75, { colour: SOFT })];
  for (let v = 0; v <= most + 1e-9; v += step) {
    const y = at(first, v)[1];
    if (v > 0) marks.push(line(plot.x, y, plot.x + plot.width, y, RULE));
    marks.push(words(fixed(v, step < 1 ? 1 : 0), plot.x - 2, y + READ * 0.35, { anchor: 'end' }));
  }
  const clock = [...grid.clock_min];
  const inside = clock.map((m, i) => [m, i] as const).filter(([m]) => m >= first && m <= last);
  layers.slice(1).forEach((upper, k) => {
    const lower = layers[k] as number[];
    const run = [
      ...inside.map(([m, i]) => at(m, upper[i] as number)),
      ...inside.toReversed().map(([m, i]) => at(m, lower[i] as number)),
    ];
    const layer = LAYERS[k] as (typeof LAYERS)[number];
    marks.push({ kind: 'path', runs: [run], closed: true, fill: layer.fill });
    marks.push({
      kind: 'path',
      runs: [inside.map(([m, i]) => at(m, upper[i] as number))],
      closed: false,
      stroke: THIN,
    });
  });
  for (let hour = Math.ceil(first / 60); hour * 60 <= last; hour += 2) {
    const [hx, hy] = at(hour * 60, 0);
    marks.push(
      line(hx, hy, hx, hy + 1, THIN),
      words(`${String(hour).padStart(2, '0')}:00`, hx, hy + 5, { anchor: 'middle' }),
    );
  }
  marks.push(line(plot.x, plot.y + plot.height, plot.x + plot.width, plot.y + plot.height, THIN));
  if (limit) marks.push(...limitLine(limit, at, first, last, plot.x + plot.width));
  marks.push(...key(plot.x + plot.width, top));
  return { marks: [{ kind: 'group', label: `curve of ${grid.name}`, marks }], height };
}

/** Running sums of the layers at each step [W/m² of floor], the ground line first. */
function stacked(day: RoomDay, floor_m2: number): readonly number[][] {
  const n = day.total_W.length;
  const sums: number[][] = [new Array<number>(n).fill(0)];
  for (const layer of LAYERS) {
    const below = sums.at(-1) as number[];
    sums.push(
      below.map((base, i) => {
        let watts = 0;
        for (const w of day.windows) for (const part of layer.parts) watts += w.parts[part][i] as number;
        return base + watts / floor_m2;
      }),
    );
  }
  return sums;
}

/** Whole hours of the clock round the light of a day. */
function lightHours(grid: DayGrid): readonly [number, number] {
  let [first, last] = [24 * 60, 0];
  grid.clock_min.forEach((minute, i) => {
    if ((grid.global_Wm2[i] as number) <= 0 && (grid.diffuse_Wm2[i] as number) <= 0) return;
    first = Math.min(first, minute);
    last = Math.max(last, minute);
  });
  return first < last ? [Math.floor(first / 60) * 60, Math.ceil(last / 60) * 60] : [0, 24 * 60];
}

function limitLine(
  limit: CurveLimit,
  at: (minute: number, value: number) => readonly [Mm, Mm],
  first: number,
  last: number,
  right: Mm,
): readonly Mark[] {
  const [from, to] = limit.between ?? [first, last];
  const [x1, y] = at(Math.max(first, from), limit.value);
  const [x2] = at(Math.min(last, to), limit.value);
  const wide = measure(limit.text, READ, 'semibold');
  const left = Math.min(x1 + 1, right - wide - 1);
  return [
    line(x1, y, x2, y, { colour: OVER, width: 0.4, dash: [2, 1.2] }),
    rect(left - 0.6, y - 5.2, wide + 1.2, 4.4, { fill: '#ffffff' }),
    words(limit.text, left, y - 1.8, { face: 'semibold', colour: OVER }),
  ];
}

function key(right: Mm, top: Mm): readonly Mark[] {
  const marks: Mark[] = [];
  let x = right;
  for (const layer of LAYERS) {
    x -= measure(layer.name, READ);
    marks.push(words(layer.name, x, top + READ * 0.75));
    x -= 6;
    marks.push(rect(x, top + 0.2, 4.4, 2.6, { fill: layer.fill, stroke: { colour: INK, width: 0.13 } }));
    x -= 4;
  }
  return marks;
}
