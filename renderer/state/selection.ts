import { signal } from '@preact/signals';

export type Kind = 'block' | 'room' | 'window' | 'glass' | 'device';
/** What can be selected: what a schedule lists, a receptor, or a face of a block (see `faces.ts`). */
export type Picked = Kind | 'receptor' | 'face';
/** What is selected: things of one kind, by id; the last one picked leads. */
export type Selection = { readonly kind: Picked; readonly ids: readonly string[] };

export const selection = signal<Selection | null>(null);

/** The id that leads the selection of a kind, or null. */
export const leadOf = (kind: Picked): string | null =>
  selection.value?.kind === kind ? (selection.value.ids.at(-1) ?? null) : null;

export const isSelected = (kind: Picked, id: string): boolean =>
  selection.value?.kind === kind && selection.value.ids.includes(id);

export function select(kind: Picked, id: string): void {
  selection.value = { kind, ids: [id] };
}

/** Adds to the selection or takes away from it; another kind starts a new one. */
export function toggle(kind: Picked, id: string): void {
  const now = selection.value;
  if (now === null || now.kind !== kind) {
    select(kind, id);
    return;
  }
  const ids = now.ids.includes(id) ? now.ids.filter((other) => other !== id) : [...now.ids, id];
  selection.value = ids.length === 0 ? null : { kind, ids };
}

export function selectNothing(): void {
  selection.value = null;
}
