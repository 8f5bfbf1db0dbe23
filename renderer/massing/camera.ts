import { dot, type Point, type Vec3 } from '../../core/plane/vec.ts';

/**
 * The one camera of massing and plan: parallel projection, so that lengths can be read off the screen.
 * `turn_rad` is the drawing bearing that the viewer looks along, clockwise from +y; `tilt_rad` how far the view looks down,
 * π/2 for a plan.
 */
export type Camera = {
  readonly centre: Vec3;
  readonly turn_rad: number;
  readonly tilt_rad: number;
  /** Pixels a metre. */
  readonly scale: number;
};

export type Size = { readonly width: number; readonly height: number };
export const PLAN_rad = Math.PI / 2;
const LEAST_TILT_rad = 0.12;
const LEAST_SCALE = 0.02;
const MOST_SCALE = 400;

/** Unit vectors of the screen in drawing axes: to the right, upwards, and into the picture. */
export function axesOf({ turn_rad, tilt_rad }: Camera): { right: Vec3; up: Vec3; into: Vec3 } {
  const s = Math.sin(turn_rad);
  const c = Math.cos(turn_rad);
  const st = Math.sin(tilt_rad);
  const ct = Math.cos(tilt_rad);
  return { right: [c, -s, 0], up: [s * st, c * st, ct], into: [s * ct, c * ct, -st] };
}

/** Where a point of the drawing falls on the screen, from the top left [px]. */
export function project(camera: Camera, size: Size, p: Vec3): Point {
  const { right, up } = axesOf(camera);
  const d: Vec3 = [p[0] - camera.centre[0], p[1] - camera.centre[1], p[2] - camera.centre[2]];
  const x = d[0] * right[0] + d[1] * right[1] + d[2] * right[2];
  const y = d[0] * up[0] + d[1] * up[1] + d[2] * up[2];
  return [size.width / 2 + x * camera.scale, size.height / 2 - y * camera.scale];
}

/** The place at a height [m] that a point of the screen, from the top left [px], looks at. */
export function onLevel(camera: Camera, size: Size, x: number, y: number, level_m: number): Vec3 {
  const { right, up, into } = axesOf(camera);
  const across = (x - size.width / 2) / camera.scale;
  const upward = (size.height / 2 - y) / camera.scale;
  const at = (i: 0 | 1 | 2): number => camera.centre[i] + right[i] * across + up[i] * upward;
  const further = (level_m - at(2)) / into[2];
  return [at(0) + into[0] * further, at(1) + into[1] * further, level_m];
}

/** Turned and tilted by angles; never below the ground, never past straight down. */
export function orbit(camera: Camera, turn_rad: number, tilt_rad: number): Camera {
  const tilt = Math.min(PLAN_rad, Math.max(LEAST_TILT_rad, camera.tilt_rad + tilt_rad));
  return { ...camera, turn_rad: camera.turn_rad + turn_rad, tilt_rad: tilt };
}

/** Moved over the ground so that the drawing follows a hand that moved by (dx, dy) on the screen [px, y down]. */
export function pan(camera: Camera, dx: number, dy: number): Camera {
  const s = Math.sin(camera.turn_rad);
  const c = Math.cos(camera.turn_rad);
  const across = -dx / camera.scale;
  const away = dy / (camera.scale * Math.max(Math.sin(camera.tilt_rad), 0.2));
  const [x, y, z] = camera.centre;
  return { ...camera, centre: [x + c * across + s * away, y - s * across + c * away, z] };
}

/** Nearer (factor above 1) or farther, with the place on the ground under (x, y) staying where it is [px]. */
export function zoomAt(camera: Camera, size: Size, factor: number, x: number, y: number): Camera {
  const scale = Math.min(MOST_SCALE, Math.max(LEAST_SCALE, camera.scale * factor));
  const k = scale / camera.scale;
  const dx = x - size.width / 2;
  const dy = y - size.height / 2;
  return { ...pan({ ...camera, scale }, dx - dx * k, dy - dy * k) };
}

/** Room kept free round what is shown [px]: instruments stand there. */
export type Margins = { readonly top: number; readonly right: number; readonly bottom: number; readonly left: number };

/** The camera with the same direction that shows some points whole and in the middle, with room round them. */
export function framed(camera: Camera, size: Size, points: readonly Vec3[], room: Margins): Camera {
  const { right, up, into } = axesOf(camera);
  let [minX, maxX, minY, maxY] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const p of points) {
    const x = dot(p, right);
    const y = dot(p, up);
    [minX, maxX] = [Math.min(minX, x), Math.max(maxX, x)];
    [minY, maxY] = [Math.min(minY, y), Math.max(maxY, y)];
  }
  if (!(maxX >= minX)) return camera;
  const wide = Math.max(1, size.width - room.left - room.right) / Math.max(maxX - minX, 1);
  const high = Math.max(1, size.height - room.top - room.bottom) / Math.max(maxY - minY, 1);
  const scale = Math.min(MOST_SCALE, Math.max(LEAST_SCALE, Math.min(wide, high)));
  const x = (minX + maxX) / 2 + (room.right - room.left) / 2 / scale;
  const y = (minY + maxY) / 2 + (room.top - room.bottom) / 2 / scale;
  // The centre lies on the ground, so that turning and zooming keep hold of the place looked at.
  const away = -(up[2] * y) / into[2];
  const at = (i: 0 | 1 | 2): number => right[i] * x + up[i] * y + into[i] * away;
  return { ...camera, centre: [at(0), at(1), at(2)], scale };
}

/** The two directions that the desk offers: a view into the scheme and a plan with the drawing's north up. */
export const AXONOMETRIC = { turn_rad: (-35 * Math.PI) / 180, tilt_rad: (35 * Math.PI) / 180 } as const;
export const PLAN = { turn_rad: 0, tilt_rad: PLAN_rad } as const;

/** A round length for a scale bar: the longest of 1, 2 or 5 times a power of ten that takes at most so many pixels [m]. */
export function barLength(scale: number, most_px: number): number {
  const most = most_px / scale;
  const power = 10 ** Math.floor(Math.log10(most));
  return most >= 5 * power ? 5 * power : most >= 2 * power ? 2 * power : power;
}
