import { computed, effect, signal } from '@preact/signals';
import type { Fault } from '../../core/scheme/fault.ts';
import type { Scheme, SheetSet } from '../../core/scheme/schema.ts';
import { freeId } from '../../core/sizing/lever.ts';
import type { Document } from '../../core/sheet/drawing.ts';
import { needsWindow, type SheetKind } from '../../core/study/sheet-kinds.ts';
import { hands } from '../jobs/hands.ts';
import { committed, file, notes } from '../state/document.ts';
import { performEdit } from '../state/perform-edit.ts';
import { selection } from '../state/selection.ts';
import type { JobState } from '../state/studies.ts';
import { weatherAtHand } from '../state/weather-at-hand.ts';
import { words } from '../words/words.ts';
import { today } from './today.ts';

/** Whether the sheets have the window to themselves. */
export const isSheetsShown = signal(false);

const FIRST: SheetSet = { id: '', name: '', kind: 'shadow-study', dates: [], times: [], paper: 'A3', landscape: true };

/** What is drawn: a set of the scheme as it was kept or as it is being changed, or one that is kept nowhere (id ''). */
export const draft = signal<SheetSet>(FIRST);

/** Sets that the scheme keeps. */
export const sets = computed<readonly SheetSet[]>(() => committed.value?.sheets ?? []);
/** The kept set that the draft is of; null: none. */
export const keptSet = computed(() => sets.value.find((set) => set.id === draft.value.id) ?? null);
export const isChanged = computed(() => JSON.stringify(keptSet.value) !== JSON.stringify(draft.value));

export type Drawn = { readonly scheme: Scheme; readonly set: SheetSet; readonly document: Document };
export const drawn = signal<Drawn | null>(null);
export const faults = signal<readonly Fault[]>([]);
export const job = signal<JobState>({ kind: 'idle' });

/** What the pages show is what is set, of the scheme as it is. */
export const isFresh = computed(
  () => drawn.value !== null && drawn.value.scheme === committed.value && drawn.value.set === draft.value,
);

export function openSheets(): void {
  const [first] = sets.peek();
  if (draft.peek() === FIRST && first !== undefined) draft.value = first;
  isSheetsShown.value = true;
}

export const change = (part: Partial<SheetSet>): void => {
  const next: Record<string, unknown> = { ...draft.peek(), ...part };
  // A choice that was taken back leaves no trace in the file.
  for (const key of Object.keys(part)) if (next[key] === undefined) delete next[key];
  draft.value = next as SheetSet;
};

/**
 * Another kind of sheet. What was chosen for the old one goes: a scale of plans says nothing of a section, and a name that only says
 * the kind would put the wrong one on the file. A section begins with the window that is selected, or the first.
 */
export function changeKind(of: Scheme, kind: SheetKind): void {
  const { kind: old, name, window } = draft.peek();
  const chosen = selection.peek();
  const first = chosen?.kind === 'window' ? chosen.ids[0] : of.windows[0]?.id;
  change({
    kind,
    name: name === words.sheets.kinds[old as SheetKind] ? '' : name,
    scale: undefined,
    window: window ?? (needsWindow(kind) ? first : undefined),
  } as Partial<SheetSet>);
}

const nameOf = (set: SheetSet): string =>
  set.name || (words.sheets.kinds[set.kind as keyof typeof words.sheets.kinds] ?? set.kind);
export { nameOf as setName };

/** Keeps the draft with the scheme, in place of the set it is of or as another. */
export function keepDraft(asNew: boolean): void {
  const of = committed.peek();
  if (of === null) return;
  const at = asNew ? -1 : of.sheets.findIndex((set) => set.id === draft.peek().id);
  const entry = at < 0 ? { ...draft.peek(), id: freeId(of.sheets, 'S1') } : draft.peek();
  const name = words.sheets.editKeep(nameOf(entry));
  const add = { kind: 'add', list: 'sheets', entry, ...(at < 0 ? {} : { at }) } as const;
  const edits = at < 0 ? [add] : [{ kind: 'remove', list: 'sheets', id: entry.id } as const, add];
  if (performEdit({ kind: 'together', edits, name }).length > 0) return;
  // The scheme's own reading of it, so that it counts as kept.
  draft.value = sets.peek().find((set) => set.id === entry.id) ?? entry;
}

export function removeSet(set: SheetSet): void {
  const name = words.sheets.editRemove(nameOf(set));
  performEdit({ kind: 'together', edits: [{ kind: 'remove', list: 'sheets', id: set.id }], name });
  if (draft.peek().id === set.id) draft.value = { ...draft.peek(), id: '' };
}

/** Draws what is set; an answer that something newer has overtaken is let go. */
export async function drawDraft(): Promise<void> {
  const of = committed.peek();
  if (of === null) return;
  const set = draft.peek();
  job.value = { kind: 'working', done: 0, total: 0 };
  const ask = { set, drawn: today(), notes: notes.peek(), weather: weatherAtHand.peek() };
  const outcome = await hands.sheets.run('sheet', ask, of, (done, total) => {
    job.value = { kind: 'working', done, total };
  });
  if (committed.peek() !== of || draft.peek() !== set) return;
  if (outcome.kind === 'done' && outcome.superseded) return;
  if (outcome.kind !== 'done') {
    job.value = outcome;
    return;
  }
  job.value = { kind: 'idle' };
  faults.value = outcome.result.ok ? [] : outcome.result.faults;
  if (outcome.result.ok) drawn.value = { scheme: of, set, document: outcome.result.value };
  else drawn.value = null;
}

export const stopDrawing = (): void => hands.sheets.stop();

/** How long the settings must rest before they are drawn [ms]. */
const REST_ms = 200;

effect(() => {
  const of = committed.value;
  void draft.value;
  if (of === null || !isSheetsShown.value || isFresh.peek()) return;
  const rest = setTimeout(() => void drawDraft(), REST_ms);
  return () => clearTimeout(rest);
});

// Another scheme has other sheets.
let owner = file.peek()?.name;
effect(() => {
  const name = file.value?.name;
  if (name === owner) return;
  owner = name;
  draft.value = FIRST;
  drawn.value = null;
  faults.value = [];
  isSheetsShown.value = false;
});
