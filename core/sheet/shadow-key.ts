import type { Model } from '../form/model.ts';
import type { Mark, Mm } from './drawing.ts';
import {
  ADDED,
  ADDED_HATCH,
  ADDED_LINE,
  AREA_LINE,
  BOUNDARY_LINE,
  GAINED_HATCH,
  GAINED_LINE,
  SHADOW,
  SOFT,
  TREE_LINE,
  WHITE,
} from './ink.ts';
import { leading, line, type Piece, rect, words } from './marks.ts';
import { READ } from './measure.ts';
import { BLOCK_LOOK } from './plan.ts';
import type { SheetUnits } from './sheet-units.ts';

const ROW: Mm = 6;
const SWATCH: Mm = 11;

/** The key: only what the drawings of this document show. */
export function shadowKey(
  x: Mm,
  top: Mm,
  model: Model,
  shows: { readonly added: boolean; readonly gained: boolean },
  units: SheetUnits = 'metric',
): Piece {
  const entries: { readonly text: string; readonly draw: (y: Mm) => readonly Mark[] }[] = [];
  const box = (look: Parameters<typeof rect>[4]) => (y: Mm) => [rect(x, y, SWATCH, 4, look)];
  const has = (standing: string): boolean => model.solids.some((s) => s.standing === standing);
  entries.push({
    text: shows.added || shows.gained ? 'shadow before and after' : 'shadow',
    draw: box({ fill: SHADOW }),
  });
  if (shows.added) {
    entries.push({
      text: 'shadow added by the proposal',
      draw: box({ fill: ADDED, hatch: ADDED_HATCH, stroke: ADDED_LINE }),
    });
  }
  if (shows.gained) {
    entries.push({
      text: 'ground that comes into sun',
      draw: box({ fill: WHITE, hatch: GAINED_HATCH, stroke: GAINED_LINE }),
    });
  }
  if (has('proposed')) entries.push({ text: 'proposed', draw: box(BLOCK_LOOK.proposed) });
  if (has('existing')) entries.push({ text: 'existing on the site, kept', draw: box(BLOCK_LOOK.existing) });
  if (has('removed')) entries.push({ text: 'existing, to be removed', draw: box(BLOCK_LOOK.removed) });
  if (has('context')) entries.push({ text: 'neighbouring building', draw: box(BLOCK_LOOK.context) });
  if (model.boundary) {
    entries.push({ text: 'site boundary', draw: (y) => [line(x, y + 2, x + SWATCH, y + 2, BOUNDARY_LINE)] });
  }
  if (model.receptors.some((r) => r.kind === 'area'))
    entries.push({ text: 'amenity area', draw: box({ stroke: AREA_LINE }) });
  if (model.trees.length > 0) {
    entries.push({
      text: 'tree crown and outline of its shadow',
      draw: (y) => [{ kind: 'circle', at: [x + SWATCH / 2, y + 2], radius: 2, stroke: TREE_LINE }],
    });
  }
  const notes = [
    `Figures on blocks: height of the top in ${units === 'imperial' ? 'feet' : 'metres'}.`,
    'Sun: true altitude, without refraction.',
  ];
  return {
    marks: [
      ...entries.flatMap((e, i) => [
        ...e.draw(top + i * ROW),
        words(e.text, x + SWATCH + 3, top + i * ROW + 2 + READ * 0.35),
      ]),
      ...notes.map((note, i) =>
        words(note, x, top + entries.length * ROW + 2 + READ * 0.35 + i * leading(READ), { colour: SOFT }),
      ),
    ],
    height: entries.length * ROW + notes.length * leading(READ) + 1,
  };
}
