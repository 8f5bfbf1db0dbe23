import { CAUTIONS } from '../../core/limits/cautions.ts';
import type { Model } from '../../core/form/model.ts';
import type { Exposure } from '../../core/shade/exposure-slice.ts';
import { type ExposureMap, type Surface, type SurfaceMap, surfacesOf } from '../../core/study/exposure-map.ts';
import { writeCsv } from '../../core/sheet/csv.ts';
import { counted, hoursText, lowSunText, periodText } from './exposure-words.ts';
import { Refusal } from './refusal.ts';
import { table } from './table.ts';

/**
 * The surfaces that words name: `ground` (the site's boundary, or the smallest rectangle round everything drawn), `walls` and
 * `roofs` of all blocks, before or after, or the id of one block.
 * @throws {Refusal} for a word that names nothing
 */
export function surfacesNamed(model: Model, words: readonly string[]): Surface[] {
  const stood = [...surfacesOf(model, 'before'), ...surfacesOf(model, 'after')];
  const once = new Map(stood.map((s) => [JSON.stringify(s), s]));
  // In the order of the scheme's blocks, each with its walls and then its roof.
  const faces = model.solids.flatMap(({ id }) =>
    [...once.values()].filter((s) => s.kind !== 'ground' && s.block === id),
  );
  const chosen = words.flatMap((word): Surface[] => {
    if (word === 'ground') return [{ kind: 'ground', outline: model.boundary ?? frame(model.extent), level_m: 0 }];
    if (word === 'walls' || word === 'roofs') return faces.filter((s) => `${s.kind}s` === word);
    const own = faces.filter((s) => s.kind !== 'ground' && s.block === word);
    if (own.length > 0) return own;
    throw new Refusal(
      `shadewright exposure: --map ${word} names nothing; give ground, walls, roofs or the id of a block that the scheme holds.`,
    );
  });
  return [...new Map(chosen.map((s) => [JSON.stringify(s), s])).values()];
}

const frame = ([x0, y0, x1, y1]: Model['extent']): (readonly [number, number])[] => [
  [x0, y0],
  [x1, y0],
  [x1, y1],
  [x0, y1],
];

const nameOf = (s: Surface): string =>
  s.kind === 'ground' ? 'ground' : s.kind === 'roof' ? `${s.block} roof` : `${s.block} wall ${s.wall}`;

const QUANTITIES = ['minutes', 'beam', 'sky', 'ground'] as const;
type Columns = { readonly [Q in (typeof QUANTITIES)[number]]: Float64Array };

const asObject = (e: Columns | null): object | null =>
  e === null ? null : { sunMinutes: [...e.minutes], beam: [...e.beam], sky: [...e.sky], ground: [...e.ground] };

/** Every point with its numbers, in columns: minutes and Wh/m² over the period. */
export function mapJson(map: ExposureMap): string {
  const surfaces = map.surfaces.map(({ surface, grid, before, after, change }) => {
    const { x, y, z, nx, ny, nz } = grid.receptors;
    return {
      kind: surface.kind,
      ...(surface.kind === 'ground' ? {} : { block: surface.block }),
      ...(surface.kind === 'wall' ? { wall: surface.wall } : {}),
      normal: [nx[0], ny[0], nz[0]],
      cell: grid.cell_m,
      at: Array.from(x, (_, i) => [x[i], y[i], z[i]]),
      builtOver: { before: indices(before), after: indices(after) },
      before: asObject(before),
      after: asObject(after),
      change: asObject(change),
    };
  });
  return `${JSON.stringify({ dates: map.dates, step: map.step_min, spacing: map.spacing_m, surfaces })}\n`;
}

/** Points that lie inside a solid at a stage: their numbers are 0 there. */
const indices = (e: Exposure | null): number[] =>
  e === null ? [] : [...e.covered.keys()].filter((i) => e.covered[i] === 1);

/** One row a point. */
export function mapCsv(map: ExposureMap): string {
  const names = ['sun minutes', 'beam Wh/m²', 'sky Wh/m²', 'ground Wh/m²'];
  const header = [
    'surface',
    'x m',
    'y m',
    'z m',
    ...['before', 'after', 'change'].flatMap((s) => names.map((n) => `${n} ${s}`)),
  ];
  const rows = map.surfaces.flatMap(({ surface, grid, before, after, change }) => {
    const name = nameOf(surface);
    const { x, y, z } = grid.receptors;
    return Array.from(x, (_, i) => [
      name,
      x[i]!,
      y[i]!,
      z[i]!,
      ...[before, after, change].flatMap((e) => QUANTITIES.map((q) => e?.[q][i] ?? null)),
    ]);
  });
  return writeCsv({ header, rows });
}

/** One line a surface: its mean before and after, and how far the change goes. */
export function mapText(map: ExposureMap, lowSun: number | undefined): string {
  const points = map.surfaces.reduce((sum, s) => sum + s.grid.cell.length, 0);
  return [
    `Sun on ${counted(points, 'point')} of ${counted(map.surfaces.length, 'surface')}, about ${map.spacing_m} m apart: ${periodText(map.dates)}, sampled every ${counted(map.step_min, 'minute')}${lowSunText(lowSun)}.`,
    'Means over the points that are not built over; energy of beam, sky and ground together, clear sky.',
    '',
    table(
      [
        { head: 'surface', align: 'left' },
        ...['points', 'sun before', 'sun after', 'most lost', 'Wh/m² before', 'Wh/m² after'].map((head) => ({
          head,
          align: 'right' as const,
        })),
      ],
      map.surfaces.map(rowOf),
    ),
    ...CAUTIONS,
    '',
  ].join('\n');
}

function rowOf({ surface, grid, before, after, change }: SurfaceMap): string[] {
  const sun = (e: Exposure | null): string => (e === null ? '–' : hoursText(meanOf(e, (i) => e.minutes[i]!)));
  const energy = (e: Exposure | null): string =>
    e === null ? '–' : meanOf(e, (i) => e.beam[i]! + e.sky[i]! + e.ground[i]!).toFixed(0);
  const lost = before && after && change ? hoursText(mostLost(before, after, change.minutes)) : '–';
  return [nameOf(surface), String(grid.cell.length), sun(before), sun(after), lost, energy(before), energy(after)];
}

/** The most sun that a point loses which is built over neither before nor after [min]. */
const mostLost = (before: Exposure, after: Exposure, change: Float64Array): number =>
  change.reduce((most, m, i) => (before.covered[i] === 1 || after.covered[i] === 1 ? most : Math.max(most, -m)), 0);

function meanOf(e: Exposure, value: (i: number) => number): number {
  let sum = 0;
  let n = 0;
  for (let i = 0; i < e.covered.length; i++) {
    if (e.covered[i] === 1) continue;
    sum += value(i);
    n++;
  }
  return n > 0 ? sum / n : 0;
}
