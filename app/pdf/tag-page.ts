import type { Mark, Page } from '../../core/sheet/drawing.ts';

type Text = Extract<Mark, { kind: 'text' }>;
type Group = Extract<Mark, { kind: 'group' }>;

/** A standard structure type of ISO 32000-1:2008, 14.8.4, or an artifact, which reading software passes over. */
export type Tag = 'Sect' | 'Div' | 'Figure' | 'H1' | 'H2' | 'P' | 'Table' | 'TR' | 'TH' | 'TD' | 'Artifact';
/** A stretch of a page in the order in which it is painted: an element with parts, or one that holds marks. */
export type Part = {
  readonly tag: Tag;
  /** What a figure shows, for those who do not see it. */
  readonly alt?: string;
  readonly title?: string;
  readonly parts?: readonly Part[];
  readonly marks?: readonly Mark[];
};

/** Heights of the em from which text is a heading [mm]. */
const H1_mm = 7;
const H2_mm = 4.6;

/**
 * What the marks of a page are to someone who has it read out: headings, paragraphs, tables, figures with their words, and rules
 * and swatches that say nothing. Marks keep their order, because what comes later is painted over what came before.
 */
export const pageParts = (page: Page): Part => ({
  tag: 'Sect',
  title: page.title,
  parts: joined(partsOf(page.marks, page.title)),
});

function partsOf(marks: readonly Mark[], within: string): Part[] {
  const parts: Part[] = [];
  let text: Text[] = [];
  let idle: Mark[] = [];
  const close = (): void => {
    if (text.length > 0) parts.push({ tag: textTag(text), marks: text });
    if (idle.length > 0) parts.push({ tag: 'Artifact', marks: idle });
    text = [];
    idle = [];
  };
  for (const mark of marks) {
    const last = text.at(-1);
    if (mark.kind === 'text') {
      if (idle.length > 0 || (last && !runsOn(last, mark))) close();
      text.push(mark);
    } else if (mark.kind === 'group') {
      close();
      parts.push(groupPart(mark, within));
    } else {
      if (text.length > 0) close();
      idle.push(mark);
    }
  }
  close();
  return parts;
}

/** Whether a line of text is the next of the same paragraph. */
function runsOn(last: Text, next: Text): boolean {
  const step = next.at[1] - last.at[1];
  return (
    next.size === last.size &&
    next.face === last.face &&
    next.colour === last.colour &&
    next.anchor === last.anchor &&
    Math.abs(next.at[0] - last.at[0]) < 1e-6 &&
    step > 0 &&
    step < next.size * 1.32 &&
    !next.turn_deg
  );
}

function textTag(text: readonly Text[]): Tag {
  const [first] = text;
  if (first?.face !== 'semibold') return 'P';
  return first.size >= H1_mm ? 'H1' : first.size >= H2_mm ? 'H2' : 'P';
}

function groupPart(group: Group, within: string): Part {
  if (group.role === 'row' || group.role === 'head') {
    const cell = group.role === 'head' ? 'TH' : 'TD';
    const parts = group.marks.map((m): Part => {
      const isCell = m.kind === 'group' && m.role === 'cell';
      return isCell ? { tag: cell, marks: m.marks } : { tag: 'Artifact', marks: [m] };
    });
    return { tag: 'TR', parts };
  }
  const label = group.label ?? '';
  const name = label === '' || label === within ? within : within === '' ? label : `${within}: ${label}`;
  if (group.role === 'text' || (!group.clip && holdsLabels(group)))
    return { tag: 'Div', parts: joined(partsOf(group.marks, group.role === 'text' ? within : label || within)) };
  if (label === '') return { tag: 'Artifact', marks: [group] };
  return { tag: 'Figure', alt: name, marks: [group] };
}

const holdsLabels = (group: Group): boolean =>
  group.marks.some((m) => m.kind === 'group' && (m.label !== undefined || m.role !== undefined || holdsLabels(m)));

/** Rows that follow each other as one table. */
function joined(parts: readonly Part[]): readonly Part[] {
  const out: Part[] = [];
  let rows: Part[] = [];
  const close = (): void => {
    if (rows.length > 0) out.push({ tag: 'Table', parts: rows });
    rows = [];
  };
  for (const part of parts) {
    if (part.tag === 'TR') {
      // A head that stands again is the start of a table of its own.
      if (part.parts?.some((p) => p.tag === 'TH')) close();
      rows.push(part);
    } else {
      close();
      out.push(part);
    }
  }
  close();
  return out;
}
