import type { Checked } from '../scheme/fault.ts';
import type { WeatherMapping } from '../sky/weather/mapping.ts';
import { readWeather } from '../sky/weather/read-weather.ts';
import { type WeatherSummary, weatherSummary } from '../sky/weather/summary.ts';
import { weatherGrid } from '../sky/weather/weather-grid.ts';
import type { Label, Quantity, WeatherPlace } from '../sky/weather/weather-year.ts';
import type { Observer } from '../sun/position.ts';

/** What there is to know of a year of weather before it is used. */
export type WeatherFacts = {
  readonly kind: string;
  readonly place: WeatherPlace;
  readonly rows: number;
  readonly step_min: number;
  readonly label: Label;
  /** Quantities that the file does not bring. */
  readonly missing: readonly Quantity[];
  readonly summary: WeatherSummary;
};

/**
 * A weather file read, summed up and held against the sun of the site.
 * @param text     of the file, whole or in pieces
 * @param mapping  null where the file says itself what its columns are
 * @param observer the site
 * @param zone     of the site
 * @returns the facts with every warning, or every fault with its place and cure
 */
export function weatherFacts(
  text: string | Iterable<string>,
  mapping: WeatherMapping | null,
  observer: Observer,
  zone: string,
): Checked<WeatherFacts> {
  const read = readWeather(text, mapping);
  if (!read.ok) return read;
  const year = read.value;
  const { kind, place, rows, step_min, label, columns } = year;
  const missing = (Object.keys(columns) as Quantity[]).filter((quantity) => columns[quantity] === null);
  const { notes } = weatherGrid(year, observer, zone);
  return {
    ok: true,
    value: { kind, place, rows, step_min, label, missing, summary: weatherSummary(year) },
    notes: [...read.notes, ...notes],
  };
}
