import type { Checked, Fault } from '../scheme/fault.ts';
import { wrap180 } from '../units/angle.ts';
import type { Observer } from './position.ts';

type Bound = {
  readonly key: keyof Observer;
  readonly name: string;
  readonly least: number;
  readonly most: number;
  readonly unit: string;
  readonly cure: string;
};

/**
 * What an observer on the Earth can be. Land reaches from −430 to 8849 m. Pressures: 1085 hPa is the highest measured, 300 hPa
 * lies above the highest summit; so 0 and a value in pascals are both caught. Air from −90 to 60 °C: the measured extremes
 * (WMO, World Weather and Climate Extremes Archive) are −89.2 and 56.7. ΔT was −3 s in 1900 and is foreseen near 200 s in 2100.
 */
const BOUNDS: readonly Bound[] = [
  { key: 'latitude_deg', name: 'latitude', least: -90, most: 90, unit: '°', cure: 'north is positive, south negative' },
  {
    key: 'longitude_deg',
    name: 'longitude',
    least: -180,
    most: 180,
    unit: '°',
    cure: 'east is positive, west negative',
  },
  { key: 'elevation_m', name: 'elevation', least: -500, most: 9000, unit: ' m', cure: 'give metres above the sea' },
  {
    key: 'pressure_hPa',
    name: 'pressure',
    least: 300,
    most: 1100,
    unit: ' hPa',
    cure: 'give the pressure at the place itself, about 1013 at the sea, or leave it out for the standard atmosphere',
  },
  {
    key: 'temperature_C',
    name: 'temperature',
    least: -90,
    most: 60,
    unit: ' °C',
    cure: 'give the air temperature, or leave it out for 12 °C',
  },
  {
    key: 'deltaT_s',
    name: 'delta T',
    least: -60,
    most: 600,
    unit: ' s',
    cure: 'give terrestrial less universal time, about 70 now, or leave it out for the published polynomials',
  },
];

function outOfBounds(bound: Bound, value: number): Fault {
  const { key, name, least, most, unit } = bound;
  const around = key === 'longitude_deg' && Number.isFinite(value);
  return {
    level: 'error',
    code: 'out-of-range',
    place: name,
    message: `must be from ${least} to ${most}${unit}, got ${value}`,
    cure: around ? `${value}° is the meridian of ${Number(wrap180(value).toFixed(9))}°; ${bound.cure}` : bound.cure,
  };
}

const poleNote = (latitude_deg: number): Fault => ({
  level: 'warning',
  code: 'at-a-pole',
  place: 'latitude',
  message: `at a pole every direction is ${latitude_deg > 0 ? 'south' : 'north'}, and azimuths are counted from the meridian of the longitude given`,
  cure: 'read azimuths against that meridian, or move off the pole',
});

/**
 * Whether an observer can be one. Nothing is set right in silence: a longitude of 540° is a fault whose cure names 180°.
 * @returns the observer as given, with a note at a pole; or every fault, `place` being latitude, longitude, elevation,
 *          pressure, temperature or delta T
 */
export function checkObserver(observer: Observer): Checked<Observer> {
  const faults = BOUNDS.flatMap((bound) => {
    const value = observer[bound.key];
    return value === undefined || (value >= bound.least && value <= bound.most) ? [] : [outOfBounds(bound, value)];
  });
  if (faults.length > 0) return { ok: false, faults };
  const atPole = Math.abs(observer.latitude_deg) === 90;
  return { ok: true, value: observer, notes: atPole ? [poleNote(observer.latitude_deg)] : [] };
}

const DAY_ms = 86_400_000;
// A civil day of 1 January 1900 begins up to 14 hours before it does in UTC, one of 31 December 2100 ends up to 12 after.
const FIRST_ms = Date.UTC(1900, 0, 1) - DAY_ms;
const LAST_ms = Date.UTC(2101, 0, 1) + DAY_ms;

/**
 * Whether an instant lies in the years for which positions are promised, 1900 to 2100 in any zone. The algorithm holds from
 * −2000 to 6000, but not the ΔT kept here nor the rules of the clocks.
 * @param instant_ms UTC milliseconds
 */
export function checkInstant(instant_ms: number): Checked<number> {
  if (instant_ms >= FIRST_ms && instant_ms < LAST_ms) return { ok: true, value: instant_ms, notes: [] };
  const isReal = Number.isFinite(instant_ms) && Math.abs(instant_ms) <= 8.64e15;
  const message = isReal
    ? `lies in the year ${new Date(instant_ms).getUTCFullYear()}, outside the years 1900 to 2100`
    : 'is no instant';
  return {
    ok: false,
    faults: [
      {
        level: 'error',
        code: 'out-of-range',
        place: 'instant',
        message,
        cure: 'give a date from 1900-01-01 to 2100-12-31',
      },
    ],
  };
}
