import { contains, distanceToOutline } from '../plane/ring.ts';
import type { Point, Ring } from '../plane/vec.ts';
import { DRAWN_m } from '../units/tolerance.ts';
import type { Fault } from './fault.ts';
import { outlineOf } from './outline.ts';
import type { Block, Device, Room, Scheme, Window } from './schema.ts';

const fault = (level: Fault['level'], code: string, place: string, message: string, cure: string): Fault => ({
  level,
  code,
  place,
  message,
  cure,
});
const m = (value: number): string => `${+value.toFixed(3)} m`;

/** Whether the edge from a to b runs along the outline of its block, so that what is beyond it is outside. */
function isOutside(a: Point, b: Point, block: Ring): boolean {
  return [0.02, 0.5, 0.98].every(
    (t) => distanceToOutline(block, a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])) <= DRAWN_m,
  );
}

function wallFaults(w: Window, place: string, room: Room, ring: Ring, block: Ring): Fault[] {
  const wall = w.wall as number;
  if (wall >= ring.length) {
    return [
      fault(
        'error',
        'unknown-wall',
        `${place}.wall`,
        `room ${JSON.stringify(room.id)} has walls 0 to ${ring.length - 1}, got ${wall}`,
        'choose one of them',
      ),
    ];
  }
  const a = ring[wall] as Point;
  const b = ring[(wall + 1) % ring.length] as Point;
  const run = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const faults: Fault[] = [];
  if (w.from < -DRAWN_m || w.from + w.width > run + DRAWN_m) {
    faults.push(
      fault(
        'error',
        'window-outside-wall',
        place,
        `the window runs from ${m(w.from)} to ${m(w.from + w.width)} along a wall of ${m(run)}`,
        'change from or width so that it fits the wall',
      ),
    );
  }
  if (w.sill < -DRAWN_m || w.sill + w.height > room.height + DRAWN_m) {
    faults.push(
      fault(
        'error',
        'window-outside-wall',
        place,
        `the window stands from ${m(w.sill)} to ${m(w.sill + w.height)} above the floor of a room of ${m(room.height)}`,
        'change sill or height so that it fits the wall',
      ),
    );
  }
  if (faults.length === 0 && !isOutside(a, b, block)) {
    faults.push(
      fault(
        'error',
        'inside-wall',
        `${place}.wall`,
        `wall ${wall} of room ${JSON.stringify(room.id)} does not lie on the outside of its block`,
        'put the window in an outside wall, or draw the room up to the face of the block',
      ),
    );
  }
  return faults;
}

function roofFaults(w: Window, place: string, room: Room, ring: Ring, block: Block): Fault[] {
  const at = w.roof as NonNullable<Window['roof']>;
  const corners = outlineOf({ box: { at: at.at, width: w.width, depth: w.height, turn: at.turn } });
  const faults: Fault[] = [];
  if (!corners.every((c) => contains(ring, c[0], c[1]) || distanceToOutline(ring, c[0], c[1]) <= DRAWN_m)) {
    faults.push(
      fault(
        'error',
        'window-outside-wall',
        `${place}.roof`,
        `the rooflight reaches outside room ${JSON.stringify(room.id)}`,
        'move it inside the outline of its room',
      ),
    );
  }
  const top = block.base + block.height;
  const cover = top - room.floor - room.height;
  if (cover > 1.5) {
    faults.push(
      fault(
        'error',
        'no-roof',
        `${place}.roof`,
        `there are ${m(cover)} of block above room ${JSON.stringify(room.id)}, so it has no roof of its own`,
        'put the rooflight in a room of the top storey',
      ),
    );
  }
  return faults;
}

/** Windows of one wall that lie over each other. */
function overlaps(scheme: Scheme): Fault[] {
  const faults: Fault[] = [];
  const byWall = new Map<string, number[]>();
  scheme.windows.forEach((w, i) => {
    if (w.wall === undefined) return;
    const key = `${w.room}\u0000${w.wall}`;
    byWall.set(key, [...(byWall.get(key) ?? []), i]);
  });
  for (const list of byWall.values()) {
    const sorted = [...list].sort((p, q) => (scheme.windows[p] as Window).from - (scheme.windows[q] as Window).from);
    sorted.forEach((i, k) => {
      const a = scheme.windows[i] as Window;
      for (const j of sorted.slice(k + 1)) {
        const b = scheme.windows[j] as Window;
        if (b.from >= a.from + a.width - DRAWN_m) break;
        if (b.sill < a.sill + a.height - DRAWN_m && a.sill < b.sill + b.height - DRAWN_m) {
          faults.push(
            fault(
              'error',
              'windows-overlap',
              `windows[${Math.max(i, j)}]`,
              `it overlaps window ${JSON.stringify((i < j ? a : b).id)} on the same wall`,
              'move one of them, or make it smaller',
            ),
          );
        }
      }
    });
  }
  return faults;
}

/** Devices that one window carries twice: both would be built in the same place. */
function deviceFaults(w: Window, place: string, devices: ReadonlyMap<string, Device>): Fault[] {
  const kinds = w.devices.map((id) => devices.get(id)).filter((d): d is Device => d !== undefined);
  const faults: Fault[] = [];
  for (const kind of ['overhang', 'louvres', 'blind'] as const) {
    const same = kinds.filter((d) => d.kind === kind);
    if (same.length > 1)
      faults.push(
        fault(
          'warning',
          'devices-overlap',
          `${place}.devices`,
          `it carries ${same.length} devices of the kind ${kind}: ${same.map((d) => d.id).join(', ')}`,
          kind === 'blind' ? 'keep one; only the first is used' : 'keep one, or check that both are meant',
        ),
      );
  }
  const fins = kinds.filter((d) => d.kind === 'fin');
  const sides = fins.flatMap((d) => (d.side === 'both' ? ['left', 'right'] : [d.side]));
  if (new Set(sides).size < sides.length)
    faults.push(
      fault(
        'warning',
        'devices-overlap',
        `${place}.devices`,
        `it carries more than one fin on the same side: ${fins.map((d) => d.id).join(', ')}`,
        'keep one a side, or check that both are meant',
      ),
    );
  return faults;
}

/** Windows outside their wall, in an inside wall, in a roof that is not there, or over each other. */
export function checkWindows(
  scheme: Scheme,
  roomRings: readonly Ring[],
  blockRings: ReadonlyMap<string, Ring>,
): Fault[] {
  const faults: Fault[] = [];
  const rooms = new Map(scheme.rooms.map((room, i) => [room.id, { room, ring: roomRings[i] as Ring }]));
  const blocks = new Map(scheme.blocks.map((block) => [block.id, block]));
  const devices = new Map(scheme.devices.map((device) => [device.id, device]));
  scheme.windows.forEach((w, i) => {
    const { room, ring } = rooms.get(w.room) as { room: Room; ring: Ring };
    const place = `windows[${i}]`;
    if (w.roof) faults.push(...roofFaults(w, place, room, ring, blocks.get(room.block) as Block));
    else faults.push(...wallFaults(w, place, room, ring, blockRings.get(room.block) as Ring));
    faults.push(...deviceFaults(w, place, devices));
  });
  scheme.receptors.forEach((r, i) => {
    if (r.kind !== 'window') return;
    const ring = blockRings.get(r.block) as Ring;
    const place = `receptors[${i}]`;
    if (r.wall >= ring.length) {
      faults.push(
        fault(
          'error',
          'unknown-wall',
          `${place}.wall`,
          `block ${JSON.stringify(r.block)} has walls 0 to ${ring.length - 1}, got ${r.wall}`,
          'choose one of them',
        ),
      );
      return;
    }
    const a = ring[r.wall] as Point;
    const b = ring[(r.wall + 1) % ring.length] as Point;
    const run = Math.hypot(b[0] - a[0], b[1] - a[1]);
    const high = (blocks.get(r.block) as Block).height;
    if (
      r.from < -DRAWN_m ||
      r.from + r.width > run + DRAWN_m ||
      r.sill < -DRAWN_m ||
      r.sill + r.height > high + DRAWN_m
    ) {
      faults.push(
        fault(
          'error',
          'window-outside-wall',
          place,
          `the window does not fit wall ${r.wall} of block ${JSON.stringify(r.block)}, which is ${m(run)} long and ${m(high)} high`,
          'change from, sill, width or height',
        ),
      );
    }
  });
  return [...faults, ...overlaps(scheme)];
}
