import { computed, effect, signal, untracked } from '@preact/signals';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { AreaLight, NeighbourLight, PointLight } from '../../core/study/exposure-neighbours.ts';
import { faultLine } from '../../core/scheme/fault.ts';
import { hands } from '../jobs/hands.ts';
import { scheme } from '../state/document.ts';
import { leadOf } from '../state/selection.ts';
import type { JobState } from '../state/studies.ts';

type Found = { readonly scheme: Scheme; readonly light: NeighbourLight };

/** The light of all receptors, and of the window of the proposal that was asked after last. */
export const receptorLight = signal<Found | null>(null);
export const windowLight = signal<Found | null>(null);
export const lightJob = signal<JobState>({ kind: 'idle' });
/** Nothing is worked out while no panel shows it. */
const shown = signal(0);

/** @returns the way to stop */
export function showLight(): () => void {
  shown.value++;
  return () => {
    shown.value--;
  };
}

async function study(of: Scheme, window: string | null): Promise<void> {
  lightJob.value = { kind: 'working', done: 0, total: 0 };
  const outcome = await hands.light.run('light', { window }, of, (done, total) => {
    lightJob.value = { kind: 'working', done, total };
  });
  if (scheme.peek() !== of || outcome.kind === 'stopped') return;
  if (outcome.kind === 'failed') lightJob.value = outcome;
  if (outcome.kind !== 'done') return;
  const { result } = outcome;
  if (result.ok) (window === null ? receptorLight : windowLight).value = { scheme: of, light: result.value };
  if (!outcome.superseded)
    lightJob.value = result.ok
      ? { kind: 'idle' }
      : { kind: 'failed', message: result.faults.map(faultLine).join(' · ') };
}

let asked: { readonly of: Scheme; readonly window: string | null } | null = null;

/** The receptors come first, once a scheme; then the window that is selected. */
effect(() => {
  const of = scheme.value;
  const window = leadOf('window');
  const known = receptorLight.value;
  if (of === null || shown.value === 0) return;
  const next = known?.scheme !== of ? null : window;
  if (asked?.of === of && asked.window === next) return;
  if (known?.scheme === of && next === null) return;
  asked = { of, window: next };
  untracked(() => void study(of, next));
});

/** Whose figures are shown: the selected receptor or window; else the first receptor. */
export const lightShown = computed<{
  readonly light: PointLight | AreaLight;
  readonly of: NeighbourLight;
  readonly isOwn: boolean;
} | null>(() => {
  const window = leadOf('window');
  if (window !== null) {
    const own = windowLight.value;
    const light = own?.light.receptors[0];
    return own === null || light?.id !== window ? null : { light, of: own.light, isOwn: true };
  }
  const all = receptorLight.value?.light;
  const id = leadOf('receptor');
  const light = all?.receptors.find((r) => r.id === id) ?? all?.receptors[0];
  return all === undefined || light === undefined ? null : { light, of: all, isOwn: false };
});
