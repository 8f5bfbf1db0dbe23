import { convexPieces } from '../plane/convex-pieces.ts';
import { signedArea } from '../plane/ring.ts';
import type { Point, Ring } from '../plane/vec.ts';
import { outlineOf } from '../scheme/outline.ts';
import type { Block, Receptor, Room, Scheme, Window } from '../scheme/schema.ts';
import { toRadians } from '../units/angle.ts';
import { deviceShaders } from './device-shaders.ts';
import type { Model, Panel, ReceptorForm, RoomForm, Solid, WallForm, WindowForm } from './model.ts';
import { outsideFace } from './outside-face.ts';
import { edgeOf, roofPanel, trueBearing_deg, wallPanel } from './panel.ts';

/**
 * The scheme as shapes, in drawing axes.
 * @param scheme  a scheme that has passed its checks
 * @throws {RangeError} when it names a room, block, glass, device or wall that it does not hold
 */
export function buildModel(scheme: Scheme): Model {
  const solids = scheme.blocks.map(solidOf);
  const byId = new Map(solids.map((s) => [s.id, s]));
  const block = (id: string): Solid => need(byId.get(id), 'block', id);
  const windowIds = new Map<string, string[]>(scheme.rooms.map((r) => [r.id, []]));
  for (const w of scheme.windows) windowIds.get(w.room)?.push(w.id);
  const rooms = scheme.rooms.map((room, i) =>
    roomOf(room, windowIds.get(room.id) ?? [], `rooms[${i}]`, block(room.block), scheme.site.north),
  );
  return {
    north_rad: toRadians(scheme.site.north),
    solids,
    windows: windowsOf(scheme, rooms, block),
    rooms,
    receptors: scheme.receptors.map((r, i) => receptorOf(r, `receptors[${i}]`, block)),
    trees: scheme.trees,
    boundary: scheme.site.boundary ?? null,
    extent: extentOf(scheme, solids),
  };
}

function need<T>(found: T | undefined, what: string, id: string): T {
  if (found === undefined) throw new RangeError(`the scheme holds no ${what} ${JSON.stringify(id)}`);
  return found;
}

function solidOf(block: Block): Solid {
  const outline = outlineOf(block);
  return {
    id: block.id,
    name: block.name,
    standing: block.standing,
    outline,
    pieces: convexPieces(outline),
    base_m: block.base,
    top_m: block.base + block.height,
  };
}

function roomOf(room: Room, windows: readonly string[], place: string, block: Solid, north_deg: number): RoomForm {
  const outline = outlineOf(room);
  const floor_m2 = Math.abs(signedArea(outline));
  return {
    id: room.id,
    name: room.name,
    use: room.use,
    block: room.block,
    outline,
    floor_m: room.floor,
    height_m: room.height,
    floor_m2,
    volume_m3: floor_m2 * room.height,
    walls: outline.map((_, n) => wallOf(room, outline, n, block, north_deg)),
    windows,
    place,
  };
}

function wallOf(room: Room, outline: Ring, n: number, block: Solid, north_deg: number): WallForm {
  const edge = edgeOf(outline, n);
  const run = Math.hypot(edge.end[0] - edge.start[0], edge.end[1] - edge.start[1]);
  const panel = wallPanel(edge, 0, room.floor, run, room.height);
  return {
    ...panel,
    room: room.id,
    wall: n,
    area_m2: run * room.height,
    bearing_deg: trueBearing_deg(panel.normal, north_deg),
    outside: outsideFace(edge, block.outline) !== null,
  };
}

function windowsOf(scheme: Scheme, rooms: readonly RoomForm[], block: (id: string) => Solid): WindowForm[] {
  const byRoom = new Map(rooms.map((r) => [r.id, r]));
  const byGlass = new Map(scheme.glass.map((g) => [g.id, g]));
  const byDevice = new Map(scheme.devices.map((d) => [d.id, d]));
  return scheme.windows.map((w, i) => {
    const room = need(byRoom.get(w.room), 'room', w.room);
    const glass = need(byGlass.get(w.glass), 'glass', w.glass);
    const devices = w.devices.map((id) => need(byDevice.get(id), 'device', id));
    const panel = openingOf(w, room, block(room.block));
    const opening_m2 = w.width * w.height;
    return {
      ...panel,
      id: w.id,
      room: w.room,
      block: room.block,
      reveal_m: w.reveal,
      opening_m2,
      glass_m2: opening_m2 * (1 - glass.frame),
      glass,
      shaders: devices.flatMap((d) => deviceShaders(d, panel)),
      blinds: devices.filter((d) => d.kind === 'blind'),
      bearing_deg: w.roof ? 0 : trueBearing_deg(panel.normal, scheme.site.north),
      tilt_deg: w.roof ? 0 : 90,
      place: `windows[${i}]`,
    };
  });
}

/** The opening of a window: in the face of its block, or in the block's roof. */
function openingOf(w: Window, room: RoomForm, block: Solid): Panel {
  if (w.roof) return roofPanel(w.roof.at, w.roof.turn, block.top_m, w.width, w.height);
  const wall = edgeOf(room.outline, w.wall ?? -1);
  return wallPanel(outsideFace(wall, block.outline) ?? wall, w.from, room.floor_m + w.sill, w.width, w.height);
}

function receptorOf(r: Receptor, place: string, block: (id: string) => Solid): ReceptorForm {
  if (r.kind !== 'window') return { ...r, place };
  const on = block(r.block);
  return { ...r, place, panel: wallPanel(edgeOf(on.outline, r.wall), r.from, on.base_m + r.sill, r.width, r.height) };
}

/** Smallest box round blocks, rooms, trees, boundary and receptors; all zero for an empty scheme. */
function extentOf(scheme: Scheme, solids: readonly Solid[]): readonly [number, number, number, number] {
  let box: [number, number, number, number] | null = null;
  const add = (p: Point, round = 0): void => {
    const [x0, y0, x1, y1]: readonly number[] = box ?? [Infinity, Infinity, -Infinity, -Infinity];
    box = [
      Math.min(x0 as number, p[0] - round),
      Math.min(y0 as number, p[1] - round),
      Math.max(x1 as number, p[0] + round),
      Math.max(y1 as number, p[1] + round),
    ];
  };
  for (const s of solids) for (const p of s.outline) add(p);
  for (const room of scheme.rooms) for (const p of outlineOf(room)) add(p);
  for (const t of scheme.trees) add(t.at, t.spread / 2);
  for (const p of scheme.site.boundary ?? []) add(p);
  for (const r of scheme.receptors) {
    if (r.kind === 'point') add([r.at[0], r.at[1]]);
    if (r.kind === 'area') for (const p of r.outline) add(p);
  }
  return box ?? [0, 0, 0, 0];
}
