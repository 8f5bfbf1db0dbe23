import { contains, crossingEdges, distanceToOutline, signedArea } from '../plane/ring.ts';
import type { Point, Ring } from '../plane/vec.ts';
import { DRAWN_m, SAME_POINT_m } from '../units/tolerance.ts';
import { checkWindows } from './check-windows.ts';
import type { Fault } from './fault.ts';
import { outlineOf } from './outline.ts';
import type { Block, Room, Scheme } from './schema.ts';

/** A site wider than this is refused: beyond it a flat drawing no longer stands for the Earth to the accuracy we print. */
export const WIDEST_SITE_m = 20_000;

const fault = (level: Fault['level'], code: string, place: string, message: string, cure: string): Fault => ({
  level,
  code,
  place,
  message,
  cure,
});

/** What is wrong with an outline as drawn: a repeated corner, edges that cross, or no area. */
function outlineFaults(ring: Ring, place: string): Fault[] {
  for (let i = 0; i < ring.length; i++) {
    const a = ring[i] as Point;
    const b = ring[(i + 1) % ring.length] as Point;
    if (Math.hypot(b[0] - a[0], b[1] - a[1]) <= SAME_POINT_m) {
      const other = (i + 1) % ring.length;
      return [
        fault(
          'error',
          'repeated-corner',
          place,
          `corners ${i} and ${other} are the same point`,
          'leave one out; an outline closes by itself',
        ),
      ];
    }
  }
  const crossing = crossingEdges(ring);
  if (crossing)
    return [
      fault(
        'error',
        'self-crossing',
        place,
        `the outline crosses or touches itself: edge ${crossing[0]} meets edge ${crossing[1]}`,
        'put the corners in order round the outline',
      ),
    ];
  if (Math.abs(signedArea(ring)) < 1e-4)
    return [
      fault(
        'error',
        'no-area',
        place,
        'the outline has no area',
        'draw it with at least three corners that are not in a line',
      ),
    ];
  return [];
}

/** Whether every corner of one ring lies in another, or on its outline. */
function liesIn(inner: Ring, outer: Ring): boolean {
  const near = (x: number, y: number) => contains(outer, x, y) || distanceToOutline(outer, x, y) <= DRAWN_m;
  return inner.every((p, i) => {
    const q = inner[(i + 1) % inner.length] as Point;
    return near(p[0], p[1]) && near((p[0] + q[0]) / 2, (p[1] + q[1]) / 2);
  });
}

function roomFaults(room: Room, place: string, block: Block, blockRing: Ring): Fault[] {
  const faults: Fault[] = [];
  const name = JSON.stringify(block.id);
  if (!liesIn(outlineOf(room), blockRing))
    faults.push(
      fault(
        'error',
        'room-outside-block',
        place,
        `the room reaches outside block ${name}`,
        'draw it inside the outline of its block, or name the block it is in',
      ),
    );
  const top = block.base + block.height;
  if (room.floor < block.base - DRAWN_m || room.floor + room.height > top + DRAWN_m) {
    faults.push(
      fault(
        'error',
        'room-outside-block',
        `${place}.floor`,
        `the room stands from ${room.floor} to ${+(room.floor + room.height).toFixed(3)} m, block ${name} from ${block.base} to ${+top.toFixed(3)} m`,
        'change floor or height so that the room is inside its block',
      ),
    );
  }
  return faults;
}

/** Rooms of one block whose volumes share more than a sliver: their floor and sun would count twice. */
function overlappingRooms(scheme: Scheme, rings: readonly Ring[]): Fault[] {
  const faults: Fault[] = [];
  const box = rings.map((ring) => {
    const xs = ring.map((p) => p[0]);
    const ys = ring.map((p) => p[1]);
    return [Math.min(...xs), Math.min(...ys), Math.max(...xs), Math.max(...ys)] as const;
  });
  for (let i = 0; i < rings.length && faults.length < 50; i++) {
    for (let j = i + 1; j < rings.length; j++) {
      const a = scheme.rooms[i] as Room;
      const b = scheme.rooms[j] as Room;
      const [p, q] = [box[i], box[j]] as [readonly number[], readonly number[]];
      if ((p[2] as number) <= (q[0] as number) + DRAWN_m || (q[2] as number) <= (p[0] as number) + DRAWN_m) continue;
      if ((p[3] as number) <= (q[1] as number) + DRAWN_m || (q[3] as number) <= (p[1] as number) + DRAWN_m) continue;
      if (a.block !== b.block || a.floor + a.height <= b.floor + DRAWN_m || b.floor + b.height <= a.floor + DRAWN_m)
        continue;
      const inside = (inner: Ring, outer: Ring) =>
        inner.some((c) => contains(outer, c[0], c[1]) && distanceToOutline(outer, c[0], c[1]) > DRAWN_m);
      if (inside(rings[i] as Ring, rings[j] as Ring) || inside(rings[j] as Ring, rings[i] as Ring)) {
        faults.push(
          fault(
            'warning',
            'rooms-overlap',
            `rooms[${j}]`,
            `it shares space with room ${JSON.stringify(a.id)}`,
            'move one of them, or their floor counts twice',
          ),
        );
      }
    }
  }
  return faults;
}

/** Everything in the scheme that contradicts itself as geometry. References are known to be sound here. */
export function checkGeometry(scheme: Scheme): Fault[] {
  const faults: Fault[] = [];
  scheme.blocks.forEach((b, i) => {
    if (b.outline) faults.push(...outlineFaults(b.outline, `blocks[${i}].outline`));
    if (b.base + b.height <= 0)
      faults.push(
        fault(
          'warning',
          'under-ground',
          `blocks[${i}]`,
          'the block lies wholly under the ground and shades nothing above it',
          'check base and height',
        ),
      );
  });
  scheme.rooms.forEach((r, i) => {
    if (r.outline) faults.push(...outlineFaults(r.outline, `rooms[${i}].outline`));
  });
  scheme.receptors.forEach((r, i) => {
    if (r.kind === 'area') faults.push(...outlineFaults(r.outline, `receptors[${i}].outline`));
    if (r.kind === 'point' && Math.hypot(...r.normal) === 0)
      faults.push(
        fault(
          'error',
          'no-direction',
          `receptors[${i}].normal`,
          'the normal has no length',
          'write a direction, such as [0, 0, 1] for up',
        ),
      );
  });
  if (scheme.site.boundary) faults.push(...outlineFaults(scheme.site.boundary, 'site.boundary'));
  const corners = scheme.blocks.flatMap((b) => outlineOf(b));
  const spread = (axis: 0 | 1) => {
    let low = Infinity;
    let high = -Infinity;
    for (const c of corners) {
      low = Math.min(low, c[axis]);
      high = Math.max(high, c[axis]);
    }
    return high - low;
  };
  if (corners.length > 0 && Math.max(spread(0), spread(1)) > WIDEST_SITE_m) {
    faults.push(
      fault(
        'error',
        'too-wide',
        'blocks',
        `the blocks lie up to ${Math.round(Math.max(spread(0), spread(1)) / 1000)} km apart; this program takes sites up to ${WIDEST_SITE_m / 1000} km across`,
        'leave out what is too far away to shade the site, and draw near the origin',
      ),
    );
  }
  if (faults.some((f) => f.level === 'error')) return faults;

  const blocks = new Map(scheme.blocks.map((b) => [b.id, b]));
  const blockRings = new Map(scheme.blocks.map((b) => [b.id, outlineOf(b)]));
  const roomRings = scheme.rooms.map((r) => outlineOf(r));
  scheme.rooms.forEach((room, i) => {
    faults.push(
      ...roomFaults(room, `rooms[${i}]`, blocks.get(room.block) as Block, blockRings.get(room.block) as Ring),
    );
  });
  faults.push(...overlappingRooms(scheme, roomRings));
  faults.push(...checkWindows(scheme, roomRings, blockRings));
  return faults;
}
