import { SHORT_CAUTION } from '../limits/cautions.ts';
import { type Mark, type Mm, PAPER, type Page } from './drawing.ts';
import { FINE, INK, RULE, SOFT } from './ink.ts';
import { line, rect, words } from './marks.ts';
import { measure, READ } from './measure.ts';

export type PaperName = 'A4' | 'A3' | 'A2' | 'A1';
/** A rectangle on the page [mm], from its top left corner. */
export type Rect = { readonly x: Mm; readonly y: Mm; readonly width: Mm; readonly height: Mm };

/** Left for the hole punch as in ISO 5457, and ten on the other sides. */
const MARGIN = { left: 20, right: 10, top: 10, bottom: 10 } as const;
/** The foot of every page: one line of words and the check bar. */
const FOOT: Mm = 14;

/** The page's size by ISO 216 [mm]. */
export function paperSize(paper: PaperName, landscape: boolean): readonly [Mm, Mm] {
  const [short, long] = PAPER[paper] as readonly [Mm, Mm];
  return landscape ? [long, short] : [short, long];
}

/** What is left of a page between its margins and above its foot. */
export function contentRect(paper: PaperName, landscape: boolean): Rect {
  const [width, height] = paperSize(paper, landscape);
  return {
    x: MARGIN.left,
    y: MARGIN.top,
    width: width - MARGIN.left - MARGIN.right,
    height: height - MARGIN.top - MARGIN.bottom - FOOT,
  };
}

/**
 * The bar that a ruler is laid against before anything is measured: 100 mm when the page was printed at its full size.
 * @param x  its left end; @param y  its baseline
 */
export function checkBar(x: Mm, y: Mm): readonly Mark[] {
  const marks: Mark[] = [];
  for (let i = 0; i < 10; i += 2) marks.push(rect(x + i * 10, y - 1.2, 10, 1.2, { fill: INK }));
  marks.push(rect(x, y - 1.2, 100, 1.2, { stroke: FINE }));
  return [
    { kind: 'group', label: 'check bar', marks },
    words('100 mm on paper when printed at full size', x + 102, y, { colour: SOFT }),
  ];
}

/** The foot: caution, page x of y, check bar and what the page goes by. */
function foot(size: readonly [Mm, Mm], number: number, count: number, note: string): readonly Mark[] {
  const left = MARGIN.left;
  const right = size[0] - MARGIN.right;
  const top = size[1] - MARGIN.bottom - FOOT + 3;
  const page = `page ${number} of ${count}`;
  const caution = words(SHORT_CAUTION, left, top + 4.4, { face: 'semibold' });
  const room = right - left - measure(SHORT_CAUTION, READ, 'semibold') - measure(page, READ) - 10;
  const noted = note !== '' && measure(note, READ) <= room;
  return [
    line(left, top, right, top, RULE),
    caution,
    ...(noted ? [words(note, right - measure(page, READ) - 6, top + 4.4, { colour: SOFT, anchor: 'end' })] : []),
    words(page, right, top + 4.4, { anchor: 'end' }),
    ...checkBar(left, size[1] - MARGIN.bottom),
  ];
}

/**
 * Pages from their contents: foot, check bar, page numbers and bookmarks are added here, so that no page can go without them.
 * @param note  what every page's foot repeats where there is room, such as the scheme and its hash
 */
export function finishPages(
  contents: readonly { readonly title: string; readonly marks: readonly Mark[] }[],
  paper: PaperName,
  landscape: boolean,
  note: string,
): readonly Page[] {
  const size = paperSize(paper, landscape);
  return contents.map((c, i) => ({
    width: size[0],
    height: size[1],
    title: c.title,
    marks: [
      ...c.marks,
      { kind: 'group', label: 'foot', role: 'text', marks: foot(size, i + 1, contents.length, note) },
    ],
  }));
}
