import type { Fault } from './fault.ts';
import {
  Block,
  Box,
  Device,
  Glass,
  Receptor,
  Room,
  Rooflight,
  Scheme,
  SheetSet,
  Site,
  Tree,
  Variant,
  Window,
} from './schema.ts';

/** A field further than this from every known one is taken for an addition of somebody's own, which is kept and not spoken of. */
const MOST_EDITS = 2;

/** Letters to add, drop, change or swap with their neighbour to come from one word to another, counted up to a bound. */
export function editsBetween(a: string, b: string, most: number): number {
  if (Math.abs(a.length - b.length) > most) return most + 1;
  let before: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const now = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = (last[j - 1] as number) + (a[i - 1] === b[j - 1] ? 0 : 1);
      let least = Math.min(change, (last[j] as number) + 1, (now[j - 1] as number) + 1);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        least = Math.min(least, (before[j - 2] as number) + 1);
      now.push(least);
    }
    [before, last] = [last, now];
  }
  return last[b.length] as number;
}

type Shape = { readonly shape: { readonly [field: string]: unknown } };
type Loose = { readonly [field: string]: unknown };

const fieldsOf = (schema: Shape): readonly string[] => Object.keys(schema.shape);

/** The fields of an entry of one of several kinds. */
function fieldsOfKind(schema: { readonly options: readonly unknown[] }, entry: Loose): readonly string[] {
  for (const option of schema.options as readonly Shape[]) {
    const kind = option.shape['kind'] as { readonly value?: unknown } | undefined;
    if (kind?.value === entry['kind']) return fieldsOf(option);
  }
  return [];
}

/** What an entry says that no field of its kind is called, but nearly. */
function nearly(entry: Loose, known: readonly string[], place: string): Fault[] {
  return Object.keys(entry).flatMap((field) => {
    if (known.length === 0 || known.includes(field)) return [];
    const near = known
      .filter((name) => !Object.hasOwn(entry, name) || entry[name] === undefined)
      .map((name) => ({ name, edits: editsBetween(field.toLowerCase(), name.toLowerCase(), MOST_EDITS) }))
      // Short words are near to each other by chance.
      .filter(({ name, edits }) => edits <= Math.min(MOST_EDITS, Math.floor(name.length / 3)))
      .sort((a, b) => a.edits - b.edits)[0];
    if (near === undefined) return [];
    const message = `no field is called ${JSON.stringify(field)}; it is kept, and means nothing to this program`;
    const cure = `write ${JSON.stringify(near.name)} if that was meant`;
    return [
      { level: 'warning', code: 'misspelt', place: place === '' ? field : `${place}.${field}`, message, cure } as const,
    ];
  });
}

/**
 * Fields of a file that look like misspelt ones. A file may hold fields of others, so that an unknown name alone is no fault; but
 * `"widht"` left unsaid would be a window of a width that nobody meant.
 * @param read the scheme as its file says it, before what is missing is filled in
 */
export function misspelt(read: Loose): readonly Fault[] {
  const entries = (list: string, fields: (entry: Loose) => readonly string[]): Fault[] => {
    const all = read[list];
    return Array.isArray(all) ? all.flatMap((entry: Loose, i) => nearly(entry, fields(entry), `${list}[${i}]`)) : [];
  };
  /** What stands inside the entries of a list, such as the boxes of its blocks. */
  const inside = (list: string, field: string, fields: readonly string[]): Fault[] => {
    const all = read[list];
    return Array.isArray(all)
      ? all.flatMap((entry: Loose, i) => nearly((entry[field] ?? {}) as Loose, fields, `${list}[${i}].${field}`))
      : [];
  };
  return [
    ...nearly(read, fieldsOf(Scheme), ''),
    ...nearly((read['site'] ?? {}) as Loose, fieldsOf(Site), 'site'),
    ...entries('blocks', () => fieldsOf(Block)),
    ...inside('blocks', 'box', fieldsOf(Box)),
    ...entries('rooms', () => fieldsOf(Room)),
    ...inside('rooms', 'box', fieldsOf(Box)),
    ...entries('windows', () => fieldsOf(Window)),
    ...inside('windows', 'roof', fieldsOf(Rooflight)),
    ...entries('glass', () => fieldsOf(Glass)),
    ...entries('devices', (entry) => fieldsOfKind(Device, entry)),
    ...entries('trees', () => fieldsOf(Tree)),
    ...entries('receptors', (entry) => fieldsOfKind(Receptor, entry)),
    ...entries('sheets', () => fieldsOf(SheetSet)),
    ...entries('variants', () => fieldsOf(Variant)),
  ];
}
