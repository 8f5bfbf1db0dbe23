import * as maths from '../../maths/maths.ts';
import type { Fault } from '../../scheme/fault.ts';
import { offset_min } from '../../sun/civil.ts';
import type { Observer } from '../../sun/position.ts';
import { relativeAirMass } from '../air-mass.ts';
import type { DayGrid } from '../day-grid.ts';
import { extraterrestrial } from '../extraterrestrial.ts';
import { checkClock } from './check-clock.ts';
import { completeRadiation } from './radiation.ts';
import { rowSun } from './row-sun.ts';
import type { WeatherYear } from './weather-year.ts';

/** A year of weather in the shape of one long day, so that whatever works on a design day works on a year. */
export type WeatherGrid = { readonly grid: DayGrid; readonly notes: readonly Fault[] };

/** Beyond this the weather is that of another place [°]; about 50 km. */
const NEAR_deg = 0.5;

/**
 * Sun, sky and air of a year of weather, one row an interval. Rows keep the order of the calendar; in a typical year their
 * instants jump between months. Sunlight of the row is a mean over its whole interval; the sun stands where `rowSun` puts it, and
 * there is no beam while it is below the horizon. Temperature read at the label is drawn straight to the middle of the interval.
 * @param observer  the site, or the place of the file
 * @param zone      IANA zone of the site, for the civil clock
 */
export function weatherGrid(weather: WeatherYear, observer: Observer, zone: string): WeatherGrid {
  const { rows } = weather;
  const sun = rowSun(weather, observer);
  const radiation = completeRadiation(weather, sun, observer.elevation_m);
  const first_ms = weather.start_ms[0]!;
  const grid: DayGrid = {
    key: 'year',
    name: weather.place.name,
    date: new Date(first_ms + offset_min(first_ms, zone) * 60_000).toISOString().slice(0, 10),
    step_min: weather.step_min,
    instant_ms: sun.instant_ms,
    clock_min: sun.instant_ms.map((t) => mod1440(t / 60_000 + offset_min(t, zone))),
    azimuth_rad: sun.azimuth_rad,
    altitude_rad: sun.altitude_rad,
    beamNormal_Wm2: radiation.beamNormal_Wm2.map((b, i) => (sun.altitude_rad[i]! > 0 ? b : 0)),
    diffuse_Wm2: radiation.diffuse_Wm2,
    global_Wm2: radiation.global_Wm2,
    extraterrestrial_Wm2: sun.distance_au.map((d) => extraterrestrial(d)),
    airMass: sun.apparentAltitude_rad.map((h) => (h > 0 ? relativeAirMass(h) : 0)),
    tAir_C: midIntervalAir(weather, rows),
  };
  return { grid, notes: [...nearby(weather, observer), ...checkClock(weather, observer), ...radiation.notes] };
}

const mod1440 = (min: number): number => ((min % 1440) + 1440) % 1440;

/** Air temperature at the middle of each interval. The year closes: before its first row comes its last. */
function midIntervalAir(weather: WeatherYear, rows: number): Float64Array {
  const air = weather.columns.tAir_C;
  if (!air) throw new Error('a year of weather without air temperature was not refused');
  if (weather.airOffset_min === null || weather.airOffset_min === 0) return air;
  const back = weather.airOffset_min / weather.step_min;
  return air.map((here, i) => {
    const other = air[(i + (back > 0 ? rows - 1 : 1)) % rows]!;
    return here + (other - here) * Math.abs(back);
  });
}

/** Says so when the weather was taken elsewhere than the site. */
function nearby(weather: WeatherYear, observer: Observer): Fault[] {
  const { latitude_deg, longitude_deg, name } = weather.place;
  if (latitude_deg === null || longitude_deg === null) return [];
  const north = Math.abs(latitude_deg - observer.latitude_deg);
  const around = Math.abs(((longitude_deg - observer.longitude_deg + 540) % 360) - 180);
  if (north <= NEAR_deg && around * maths.cos((latitude_deg * Math.PI) / 180) <= NEAR_deg) return [];
  return [
    {
      level: 'warning',
      code: 'far-weather',
      place: 'weather',
      message: `the weather is that of ${name}, ${north.toFixed(1)}° north or south and ${around.toFixed(1)}° east or west of the site`,
      cure: 'choose weather from nearer the site; its sunlight was meant for the sun of its own place',
    },
  ];
}
