import type { Model, RoomForm, Solid, WindowForm } from '../../core/form/model.ts';
import { signedArea } from '../../core/plane/ring.ts';
import type { Block, Device, Glass, Room, Scheme, Window } from '../../core/scheme/schema.ts';
import type { Kind } from '../state/selection.ts';
import { bearing, fixed, percent } from '../ui/format.ts';
import { words } from '../words/words.ts';

/** What a cell is worth: a number sorts as a number and stands to the right. */
export type Cell = string | number | null;

export type Column<Row> = {
  readonly key: string;
  readonly head: string;
  readonly unit?: string;
  readonly value: (row: Row) => Cell;
  /** How a number is written; text stands as it is. */
  readonly write?: (value: number, row: Row) => string;
};

/** A schedule's rows and columns, read from the scheme and its shapes. */
export type Schedule<Row extends { readonly id: string }> = {
  readonly kind: Kind;
  readonly rows: readonly Row[];
  readonly columns: readonly Column<Row>[];
};

const head = words.schedule.head;
const length = (v: number): string => fixed(v, 2);
const area = (v: number): string => fixed(v, 1);

export type BlockRow = { readonly id: string; readonly block: Block; readonly solid: Solid | undefined };

export function blockSchedule(scheme: Scheme, model: Model): Schedule<BlockRow> {
  const solids = new Map(model.solids.map((s) => [s.id, s]));
  return {
    kind: 'block',
    rows: scheme.blocks.map((block) => ({ id: block.id, block, solid: solids.get(block.id) })),
    columns: [
      { key: 'id', head: head.id, value: (r) => r.id },
      { key: 'name', head: head.name, value: (r) => r.block.name },
      { key: 'standing', head: head.standing, value: (r) => words.massing.standing[r.block.standing] },
      { key: 'base', head: head.base, unit: 'm', value: (r) => r.block.base, write: length },
      { key: 'height', head: head.height, unit: 'm', value: (r) => r.block.height, write: length },
      {
        key: 'area',
        head: head.area,
        unit: 'm²',
        value: (r) => (r.solid ? signedArea(r.solid.outline) : null),
        write: area,
      },
      { key: 'corners', head: head.corners, value: (r) => r.solid?.outline.length ?? null, write: (v) => fixed(v, 0) },
    ],
  };
}

export type RoomRow = {
  readonly id: string;
  readonly room: Room;
  readonly form: RoomForm | undefined;
  readonly glazing_m2: number;
};

export function roomSchedule(scheme: Scheme, model: Model): Schedule<RoomRow> {
  const forms = new Map(model.rooms.map((r) => [r.id, r]));
  const glazing = new Map<string, number>();
  for (const w of model.windows) glazing.set(w.room, (glazing.get(w.room) ?? 0) + w.opening_m2);
  return {
    kind: 'room',
    rows: scheme.rooms.map((room) => ({
      id: room.id,
      room,
      form: forms.get(room.id),
      glazing_m2: glazing.get(room.id) ?? 0,
    })),
    columns: [
      { key: 'id', head: head.id, value: (r) => r.id },
      { key: 'name', head: head.name, value: (r) => r.room.name },
      { key: 'use', head: head.use, value: (r) => words.schedule.uses[r.room.use] },
      { key: 'block', head: head.block, value: (r) => r.room.block },
      { key: 'floor', head: head.floor, unit: 'm', value: (r) => r.room.floor, write: length },
      { key: 'height', head: head.height, unit: 'm', value: (r) => r.room.height, write: length },
      { key: 'area', head: head.area, unit: 'm²', value: (r) => r.form?.floor_m2 ?? null, write: area },
      { key: 'glazing', head: head.openings, unit: 'm²', value: (r) => r.glazing_m2, write: area },
      {
        key: 'share',
        head: head.share,
        value: (r) => (r.form ? r.glazing_m2 / r.form.floor_m2 : null),
        write: percent,
      },
    ],
  };
}

export type WindowRow = { readonly id: string; readonly window: Window; readonly form: WindowForm | undefined };

/** @param sunlit share of each window's glass in direct sun at the moment, by id */
export function windowSchedule(scheme: Scheme, model: Model, sunlit: ReadonlyMap<string, number>): Schedule<WindowRow> {
  const forms = new Map(model.windows.map((w) => [w.id, w]));
  const devices = new Map(scheme.devices.map((d) => [d.id, d]));
  return {
    kind: 'window',
    rows: scheme.windows.map((window) => ({ id: window.id, window, form: forms.get(window.id) })),
    columns: [
      { key: 'id', head: head.id, value: (r) => r.id },
      { key: 'room', head: head.room, value: (r) => r.window.room },
      {
        key: 'faces',
        head: head.faces,
        value: (r) => r.form?.bearing_deg ?? null,
        write: (v, r) => (r.form?.tilt_deg === 0 ? words.schedule.roof : bearing(v)),
      },
      { key: 'width', head: head.width, unit: 'm', value: (r) => r.window.width, write: length },
      { key: 'height', head: head.height, unit: 'm', value: (r) => r.window.height, write: length },
      { key: 'sill', head: head.sill, unit: 'm', value: (r) => r.window.sill, write: length },
      { key: 'reveal', head: head.reveal, unit: 'm', value: (r) => r.window.reveal, write: length },
      { key: 'glass', head: head.glass, value: (r) => r.window.glass },
      {
        key: 'devices',
        head: head.devices,
        value: (r) =>
          r.window.devices.map((id) => (devices.get(id) ? shortDevice(devices.get(id) as Device) : id)).join(', ') ||
          null,
      },
      { key: 'sun', head: head.sunNow, value: (r) => sunlit.get(r.id) ?? null, write: percent },
    ],
  };
}

export function glassSchedule(scheme: Scheme): Schedule<Glass> {
  const used = new Map<string, number>();
  for (const w of scheme.windows) used.set(w.glass, (used.get(w.glass) ?? 0) + 1);
  return {
    kind: 'glass',
    rows: scheme.glass,
    columns: [
      { key: 'id', head: head.id, value: (r) => r.id },
      { key: 'name', head: head.name, value: (r) => r.name },
      { key: 'g', head: head.g, value: (r) => r.g, write: length },
      { key: 'u', head: head.u, unit: 'W/m²K', value: (r) => r.u, write: length },
      { key: 'light', head: head.light, value: (r) => r.light, write: length },
      { key: 'panes', head: head.panes, value: (r) => r.panes, write: (v) => fixed(v, 0) },
      { key: 'frame', head: head.frame, value: (r) => r.frame, write: percent },
      { key: 'used', head: head.usedBy, value: (r) => used.get(r.id) ?? 0, write: (v) => fixed(v, 0) },
    ],
  };
}

export function deviceSchedule(scheme: Scheme): Schedule<Device> {
  const used = new Map<string, number>();
  for (const id of scheme.windows.flatMap((w) => w.devices)) used.set(id, (used.get(id) ?? 0) + 1);
  return {
    kind: 'device',
    rows: scheme.devices,
    columns: [
      { key: 'id', head: head.id, value: (r) => r.id },
      { key: 'kind', head: head.kind, value: (r) => words.schedule.kinds[r.kind] },
      { key: 'depth', head: head.depth, unit: 'm', value: (r) => (r.kind === 'blind' ? null : r.depth), write: length },
      { key: 'size', head: head.size, value: sizeOf },
      { key: 'place', head: head.place, value: placeOf },
      { key: 'used', head: head.usedBy, value: (r) => used.get(r.id) ?? 0, write: (v) => fixed(v, 0) },
    ],
  };
}

const shortDevice = (d: Device): string =>
  d.kind === 'blind'
    ? `${words.schedule.kinds.blind} ${words.schedule.places[d.place]}`
    : d.kind === 'louvres'
      ? `${words.schedule.kinds.louvres} ${d.count}`
      : `${words.schedule.kinds[d.kind]} ${length(d.depth)}`;

function sizeOf(d: Device): string {
  if (d.kind === 'louvres') return `${d.count} × ${length(d.spacing)} m`;
  if (d.kind === 'blind') return `τ ${length(d.transmittance)}, ρ ${length(d.reflectance)}`;
  return d.kind === 'overhang' ? `${fixed(d.tilt, 0)}°` : `${length(d.gap)} m`;
}

function placeOf(d: Device): string {
  if (d.kind === 'fin') return words.schedule.sides[d.side];
  if (d.kind === 'blind') return words.schedule.places[d.place];
  if (d.kind === 'overhang') return words.schedule.above(length(d.above));
  return words.schedule.gap(length(d.gap));
}
