import type { Checked } from '../../scheme/fault.ts';
import type { WeatherMapping } from './mapping.ts';
import { WeatherReader } from './weather-reader.ts';
import type { WeatherYear } from './weather-year.ts';

/**
 * A year of weather from the text of a file, in pieces as they come; they may end anywhere.
 * @param text    whole, or its pieces
 * @param mapping null where the file says itself what its columns are
 * @returns the year with warnings, or every fault by line, with its cure
 */
export function readWeather(
  text: string | Iterable<string>,
  mapping: WeatherMapping | null = null,
): Checked<WeatherYear> {
  const reader = new WeatherReader(mapping);
  for (const piece of typeof text === 'string' ? [text] : text) if (!reader.push(piece)) break;
  return reader.finish();
}
