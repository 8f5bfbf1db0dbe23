import type { z } from 'zod';
import type { Checked, Fault } from './fault.ts';
import { checkScheme } from './load.ts';
import { sayIssue } from './say-issue.ts';
import { Block, Device, Glass, Receptor, Room, Scheme, SheetSet, Tree, Window } from './schema.ts';

/** The lists of a scheme whose entries have ids and can be edited one by one. */
export const ENTRY_SCHEMAS = {
  blocks: Block,
  rooms: Room,
  windows: Window,
  glass: Glass,
  devices: Device,
  trees: Tree,
  receptors: Receptor,
  sheets: SheetSet,
} as const;
export type ListKey = keyof typeof ENTRY_SCHEMAS;

/**
 * A change of the scheme, as data: the desk, the command, ways to pass and tests all go through `applyEdit`, so that an edit
 * means the same wherever it comes from. Fields are named by path, such as `box.width` or `site.north`.
 */
export type SchemeEdit =
  | {
      readonly kind: 'set';
      readonly list: ListKey;
      readonly id: string;
      readonly field: string;
      readonly value: unknown;
    }
  /** A field of the scheme itself, such as `title` or `site.latitude`. */
  | { readonly kind: 'set-head'; readonly field: string; readonly value: unknown }
  | { readonly kind: 'add'; readonly list: ListKey; readonly entry: unknown; readonly at?: number }
  | { readonly kind: 'remove'; readonly list: ListKey; readonly id: string }
  /** Several as one step: all or none. */
  | { readonly kind: 'together'; readonly edits: readonly SchemeEdit[]; readonly name: string };

type Loose = { readonly [key: string]: unknown };
type Entry = Loose & { readonly id: string };

class Refusal extends Error {
  readonly faults: readonly Fault[];
  constructor(faults: readonly Fault[]) {
    super('refused');
    this.faults = faults;
  }
}
const refuse = (code: string, place: string, message: string, cure: string): never => {
  throw new Refusal([{ level: 'error', code, place, message, cure }]);
};

/** The object with one field set by path; undefined takes the field away. Everything off the path is shared. */
function withField(object: Loose, path: readonly string[], value: unknown): Loose {
  const [head, ...rest] = path as [string, ...string[]];
  if (head === '__proto__')
    return refuse('forbidden-key', head, 'a key named __proto__ is not allowed', 'choose another name');
  if (rest.length === 0) {
    if (value !== undefined) return { ...object, [head]: value };
    const { [head]: _gone, ...kept } = object;
    return kept;
  }
  const inner = object[head];
  const base: Loose = inner !== null && typeof inner === 'object' && !Array.isArray(inner) ? (inner as Loose) : {};
  return { ...object, [head]: withField(base, rest, value) };
}

function parsed<T>(schema: z.ZodType<T>, value: unknown, place: string): T {
  const read = schema.safeParse(value);
  if (read.success) return read.data;
  throw new Refusal(
    read.error.issues
      .flatMap((issue) => sayIssue(issue, value))
      .map((f) => ({ ...f, place: f.place === '' ? place : `${place}.${f.place}` })),
  );
}

const entriesOf = (scheme: Scheme, list: ListKey): readonly Entry[] => scheme[list] as readonly Entry[];
const withList = (scheme: Scheme, list: ListKey, entries: readonly Entry[]): Scheme =>
  ({ ...scheme, [list]: entries }) as Scheme;

function indexOf(scheme: Scheme, list: ListKey, id: string): number {
  const at = entriesOf(scheme, list).findIndex((e) => e.id === id);
  return at >= 0
    ? at
    : refuse('unknown-id', list, `there is no entry ${JSON.stringify(id)}`, 'it may have been removed');
}

/** What names an entry of a list: list and field, and whether the field holds several names. */
const REFERENCES: { readonly [L in ListKey]?: readonly (readonly [ListKey, string])[] } = {
  blocks: [
    ['rooms', 'block'],
    ['receptors', 'block'],
  ],
  rooms: [['windows', 'room']],
  glass: [['windows', 'glass']],
  devices: [['windows', 'devices']],
};

/** Every reference to an id gets its new name. */
function renamed(scheme: Scheme, list: ListKey, from: string, to: string): Scheme {
  let now = scheme;
  for (const [other, field] of REFERENCES[list] ?? []) {
    const swap = (value: unknown): unknown =>
      Array.isArray(value) ? value.map((v) => (v === from ? to : v)) : value === from ? to : value;
    now = withList(
      now,
      other,
      entriesOf(now, other).map((e) => {
        const next = swap(e[field]);
        const same = Array.isArray(next) ? !(e[field] as unknown[]).includes(from) : next === e[field];
        return same ? e : { ...e, [field]: next };
      }),
    );
  }
  return now;
}

function set(scheme: Scheme, edit: SchemeEdit & { kind: 'set' }): Scheme {
  const at = indexOf(scheme, edit.list, edit.id);
  const entries = entriesOf(scheme, edit.list);
  const old = entries[at] as Entry;
  const place = `${edit.list}[${at}]`;
  const next = parsed(
    ENTRY_SCHEMAS[edit.list] as z.ZodType<Entry>,
    withField(old, edit.field.split('.'), edit.value),
    place,
  );
  const changed = withList(
    scheme,
    edit.list,
    entries.map((e, i) => (i === at ? next : e)),
  );
  return next.id === old.id ? changed : renamed(changed, edit.list, old.id, next.id);
}

function setHead(scheme: Scheme, edit: SchemeEdit & { kind: 'set-head' }): Scheme {
  const path = edit.field.split('.');
  if (Object.hasOwn(ENTRY_SCHEMAS, path[0] as string)) throw new Error(`${edit.field} is edited entry by entry`);
  const next = withField(scheme, path, edit.value);
  // Lists are empty here so that only the head is validated again, and are put back as they were.
  const lists = Object.fromEntries(Object.keys(ENTRY_SCHEMAS).map((key) => [key, []]));
  const kept = Object.fromEntries(Object.keys(ENTRY_SCHEMAS).map((key) => [key, scheme[key]]));
  const read = Scheme.safeParse({ ...next, ...lists });
  if (!read.success) throw new Refusal(read.error.issues.flatMap((issue) => sayIssue(issue, next)));
  return { ...read.data, ...kept } as Scheme;
}

function add(scheme: Scheme, edit: SchemeEdit & { kind: 'add' }): Scheme {
  const entries = entriesOf(scheme, edit.list);
  const at = Math.min(Math.max(0, edit.at ?? entries.length), entries.length);
  const entry = parsed(ENTRY_SCHEMAS[edit.list] as z.ZodType<Entry>, edit.entry, `${edit.list}[${at}]`);
  return withList(scheme, edit.list, [...entries.slice(0, at), entry, ...entries.slice(at)]);
}

/** A block takes its rooms along, a room its windows; a device is taken off its windows; glass in use stays. */
function remove(scheme: Scheme, edit: SchemeEdit & { kind: 'remove' }): Scheme {
  const at = indexOf(scheme, edit.list, edit.id);
  let now = withList(
    scheme,
    edit.list,
    entriesOf(scheme, edit.list).filter((_, i) => i !== at),
  );
  if (edit.list === 'glass') {
    const user = scheme.windows.find((w) => w.glass === edit.id);
    if (user)
      refuse(
        'in-use',
        `glass[${at}]`,
        `window ${JSON.stringify(user.id)} has this glass`,
        'give its windows another glass first',
      );
  }
  if (edit.list === 'devices') {
    now = {
      ...now,
      windows: now.windows.map((w) =>
        w.devices.includes(edit.id) ? { ...w, devices: w.devices.filter((d) => d !== edit.id) } : w,
      ),
    };
  }
  if (edit.list === 'blocks') {
    const gone = new Set(now.rooms.filter((r) => r.block === edit.id).map((r) => r.id));
    now = {
      ...now,
      rooms: now.rooms.filter((r) => r.block !== edit.id),
      windows: now.windows.filter((w) => !gone.has(w.room)),
      receptors: now.receptors.filter((r) => r.kind !== 'window' || r.block !== edit.id),
    };
  }
  if (edit.list === 'rooms') now = { ...now, windows: now.windows.filter((w) => w.room !== edit.id) };
  return now;
}

function step(scheme: Scheme, edit: SchemeEdit): Scheme {
  switch (edit.kind) {
    case 'set':
      return set(scheme, edit);
    case 'set-head':
      return setHead(scheme, edit);
    case 'add':
      return add(scheme, edit);
    case 'remove':
      return remove(scheme, edit);
    case 'together':
      return edit.edits.reduce(step, scheme);
  }
}

/**
 * The scheme after an edit: a new value that shares what did not change. An edit whose result would contradict itself is
 * refused with every fault, and the scheme stays as it was.
 */
export function applyEdit(scheme: Scheme, edit: SchemeEdit): Checked<Scheme> {
  try {
    return checkScheme(step(scheme, edit));
  } catch (error) {
    if (error instanceof Refusal) return { ok: false, faults: error.faults };
    throw error;
  }
}

const ONE: { readonly [L in ListKey]: string } = {
  blocks: 'block',
  rooms: 'room',
  windows: 'window',
  glass: 'glass',
  devices: 'device',
  trees: 'tree',
  receptors: 'receptor',
  sheets: 'sheet',
};

/** The edit in a few words, to stand after "Undo": `width of window W3`. */
export function editName(edit: SchemeEdit): string {
  switch (edit.kind) {
    case 'set':
      return `${edit.field.split('.').at(-1)} of ${ONE[edit.list]} ${edit.id}`;
    case 'set-head':
      return `${edit.field.split('.').at(-1)} of the scheme`;
    case 'add':
      return `add ${ONE[edit.list]}`;
    case 'remove':
      return `remove ${ONE[edit.list]} ${edit.id}`;
    case 'together':
      return edit.name;
  }
}
