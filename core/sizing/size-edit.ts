import { applyEdit, type SchemeEdit } from '../scheme/edit.ts';
import type { Scheme, Window } from '../scheme/schema.ts';
import { darker, freeId, NEW_OVERHANG } from './lever.ts';
import type { Swept } from './sweep.ts';

const hang = (window: Window, devices: readonly string[]): SchemeEdit => ({
  kind: 'set',
  list: 'windows',
  id: window.id,
  field: 'devices',
  value: devices,
});

/** Edits that give one window a device of a depth, and what hangs on the window then. Depth 0 takes the device off. */
function deviceEdits(
  scheme: Scheme,
  window: Window,
  kind: 'overhang' | 'fin',
  depth: number,
  hung: readonly string[],
): { readonly edits: readonly SchemeEdit[]; readonly hung: readonly string[] } {
  const own = scheme.devices.filter((d) => hung.includes(d.id) && d.kind === kind);
  if (depth === 0) return { edits: [], hung: hung.filter((id) => !own.some((d) => d.id === id)) };
  const [first] = own;
  if (first === undefined) {
    const id = freeId(scheme.devices, `${kind}-${window.id}`);
    const entry = kind === 'overhang' ? { id, kind, depth, ...NEW_OVERHANG } : { id, kind, side: 'both', depth };
    return { edits: [{ kind: 'add', list: 'devices', entry }], hung: [...hung, id] };
  }
  // Further devices of the kind would make two depths of one; a sweep has one.
  const others = hung.filter((id) => id === first.id || !own.some((d) => d.id === id));
  if (first.depth === depth) return { edits: [], hung: others };
  const isShared = scheme.windows.some((w) => w.id !== window.id && w.devices.includes(first.id));
  if (!isShared)
    return { edits: [{ kind: 'set', list: 'devices', id: first.id, field: 'depth', value: depth }], hung: others };
  const id = freeId(scheme.devices, `${first.id}-${window.id}`);
  return {
    edits: [{ kind: 'add', list: 'devices', entry: { ...first, id, depth } }],
    hung: others.map((other) => (other === first.id ? id : other)),
  };
}

function glassEdit(scheme: Scheme, window: Window, g: number): readonly SchemeEdit[] {
  const glass = scheme.glass.find((entry) => entry.id === window.glass);
  if (!glass) throw new RangeError(`the scheme holds no glass ${JSON.stringify(window.glass)}`);
  if (glass.g === g) return [];
  const id = freeId(scheme.glass, `${glass.id}-g${g}`);
  return [
    { kind: 'add', list: 'glass', entry: darker(glass, id, g) },
    { kind: 'set', list: 'windows', id: window.id, field: 'glass', value: id },
  ];
}

const NAMES: { readonly [S in Swept]: string } = {
  overhang: 'overhang',
  fins: 'fins',
  both: 'overhang and fins',
  glass: 'glass',
};

/** The edits for one window; none when it has the amount already. */
function editsOf(scheme: Scheme, window: Window, swept: Swept, amount: number): readonly SchemeEdit[] {
  if (swept === 'glass') return glassEdit(scheme, window, amount);
  const kinds = swept === 'both' ? (['overhang', 'fin'] as const) : ([swept === 'fins' ? 'fin' : 'overhang'] as const);
  const edits: SchemeEdit[] = [];
  let hung: readonly string[] = window.devices;
  for (const kind of kinds) {
    const next = deviceEdits(scheme, window, kind, amount, hung);
    edits.push(...next.edits);
    hung = next.hung;
  }
  if (hung.join('\n') !== window.devices.join('\n')) edits.push(hang(window, hung));
  return edits;
}

/**
 * The edit that sets what a sweep swept to one of its amounts, for the windows named and no others: their own devices made so
 * deep, a copy where other windows share one, a new one where there is none, none at depth 0; or glass of that g.
 * @param amount depth [m], or g
 * @returns null when the windows have it already
 * @throws {RangeError} when the scheme holds no such window
 */
export function sizeEdit(
  scheme: Scheme,
  windowIds: readonly string[],
  swept: Swept,
  amount: number,
): SchemeEdit | null {
  const edits: SchemeEdit[] = [];
  let now = scheme;
  for (const id of windowIds) {
    const window = now.windows.find((w) => w.id === id);
    if (!window) throw new RangeError(`the scheme holds no window ${JSON.stringify(id)}`);
    const own = editsOf(now, window, swept, amount);
    if (own.length === 0) continue;
    edits.push(...own);
    // Ids of new entries must be free in what stands by then; a step that is refused is refused again as a whole, with its faults.
    const next = applyEdit(now, { kind: 'together', edits: own, name: '' });
    if (next.ok) now = next.value;
  }
  if (edits.length === 0) return null;
  const listed = windowIds.join(', ');
  const name =
    swept === 'glass'
      ? `glass of g ${amount} in ${listed}`
      : `${NAMES[swept]} of ${listed} ${amount === 0 ? 'taken off' : `${amount} m deep`}`;
  return { kind: 'together', edits, name };
}
