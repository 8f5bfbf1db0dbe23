import type { Ring, Vec3 } from '../plane/vec.ts';
import type { Blind, Glass, Receptor, Room, Standing, Tree } from '../scheme/schema.ts';

/** Before: what stands now (existing, removed, context). After: what will stand (existing, proposed, context). */
export type Stage = 'before' | 'after';

/** A prism of the scheme: a block as it casts shadow. Heights in metres of the drawing's z. */
export type Solid = {
  readonly id: string;
  readonly name: string;
  readonly standing: Standing;
  /** Anticlockwise. */
  readonly outline: Ring;
  /** The outline cut into convex anticlockwise pieces, once, so that every test downstream works on convex prisms. */
  readonly pieces: readonly Ring[];
  readonly base_m: number;
  readonly top_m: number;
};

/** A flat opaque convex thing near a window (overhang, fin, blade, reveal side): a polygon in drawing axes. */
export type Shader = {
  readonly device: string;
  readonly kind: 'overhang' | 'fin' | 'louvres';
  readonly corners: readonly Vec3[];
};

/** A rectangle in drawing axes: `origin` its lower left corner seen from outside, `right` and `up` unit vectors in it. */
export type Panel = {
  readonly origin: Vec3;
  readonly right: Vec3;
  readonly up: Vec3;
  /** Outward unit normal: right × up. */
  readonly normal: Vec3;
  readonly width_m: number;
  readonly height_m: number;
};

export type WindowForm = Panel & {
  readonly id: string;
  readonly room: string;
  readonly block: string;
  /** The opening stands in the face of the wall (`origin`); the glass lies `reveal_m` behind it, same size. */
  readonly reveal_m: number;
  readonly opening_m2: number;
  /** Opening less frame. */
  readonly glass_m2: number;
  readonly glass: Glass;
  readonly shaders: readonly Shader[];
  readonly blinds: readonly Blind[];
  /** True azimuth of the outward normal [°, 0..360); 0 for a rooflight. */
  readonly bearing_deg: number;
  /** 90 for a wall window, 0 for a rooflight. */
  readonly tilt_deg: number;
  /** Place in the scheme file, such as `windows[4]`. */
  readonly place: string;
};

export type WallForm = Panel & {
  readonly room: string;
  readonly wall: number;
  readonly area_m2: number;
  readonly bearing_deg: number;
  /** Whether it lies on an outside face of its block. */
  readonly outside: boolean;
};

export type RoomForm = {
  readonly id: string;
  readonly name: string;
  readonly use: Room['use'];
  readonly block: string;
  readonly outline: Ring;
  readonly floor_m: number;
  readonly height_m: number;
  readonly floor_m2: number;
  readonly volume_m3: number;
  readonly walls: readonly WallForm[];
  /** Ids of its windows, in the order of the scheme. */
  readonly windows: readonly string[];
  readonly place: string;
};

export type ReceptorForm = Receptor & {
  readonly place: string;
  /** For a neighbour's window: its panel. */
  readonly panel?: Panel;
};

/** The scheme as shapes: derived, never saved, never edited. */
export type Model = {
  /** True north, radians clockwise from +y: a true azimuth A lies at the drawing bearing A + north. */
  readonly north_rad: number;
  readonly solids: readonly Solid[];
  readonly windows: readonly WindowForm[];
  readonly rooms: readonly RoomForm[];
  readonly receptors: readonly ReceptorForm[];
  readonly trees: readonly Tree[];
  readonly boundary: Ring | null;
  /** Smallest box round everything drawn [minX, minY, maxX, maxY], metres. */
  readonly extent: readonly [number, number, number, number];
};
