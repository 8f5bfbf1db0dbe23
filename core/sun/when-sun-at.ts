import * as maths from '../maths/maths.ts';
import type { Observer } from './position.ts';
import { seasons } from './seasons.ts';
import { sunTable } from './sun-table.ts';

const DAY_ms = 86_400_000;
const COARSE_DAYS = 4;
const STEP_ms = 600_000;

/** What was found, and how far the sun is from the direction asked for then [rad]. */
export type WhenSun = { readonly instant_ms: number; readonly away_rad: number };

/**
 * When the sun comes nearest to a direction. It passes through each twice a year, once on either side of a solstice: the half year
 * between solstices that holds `near_ms` is searched.
 * @param azimuth_rad  clockwise from true north; @param altitude_rad true altitude
 * @param observer     place
 * @param near_ms      an instant of the half year that is meant [UTC ms], 1900 to 2100
 * @returns the instant, to the minute
 */
export function whenSunAt(azimuth_rad: number, altitude_rad: number, observer: Observer, near_ms: number): WhenSun {
  const [from, to] = halfYear(near_ms);
  const wanted = unit(azimuth_rad, altitude_rad);
  const rough = nearest(days(from, to, COARSE_DAYS), wanted, observer);
  // The sun's ways of neighbouring days lie side by side, so the best day is next to the best of every fourth.
  const reach = COARSE_DAYS * DAY_ms;
  const start = from + Math.floor((rough.instant_ms - from) / DAY_ms) * DAY_ms;
  const best = nearest(days(Math.max(from, start - reach), Math.min(to, start + reach + DAY_ms), 1), wanted, observer);
  return { ...best, instant_ms: Math.round(best.instant_ms / 60_000) * 60_000 };
}

/** The solstices before and after an instant. */
function halfYear(near_ms: number): readonly [number, number] {
  const year = new Date(near_ms).getUTCFullYear();
  const turns = [year - 1, year, year + 1].flatMap((y) => {
    const { juneSolstice_ms, decemberSolstice_ms } = seasons(y);
    return [juneSolstice_ms, decemberSolstice_ms];
  });
  const after = turns.findIndex((t) => t > near_ms);
  return [turns[after - 1] as number, turns[after] as number];
}

/** First instants of days from one instant to another, some days apart. */
function days(from: number, to: number, apart: number): readonly number[] {
  const count = Math.max(1, Math.ceil((to - from) / (apart * DAY_ms)));
  return Array.from({ length: count }, (_, i) => from + i * apart * DAY_ms);
}

type Vector = readonly [number, number, number];

const unit = (azimuth_rad: number, altitude_rad: number): Vector => {
  const c = maths.cos(altitude_rad);
  return [c * maths.sin(azimuth_rad), c * maths.cos(azimuth_rad), maths.sin(altitude_rad)];
};

/** The instant of several days at which the sun comes nearest to a direction, on straight lines between steps of ten minutes. */
function nearest(starts: readonly number[], p: Vector, observer: Observer): WhenSun {
  const steps = DAY_ms / STEP_ms;
  let best: WhenSun = { instant_ms: starts[0] as number, away_rad: Math.PI };
  for (const start of starts) {
    const instants = Float64Array.from({ length: steps + 1 }, (_, i) => start + i * STEP_ms);
    const table = sunTable(instants, observer);
    let a = unit(table.azimuth_rad[0]!, table.altitude_rad[0]!);
    for (let i = 1; i <= steps; i++) {
      const b = unit(table.azimuth_rad[i]!, table.altitude_rad[i]!);
      const along: Vector = [b[0] - a[0], b[1] - a[1], b[2] - a[2]];
      const to: Vector = [p[0] - a[0], p[1] - a[1], p[2] - a[2]];
      const share = Math.min(1, Math.max(0, dot(to, along) / dot(along, along)));
      const away = Math.hypot(to[0] - share * along[0], to[1] - share * along[1], to[2] - share * along[2]);
      const away_rad = 2 * maths.asin(Math.min(1, away / 2));
      if (away_rad < best.away_rad) best = { instant_ms: instants[i - 1]! + share * STEP_ms, away_rad };
      a = b;
    }
  }
  return best;
}

const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
