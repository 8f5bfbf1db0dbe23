import { glazingToWall } from '../../core/form/glazing-share.ts';
import type { Model, RoomForm, Solid, WallForm, WindowForm } from '../../core/form/model.ts';
import { signedArea } from '../../core/plane/ring.ts';
import type { Block, Device, Room, Scheme, Window } from '../../core/scheme/schema.ts';
import { widthForShare } from '../../core/scheme/window-share.ts';
import { bearing, fixed, percent } from '../ui/format.ts';
import { words } from '../words/words.ts';
import { area, type Column, choice, head, ids, length, named, number, type Schedule, text } from './columns.ts';
import { shortDevice } from './stock-columns.ts';

export type BlockRow = { readonly id: string; readonly block: Block; readonly solid: Solid | undefined };

export function blockSchedule(scheme: Scheme, model: Model): Schedule<BlockRow> {
  const solids = new Map(model.solids.map((s) => [s.id, s]));
  return {
    kind: 'block',
    list: 'blocks',
    rows: scheme.blocks.map((block) => ({ id: block.id, block, solid: solids.get(block.id) })),
    columns: [
      { key: 'id', head: head.id, value: (r) => r.id, ...text('id', (r: BlockRow) => r.id) },
      { key: 'name', head: head.name, value: (r) => r.block.name, ...text('name', (r: BlockRow) => r.block.name) },
      {
        key: 'standing',
        head: head.standing,
        value: (r) => words.massing.standing[r.block.standing],
        ...choice('standing', (r: BlockRow) => r.block.standing, named(words.massing.standing)),
      },
      {
        key: 'base',
        head: head.base,
        unit: 'm',
        value: (r) => r.block.base,
        write: length,
        ...number('base', (r: BlockRow) => r.block.base),
      },
      {
        key: 'height',
        head: head.height,
        unit: 'm',
        value: (r) => r.block.height,
        write: length,
        ...number('height', (r: BlockRow) => r.block.height),
      },
      ...boxColumns((r: BlockRow) => r.block.box ?? null),
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

/** Width and depth of what was drawn as a box; what was drawn as an outline has neither. */
const boxColumns = <R>(boxOf: (row: R) => { readonly width: number; readonly depth: number } | null): Column<R>[] =>
  (['width', 'depth'] as const).map((field) => ({
    key: field,
    head: head[field],
    unit: 'm',
    value: (row) => boxOf(row)?.[field] ?? null,
    write: length,
    ...number(`box.${field}`, (row: R) => boxOf(row)?.[field] ?? null),
  }));

export type RoomRow = {
  readonly id: string;
  readonly room: Room;
  readonly form: RoomForm | undefined;
  readonly windows: readonly WindowForm[];
  readonly glazing_m2: number;
};

export function roomSchedule(scheme: Scheme, model: Model): Schedule<RoomRow> {
  const forms = new Map(model.rooms.map((r) => [r.id, r]));
  const windows = new Map<string, WindowForm[]>(scheme.rooms.map((room) => [room.id, []]));
  for (const w of model.windows) windows.get(w.room)?.push(w);
  return {
    kind: 'room',
    list: 'rooms',
    rows: scheme.rooms.map((room) => {
      const own = windows.get(room.id) ?? [];
      const glazing_m2 = own.reduce((sum, w) => sum + w.opening_m2, 0);
      return { id: room.id, room, form: forms.get(room.id), windows: own, glazing_m2 };
    }),
    columns: [
      { key: 'id', head: head.id, value: (r) => r.id, ...text('id', (r: RoomRow) => r.id) },
      { key: 'name', head: head.name, value: (r) => r.room.name, ...text('name', (r: RoomRow) => r.room.name) },
      {
        key: 'use',
        head: head.use,
        value: (r) => words.schedule.uses[r.room.use],
        ...choice('use', (r: RoomRow) => r.room.use, named(words.schedule.uses)),
      },
      {
        key: 'block',
        head: head.block,
        value: (r) => r.room.block,
        ...choice('block', (r: RoomRow) => r.room.block, ids(scheme.blocks)),
      },
      {
        key: 'floor',
        head: head.floor,
        unit: 'm',
        value: (r) => r.room.floor,
        write: length,
        ...number('floor', (r: RoomRow) => r.room.floor),
      },
      {
        key: 'height',
        head: head.height,
        unit: 'm',
        value: (r) => r.room.height,
        write: length,
        ...number('height', (r: RoomRow) => r.room.height),
      },
      ...boxColumns((r: RoomRow) => r.room.box ?? null),
      { key: 'area', head: head.area, unit: 'm²', value: (r) => r.form?.floor_m2 ?? null, write: area },
      { key: 'glazing', head: head.openings, unit: 'm²', value: (r) => r.glazing_m2, write: area },
      {
        key: 'share',
        head: head.share,
        value: (r) => (r.form ? r.glazing_m2 / r.form.floor_m2 : null),
        write: percent,
      },
      {
        key: 'wallShare',
        head: head.wallShare,
        value: (r) => (r.form ? glazingToWall(r.form, r.windows) : null),
        write: percent,
      },
    ],
  };
}

export type WindowRow = {
  readonly id: string;
  readonly window: Window;
  readonly form: WindowForm | undefined;
  /** The side of its wall that the room sees; absent for a rooflight. */
  readonly wall: WallForm | undefined;
};

/** A width that is typed as a share of the wall: the window is set in the middle of it. */
const shareOfWall = ({ window, wall }: WindowRow, share: number): { readonly [field: string]: unknown } | null =>
  wall === undefined ? null : widthForShare(share, window.height, wall.width_m, wall.height_m);

/** @param sunlit share of each window's glass in direct sun at the moment, by id */
export function windowSchedule(scheme: Scheme, model: Model, sunlit: ReadonlyMap<string, number>): Schedule<WindowRow> {
  const forms = new Map(model.windows.map((w) => [w.id, w]));
  const walls = new Map(model.rooms.map((room) => [room.id, room.walls]));
  const devices = new Map(scheme.devices.map((d) => [d.id, d]));
  return {
    kind: 'window',
    list: 'windows',
    rows: scheme.windows.map((window) => ({
      id: window.id,
      window,
      form: forms.get(window.id),
      wall: window.wall === undefined ? undefined : walls.get(window.room)?.[window.wall],
    })),
    columns: [
      { key: 'id', head: head.id, value: (r) => r.id, ...text('id', (r: WindowRow) => r.id) },
      {
        key: 'room',
        head: head.room,
        value: (r) => r.window.room,
        ...choice('room', (r: WindowRow) => r.window.room, ids(scheme.rooms)),
      },
      {
        key: 'wall',
        head: head.wall,
        value: (r) => r.window.wall ?? null,
        write: (v) => fixed(v, 0),
        ...number('wall', (r: WindowRow) => r.window.wall ?? null),
      },
      {
        key: 'faces',
        head: head.faces,
        value: (r) => r.form?.bearing_deg ?? null,
        write: (v, r) => (r.form?.tilt_deg === 0 ? words.schedule.roof : bearing(v)),
      },
      ...(['width', 'height', 'from', 'sill', 'reveal'] as const).map((field) => ({
        key: field,
        head: head[field],
        unit: 'm',
        value: (r: WindowRow) => r.window[field] ?? null,
        write: length,
        // A rooflight has no place along a wall.
        ...number(
          field,
          (r: WindowRow) =>
            r.window.wall === undefined && (field === 'from' || field === 'sill') ? null : (r.window[field] ?? null),
          field === 'width' ? shareOfWall : undefined,
        ),
      })),
      {
        key: 'glass',
        head: head.glass,
        value: (r) => r.window.glass,
        ...choice('glass', (r: WindowRow) => r.window.glass, ids(scheme.glass)),
      },
      {
        key: 'devices',
        head: head.devices,
        value: (r) =>
          r.window.devices.map((id) => (devices.get(id) ? shortDevice(devices.get(id) as Device) : id)).join(', ') ||
          null,
        edit: { field: 'devices', kind: 'list', typed: (r) => r.window.devices.join(', ') },
      },
      { key: 'sun', head: head.sunNow, value: (r) => sunlit.get(r.id) ?? null, write: percent },
    ],
  };
}
