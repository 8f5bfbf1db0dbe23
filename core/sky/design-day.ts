import type { Fault } from '../scheme/fault.ts';
import { addDays, daySamples, isDate, isZone } from '../sun/civil.ts';
import type { Observer } from '../sun/position.ts';
import { standardPressure_hPa } from '../sun/refraction.ts';
import { sunTable } from '../sun/sun-table.ts';
import { relativeAirMass } from './air-mass.ts';
import { checkClearAir, checkClearSun } from './clear-sky.ts';
import type { DayGrid } from './day-grid.ts';
import { designTemperature_C } from './design-temperature.ts';
import { extraterrestrial } from './extraterrestrial.ts';
import { ineichenPerez } from './ineichen.ts';
import { type Monthly, monthly, monthOf } from './monthly.ts';
import { outOfRange } from './range.ts';

/** A cloudless day with the temperature of a hot design day. */
export type DesignDayInput = {
  readonly key: string;
  readonly name: string;
  /** Civil date, YYYY-MM-DD. */
  readonly date: string;
  /** IANA time zone. */
  readonly zone: string;
  /** Minutes a step; each is sampled at its middle. */
  readonly step_min: number;
  readonly observer: Observer;
  /** Of the air: one value, or twelve by month. */
  readonly linkeTurbidity: Monthly;
  /** Maximum air temperature of the day [°C]. */
  readonly maximum_C: number;
  /** Maximum less minimum [K]. */
  readonly range_K: number;
};

/** How a design day's sky was reached, for the working. */
export const DESIGN_DAY_METHOD =
  'cloudless sky by Ineichen–Perez 2002 with Linke turbidity, air mass of Kasten–Young 1989 at the refracted altitude, pressure of the standard atmosphere at the site, 1366.1 W/m² at 1 au (ASTM E490) over the square of the sun’s distance';

/**
 * The sun, the clear sky and the air temperature of a design day, step by step over the whole civil day (23, 24 or 25 hours).
 * The constant is 1366.1 W/m² (ASTM E490, the value of the time when the model was fitted) over the square of the true distance
 * of the sun; the pressure is the observer's or that of the standard atmosphere. The temperature follows the civil clock.
 * @throws {RangeError} on input that `checkDesignDay` finds fault with
 * @see P. Ineichen, R. Perez, Solar Energy 73, 151–157 (2002); ASHRAE Handbook of Fundamentals, ch. 14 (temperature profile)
 */
export function designDay(input: DesignDayInput): DayGrid {
  const [fault] = checkDesignDay(input, '');
  if (fault) throw new RangeError(`${fault.place}: ${fault.message}`);
  const { observer } = input;
  const { instant_ms, clock_min } = daySamples(input.date, input.zone, input.step_min);
  const sun = sunTable(instant_ms, observer);
  const turbidity = monthly(input.linkeTurbidity, monthOf(input.date));
  const pressure_hPa = observer.pressure_hPa ?? standardPressure_hPa(observer.elevation_m);
  const n = instant_ms.length;
  const day = {
    beamNormal_Wm2: new Float64Array(n),
    diffuse_Wm2: new Float64Array(n),
    global_Wm2: new Float64Array(n),
    extraterrestrial_Wm2: new Float64Array(n),
    airMass: new Float64Array(n),
    tAir_C: new Float64Array(n),
  };
  for (let i = 0; i < n; i++) {
    const e0 = extraterrestrial(sun.distance_au[i]!);
    day.extraterrestrial_Wm2[i] = e0;
    day.tAir_C[i] = designTemperature_C(clock_min[i]!, input.maximum_C, input.range_K);
    const apparent = sun.apparentAltitude_rad[i]!;
    if (!(apparent > 0)) continue;
    const airMass = relativeAirMass(apparent);
    const sky = ineichenPerez(
      {
        apparentAltitude_rad: apparent,
        extraterrestrial_Wm2: e0,
        airMass,
        pressure_hPa,
        elevation_m: observer.elevation_m,
      },
      turbidity,
    );
    // The house's sun is the true one: while refraction alone lifts it above the horizon there is sky light but no beam.
    const up = sun.altitude_rad[i]! > 0;
    day.airMass[i] = airMass;
    day.beamNormal_Wm2[i] = up ? sky.beamNormal_Wm2 : 0;
    day.diffuse_Wm2[i] = sky.diffuse_Wm2;
    day.global_Wm2[i] = up ? sky.global_Wm2 : sky.diffuse_Wm2;
  }
  return {
    key: input.key,
    name: input.name,
    date: input.date,
    step_min: input.step_min,
    instant_ms,
    clock_min,
    azimuth_rad: sun.azimuth_rad,
    altitude_rad: sun.altitude_rad,
    ...day,
  };
}

/**
 * A hot spell: so many design days on end, the last on the date of the input, each with the same temperatures and its own sun.
 * Keys are the input's with the number of the day, `hot-1`, `hot-2` …
 * @param days  1 to 60
 */
export function hotSpell(input: DesignDayInput, days: number): DayGrid[] {
  if (!Number.isInteger(days) || days < 1 || days > 60)
    throw new RangeError(`a hot spell lasts 1 to 60 days, got ${days}`);
  return Array.from({ length: days }, (_, i) => {
    const date = addDays(input.date, i + 1 - days);
    return designDay({ ...input, key: `${input.key}-${i + 1}`, name: `${input.name}, day ${i + 1} of ${days}`, date });
  });
}

/** Faults of a design day as a user gave it: place of each, its range and the cure. */
export function checkDesignDay(input: DesignDayInput, place: string): readonly Fault[] {
  const at = place === '' ? '' : `${place}.`;
  const { observer } = input;
  const turbidities = typeof input.linkeTurbidity === 'number' ? [input.linkeTurbidity] : input.linkeTurbidity;
  const faults: Fault[] = turbidities.flatMap((linkeTurbidity, i) =>
    checkClearAir({ model: 'ineichen-perez', linkeTurbidity }, '').map((f) => ({
      ...f,
      place: `${at}linkeTurbidity${turbidities.length > 1 ? `[${i}]` : ''}`,
    })),
  );
  if (typeof input.linkeTurbidity !== 'number' && turbidities.length !== 12) {
    const message = `Linke turbidity must be one value or twelve, got ${turbidities.length}`;
    faults.push({
      level: 'error',
      code: 'twelve-months',
      place: `${at}linkeTurbidity`,
      message,
      cure: 'give one value for the year or one a month',
    });
  }
  if (!isDate(input.date)) {
    const message = `\`${input.date}\` is no date of the calendar`;
    faults.push({ level: 'error', code: 'date', place: `${at}date`, message, cure: 'write it as YYYY-MM-DD' });
  }
  if (!isZone(input.zone)) {
    const message = `\`${input.zone}\` is no zone of the time zone database`;
    faults.push({ level: 'error', code: 'zone', place: `${at}zone`, message, cure: 'name one, such as Europe/London' });
  }
  const pressure_hPa = observer.pressure_hPa ?? standardPressure_hPa(observer.elevation_m);
  faults.push(...checkClearSun({ pressure_hPa, elevation_m: observer.elevation_m }, `${at}observer`));
  faults.push(
    ...outOfRange(
      input.maximum_C,
      { name: 'maximum temperature', unit: '°C', min: -30, max: 60, usual: '30' },
      `${at}maximum`,
    ),
  );
  faults.push(
    ...outOfRange(
      input.range_K,
      { name: 'daily range of temperature', unit: 'K', min: 0, max: 40, usual: '10' },
      `${at}range`,
    ),
  );
  faults.push(...outOfRange(input.step_min, { name: 'step', unit: 'min', min: 1, max: 60, usual: '5' }, `${at}step`));
  return faults;
}
