import type { Checked } from '../../core/scheme/fault.ts';
import type { WeatherMapping } from '../../core/sky/weather/mapping.ts';
import type { WeatherYear } from '../../core/sky/weather/weather-year.ts';
import { Speller, SPELLINGS } from '../contract/file-text.ts';
import { MAX_BYTES } from '../contract/host.ts';
import { type ReadFault, streamBounded } from '../files/read-bounded.ts';

/** What a file says, and the hash of its bytes; null where it was not read to its end. */
type Read = { readonly ok: true; readonly hash: string | null; readonly year: Checked<WeatherYear> };

/**
 * Reads a weather file as it streams in: its text, its bytes' hash and its rows go by piece by piece. Bytes that turn out to be no
 * UTF-8 are begun again in the other spelling. A file that is too long is not read on from where that is known; any other goes
 * by to its end, wherever its rows end, since its hash is that of the whole.
 * @param mapping null where the file says itself what its columns are
 * @returns what it says, or what kept it from being read
 */
export async function streamWeather(
  path: string,
  mapping: WeatherMapping | null,
): Promise<Read | { readonly ok: false; readonly fault: ReadFault }> {
  const [{ WeatherReader }, { growingHash }] = await Promise.all([
    import('../../core/sky/weather/weather-reader.ts'),
    import('../../core/scheme/hash.ts'),
  ]);
  for (const spelling of SPELLINGS) {
    const [speller, reader, hash] = [new Speller(spelling), new WeatherReader(mapping), growingHash()];
    try {
      const fault = await streamBounded(path, MAX_BYTES, (piece) => {
        hash.add(piece);
        return reader.push(speller.push(piece)) || !reader.isTooLong;
      });
      if (fault !== null) return { ok: false, fault };
      if (!reader.isTooLong) reader.push(speller.finish());
    } catch (error) {
      if (spelling === 'utf-8' && error instanceof TypeError) continue;
      throw error;
    }
    return { ok: true, hash: reader.isTooLong ? null : hash.text(), year: reader.finish() };
  }
  throw new Error('Latin 1 spells every byte');
}
