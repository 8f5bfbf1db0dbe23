import type { Vec3 } from '../plane/vec.ts';
import type { Site } from '../scheme/schema.ts';
import { relativeAirMass } from '../sky/air-mass.ts';
import { designDay } from '../sky/design-day.ts';
import { extraterrestrial } from '../sky/extraterrestrial.ts';
import { ineichenPerez } from '../sky/ineichen.ts';
import { monthly, monthOf } from '../sky/monthly.ts';
import { civilOf, dayBounds } from '../sun/civil.ts';
import type { Observer } from '../sun/position.ts';
import { standardPressure_hPa } from '../sun/refraction.ts';
import { sunTable } from '../sun/sun-table.ts';
import { DEG } from '../units/angle.ts';
import type { MonthShares } from './crown-sky.ts';
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
  /** How both fall to the months: shares, entry m for month m. */
  readonly diffuseMonths: MonthShares;
  readonly reflectedMonths: MonthShares;
};

/** The observer of a scheme's site. */
export const observerOf = (site: Site): Observer => ({
  latitude_deg: site.latitude,
  longitude_deg: site.longitude,
  elevation_m: site.elevation,
});

/** Columns of a period while they are being filled. */
class Samples {
  readonly sx: number[] = [];
  readonly sy: number[] = [];
  readonly sz: number[] = [];
  readonly minutes: number[] = [];
  readonly beam: number[] = [];
  readonly day: number[] = [];
  readonly instant: number[] = [];
  readonly month: number[] = [];
  readonly diffuse_Whm2 = new Float64Array(13);
  readonly reflected_Whm2 = new Float64Array(13);

  /** Adds what the sky and the ground send over a step [Wh/m²]. @param month 1..12 */
  addSky(month: number, diffuse_Whm2: number, reflected_Whm2: number): void {
    this.diffuse_Whm2[month]! += diffuse_Whm2;
    this.reflected_Whm2[month]! += reflected_Whm2;
  }

  add(day: number, month: number, instant_ms: number, span_min: number, s: Vec3, beam_Wm2: number): void {
    this.sx.push(s[0]);
    this.sy.push(s[1]);
    this.sz.push(s[2]);
    this.minutes.push(span_min);
    this.beam.push((beam_Wm2 * span_min) / 60);
    this.day.push(day);
    this.month.push(month);
    this.instant.push(instant_ms);
  }

  done(): PeriodSky {
    return {
      light: {
        sx: Float64Array.from(this.sx),
        sy: Float64Array.from(this.sy),
        sz: Float64Array.from(this.sz),
        minutes: Float64Array.from(this.minutes),
        beam: Float64Array.from(this.beam),
        month: Uint8Array.from(this.month),
      },
      day: Uint16Array.from(this.day),
      instant_ms: Float64Array.from(this.instant),
      diffuse_Whm2: total(this.diffuse_Whm2),
      reflected_Whm2: total(this.reflected_Whm2),
      diffuseMonths: shares(this.diffuse_Whm2),
      reflectedMonths: shares(this.reflected_Whm2),
    };
  }
}

const total = (months: Float64Array): number => months.reduce((sum, v) => sum + v, 0);

function shares(months: Float64Array): MonthShares {
  const all = total(months);
  return months.map((v, m) => (all > 0 ? v / all : m === 0 ? 1 : 0));
}

/** Altitude at or below which the sun does not count [rad]. */
const least_rad = (site: Site): number => Math.max(0, (site.lowSun ?? 0) * DEG);

/**
 * Samples the sun of a site. It counts when its true altitude is above 0 and above the scheme's `lowSun` (not at it); sky and
 * ground light do not leave low sun out. Clear sky: see `designDay`.
 * @param dates     civil dates, YYYY-MM-DD, each whole in the site's zone (23 to 25 h)
 * @param step_min  minutes a step, 1 to 60
 */
export function periodSky(site: Site, north_rad: number, dates: readonly string[], step_min: number): PeriodSky {
  const observer = observerOf(site);
  const least = least_rad(site);
  const samples = new Samples();
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
    const month = monthOf(date);
    const reflectance = monthly(site.groundReflectance, month);
    const n = sky.instant_ms.length;
    const { end_ms } = dayBounds(date, site.zone);
    for (let i = 0; i < n; i++) {
      // A day that is no whole number of steps ends in a shorter one, sampled at its own middle.
      const span_min = i < n - 1 ? step_min : (2 * (end_ms - sky.instant_ms[i]!)) / 60_000;
      const hours = span_min / 60;
      samples.addSky(month, sky.diffuse_Wm2[i]! * hours, sky.global_Wm2[i]! * reflectance * hours);
      const altitude = sky.altitude_rad[i]!;
      if (!(altitude > least)) continue;
      const s = sunVector(sky.azimuth_rad[i]!, altitude, north_rad);
      samples.add(d, month, sky.instant_ms[i]!, span_min, s, sky.beamNormal_Wm2[i]!);
    }
  });
  return samples.done();
}

/**
 * The sun and clear sky at single moments, each standing for so many minutes. `day` numbers the moments.
 * @param instants_ms  UTC
 */
export function momentSky(site: Site, north_rad: number, instants_ms: readonly number[], span_min: number): PeriodSky {
  const observer = observerOf(site);
  const least = least_rad(site);
  const pressure_hPa = standardPressure_hPa(observer.elevation_m);
  const sun = sunTable(Float64Array.from(instants_ms), observer);
  const samples = new Samples();
  instants_ms.forEach((instant_ms, i) => {
    const altitude = sun.altitude_rad[i]!;
    const apparentAltitude_rad = sun.apparentAltitude_rad[i]!;
    if (!(altitude > 0)) return;
    const month = monthOf(civilOf(instant_ms, site.zone).date);
    const sky = ineichenPerez(
      {
        apparentAltitude_rad,
        extraterrestrial_Wm2: extraterrestrial(sun.distance_au[i]!),
        airMass: relativeAirMass(apparentAltitude_rad),
        pressure_hPa,
        elevation_m: observer.elevation_m,
      },
      monthly(site.linkeTurbidity, month),
    );
    const hours = span_min / 60;
    samples.addSky(month, sky.diffuse_Wm2 * hours, sky.global_Wm2 * monthly(site.groundReflectance, month) * hours);
    if (altitude > least)
      samples.add(
        i,
        month,
        instant_ms,
        span_min,
        sunVector(sun.azimuth_rad[i]!, altitude, north_rad),
        sky.beamNormal_Wm2,
      );
  });
  return samples.done();
}
