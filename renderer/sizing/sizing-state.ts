import { computed, signal } from '@preact/signals';
import type { Sweep, Swept, SweepPoint } from '../../core/sizing/sweep.ts';
import { scheme } from '../state/document.ts';
import { selection } from '../state/selection.ts';
import { check } from '../state/studies.ts';

/** What is sized. */
export const swept = signal<Swept>('overhang');
/** Summer gain to come down to [kWh a day]; null: none is asked for. */
export const target_kWh = signal<number | null>(null);
/** The setting that is looked at; null: what the window has, or the first. */
export const picked = signal<number | null>(null);

/**
 * The windows that are sized together: those selected, those in the walls of the selected rooms, or the one that brings most into
 * the worst room.
 */
export const sizedWindows = computed<readonly string[]>(() => {
  const open = scheme.value;
  if (open === null) return [];
  const chosen = selection.value;
  const ids = new Set(chosen?.ids ?? []);
  const of = open.windows.filter((w) =>
    chosen?.kind === 'window' ? ids.has(w.id) : chosen?.kind === 'room' && ids.has(w.room) && w.wall !== undefined,
  );
  if (of.length > 0) return of.map((w) => w.id);
  const worst = check.value?.value.findings[0]?.through?.window;
  const one = open.windows.find((w) => w.id === worst) ?? open.windows[0];
  return one === undefined ? [] : [one.id];
});

/** The point of a sweep nearest to an amount. */
export function pointAt(sweep: Sweep, amount: number): SweepPoint {
  const [first, ...rest] = sweep.points as readonly [SweepPoint, ...SweepPoint[]];
  return rest.reduce((best, p) => (Math.abs(p.amount - amount) < Math.abs(best.amount - amount) ? p : best), first);
}

/** The point that stands for the window as it is: that of its own amount, or no device. */
export const pointNow = (sweep: Sweep): SweepPoint => pointAt(sweep, sweep.now ?? sweep.points[0]?.amount ?? 0);
