import type { Model } from '../form/model.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { ShadowMoment } from '../sheet/shadow-moment.ts';
import { resolveCivil } from '../sun/civil.ts';
import { momentStudy } from './moment.ts';

/** Below this the light is bent by half as much as it is high, and hills beyond the drawing hide the sun (common practice, no source) [°]. */
const ROUGH_BELOW_deg = 2;
const ROUGH = `sun below ${ROUGH_BELOW_deg}°: refraction and the land far off decide, so areas are rough`;

/**
 * The moments of a shadow study, in the order of the dates and within a date of the times: what `shadowSheet` draws.
 * @param dates  civil dates, YYYY-MM-DD
 * @param times  wall times of the site, HH:MM; one that a clock change skips or repeats is resolved by rule and noted
 */
export function shadowMoments(
  scheme: Scheme,
  model: Model,
  dates: readonly string[],
  times: readonly string[],
): readonly ShadowMoment[] {
  return dates.flatMap((date) => times.map((time) => shadowMoment(scheme, model, date, time)));
}

/** One moment of a shadow study. */
export function shadowMoment(scheme: Scheme, model: Model, date: string, time: string): ShadowMoment {
  const { instant_ms, note } = resolveCivil(date, time, scheme.site.zone);
  const { civil, sun, shadows, isLowSun, areas } = momentStudy(scheme, model, instant_ms);
  const names = new Map(model.receptors.map((r) => [r.id, r.name]));
  const low = `sun at or below ${scheme.site.lowSun ?? 0}°: not counted in the scheme’s sun hours`;
  return {
    instant_ms,
    date,
    text: civil.text,
    azimuth_deg: sun.azimuth_deg,
    altitude_deg: sun.altitude_deg,
    change: shadows,
    areas: areas.map((a) => ({ id: a.receptor, name: names.get(a.receptor) ?? '', before: a.before, after: a.after })),
    notes: [
      ...(note === null ? [] : [note]),
      ...(isLowSun ? [low] : []),
      ...(shadows !== null && sun.altitude_deg < ROUGH_BELOW_deg ? [ROUGH] : []),
    ],
  };
}
