import type { SchemeEdit } from '../../core/scheme/edit.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { freeId } from '../../core/sizing/lever.ts';
import { committed } from '../state/document.ts';
import { performEdit } from '../state/perform-edit.ts';
import { type Kind, select, selectNothing } from '../state/selection.ts';
import { words } from '../words/words.ts';
import type { ListName } from './cell-edit.ts';

const text = words.schedule;

type Loose = { readonly id: string; readonly [field: string]: unknown };

/** Where a new block is put: east of all that stands, a lane apart [m]. */
const LANE_m = 4;

/** The far east of what is drawn [m]. */
function eastOf(scheme: Scheme): number {
  const ends = scheme.blocks.flatMap((b) => (b.box ? [b.box.at[0] + b.box.width] : (b.outline ?? []).map(([x]) => x)));
  return ends.length === 0 ? 0 : Math.max(...ends) + LANE_m;
}

/** An entry to begin with; null where it needs something that is not there yet. */
function freshEntry(scheme: Scheme, kind: Kind): Loose | null {
  const id = (list: readonly { readonly id: string }[], first: string): string => freeId(list, first);
  if (kind === 'block') {
    const box = { at: [eastOf(scheme), 0], width: 10, depth: 10 };
    return { id: id(scheme.blocks, 'B1'), name: text.newNames.block, standing: 'proposed', box, base: 0, height: 6 };
  }
  if (kind === 'glass')
    return { id: id(scheme.glass, 'G1'), name: text.newNames.glass, g: 0.5, u: 1.2, light: 0.7, panes: 2, frame: 0.2 };
  if (kind === 'device')
    return { id: id(scheme.devices, 'D1'), kind: 'overhang', depth: 0.6, above: 0, left: 0.3, right: 0.3 };
  if (kind === 'room') {
    const block = scheme.blocks.find((b) => b.box && b.standing !== 'context') ?? scheme.blocks.find((b) => b.box);
    if (!block?.box) return null;
    // The whole of its lowest storey: to be made smaller.
    const height = Math.min(2.7, block.height - block.base);
    return {
      id: id(scheme.rooms, '1.1'),
      name: text.newNames.room,
      use: 'living',
      block: block.id,
      box: block.box,
      floor: block.base,
      height,
    };
  }
  const room = scheme.rooms[0];
  const glass = scheme.glass[0];
  if (room === undefined || glass === undefined) return null;
  return {
    id: id(scheme.windows, 'W1'),
    room: room.id,
    wall: 0,
    from: 0.5,
    sill: 0.9,
    width: 1.2,
    height: 1.2,
    reveal: 0.1,
    glass: glass.id,
    devices: [],
  };
}

/** Why nothing can be added yet, or null. */
export function addNeeds(scheme: Scheme, kind: Kind): string | null {
  if (freshEntry(scheme, kind) !== null) return null;
  return kind === 'room' ? text.needsFirst.room : text.needsFirst.window;
}

function addEntry(kind: Kind, list: ListName, entry: Loose): void {
  const name = text.addName(text.one[kind]);
  const edit: SchemeEdit = { kind: 'together', edits: [{ kind: 'add', list, entry }], name };
  if (performEdit(edit).length === 0) select(kind, entry.id);
}

export function addRow(kind: Kind, list: ListName): void {
  const scheme = committed.peek();
  const entry = scheme === null ? null : freshEntry(scheme, kind);
  if (entry !== null) addEntry(kind, list, entry);
}

/** A copy of an entry from elsewhere, under an id that is free here. */
export function addCopy(kind: Kind, list: ListName, entry: Loose): void {
  const scheme = committed.peek();
  if (scheme !== null) addEntry(kind, list, { ...entry, id: freeId(scheme[list] as readonly Loose[], entry.id) });
}

/**
 * A copy of an entry under an id of its own. A window is put beside the one it is of, so that the two do not cover each other, and
 * a block east of all that stands.
 * @returns null when there is no such entry
 */
function copyOf(scheme: Scheme, kind: Kind, list: ListName, id: string): Loose | null {
  const entries = scheme[list] as readonly Loose[];
  const of = entries.find((entry) => entry.id === id);
  if (of === undefined) return null;
  const copy: { [field: string]: unknown; id: string } = { ...of, id: freeId(entries, id) };
  if (kind === 'window' && typeof of['from'] === 'number') copy['from'] = of['from'] + Number(of['width']) + 0.3;
  if (kind === 'block' && of['box'] !== undefined) {
    const box = of['box'] as { at: readonly [number, number]; width: number };
    copy['box'] = { ...box, at: [eastOf(scheme), box.at[1]] };
  }
  return copy;
}

/**
 * Copies of an entry, each beside the one before it, that are not in the scheme yet.
 * @param ids what they are to be called; null: an id that is free
 */
export function copiesOf(kind: Kind, list: ListName, id: string, ids: readonly (string | null)[]): readonly Loose[] {
  let scheme = committed.peek();
  let last = id;
  const copies: Loose[] = [];
  for (const own of ids) {
    const copy = scheme === null ? null : copyOf(scheme, kind, list, last);
    if (scheme === null || copy === null) break;
    const entry = { ...copy, id: own ?? copy.id };
    copies.push(entry);
    scheme = { ...scheme, [list]: [...(scheme[list] as readonly Loose[]), entry] };
    last = entry.id;
  }
  return copies;
}

/** A copy of a row, as `copyOf` puts it. */
export function duplicateRow(kind: Kind, list: ListName, id: string): void {
  const scheme = committed.peek();
  const copy = scheme === null ? null : copyOf(scheme, kind, list, id);
  if (copy !== null) addEntry(kind, list, copy);
}

/** Takes rows out as one step; a block takes its rooms along, a room its windows, as undo says. */
export function removeRows(kind: Kind, list: ListName, ids: readonly string[]): void {
  if (ids.length === 0) return;
  const edits = ids.map((id): SchemeEdit => ({ kind: 'remove', list, id }));
  const name = text.removeName(ids.length, text.one[kind]);
  if (performEdit({ kind: 'together', edits, name }).length === 0) selectNothing();
}
