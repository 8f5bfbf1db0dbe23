import { dimSeen, makeDimming } from './crown-light.ts';
import { type LightColumns, lightOnPlane, makePlaneLight, type PlaneLight } from './exposure-light.ts';
import { hideSeen, listSeen, makeSkyline, raiseWalls, type Skyline, sumSeen } from './skyline.ts';
import { type Columns, makeColumns } from './skyline-columns.ts';
import { byNormal, type Receptors, visitReceptors } from './skyline-groups.ts';
import type { Occluders } from './skyline-occluders.ts';
import { makePatchScratch, type PatchScratch } from './skyline-patch-trace.ts';
import { hidePatches } from './skyline-patches.ts';
import { makeShelter, type Shelter } from './skyline-shelter.ts';

/** Sun on each receptor: columns, one row a receptor. */
export type SunOnReceptors = {
  /** What the samples that are seen add up to [min]. */
  readonly minutes: Float64Array;
  /** Beam on the receptor's plane [Wh/m²]. */
  readonly beam: Float64Array;
  /** 1 where the receptor lies inside a solid, and so sees nothing. */
  readonly covered: Uint8Array;
};

/** Something else that may stand before a receptor: asked of each sample that the occluders leave. See `mesh/`. */
export type Hider = (x: number, y: number, z: number, sx: number, sy: number, sz: number) => boolean;

/**
 * Sun time and beam on receptors, each sample exactly hidden or seen (see `skyline.ts`), and where it passes crowns of trees
 * counted with what comes through in its month. The result of a receptor does not
 * depend on which others are asked for, so any cut of a long list gives the same numbers.
 * @param from, to  rows to work out, `to` exclusive
 * @param hider     what the occluders do not hold
 */
export function sunOnReceptors(
  o: Occluders,
  light: LightColumns,
  r: Receptors,
  from = 0,
  to = r.x.length,
  hider: Hider | null = null,
): SunOnReceptors {
  const out: SunOnReceptors = {
    minutes: new Float64Array(to - from),
    beam: new Float64Array(to - from),
    covered: new Uint8Array(to - from),
  };
  const sums = new Float64Array(2);
  const room = takeRoom(o, light);
  const dimming = o.crowns.count > 0 ? makeDimming(light.sx.length) : null;
  for (const rows of byNormal(r, from, to)) {
    eachSkyline(room, o, light, r, rows, hider, (row, s) => {
      if (s === null) out.covered[row - from] = 1;
      else {
        sumSeen(s, sums, 0);
        if (dimming !== null) {
          const normal = [r.nx[row]!, r.ny[row]!, r.nz[row]!] as const;
          dimSeen(s, dimming, o.crowns, normal, r.x[row]!, r.y[row]!, r.z[row]!, sums);
        }
        out.minutes[row - from] = sums[0]!;
        out.beam[row - from] = sums[1]!;
      }
    });
  }
  rooms.set(light, room);
  return out;
}

/** Which samples of the light no solid and no device hides from one receptor: 1 or 0 for each row of the light before it was sorted. */
export function seenSamples(
  o: Occluders,
  light: LightColumns,
  r: Receptors,
  row: number,
  hider: Hider | null = null,
): Uint8Array {
  const seen = new Uint8Array(light.sx.length);
  eachSkyline(makeRoom(o, light), o, light, r, Uint32Array.of(row), hider, (_, s) => {
    if (s !== null) listSeen(s, seen);
  });
  return seen;
}

/** Working memory for the skylines of any number of planes. */
type Room = {
  readonly walls: number;
  readonly columns: Columns;
  readonly plane: PlaneLight;
  readonly skyline: Skyline;
  readonly patches: PatchScratch;
  readonly shelter: Shelter;
};

function makeRoom(o: Occluders, light: LightColumns): Room {
  const columns = makeColumns(light.count);
  const plane = makePlaneLight(light);
  return {
    walls: o.wallSolid.length,
    columns,
    plane,
    skyline: makeSkyline(plane, columns, o.wallSolid.length),
    patches: makePatchScratch(light.count),
    shelter: makeShelter(light.count),
  };
}

/** Rooms that lie idle: tiles of one map come one after the other, and each would else leave megabytes behind. */
const rooms = new WeakMap<LightColumns, Room>();

/** A room for one call, out of the idle ones where one is wide enough; nobody else gets it until it is put back. */
function takeRoom(o: Occluders, light: LightColumns): Room {
  const idle = rooms.get(light);
  rooms.delete(light);
  return idle !== undefined && idle.walls >= o.wallSolid.length ? idle : makeRoom(o, light);
}

/** Works out the skyline of receptors of one plane, one after the other in the same memory; null inside a solid. */
function eachSkyline(
  { columns, plane, skyline, patches, shelter }: Room,
  o: Occluders,
  light: LightColumns,
  r: Receptors,
  rows: Uint32Array,
  hider: Hider | null,
  done: (row: number, s: Skyline | null) => void,
): void {
  const first = rows[0]!;
  lightOnPlane(plane, light, [r.nx[first]!, r.ny[first]!, r.nz[first]!]);
  visitReceptors(o, columns, plane.lowest, r, rows, (row, list) => {
    if (list === null) {
      done(row, null);
      return;
    }
    const x = r.x[row]!;
    const y = r.y[row]!;
    const z = r.z[row]!;
    raiseWalls(skyline, list.walls, list.wallCount, x, y, z);
    if (list.patchCount > 0) hidePatches(skyline, patches, shelter, o, list.patchId, list.patchCount, x, y, z);
    if (hider !== null) hideSeen(skyline, (sx, sy, sz) => hider(x, y, z, sx, sy, sz));
    done(row, skyline);
  });
}
