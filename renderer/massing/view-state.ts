import { computed, signal } from '@preact/signals';
import type { Model, Stage } from '../../core/form/model.ts';
import { model } from '../state/studies.ts';
import { AXONOMETRIC, type Box3, type Camera, fit, PLAN, type Size } from './camera.ts';

/** Room kept round the drawing when all of it is shown [px]. */
const MARGIN_px = 44;

export const stage = signal<Stage>('after');
export const camera = signal<Camera>({ centre: [0, 0, 0], ...AXONOMETRIC, scale: 8 });
export const size = signal<Size>({ width: 1, height: 1 });
export const isPlan = computed(() => camera.value.tilt_rad > (Math.PI / 2) * 0.999);

/** The smallest box round everything drawn. */
export function boxOf(shapes: Model): Box3 {
  const [minX, minY, maxX, maxY] = shapes.extent;
  const top = Math.max(0, ...shapes.solids.map((s) => s.top_m));
  return { min: [minX, minY, 0], max: [maxX, maxY, top] };
}

export function showAll(): void {
  const shapes = model.peek()?.value;
  if (shapes !== undefined) camera.value = fit(camera.peek(), size.peek(), boxOf(shapes), MARGIN_px);
}

export function lookAs(direction: 'massing' | 'plan'): void {
  camera.value = { ...camera.peek(), ...(direction === 'plan' ? PLAN : AXONOMETRIC) };
  showAll();
}
