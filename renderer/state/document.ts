import { computed, signal } from '@preact/signals';
import type { FileId } from '../../app/contract/host.ts';
import type { Fault } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { type KeptVariant, variantsOf, withoutVariants, withVariants } from '../../core/scheme/variants.ts';
import { begin, commit, type History, redo, redoLabel, undo, undoLabel } from './history.ts';

/** Where the open scheme lives. Without an id it has no file yet: saving asks for a place. */
export type SchemeFile = { readonly id: FileId | null; readonly name: string };

const history = signal<History<Scheme> | null>(null);
const saved = signal<Scheme | null>(null);

/** What an unfinished gesture (a drag, typing in a cell) would make of the scheme; null: no gesture. Never in the history. */
export const preview = signal<Scheme | null>(null);
export const file = signal<SchemeFile | null>(null);
/** Warnings that came with the file. */
export const notes = signal<readonly Fault[]>([]);

/** The document as committed, with the variants that are kept with it: what is saved. */
export const whole = computed(() => history.value?.now.value ?? null);
let alone: Scheme | null = null;
/** The scheme alone, as it is drawn and worked out; the same object as long as only its variants change. */
export const committed = computed<Scheme | null>(() => {
  const now = whole.value === null ? null : withoutVariants(whole.value);
  if (now === null || alone === null || !isSameOutside(alone, now)) alone = now;
  return alone;
});
/** The scheme as it should be drawn and worked out now. */
export const scheme = computed(() => preview.value ?? committed.value);
export const isUnsaved = computed(() => whole.value !== null && whole.value !== saved.value);
export const undoName = computed(() => (history.value === null ? null : undoLabel(history.value)));
export const redoName = computed(() => (history.value === null ? null : redoLabel(history.value)));

/** Puts a loaded scheme on the desk in place of what was there; its history begins anew. */
export function place(value: Scheme, where: SchemeFile, warnings: readonly Fault[], isSaved: boolean): void {
  preview.value = null;
  history.value = begin(value);
  saved.value = isSaved ? value : null;
  file.value = where;
  notes.value = warnings;
}

/** Takes the scheme off the desk. */
export function leave(): void {
  preview.value = null;
  history.value = null;
  saved.value = null;
  file.value = null;
  notes.value = [];
}

function commitAs(label: string, change: (now: Scheme) => Scheme): void {
  preview.value = null;
  if (history.value !== null) history.value = commit(history.value, change(history.value.now.value), label);
}

/** One edit of the scheme, named for the undo button; its variants stay as they are. */
export function edit(label: string, change: (scheme: Scheme) => Scheme): void {
  commitAs(label, (now) => withVariants(change(withoutVariants(now)), variantsOf(now)));
}

/** One edit of what is kept with the scheme. */
export function editVariants(
  label: string,
  change: (variants: readonly KeptVariant[]) => readonly KeptVariant[],
): void {
  commitAs(label, (now) => withVariants(now, change(variantsOf(now))));
}

/** Whether two schemes are the same part by part, as objects. */
function isSameOutside(a: Scheme, b: Scheme): boolean {
  const keys = Object.keys(a);
  return keys.length === Object.keys(b).length && keys.every((key) => a[key] === b[key]);
}

export function undoEdit(): void {
  preview.value = null;
  if (history.value !== null) history.value = undo(history.value);
}

export function redoEdit(): void {
  preview.value = null;
  if (history.value !== null) history.value = redo(history.value);
}

/** Marks a value as written to disk: "unsaved" compares with it. */
export function markSaved(value: Scheme, where: SchemeFile): void {
  saved.value = value;
  file.value = where;
}
