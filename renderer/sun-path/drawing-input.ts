import { computed } from '@preact/signals';
import type { SunPathInput } from '../../core/sheet/sun-path-input.ts';
import type { SunPathProjection } from '../../core/sheet/sun-path-view.ts';
import { scheme } from '../state/document.ts';
import { moment } from '../state/studies.ts';
import { words } from '../words/words.ts';
import { observerOf, sunPathResult } from './sun-path-state.ts';

type Fixed = Omit<SunPathInput, 'projection' | 'moment'>;

/** What a drawing of the open scheme's sun path is made of, but for the projection and the moment; null until it is worked out. */
export const drawingOf = computed<Fixed | null>(() => {
  const found = sunPathResult.value;
  const of = scheme.value;
  if (found === null || of === null) return null;
  const { path, mask, window } = found;
  return {
    path,
    place: { name: of.title, zone: of.site.zone, ...observerOf(of) },
    mask:
      mask === null || window === null
        ? null
        : {
            of: words.sunPath.maskOf(
              window,
              of.receptors.every((r) => r.id !== window || r.kind === 'window'),
            ),
            hidden: mask,
          },
  };
});

/** The moment as drawings show it; null until it is worked out. */
export function momentOfDrawing(): SunPathInput['moment'] {
  const found = moment.value;
  if (found === null || found.scheme.site.zone !== scheme.value?.site.zone) return null;
  const { sun, civil } = found.value;
  return { azimuth_deg: sun.azimuth_deg, altitude_deg: sun.altitude_deg, text: civil.text };
}

export const inputFor = (fixed: Fixed, projection: SunPathProjection): SunPathInput => ({
  ...fixed,
  projection,
  moment: momentOfDrawing(),
});
