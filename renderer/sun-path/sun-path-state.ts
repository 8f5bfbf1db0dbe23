import { computed, effect, signal, untracked } from '@preact/signals';
import { DEFAULT_YEAR, type Scheme } from '../../core/scheme/schema.ts';
import type { ShadingMask } from '../../core/shade/sky-view-mask.ts';
import type { SunPathProjection } from '../../core/sheet/sun-path-view.ts';
import { civilOf } from '../../core/sun/civil.ts';
import type { Observer } from '../../core/sun/position.ts';
import type { SunPath } from '../../core/sun/sun-path.ts';
import { DEG } from '../../core/units/angle.ts';
import { hands } from '../jobs/hands.ts';
import { scheme } from '../state/document.ts';
import { civil, instant } from '../state/moment.ts';
import { leadOf } from '../state/selection.ts';

export const projection = signal<SunPathProjection>('altitude-azimuth');
/** Whether what hides the sky from the selected window is drawn over the paths. */
export const isMaskWanted = signal(false);
/** Panels that show a sun path now; none, and nothing is worked out. */
const shown = signal(0);

/** @returns the way to stop */
export function showSunPath(): () => void {
  shown.value++;
  return () => {
    shown.value--;
  };
}

export type SunPathResult = {
  readonly key: string;
  readonly path: SunPath;
  readonly window: string | null;
  readonly mask: ShadingMask | null;
};

export const sunPathResult = signal<SunPathResult | null>(null);
export const sunPathFailure = signal<string | null>(null);

export const observerOf = ({ site }: Scheme): Observer => ({
  latitude_deg: site.latitude,
  longitude_deg: site.longitude,
  elevation_m: site.elevation,
});

/** The window or the point whose sky is looked at, where that is wanted. */
const maskWindow = computed(() => (isMaskWanted.value ? (leadOf('window') ?? leadOf('receptor')) : null));

async function study(of: Scheme, window: string | null, key: string): Promise<void> {
  const ask = { observer: observerOf(of), zone: of.site.zone, year: of.year ?? DEFAULT_YEAR, window };
  const outcome = await hands.sunPath.run('sunPath', ask, window === null ? null : of);
  if (outcome.kind === 'stopped' || key !== asked?.key) return;
  sunPathFailure.value = outcome.kind === 'failed' ? outcome.message : null;
  if (outcome.kind === 'done') sunPathResult.value = { key, window, ...outcome.result };
}

let asked: { readonly key: string; readonly of: Scheme | null } | null = null;

effect(() => {
  const of = scheme.value;
  if (of === null || shown.value === 0) return;
  const window = maskWindow.value;
  const { latitude, longitude, elevation, zone } = of.site;
  const key = JSON.stringify([latitude, longitude, elevation, zone, of.year, window]);
  // Without a window the drawing depends on the site alone.
  const source = window === null ? null : of;
  if (asked?.key === key && asked.of === source) return;
  asked = { key, of: source };
  untracked(() => void study(of, window, key));
});

/** Farther than this from the sun's paths a place in the sky means nothing [rad]. */
const REACH_rad = 8 * DEG;

/** Sets the clock to when the sun comes nearest to a direction, in the half year that the clock is in. */
export async function setMomentBySky(azimuth_rad: number, altitude_rad: number): Promise<void> {
  const [of, at] = [scheme.peek(), instant.peek()];
  if (of === null || at === null) return;
  const ask = { observer: observerOf(of), azimuth_rad, altitude_rad, near_ms: at.instant_ms };
  const outcome = await hands.quick.run('whenSun', ask);
  if (outcome.kind !== 'done' || outcome.result.away_rad > REACH_rad) return;
  const { date, time } = civilOf(outcome.result.instant_ms, of.site.zone);
  // A half year between solstices reaches into December of the year before: the clock stays in its own year.
  civil.value = { date: `${civil.peek().date.slice(0, 4)}${date.slice(4)}`, time };
}
