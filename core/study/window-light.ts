import { pointOn } from '../form/panel.ts';
import type { Model } from '../form/model.ts';

/** The middle of the glass stands this far in front of the wall, so that the wall itself is behind it [m]. */
const CLEAR_m = 0.01;

/**
 * A model whose one receptor is the middle of a window of the proposal: what is asked of neighbours can then be asked of it, with
 * its devices and all that stands. The reveal is left out. Only the figures after the proposal mean anything.
 * @returns null where there is no such window
 */
export function askingWindow(model: Model, id: string): Model | null {
  const window = model.windows.find((w) => w.id === id);
  if (window === undefined) return null;
  const at = pointOn(window, window.width_m / 2, window.height_m / 2, CLEAR_m);
  const { normal, place } = window;
  return { ...model, receptors: [{ id, kind: 'point', name: '', at: [...at], normal: [...normal], place }] };
}
