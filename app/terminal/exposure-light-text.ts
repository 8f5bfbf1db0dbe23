import { CAUTIONS } from '../../core/limits/cautions.ts';
import { writeCsv } from '../../core/sheet/csv.ts';
import { treesSentence } from '../../core/sheet/light-trees.ts';
import type { BeforeAfter, NeighbourLight } from '../../core/study/exposure-neighbours.ts';
import { counted, hoursText, lowSunText } from './exposure-words.ts';
import { table } from './table.ts';

/** The figures as they are, shares as 0..1, with what is said of trees before them. */
export function lightJson({ receptors, ...asked }: NeighbourLight): string {
  return `${JSON.stringify({ ...asked, treesNote: treesSentence(asked.trees), receptors }, null, 2)}\n`;
}

type Figure = { readonly name: string; readonly of: BeforeAfter; readonly kind: 'share' | 'factor' | 'minutes' };

function figuresOf(r: NeighbourLight['receptors'][number], light: NeighbourLight): Figure[] {
  if (r.kind === 'area')
    return [{ name: `area with ${light.hours} h of sun on ${light.date}`, of: r.share, kind: 'share' }];
  return [
    { name: 'sky view factor', of: r.skyView, kind: 'factor' },
    { name: 'sky component, CIE overcast', of: r.skyComponent, kind: 'share' },
    { name: 'annual probable sunlight hours', of: r.annual, kind: 'share' },
    { name: 'winter probable sunlight hours', of: r.winter, kind: 'share' },
    { name: `sun on ${light.date}`, of: r.sunMinutes, kind: 'minutes' },
  ];
}

const shown = (v: number, kind: Figure['kind']): string =>
  kind === 'minutes' ? hoursText(v) : kind === 'factor' ? v.toFixed(3) : `${(100 * v).toFixed(1)} %`;

/** One line a figure, in the order of the scheme: before, after, and what is kept. */
export function lightText(light: NeighbourLight, lowSun: number | undefined): string {
  const rows = light.receptors.flatMap((r) => {
    const figures = figuresOf(r, light).map(({ name, of, kind }) => [
      r.id,
      name,
      shown(of.before, kind),
      shown(of.after, kind),
      `${(100 * of.kept).toFixed(0)} %`,
    ]);
    if (r.kind !== 'area')
      figures.push([r.id, 'level of exposure to sunlight, EN 17037', r.level.before, r.level.after, '']);
    return figures;
  });
  return [
    `Light of ${counted(light.receptors.length, 'receptor')} before and after: ${light.year}, and ${light.date} alone${lowSunText(lowSun)}.`,
    `An open place has ${light.openHours.toFixed(0)} h of sun in the year as counted here; sunlight hours are shares of that.`,
    treesSentence(light.trees),
    '',
    table(
      [
        { head: 'receptor', align: 'left' },
        { head: 'figure', align: 'left' },
        { head: 'before', align: 'right' },
        { head: 'after', align: 'right' },
        { head: 'kept', align: 'right' },
      ],
      rows,
    ),
    ...CAUTIONS,
    '',
  ].join('\n');
}

const TREES_CELL = { none: 'none in the scheme', 'left-out': 'left out', counted: 'counted' } as const;

/** One row a figure; shares as 0..1. Every row says whether trees are in it, as rows are taken out of tables one by one. */
export function lightCsv(light: NeighbourLight): string {
  const trees = TREES_CELL[light.trees];
  return writeCsv({
    header: ['id', 'figure', 'unit', 'before', 'after', 'kept', 'trees'],
    rows: light.receptors.flatMap((r) => [
      ...figuresOf(r, light).map(({ name, of, kind }) => [
        r.id,
        name,
        kind === 'minutes' ? 'min' : '1',
        of.before,
        of.after,
        of.kept,
        trees,
      ]),
      ...(r.kind === 'area'
        ? []
        : [[r.id, 'level of exposure to sunlight, EN 17037', '', r.level.before, r.level.after, null, trees]]),
    ]),
  });
}
