import * as maths from '../../maths/maths.ts';
import type { Fault } from '../../scheme/fault.ts';
import { standardPressure_hPa } from '../../sun/refraction.ts';
import { dewPoint_C } from '../dew-point.ts';
import { dayOfYear, extraterrestrial } from '../extraterrestrial.ts';
import { dirint } from '../split.ts';
import type { RowSun } from './row-sun.ts';
import type { WeatherYear } from './weather-year.ts';

/** Beam, diffuse and global of every row, whichever of them the file had. */
export type Radiation = {
  readonly beamNormal_Wm2: Float64Array;
  readonly diffuse_Wm2: Float64Array;
  readonly global_Wm2: Float64Array;
  readonly notes: readonly Fault[];
};

/** Below this altitude of the sun a difference over the sine of it is mostly error; what is left over is called diffuse. 3° as in the splits. */
const LOWEST_UP = maths.sin((3 * Math.PI) / 180);

const note = (message: string): Fault => ({
  level: 'warning',
  code: 'worked-out',
  place: '',
  message,
  cure: 'choose a file that has all three where the difference matters',
});

/**
 * Brings a year to beam, diffuse and global. What the file has is kept as it is; what it lacks is worked out and told: the third
 * of three by closure, beam and diffuse from global alone by DIRINT with pressure and dew point where there are any.
 * @see core/sky/split.ts for the split and its source
 */
export function completeRadiation(weather: WeatherYear, sun: RowSun, elevation_m: number): Radiation {
  const { global_Wm2: global, beamNormal_Wm2: beam, diffuse_Wm2: diffuse } = weather.columns;
  const up = sun.apparentAltitude_rad.map((h) => Math.max(0, maths.sin(h)));
  if (beam && diffuse) {
    const notes = global ? [] : [note('the file has no global irradiance; it was worked out from beam and diffuse')];
    return {
      beamNormal_Wm2: beam,
      diffuse_Wm2: diffuse,
      global_Wm2: global ?? diffuse.map((d, i) => d + beam[i]! * up[i]!),
      notes,
    };
  }
  if (!global) throw new Error('a year of weather without global, and without beam and diffuse, was not refused');
  if (diffuse) {
    const most = sun.distance_au.map((d) => extraterrestrial(d));
    const found = global.map((g, i) =>
      up[i]! < LOWEST_UP ? 0 : Math.min(most[i]!, Math.max(0, (g - diffuse[i]!) / up[i]!)),
    );
    return {
      beamNormal_Wm2: found,
      diffuse_Wm2: diffuse,
      global_Wm2: global,
      notes: [note('the file has no beam irradiance; it was worked out from global and diffuse')],
    };
  }
  if (beam) {
    const found = global.map((g, i) => Math.max(0, g - beam[i]! * up[i]!));
    return {
      beamNormal_Wm2: beam,
      diffuse_Wm2: found,
      global_Wm2: global,
      notes: [note('the file has no diffuse irradiance; it was worked out from global and beam')],
    };
  }
  return splitGlobal(weather, global, sun, elevation_m);
}

/** Beam and diffuse from global alone. */
function splitGlobal(weather: WeatherYear, global: Float64Array, sun: RowSun, elevation_m: number): Radiation {
  const dewPoint = dewPoints(weather);
  const split = dirint({
    readings: Array.from(global, (g, i) => ({
      global_Wm2: g,
      zenith_rad: Math.PI / 2 - sun.altitude_rad[i]!,
      dayOfYear: dayOfYear(sun.instant_ms[i]!),
    })),
    pressure_hPa: weather.columns.pressure_hPa ?? standardPressure_hPa(elevation_m),
    ...(dewPoint ? { dewPoint_C: dewPoint } : {}),
  });
  const message =
    'the file has global irradiance alone; beam and diffuse were split from it by DIRINT (Perez and others 1992)';
  return {
    beamNormal_Wm2: Float64Array.from(split, (s) => s.beamNormal_Wm2),
    diffuse_Wm2: Float64Array.from(split, (s) => s.diffuse_Wm2),
    global_Wm2: global,
    notes: [note(message)],
  };
}

/** Dew points of the file, or from its humidity; null where it has neither [°C]. */
export function dewPoints(weather: WeatherYear): Float64Array | null {
  const { dewPoint_C: own, relativeHumidity_pct: humidity, tAir_C: air } = weather.columns;
  if (own) return own;
  return humidity && air ? humidity.map((rh, i) => dewPoint_C(air[i]!, rh)) : null;
}
