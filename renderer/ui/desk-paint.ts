import { ACCENT, CLOSE, HAIR, INK, OVER, SOFT, WASH, WHITE, WITHIN } from '../../core/sheet/ink.ts';
import type { Paint } from './drawing-view.tsx';

const ROLES = new Map<string, string>([
  [INK, 'var(--ink)'],
  [SOFT, 'var(--soft)'],
  [WHITE, 'var(--sheet)'],
  [HAIR, 'var(--line)'],
  [WASH, 'var(--wash)'],
  [ACCENT, 'var(--accent)'],
  [OVER, 'var(--over)'],
  [CLOSE, 'var(--close)'],
  [WITHIN, 'var(--within)'],
]);

/** The inks of paper in the colours of the desk, light or dark: for drawings that are part of a screen and not a sheet. */
export const deskPaint: Paint = (colour) => ROLES.get(colour) ?? colour;
