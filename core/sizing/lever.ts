import type { SchemeEdit } from '../scheme/edit.ts';
import type { Device, Glass, Scheme, Window } from '../scheme/schema.ts';

/** What can be changed to bring a room within: one lever at a time. */
export type LeverKind = 'overhang' | 'fins' | 'glass' | 'area' | 'blind';

/** A lever: how far it goes, in what unit, and the edit that sets it. */
export type Lever = {
  readonly kind: LeverKind;
  readonly unit: 'm' | '' | 'W/m²' | '%';
  /** The setting that changes nothing, and the one that goes furthest. Bisection runs between them. */
  readonly least: number;
  readonly most: number;
  /** The setting rounded towards `most`, so that what passed still passes. */
  readonly round: (amount: number) => number;
  /** The edit for an amount; null when it would change nothing. */
  readonly edit: (amount: number) => SchemeEdit | null;
};

/** How far each lever is tried. Common practice, no source: deeper than this is a balcony or another building. */
export const REACH = { overhang_m: 3, fins_m: 2, g: 0.15, area: 0.2, widen: 4, blind_Wm2: 50 } as const;

/** A new overhang: at the head, running on by this much on either side [m]. Common practice, no source. */
export const NEW_OVERHANG = { above: 0, left: 0.3, right: 0.3 } as const;
/** A new external blind: light fabric of the kind that data sheets show, closed above the amount. */
export const NEW_BLIND = { place: 'external', transmittance: 0.05, reflectance: 0.5 } as const;

/** Up to the next thousandth; to the next tenth of that below a fifth, so that rounding stays under half a percent. */
const roundUp = (x: number): number => {
  const grid = x >= 0.2 ? 1000 : 10_000;
  return Math.ceil(x * grid - 1e-9) / grid;
};
const roundDown = (x: number): number => {
  const grid = x >= 0.2 ? 1000 : 10_000;
  return Math.floor(x * grid + 1e-9) / grid;
};

/** An id that no entry of a list has yet. */
export function freeId(entries: readonly { readonly id: string }[], wanted: string): string {
  const used = new Set(entries.map((e) => e.id));
  const base = wanted.slice(0, 50);
  if (!used.has(base)) return base;
  let n = 2;
  while (used.has(`${base}-${n}`)) n++;
  return `${base}-${n}`;
}

const together = (edits: readonly SchemeEdit[], name: string): SchemeEdit | null =>
  edits.length === 0 ? null : { kind: 'together', edits, name };

const set = (list: 'windows' | 'devices', id: string, field: string, value: unknown): SchemeEdit => ({
  kind: 'set',
  list,
  id,
  field,
  value,
});

type DepthDevice = Extract<Device, { kind: 'overhang' | 'fin' }>;

/**
 * Edits that give every window a device of a kind at least so deep: its own deepened, a copy where others share it, a new one
 * where there is none. A window may be named whose device is deep enough already: it is left alone.
 */
function depthEdits(scheme: Scheme, windows: readonly Window[], kind: 'overhang' | 'fin', depth: number): SchemeEdit[] {
  const edits: SchemeEdit[] = [];
  const names = new Set(windows.map((w) => w.id));
  const devices = new Map(scheme.devices.map((d) => [d.id, d]));
  const shared = (id: string): boolean => scheme.windows.some((w) => !names.has(w.id) && w.devices.includes(id));
  const done = new Map<string, string>();
  let fresh: string | null = null;
  for (const w of windows) {
    const own = w.devices.map((id) => devices.get(id)).filter((d): d is DepthDevice => d?.kind === kind);
    if (own.some((d) => d.depth >= depth)) continue;
    const [first] = own;
    if (first && !shared(first.id)) {
      if (!done.has(first.id)) edits.push(set('devices', first.id, 'depth', depth));
      done.set(first.id, first.id);
      continue;
    }
    let id: string | undefined = first ? done.get(first.id) : (fresh ?? undefined);
    if (id === undefined) {
      const wanted = first ? `${first.id}-${w.id}` : `${kind}-${w.room}`;
      id = freeId(scheme.devices, wanted);
      const entry = first ? { ...first, id, depth } : newDevice(kind, id, depth);
      edits.push({ kind: 'add', list: 'devices', entry });
      if (first) done.set(first.id, id);
      else fresh = id;
    }
    const kept = w.devices.filter((d) => d !== first?.id);
    edits.push(set('windows', w.id, 'devices', [...kept, id]));
  }
  return edits;
}

const newDevice = (kind: 'overhang' | 'fin', id: string, depth: number): unknown =>
  kind === 'overhang' ? { id, kind, depth, ...NEW_OVERHANG } : { id, kind, side: 'both', depth };

const listed = (windows: readonly Window[]): string => windows.map((w) => w.id).join(', ');

/** Overhangs over wall windows. */
export const overhangLever = (scheme: Scheme, windows: readonly Window[]): Lever => ({
  kind: 'overhang',
  unit: 'm',
  least: 0,
  most: REACH.overhang_m,
  round: roundUp,
  edit: (depth) =>
    together(depthEdits(scheme, windows, 'overhang', depth), `overhang ${depth} m deep over ${listed(windows)}`),
});

/** Fins on both sides of wall windows. */
export const finLever = (scheme: Scheme, windows: readonly Window[]): Lever => ({
  kind: 'fins',
  unit: 'm',
  least: 0,
  most: REACH.fins_m,
  round: roundUp,
  edit: (depth) =>
    together(depthEdits(scheme, windows, 'fin', depth), `fins ${depth} m deep beside ${listed(windows)}`),
});

/** The glass with another g, its light falling in the same measure. */
export const darker = (glass: Glass, id: string, g: number): Glass => ({
  ...glass,
  id,
  name: `${glass.name} with g ${g}`.trim(),
  g,
  light: Math.round((glass.light * g * 1000) / glass.g) / 1000,
  source: `g asked for; light in proportion to ${glass.id}: find a product that has both`,
});

/** Glass of a lower g in all the windows named. */
export function glassLever(scheme: Scheme, windows: readonly Window[]): Lever {
  const glasses = scheme.glass.filter((g) => windows.some((w) => w.glass === g.id));
  return {
    kind: 'glass',
    unit: '',
    least: Math.max(...glasses.map((g) => g.g)),
    most: REACH.g,
    round: roundDown,
    edit: (g) => {
      const edits: SchemeEdit[] = [];
      for (const glass of glasses) {
        if (glass.g <= g) continue;
        const id = freeId(scheme.glass, `${glass.id}-g${g}`);
        edits.push({ kind: 'add', list: 'glass', entry: darker(glass, id, g) });
        for (const w of windows) if (w.glass === glass.id) edits.push(set('windows', w.id, 'glass', id));
      }
      return together(edits, `glass of g ${g} in ${listed(windows)}`);
    },
  };
}

/** Lengths of an edit, to a tenth of a millimetre: what a person can build is coarser, and the numbers stay short. */
const tidy = (x: number): number => Math.round(x * 1e4) / 1e4;

/**
 * Windows made narrower about their middles (or wider, where a limit asks for more), all in the same measure: the amount is
 * the share of the width that stays [%].
 */
export const areaLever = (windows: readonly Window[], wider: boolean): Lever => ({
  kind: 'area',
  unit: '%',
  least: 100,
  most: 100 * (wider ? REACH.widen : REACH.area),
  round: (x) => (wider ? Math.ceil(x * 10 - 1e-9) / 10 : Math.floor(x * 10 + 1e-9) / 10),
  edit: (percent) =>
    percent === 100
      ? null
      : together(
          windows.flatMap((w) => {
            const width = tidy((w.width * percent) / 100);
            const edits = [set('windows', w.id, 'width', width)];
            if (w.wall !== undefined) edits.push(set('windows', w.id, 'from', tidy(w.from + (w.width - width) / 2)));
            return edits;
          }),
          `${listed(windows)} ${percent} % as wide`,
        ),
});

/** External blinds, closed above an irradiance on the glass: the higher it is, the longer the view stays open. */
export const blindLever = (scheme: Scheme, windows: readonly Window[]): Lever => ({
  kind: 'blind',
  unit: 'W/m²',
  least: 1000,
  most: REACH.blind_Wm2,
  round: (x) => Math.floor(x * (x >= 200 ? 1 : 10) + 1e-9) / (x >= 200 ? 1 : 10),
  edit: (above) => {
    const bare = windows.filter((w) => !w.devices.some((id) => isExternalBlind(scheme, id)));
    if (bare.length === 0) return null;
    const id = freeId(scheme.devices, `blind-${(bare[0] as Window).room}`);
    const add: SchemeEdit = {
      kind: 'add',
      list: 'devices',
      entry: { id, kind: 'blind', ...NEW_BLIND, closedAbove: above },
    };
    const hang = bare.map((w) => set('windows', w.id, 'devices', [...w.devices, id]));
    return together([add, ...hang], `external blind on ${listed(bare)}, closed above ${above} W/m²`);
  },
});

function isExternalBlind(scheme: Scheme, id: string): boolean {
  const device = scheme.devices.find((d) => d.id === id);
  return device?.kind === 'blind' && device.place === 'external';
}
