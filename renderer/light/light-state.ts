import { computed, effect, signal, untracked } from '@preact/signals';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { AreaLight, NeighbourLight, PointLight } from '../../core/study/exposure-neighbours.ts';
import { faultLine } from '../../core/scheme/fault.ts';
import { hands } from '../jobs/hands.ts';
import { scheme } from '../state/document.ts';
import { leadOf } from '../state/selection.ts';
import type { JobState } from '../state/studies.ts';

type Found = { readonly scheme: Scheme; readonly hasTrees: boolean; readonly light: NeighbourLight };

/** Whether crowns of trees count, as asked for in this window; it is not kept with the scheme. */
export const countsTrees = signal(false);

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

async function study(of: Scheme, window: string | null, trees: boolean): Promise<void> {
  const isMeant = (): boolean => scheme.peek() === of && countsTrees.peek() === trees;
  lightJob.value = { kind: 'working', done: 0, total: 0 };
  const outcome = await hands.light.run('light', { window, trees }, of, (done, total) => {
    if (isMeant()) lightJob.value = { kind: 'working', done, total };
  });
  if (!isMeant() || outcome.kind === 'stopped') return;
  if (outcome.kind === 'failed') lightJob.value = outcome;
  if (outcome.kind !== 'done') return;
  const { result } = outcome;
  if (result.ok)
    (window === null ? receptorLight : windowLight).value = { scheme: of, hasTrees: trees, light: result.value };
  if (!outcome.superseded)
    lightJob.value = result.ok
      ? { kind: 'idle' }
      : { kind: 'failed', message: result.faults.map(faultLine).join(' · ') };
}

/** Whether figures are of the scheme and of the choice of trees as they are now. */
export const isFresh = (found: Found | null): boolean =>
  found !== null && found.scheme === scheme.value && found.hasTrees === countsTrees.value;

let asked: { readonly of: Scheme; readonly trees: boolean; readonly window: string | null } | null = null;

/** The receptors come first, once a scheme; then the window that is selected. */
effect(() => {
  const of = scheme.value;
  const window = leadOf('window');
  const trees = countsTrees.value;
  const isKnown = isFresh(receptorLight.value);
  if (of === null || shown.value === 0) return;
  const next = isKnown ? window : null;
  if (asked?.of === of && asked.trees === trees && asked.window === next) return;
  if (isKnown && next === null) {
    // What was asked of a choice that was taken back is let go when it comes: nothing waits for it, and it can be asked again.
    if (asked !== null && (asked.of !== of || asked.trees !== trees)) {
      asked = null;
      untracked(() => {
        lightJob.value = { kind: 'idle' };
      });
    }
    return;
  }
  asked = { of, trees, window: next };
  untracked(() => void study(of, next, trees));
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
