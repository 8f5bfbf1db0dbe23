import type { Solid } from '../form/model.ts';
import { STAR_NOTE } from './diagram.ts';
import type { Mark } from './drawing.ts';
import { place } from './numerals.ts';
import type { Rect } from './paper.ts';
import { heightWords } from './plan.ts';
import { dimension, type SheetUnits, scaleWords } from './sheet-units.ts';
import { northPoint, scaleBar } from './scale-marks.ts';
import { shadowKey } from './shadow-key.ts';
import { type ShadowSheetInput, SUBJECT } from './shadow-input.ts';
import { type Areas, DRAWING_CAUTIONS, type Note, placeNotes } from './side-panel.ts';
import { titleBlock } from './title-block.ts';

const levelText = ({ level_m = 0, units = 'metric' }: ShadowSheetInput): string =>
  `${dimension(level_m, units)}${units === 'metric' ? ' m' : ''}`;

/** What the drawing shows and leaves out, in words. */
function methodNote(input: ShadowSheetInput): Note {
  const { site } = input.scheme;
  return {
    heading: 'How it was worked out',
    lines: [
      `Site ${place(site.latitude, site.longitude)}. Civil time with its offset from UTC. Azimuth clockwise from true north.`,
      `Shadow of the blocks on level ground at ${levelText(input)} under a clear sky. Slopes, and shadow on roofs and walls, are not drawn.`,
      'Added: in shadow after and in sun before. Areas leave out ground under buildings. Their shares in sun count tree crowns, which let through what the scheme says for the month; added shadow does not.',
      STAR_NOTE,
    ],
  };
}

/** Blocks that a note names at most. */
const MOST_NAMED = 150;

/** Heights of the blocks that are too small to carry a figure at this scale. */
function unlabelled(left: readonly Solid[], units: SheetUnits | undefined): Note {
  const named = left.slice(0, MOST_NAMED).map((s) => `${s.name || s.id} ${heightWords(s, units)}`);
  const more = left.length - named.length;
  return {
    heading: 'Blocks too small for a figure',
    lines: [`${named.join('; ')}${more > 0 ? `; and ${more} more` : ''}`],
  };
}

/** North, scale and key from the top, title block at the lower right, and between them whatever text has room. */
export function shadowPanel(
  input: ShadowSheetInput,
  areas: Areas,
  scale: number,
  left: readonly Solid[],
): { readonly marks: readonly Mark[]; readonly spill: readonly Note[] } {
  const first = areas.panel[0] as Rect;
  const last = areas.panel.at(-1) as Rect;
  const marks: Mark[] = [];
  const radius = 8;
  marks.push(northPoint(first.x + radius, first.y + radius * 1.34 + 4, radius, input.scheme.site.north));
  const bar = scaleBar(
    first.x + radius * 2 + 8,
    first.y + 3,
    first.width - radius * 2 - 8,
    scale,
    input.paper,
    input.units,
  );
  marks.push(...bar.marks);
  let y = first.y + radius * 2.7 + 6;
  const any = (kind: 'added' | 'gained'): boolean =>
    input.moments.some((m) => (m.change?.[kind].regions.length ?? 0) > 0);
  const key = shadowKey(first.x, y, input.model, { added: any('added'), gained: any('gained') }, input.units);
  marks.push(...key.marks);
  y += key.height + 3;
  const facts = {
    subject: SUBJECT,
    number: input.number ?? '',
    date: input.drawn,
    engine: input.engine,
    hash: input.hash,
    scale: `${scaleWords(scale, input.units)} on ${input.paper}`,
  };
  const height = titleBlock(last.x, 0, last.width, input.scheme, facts).height;
  const foot = last.y + last.height - height;
  marks.push(...titleBlock(last.x, foot, last.width, input.scheme, facts).marks);
  const slots =
    areas.panel.length === 1
      ? [{ x: first.x, y, end: foot - 2 }]
      : [
          { x: first.x, y, end: first.y + first.height },
          { x: last.x, y: last.y, end: foot - 2 },
        ];
  const notes = [methodNote(input), DRAWING_CAUTIONS, ...(left.length > 0 ? [unlabelled(left, input.units)] : [])];
  const placed = placeNotes(notes, slots, first.width);
  return { marks: [...marks, ...placed.marks], spill: placed.spill };
}
