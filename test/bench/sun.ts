import * as Astronomy from 'astronomy-engine';
import * as suncalc from 'suncalc';
import { addDays } from '../../core/sun/civil.ts';
import { sunEvents } from '../../core/sun/events.ts';
import type { Observer } from '../../core/sun/position.ts';
import { seasons } from '../../core/sun/seasons.ts';
import { sunPosition } from '../../core/sun/spa.ts';
import { SunKnots } from '../../core/sun/sun-knots.ts';
import { sunTable } from '../../core/sun/sun-table.ts';
import { type SunSight, sunTrack } from '../../core/sun/sun-track.ts';
import { DEG, toDegrees } from '../../core/units/angle.ts';
import type { Row } from './row.ts';

const ROUNDS = 9;
const SUNCALC = 'suncalc 2.0.2';
const ENGINE = 'astronomy-engine 2.1.19';

const observer: Observer = { latitude_deg: 51.5, longitude_deg: -0.13, elevation_m: 20 };
const there = new Astronomy.Observer(observer.latitude_deg, observer.longitude_deg, observer.elevation_m);
const yearInstants = Float64Array.from({ length: 105_120 }, (_, i) => Date.UTC(2025, 0, 1) + (i + 0.5) * 300_000);
const instants = yearInstants.filter((_, i) => i % 11 === 0);
const dates = Array.from({ length: 365 }, (_, i) => addDays('2025-01-01', i));

/** One side of a comparison: does `count` pieces of work and returns a sum, so that nothing can be left out as unused. */
type Side = { readonly count: number; readonly run: () => number };

type Pace = { readonly best: number; readonly median: number; readonly sum: number };

const pace = (side: Side, seconds: number[], sum: number): Pace => {
  seconds.sort((a, b) => a - b);
  return { best: side.count / seconds[0]!, median: side.count / seconds[seconds.length >> 1]!, sum };
};

/** Both sides turn and turn about in one process, so that a machine that slows down slows both. */
function turnAbout(ours: Side, theirs: Side): readonly [Pace, Pace] {
  const times: [number[], number[]] = [[], []];
  const sums: [number, number] = [0, 0];
  for (let round = -2; round < ROUNDS; round++)
    for (const [k, side] of [ours, theirs].entries()) {
      const start = performance.now();
      const sum = side.run();
      const seconds = (performance.now() - start) / 1000;
      if (round < 0) continue;
      times[k]!.push(seconds);
      sums[k] = sum;
    }
  return [pace(ours, times[0], sums[0]), pace(theirs, times[1], sums[1])];
}

const rate = (n: number): string => n.toExponential(2);

function row(what: string, ours: Side, other: string, theirs: Side, accuracy: string): Row {
  const [a, b] = turnAbout(ours, theirs);
  const spread = `median ${rate(a.median)} against ${rate(b.median)}; sums ${a.sum.toFixed(3)}, ${b.sum.toFixed(3)}`;
  return {
    what,
    ours_perSecond: a.best,
    other,
    other_perSecond: b.best,
    ratio: a.median / b.median,
    note: `${accuracy}; ratio of medians of ${ROUNDS} rounds, rates the best; ${spread}`,
  };
}

type Horizontal = { readonly azimuth_deg: number; readonly altitude_deg: number };

/** Largest angle on the sky from the full algorithm over the sampled year, above the horizon [°]. */
function farthest_deg(
  seen: (instant_ms: number) => Horizontal,
  altitude: 'altitude_deg' | 'apparentAltitude_deg',
): string {
  let worst = 0;
  for (let i = 0; i < instants.length; i += 7) {
    const full = sunPosition(instants[i]!, observer);
    if (full.altitude_deg < 1) continue;
    const other = seen(instants[i]!);
    const turn = (((other.azimuth_deg - full.azimuth_deg + 540) % 360) - 180) * Math.cos(full.altitude_deg * DEG);
    worst = Math.max(worst, Math.hypot(turn, other.altitude_deg - full[altitude]));
  }
  return `${worst.toPrecision(2)}°`;
}

const sight: SunSight = { azimuth_rad: 0, altitude_rad: 0, distance_au: 1 };
const track = sunTrack(observer);

const bySuncalc = (instant_ms: number): Horizontal => {
  const p = suncalc.getPosition(new Date(instant_ms), observer.latitude_deg, observer.longitude_deg);
  return { azimuth_deg: p.azimuth, altitude_deg: p.altitude };
};

const byEngine = (instant_ms: number): Horizontal => {
  const date = new Date(instant_ms);
  const sun = Astronomy.Equator(Astronomy.Body.Sun, date, there, true, true);
  const p = Astronomy.Horizon(date, there, sun.ra, sun.dec);
  return { azimuth_deg: p.azimuth, altitude_deg: p.altitude };
};

const byTrack = (instant_ms: number): Horizontal => {
  track(instant_ms, sight);
  return { azimuth_deg: toDegrees(sight.azimuth_rad), altitude_deg: toDegrees(sight.altitude_rad) };
};

const sumOver = (places: Float64Array, f: (instant_ms: number) => number): Side => ({
  count: places.length,
  run: () => places.reduce((sum, t) => sum + f(t), 0),
});

const table: Side = {
  count: yearInstants.length,
  run: () => sunTable(yearInstants, observer).altitude_rad.reduce((a, b) => a + b, 0),
};

const prepared = (): Side => {
  const look = sunTrack(observer);
  return sumOver(instants, (t) => {
    look(t, sight);
    return sight.altitude_rad;
  });
};

const overDays = (f: (date: string) => number): Side => ({
  count: dates.length,
  run: () => dates.reduce((sum, date) => sum + f(date), 0),
});

/** How far a library's sunrise lies from the search on the full algorithm, at most, over the days of the bench [s]. */
function sunriseOff_s(rise: (date: string) => number): string {
  const off = dates.map((date) => Math.abs(rise(date) - (sunEvents(date, 'Etc/UTC', observer).sunrise_ms ?? 0)) / 1000);
  return `${Math.max(...off).toPrecision(2)} s`;
}

const suncalcRise = (date: string): number =>
  (
    suncalc.getTimes(new Date(`${date}T12:00Z`), observer.latitude_deg, observer.longitude_deg).sunrise as Date
  ).getTime();

const engineDay = (date: string): number => {
  const start = new Date(`${date}T00:00Z`);
  const rise = Astronomy.SearchRiseSet(Astronomy.Body.Sun, there, 1, start, 1);
  const set = Astronomy.SearchRiseSet(Astronomy.Body.Sun, there, -1, start, 1);
  const noon = Astronomy.SearchHourAngle(Astronomy.Body.Sun, there, 0, start);
  return (rise?.date.getTime() ?? 0) + 0 * ((set?.ut ?? 0) + noon.time.ut);
};

/** Speed of the sun beside two public libraries, each with how far it lies from the algorithm in full. */
export async function benchSun(): Promise<Row[]> {
  Astronomy.SetDeltaTFunction(Astronomy.DeltaT_EspenakMeeus);
  const off = `off SPA by at most: ours ${farthest_deg(byTrack, 'altitude_deg')}`;
  const offSuncalc = `${off}, ${SUNCALC} ${farthest_deg(bySuncalc, 'apparentAltitude_deg')} (apparent place)`;
  const offEngine = `${off}, ${ENGINE} ${farthest_deg(byEngine, 'altitude_deg')}`;
  const full = sumOver(instants, (t) => sunPosition(t, observer).altitude_deg);
  const suncalcSide = sumOver(instants, (t) => bySuncalc(t).altitude_deg);
  const engineSide = sumOver(instants, (t) => byEngine(t).altitude_deg);
  // A new set of knots each turn, as a view of a whole year would make one.
  const day: Side = {
    count: dates.length,
    run: () => {
      const knots = new SunKnots();
      return dates.reduce((sum, date) => sum + (sunEvents(date, 'Etc/UTC', observer, 0, knots).sunrise_ms ?? 0), 0);
    },
  };
  const rises = `sunrise off the search on SPA by at most: ${SUNCALC} ${sunriseOff_s(suncalcRise)}, ${ENGINE} ${sunriseOff_s(engineDay)}`;
  const years: Side = {
    count: 5,
    run: () => [1, 2, 3, 4, 5].reduce((s, y) => s + seasons(2020 + y).juneSolstice_ms, 0),
  };
  const yearsEngine: Side = {
    count: 5,
    run: () => [1, 2, 3, 4, 5].reduce((s, y) => s + Astronomy.Seasons(2020 + y).jun_solstice.date.getTime(), 0),
  };
  return [
    row('table of 105 120 positions (a year at 5 min)', table, SUNCALC, suncalcSide, offSuncalc),
    row('prepared sun, single calls in order of time', prepared(), SUNCALC, suncalcSide, offSuncalc),
    row('prepared sun, single calls in order of time', prepared(), ENGINE, engineSide, offEngine),
    row('full algorithm, single calls', full, SUNCALC, suncalcSide, `${offSuncalc}; ours here is SPA in full`),
    row('full algorithm, single calls', full, ENGINE, engineSide, `${offEngine}; ours here is SPA in full`),
    row('rise, transit and set of a day', day, SUNCALC, overDays(suncalcRise), rises),
    row('rise, transit and set of a day', day, ENGINE, overDays(engineDay), rises),
    row('four seasons of a year', years, ENGINE, yearsEngine, 'accuracy: see test/core/sun/facts.test.ts, 60 s'),
  ];
}
