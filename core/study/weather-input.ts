import { type WeatherMonths, weatherMonths } from '../gain/weather-run.ts';
import type { Checked, Fault } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { WeatherMapping } from '../sky/weather/mapping.ts';
import { FAR_CLOCK } from '../sky/weather/check-clock.ts';
import { weatherGrid } from '../sky/weather/weather-grid.ts';
import type { WeatherPlace, WeatherYear } from '../sky/weather/weather-year.ts';

/** A year of weather as a check reports it. */
export type WeatherUsed = {
  /** Name of the file, without its folder. */
  readonly file: string;
  /** SHA-256 of its bytes, hexadecimal. */
  readonly hash: string;
  readonly kind: string;
  readonly place: WeatherPlace;
  readonly rows: number;
  readonly step_min: number;
};

/** A year of weather ready for a check. */
export type WeatherInput = {
  readonly used: WeatherUsed;
  readonly months: WeatherMonths;
  readonly notes: readonly Fault[];
};

/**
 * A year of weather made ready for a scheme's site.
 * @param file    its name and the hash of its bytes
 * @param read    what was read from it
 * @param mapping by which it was read; null where the file says itself what its columns are
 * @returns every fault of the file with its place and cure, one whose clock is hours from the site's sun among them, or the year
 *          with its warnings
 */
export function weatherInput(
  scheme: Scheme,
  { name, hash }: { readonly name: string; readonly hash: string },
  read: Checked<WeatherYear>,
  mapping: WeatherMapping | null,
): Checked<WeatherInput> {
  if (!read.ok) return read;
  const year = read.value;
  const { site } = scheme;
  const observer = { latitude_deg: site.latitude, longitude_deg: site.longitude, elevation_m: site.elevation };
  const { grid, notes } = weatherGrid(year, observer, site.zone);
  const far = notes.filter((note) => note.code === FAR_CLOCK);
  if (far.length > 0) return { ok: false, faults: far.map((note) => ({ ...note, level: 'error', place: 'weather' })) };
  const key = JSON.stringify([hash, mapping, observer, site.zone]);
  const { kind, place, rows, step_min } = year;
  // The file's own places are rows of it; what has none is of the file as a whole.
  const all = [...read.notes, ...notes].map((note) => (note.place === '' ? { ...note, place: 'weather' } : note));
  return {
    ok: true,
    value: {
      used: { file: name, hash, kind, place, rows, step_min },
      months: weatherMonths(grid, year.month, key),
      notes: all,
    },
    notes: all,
  };
}
