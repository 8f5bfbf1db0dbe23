import type { Checked } from '../../scheme/fault.ts';
import { isJrc, readJrc } from './jrc.ts';
import { readMapped } from './mapped.ts';
import type { WeatherMapping } from './mapping.ts';
import { isTmy3, readTmy3 } from './tmy3.ts';
import type { WeatherYear } from './weather-year.ts';

/** A year in steps of a minute with a few columns is some tens of megabytes; what is longer is not read. */
const LONGEST = 100_000_000;

/**
 * Reads a year of weather from the text of a file: TMY3, a typical year of the Joint Research Centre, or any table of hourly or
 * sub-hourly rows with a mapping. A mapping, when there is one, decides; otherwise the file says what it is.
 * @returns the year with warnings, or every fault by line, with its cure
 */
export function readWeather(text: string, mapping: WeatherMapping | null = null): Checked<WeatherYear> {
  if (text.length > LONGEST) {
    const message = `${Math.round(text.length / 1e6)} million characters, where a year of minutes needs less than 100`;
    return { ok: false, faults: [{ level: 'error', code: 'too-long', place: '', message, cure: 'give one year' }] };
  }
  // The mark that some programs put at the head of a text file.
  const lines = (text.charCodeAt(0) === 0xfeff ? text.slice(1) : text).split('\n');
  if (mapping) return readMapped(lines, mapping);
  if (isTmy3(lines)) return readTmy3(lines);
  if (isJrc(lines)) return readJrc(lines);
  const message = 'the file is neither a TMY3 table nor a typical year of the Joint Research Centre';
  return {
    ok: false,
    faults: [
      {
        level: 'error',
        code: 'unknown-form',
        place: 'line 1',
        message,
        cure: 'say which column is what, in a mapping',
      },
    ],
  };
}
