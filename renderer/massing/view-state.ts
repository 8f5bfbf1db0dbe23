import { computed, signal } from '@preact/signals';
import type { Model, Solid } from '../../core/form/model.ts';
import type { Point, Vec3 } from '../../core/plane/vec.ts';
import { scheme } from '../state/document.ts';
import { model } from '../state/studies.ts';
import { AXONOMETRIC, type Camera, framed, type Margins, PLAN, type Size } from './camera.ts';

/** Room kept for the instruments when all of the drawing is shown [px]. */
const ROOM: Margins = { top: 48, right: 28, bottom: 44, left: 28 };

/** In a plan nothing tapers away under the key: room is kept for it, where there is enough. */
const roomFor = (direction: 'massing' | 'plan', width: number): Margins =>
  direction === 'plan' && width > 720 ? { ...ROOM, right: 276 } : ROOM;

export const camera = signal<Camera>({ centre: [0, 0, 0], ...AXONOMETRIC, scale: 8 });
export const size = signal<Size>({ width: 1, height: 1 });
export const isPlan = computed(() => camera.value.tilt_rad > (Math.PI / 2) * 0.999);

/** How far round the site the first look reaches: so many times the site's own radius, and never less than this. */
const FIRST_REACH = 2;
const LEAST_REACH_m = 45;

const cornersOf = (solid: Solid): readonly Vec3[] =>
  solid.outline.flatMap(([x, y]): Vec3[] => [
    [x, y, Math.min(solid.base_m, 0)],
    [x, y, solid.top_m],
  ]);

const boundaryOf = (shapes: Model): readonly Vec3[] => (shapes.boundary ?? []).map(([x, y]): Vec3 => [x, y, 0]);

const farthest = (centre: Point, points: readonly Vec3[]): number =>
  points.reduce((most, [x, y]) => Math.max(most, Math.hypot(x - centre[0], y - centre[1])), 0);

/** The corners of the site and of what stands near it; of everything, when nothing says where the site is. */
function nearCorners(shapes: Model): readonly Vec3[] {
  const site = [...boundaryOf(shapes), ...shapes.solids.filter((s) => s.standing === 'proposed').flatMap(cornersOf)];
  if (site.length === 0) return shapes.solids.flatMap(cornersOf);
  const xs = site.map((p) => p[0]);
  const ys = site.map((p) => p[1]);
  const centre: Point = [(Math.min(...xs) + Math.max(...xs)) / 2, (Math.min(...ys) + Math.max(...ys)) / 2];
  const reach = Math.max(LEAST_REACH_m, FIRST_REACH * farthest(centre, site));
  const near = shapes.solids.map(cornersOf).filter((corners) => farthest(centre, corners) <= reach);
  return [...site, ...near.flat()];
}

export function showAll(): void {
  const shapes = model.peek()?.value;
  if (shapes === undefined) return;
  const all = [...boundaryOf(shapes), ...shapes.solids.flatMap(cornersOf)];
  camera.value = framed(camera.peek(), size.peek(), all, ROOM);
}

/** The drawing as a plan, or from the side on which the midday sun stands; the site and what is near it fill the view. */
export function lookAs(direction: 'massing' | 'plan'): void {
  const isSouthern = (scheme.peek()?.site.latitude ?? 0) < 0;
  const from = isSouthern ? { ...AXONOMETRIC, turn_rad: AXONOMETRIC.turn_rad + Math.PI } : AXONOMETRIC;
  const view = { ...camera.peek(), ...(direction === 'plan' ? PLAN : from) };
  const shapes = model.peek()?.value;
  camera.value =
    shapes === undefined ? view : framed(view, size.peek(), nearCorners(shapes), roomFor(direction, size.peek().width));
}
