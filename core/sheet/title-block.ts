import type { Scheme } from '../scheme/schema.ts';
import type { Mark, Mm } from './drawing.ts';
import { RULE, SOFT } from './ink.ts';
import { field, line, type Piece, paragraph, words } from './marks.ts';
import { READ, SMALL } from './measure.ts';

/** What a title block states beside the scheme's own title, address, author and revision. */
export type TitleFacts = {
  /** What the drawing is, such as `Shadow study`. */
  readonly subject: string;
  /** Drawing number; null where there is none to give. */
  readonly number: string | null;
  /** Date of the drawing, YYYY-MM-DD, handed in: nothing here reads a clock. */
  readonly date: string;
  /** Version of the engine. */
  readonly engine: string;
  /** Content hash of the scheme; its first 12 digits are printed. */
  readonly hash: string;
  /** Such as `1:500 on A3`; empty for what is not to scale. */
  readonly scale: string;
};

/** Digits of a content hash that are printed: enough to tell two revisions apart. */
export const shortHash = (hash: string): string => hash.slice(0, 12);

const or = (text: string): string => (text.trim() === '' ? '–' : text.trim());

/** The title block, drawn from its top; long texts are broken and then cut inside their fields. */
export function titleBlock(x: Mm, top: Mm, width: Mm, scheme: Scheme, facts: TitleFacts): Piece {
  const marks: Mark[] = [line(x, top, x + width, top, { ...RULE, colour: SOFT })];
  const title = paragraph(or(scheme.title), x, top + 2.6, width, { size: 5, face: 'semibold' }, 2);
  let y = top + 2.6 + title.height;
  marks.push(...title.marks);
  const subject = paragraph(
    [facts.subject, facts.scale].filter((t) => t !== '').join(', '),
    x,
    y,
    width,
    { size: 4.2 },
    1,
  );
  marks.push(...subject.marks);
  y += subject.height;
  if (scheme.address.trim() !== '') {
    const address = paragraph(scheme.address, x, y + 0.4, width, { colour: SOFT }, 2);
    marks.push(...address.marks);
    y += address.height + 0.4;
  }
  y += 1.6;
  const rows: readonly (readonly (readonly [string, string])[])[] = [
    [
      ...(facts.number === null ? [] : [['drawing', or(facts.number)] as const]),
      ['revision', or(scheme.revision)],
      ['date', facts.date],
    ],
    [['author', or(scheme.author)]],
    [
      ['engine', `Shadewright ${facts.engine}`],
      ['scheme, content hash', shortHash(facts.hash)],
    ],
  ];
  for (const row of rows) {
    marks.push(line(x, y, x + width, y, RULE));
    const share = row.length === 3 ? [0.38, 0.26, 0.36] : row.length === 2 ? [0.52, 0.48] : [1];
    let left = x;
    row.forEach(([label, value], i) => {
      const wide = width * (share[i] as number);
      marks.push(
        words(label, left, y + 3.4, { size: SMALL, colour: SOFT }),
        field(value, left, y + 3.4 + READ * 1.25, wide - 2),
      );
      left += wide;
    });
    y += 10;
  }
  return { marks: [{ kind: 'group', label: 'title block', role: 'text', marks }], height: y - top };
}
