import type { SchemeEdit } from '../../core/scheme/edit.ts';
import type { Fault } from '../../core/scheme/fault.ts';
import { words } from '../words/words.ts';

/** The list of the scheme that a schedule shows. */
export type ListName = 'blocks' | 'rooms' | 'windows' | 'glass' | 'devices';

/** How the cells of a column are changed: the field of the entry, and what may stand in it. */
export type CellEdit<Row> = {
  /** Path in the entry, such as `width`. */
  readonly field: string;
  readonly kind: 'text' | 'number' | 'share' | 'choice' | 'list';
  /** Of a choice: what is kept, and how it reads. */
  readonly options?: readonly (readonly [value: string, text: string])[];
  /** What stands in the cell while it is edited; null: this row has no such field. */
  readonly typed: (row: Row) => string | null;
  /** What a share that is typed into a cell of lengths comes to, field by field; null: this row has nothing to be a share of. */
  readonly asShare?: ((row: Row, share: number) => { readonly [field: string]: unknown } | null) | undefined;
};

export type ParsedCell = { readonly ok: true; readonly value: unknown } | { readonly ok: false; readonly why: string };

/** A number as readers of any tongue write it, with or without its unit: `1,20`, `1.20 m`, `−0.5`. NaN for what is none. */
export function readNumber(text: string): number {
  const plain = text.replaceAll('−', '-').trim();
  const found = /^([+-]?\d*(?:[.,]\d+)?(?:e[+-]?\d+)?)\s*(?:m|m²|°|%|W\/m²K?)?$/i.exec(plain)?.[1];
  return found === undefined || found === '' ? Number.NaN : Number(found.replace(',', '.'));
}

/** What was typed into a cell, as the scheme keeps it. */
export function parseCell(edit: Pick<CellEdit<never>, 'kind' | 'options'>, text: string): ParsedCell {
  const typed = text.trim();
  if (edit.kind === 'text') return { ok: true, value: typed };
  if (edit.kind === 'list') {
    return { ok: true, value: typed === '' || typed === '–' ? [] : typed.split(/[,;\s]+/).filter((id) => id !== '') };
  }
  if (edit.kind === 'choice') {
    const wanted = typed.toLocaleLowerCase();
    const found = edit.options?.find(
      ([value, name]) => value.toLocaleLowerCase() === wanted || name.toLocaleLowerCase() === wanted,
    );
    if (found !== undefined) return { ok: true, value: found[0] };
    const known = edit.options?.slice(0, 12).map(([, name]) => name) ?? [];
    return { ok: false, why: words.schedule.noChoice(typed, known.join(', ')) };
  }
  const number = readNumber(typed);
  if (Number.isNaN(number)) return { ok: false, why: words.schedule.noNumber(typed) };
  // A share is shown in percent; 0.2 and 20 both mean a fifth.
  const isPercent = edit.kind === 'share' && (typed.includes('%') || Math.abs(number) > 1);
  return { ok: true, value: isPercent ? number / 100 : number };
}

/** A cell that is to be changed. */
export type CellChange<Row> = {
  readonly id: string;
  readonly row: Row;
  readonly head: string;
  readonly edit: CellEdit<Row> | undefined;
  readonly text: string;
  /** Whether the row is only now being added, as a copy of `row`: what is typed always stands, and nothing typed leaves the copy. */
  readonly isNew?: boolean;
};

export type Changes =
  | { readonly ok: true; readonly edit: SchemeEdit | null }
  | { readonly ok: false; readonly faults: readonly Fault[] };

/**
 * Cells as one edit, so that many are one step of undo; or what is wrong with each, and then nothing is changed.
 * @param name  what stands after “Undo”
 */
export function changesOf<Row>(list: ListName, cells: readonly CellChange<Row>[], name: string): Changes {
  const faults: Fault[] = [];
  const edits: SchemeEdit[] = [];
  const renames: Rename[] = [];
  for (const { id, row, head, edit, text, isNew = false } of cells) {
    const place = `${id}, ${head}`;
    const before = edit?.typed(row) ?? null;
    if (edit === undefined || before === null) {
      faults.push(fault(place, words.schedule.fixedCell, words.schedule.fixedCure));
      continue;
    }
    if (isNew ? text.trim() === '' : before === text.trim()) continue;
    const share = edit.asShare && text.includes('%') ? edit.asShare(row, readNumber(text) / 100) : null;
    if (share !== null && Number.isFinite(readNumber(text))) {
      for (const [field, value] of Object.entries(share)) edits.push({ kind: 'set', list, id, field, value });
      continue;
    }
    const parsed = parseCell(edit, text);
    if (!parsed.ok) faults.push(fault(place, parsed.why, words.schedule.typeAgain));
    else if (edit.field === 'id') renames.push({ from: id, to: String(parsed.value) });
    else edits.push({ kind: 'set', list, id, field: edit.field, value: parsed.value });
  }
  if (faults.length > 0) return { ok: false, faults };
  edits.push(...renamed(list, renames));
  return { ok: true, edit: edits.length === 0 ? null : { kind: 'together', edits, name } };
}

type Rename = { readonly from: string; readonly to: string };

/**
 * New ids come after all else, since the other cells of a row are told by the old one. Where one is the old id of another row, as
 * when names move up by a row, all go by way of names that nothing has.
 */
function renamed(list: ListName, renames: readonly Rename[]): readonly SchemeEdit[] {
  const set = (id: string, value: string): SchemeEdit => ({ kind: 'set', list, id, field: 'id', value });
  const old = new Set(renames.map(({ from }) => from));
  if (!renames.some(({ to }) => old.has(to))) return renames.map(({ from, to }) => set(from, to));
  const between = (i: number): string => `\u0001${i}`;
  return [...renames.map(({ from }, i) => set(from, between(i))), ...renames.map(({ to }, i) => set(between(i), to))];
}

const fault = (place: string, message: string, cure: string): Fault => ({
  level: 'error',
  code: 'bad-cell',
  place,
  message,
  cure,
});

/** The cells of a clipboard as spreadsheets write it: rows of lines, columns of tabs; cells may be quoted. */
export function readClipboard(text: string): readonly (readonly string[])[] {
  const lines = text.replace(/\r\n?/g, '\n').replace(/\n$/, '').split('\n');
  return lines.map((line) =>
    line.split('\t').map((cell) => (/^".*"$/s.test(cell) ? cell.slice(1, -1).replaceAll('""', '"') : cell)),
  );
}

/** A cell of a clipboard: tabs and line ends would break it apart. */
export const clipboardCell = (text: string): string =>
  /[\t\n"]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
