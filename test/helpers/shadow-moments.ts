import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { buildModel } from '../../core/form/build-model.ts';
import type { Model } from '../../core/form/model.ts';
import { Scheme } from '../../core/scheme/schema.ts';
import { shadowChange } from '../../core/shade/ground-shadow.ts';
import { sunVector } from '../../core/shade/sun-vector.ts';
import { areaSun } from '../../core/sheet/area-sun.ts';
import type { ShadowMoment } from '../../core/sheet/shadow-moment.ts';
import { civilOf, resolveCivil } from '../../core/sun/civil.ts';
import { sunPosition } from '../../core/sun/spa.ts';
import { DEG } from '../../core/units/angle.ts';

/** One of the shipped example schemes. */
export const demoScheme = (key: string): Scheme =>
  Scheme.parse(JSON.parse(readFileSync(join(import.meta.dirname, `../../assets/demo/${key}.scheme.json`), 'utf8')));

/** The moments of dates × times, worked out by the stages before the sheet. */
export function shadowMoments(
  scheme: Scheme,
  model: Model,
  dates: readonly string[],
  times: readonly string[],
): ShadowMoment[] {
  const { site } = scheme;
  return dates.flatMap((date) =>
    times.map((time) => {
      const { instant_ms, note } = resolveCivil(date, time, site.zone);
      const sun = sunPosition(instant_ms, {
        latitude_deg: site.latitude,
        longitude_deg: site.longitude,
        elevation_m: site.elevation,
      });
      const up = sun.altitude_deg > (site.lowSun ?? 0);
      const towards = sunVector(sun.azimuth_deg * DEG, sun.altitude_deg * DEG, model.north_rad);
      const change = up ? shadowChange(model.solids, towards, 0) : null;
      return {
        instant_ms,
        date,
        text: civilOf(instant_ms, site.zone).text,
        azimuth_deg: sun.azimuth_deg,
        altitude_deg: sun.altitude_deg,
        change,
        areas: change ? areaSun(model, change) : [],
        ...(note ? { note } : {}),
      };
    }),
  );
}

/** A scheme as shapes; a fault in a test scheme is a fault of the test. */
export const modelOf = (scheme: Scheme): Model => buildModel(scheme);
