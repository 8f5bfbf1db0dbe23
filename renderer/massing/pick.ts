import type { Model } from '../../core/form/model.ts';
import { contains } from '../../core/plane/ring.ts';
import type { Vec3 } from '../../core/plane/vec.ts';
import { cellAt, rowAt } from '../maps/map-cells.ts';
import { type CellPlace, shownMap } from '../maps/map-shown.ts';
import { type Face, faceId } from '../state/faces.ts';
import { type Picked, select, selection, selectNothing, toggle } from '../state/selection.ts';
import { model } from '../state/studies.ts';
import { onLevel, project } from './camera.ts';
import { laidMap } from './laid-map.ts';
import type { MassingScene } from './scene.ts';
import { camera, size } from './view-state.ts';

/** A press this near to the mark of a point means the point [px]. */
const NEAR_px = 11;

/** The receptor point whose mark a place on the screen is at. */
function pointAt(shapes: Model, x: number, y: number): string | null {
  let [nearest, found]: [number, string | null] = [NEAR_px, null];
  for (const r of shapes.receptors) {
    if (r.kind !== 'point') continue;
    const [px, py] = project(camera.peek(), size.peek(), r.at);
    const away = Math.hypot(px - x, py - y);
    if (away <= nearest) [nearest, found] = [away, r.id];
  }
  return found;
}

/** The amenity area that lies under a place on the screen; the smallest where several do. */
function areaAt(shapes: Model, x: number, y: number): string | null {
  const areas = shapes.receptors.flatMap((r) => {
    if (r.kind !== 'area') return [];
    const [gx, gy] = onLevel(camera.peek(), size.peek(), x, y, r.level);
    return contains(r.outline, gx, gy) ? [r] : [];
  });
  const corners = (outline: readonly (readonly [number, number])[]): number =>
    Math.max(...outline.map((p) => p[0])) - Math.min(...outline.map((p) => p[0]));
  return areas.sort((a, b) => corners(a.outline) - corners(b.outline))[0]?.id ?? null;
}

/**
 * Selects what lies under a press. A block comes first as a whole; pressed once more, the wall or the roof that was met; from
 * there on its other faces.
 * @param isMore  adds to the selection or takes away from it
 */
export function pressAt(scene: MassingScene, x: number, y: number, isMore: boolean): void {
  const shapes = model.peek()?.value;
  if (shapes === undefined) return;
  const found = thingAt(scene, shapes, x, y);
  if (found === null) selectNothing();
  else (isMore ? toggle : select)(found.kind, found.id);
}

function thingAt(
  scene: MassingScene,
  shapes: Model,
  x: number,
  y: number,
): { readonly kind: Picked; readonly id: string } | null {
  const point = pointAt(shapes, x, y);
  if (point !== null) return { kind: 'receptor', id: point };
  const owner = scene.pick(x, y)?.owner ?? null;
  if (owner === null) {
    const area = areaAt(shapes, x, y);
    return area === null ? null : { kind: 'receptor', id: area };
  }
  return owner.kind === 'block' && isInside(owner.id) ? { kind: 'face', id: faceId(owner.face) } : owner;
}

/** Whether a block, or a face of it, is all that is selected. */
function isInside(block: string): boolean {
  const now = selection.peek();
  if (now?.kind === 'block') return now.ids.length === 1 && now.ids[0] === block;
  return now?.kind === 'face' && now.ids.every((id) => id.startsWith(`${block}/`));
}

const isFace = (face: Face, at: { kind: string; block?: string; wall?: number }): boolean =>
  at.kind === face.kind && at.block === face.block && (face.kind === 'roof' || at.wall === face.wall);

/** The cell of the map under a place on the screen. */
export function cellUnder(scene: MassingScene, x: number, y: number): CellPlace | null {
  const [laid, shown] = [laidMap.peek(), shownMap.peek()];
  if (laid === null || shown === null) return null;
  const hit = scene.pick(x, y);
  const at = (surface: number, place: Vec3): CellPlace | null => {
    const cells = laid.cells[surface];
    const cell = cells === undefined ? null : cellAt(cells, place);
    return cells === undefined || cell === null || rowAt(cells, cell) === null ? null : { surface, cell };
  };
  if (hit !== null) {
    if (hit.owner?.kind !== 'block') return null;
    const { face } = hit.owner;
    const surface = shown.picture.surfaces.findIndex((s) => isFace(face, s.surface));
    return surface < 0 ? null : at(surface, hit.at);
  }
  for (const [i, { surface }] of shown.picture.surfaces.entries()) {
    if (surface.kind !== 'ground') continue;
    const found = at(i, onLevel(camera.peek(), size.peek(), x, y, surface.level_m));
    if (found !== null) return found;
  }
  return null;
}
