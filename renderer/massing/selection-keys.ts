import type { Model } from '../../core/form/model.ts';
import { faceId, faceOf } from '../state/faces.ts';
import { type Picked, select, selection, selectNothing } from '../state/selection.ts';
import { model } from '../state/studies.ts';

/** What a step goes through: things of the kind that is selected; of a face, the faces of its block. */
function siblings(shapes: Model, kind: Picked, id: string): readonly string[] {
  if (kind === 'face') {
    const { block } = faceOf(id);
    const corners = shapes.solids.find((s) => s.id === block)?.outline ?? [];
    return [...corners.map((_, wall) => faceId({ kind: 'wall', block, wall })), faceId({ kind: 'roof', block })];
  }
  const lists: { readonly [K in Picked]?: readonly { readonly id: string }[] } = {
    block: shapes.solids,
    room: shapes.rooms,
    window: shapes.windows,
    receptor: shapes.receptors,
  };
  return (lists[kind] ?? []).map((thing) => thing.id);
}

/**
 * Selecting in the drawing by keyboard: brackets step from one thing to the next of its kind, Enter goes from a block into its
 * walls and roof, Escape back out.
 * @returns whether the key meant something here
 */
export function pressSelectionKey(event: KeyboardEvent): boolean {
  if (event.ctrlKey || event.metaKey || event.altKey) return false;
  const shapes = model.peek()?.value;
  const now = selection.peek();
  const id = now?.ids.at(-1);
  if (shapes === undefined) return false;
  if (event.key === '[' || event.key === ']') {
    const kind = now?.kind ?? 'block';
    const all = siblings(shapes, kind, id ?? '');
    if (all.length === 0) return false;
    const at = id === undefined ? (event.key === ']' ? -1 : 0) : all.indexOf(id);
    select(kind, all[(at + (event.key === ']' ? 1 : all.length - 1)) % all.length] as string);
    return true;
  }
  if (id === undefined || now === null) return false;
  if (event.key === 'Enter' && now.kind === 'block') {
    select('face', faceId({ kind: 'wall', block: id, wall: 0 }));
    return true;
  }
  if (event.key !== 'Escape') return false;
  if (now.kind === 'face') select('block', faceOf(id).block);
  else selectNothing();
  return true;
}
