import type { Site } from '../scheme/schema.ts';
import { designDay } from '../sky/design-day.ts';
import { monthly, monthOf } from '../sky/monthly.ts';
import { dayBounds } from '../sun/civil.ts';
import type { Observer } from '../sun/position.ts';
import { DEG } from '../units/angle.ts';
import type { Light } from './exposure-light.ts';
import { sunVector } from './sun-vector.ts';

/** Sun and clear sky over a set of civil dates at one place, sampled at the middle of each step. */
export type PeriodSky = {
  /** The samples at which the sun counts. */
  readonly light: Light;
  /** Number of the date, in the list asked for, of each sample of the light. */
  readonly day: Uint16Array;
  /** UTC milliseconds of each sample of the light. */
  readonly instant_ms: Float64Array;
  /** Diffuse on the level over all steps [Wh/m²]. */
  readonly diffuse_Whm2: number;
  /** What level ground throws back over all steps: global on the level times its reflectance of the month [Wh/m²]. */
  readonly reflected_Whm2: number;
};

/** The observer of a scheme's site. */
export const observerOf = (site: Site): Observer => ({
  latitude_deg: site.latitude,
  longitude_deg: site.longitude,
  elevation_m: site.elevation,
});

/**
 * Samples the sun of a site. It counts when its true altitude is above 0 and above the scheme's `lowSun` (not at it); sky and
 * ground light do not leave low sun out. Clear sky: see `designDay`.
 * @param dates     civil dates, YYYY-MM-DD, each whole in the site's zone (23 to 25 h)
 * @param step_min  minutes a step, 1 to 60
 */
export function periodSky(site: Site, north_rad: number, dates: readonly string[], step_min: number): PeriodSky {
  const observer = observerOf(site);
  const least_rad = Math.max(0, (site.lowSun ?? 0) * DEG);
  const sx: number[] = [];
  const sy: number[] = [];
  const sz: number[] = [];
  const minutes: number[] = [];
  const beam: number[] = [];
  const day: number[] = [];
  const instant: number[] = [];
  let diffuse_Whm2 = 0;
  let reflected_Whm2 = 0;
  dates.forEach((date, d) => {
    const sky = designDay({
      key: 'exposure',
      name: '',
      date,
      zone: site.zone,
      step_min,
      observer,
      linkeTurbidity: site.linkeTurbidity,
      maximum_C: 20,
      range_K: 0,
    });
    const reflectance = monthly(site.groundReflectance, monthOf(date));
    const n = sky.instant_ms.length;
    const { end_ms } = dayBounds(date, site.zone);
    for (let i = 0; i < n; i++) {
      // A day that is no whole number of steps ends in a shorter one, sampled at its own middle.
      const span_min = i < n - 1 ? step_min : (2 * (end_ms - sky.instant_ms[i]!)) / 60_000;
      const hours = span_min / 60;
      diffuse_Whm2 += sky.diffuse_Wm2[i]! * hours;
      reflected_Whm2 += sky.global_Wm2[i]! * reflectance * hours;
      const altitude = sky.altitude_rad[i]!;
      if (!(altitude > least_rad)) continue;
      const s = sunVector(sky.azimuth_rad[i]!, altitude, north_rad);
      sx.push(s[0]);
      sy.push(s[1]);
      sz.push(s[2]);
      minutes.push(span_min);
      beam.push(sky.beamNormal_Wm2[i]! * hours);
      day.push(d);
      instant.push(sky.instant_ms[i]!);
    }
  });
  return {
    light: {
      sx: Float64Array.from(sx),
      sy: Float64Array.from(sy),
      sz: Float64Array.from(sz),
      minutes: Float64Array.from(minutes),
      beam: Float64Array.from(beam),
    },
    day: Uint16Array.from(day),
    instant_ms: Float64Array.from(instant),
    diffuse_Whm2,
    reflected_Whm2,
  };
}
