import type { Observer } from '../../sun/position.ts';
import { rootBetween } from '../../sun/root.ts';
import { type SunTable, sunTable } from '../../sun/sun-table.ts';
import { sunTrack } from '../../sun/sun-track.ts';
import type { WeatherYear } from './weather-year.ts';

/** The sun that stands for each row of a year of weather. */
export type RowSun = SunTable & {
  /** The instant it was put at [UTC ms]. */
  readonly instant_ms: Float64Array;
};

/**
 * The sun of every row: at the middle of its interval, and in the rows of sunrise and sunset at the middle of the part of the
 * interval in which it is above the horizon (true altitude), for that is when the row's sunlight came. A row read at one instant
 * has the sun of that instant.
 */
export function rowSun(weather: WeatherYear, observer: Observer): RowSun {
  const { start_ms, end_ms, rows, label } = weather;
  const instant_ms = start_ms.map((start, i) => (start + end_ms[i]!) / 2);
  if (label !== 'instant') {
    const atStart = sunTable(start_ms, observer).altitude_rad;
    const atEnd = sunTable(end_ms, observer).altitude_rad;
    const track = sunTrack(observer);
    const sight = { azimuth_rad: 0, altitude_rad: 0, distance_au: 1 };
    const altitude = (t_ms: number): number => {
      track(t_ms, sight);
      return sight.altitude_rad;
    };
    for (let i = 0; i < rows; i++) {
      const rises = atStart[i]! <= 0 && atEnd[i]! > 0;
      const sets = atStart[i]! > 0 && atEnd[i]! <= 0;
      if (!rises && !sets) continue;
      const crossing = rootBetween(altitude, start_ms[i]!, end_ms[i]!, 1000);
      instant_ms[i] = rises ? (crossing + end_ms[i]!) / 2 : (start_ms[i]! + crossing) / 2;
    }
  }
  return { ...sunTable(instant_ms, observer), instant_ms };
}
