import { computed, signal } from '@preact/signals';
import type { Sweep, Swept, SweepPoint } from '../../core/sizing/sweep.ts';
import { scheme } from '../state/document.ts';
import { leadOf } from '../state/selection.ts';
import { check } from '../state/studies.ts';

/** What is sized. */
export const swept = signal<Swept>('overhang');
/** Summer gain to come down to [kWh a day]; null: none is asked for. */
export const target_kWh = signal<number | null>(null);
/** The setting that is looked at; null: what the window has, or the first. */
export const picked = signal<number | null>(null);

/** The window that is sized: the selected one, else the one that brings most into the worst room. */
export const sizedWindow = computed<string | null>(() => {
  const open = scheme.value;
  if (open === null) return null;
  const has = (id: string | null | undefined): id is string => open.windows.some((w) => w.id === id);
  const chosen = leadOf('window');
  if (has(chosen)) return chosen;
  const worst = check.value?.value.findings[0]?.through?.window;
  return has(worst) ? worst : (open.windows[0]?.id ?? null);
});

/** The point of a sweep nearest to an amount. */
export function pointAt(sweep: Sweep, amount: number): SweepPoint {
  const [first, ...rest] = sweep.points as readonly [SweepPoint, ...SweepPoint[]];
  return rest.reduce((best, p) => (Math.abs(p.amount - amount) < Math.abs(best.amount - amount) ? p : best), first);
}

/** The point that stands for the window as it is: that of its own amount, or no device. */
export const pointNow = (sweep: Sweep): SweepPoint => pointAt(sweep, sweep.now ?? sweep.points[0]?.amount ?? 0);
