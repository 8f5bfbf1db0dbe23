import { basename, dirname, join } from 'node:path';
import { type Checked, faultLine } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { WeatherMapping } from '../../core/sky/weather/mapping.ts';
import type { WeatherYear } from '../../core/sky/weather/weather-year.ts';
import type { WeatherInput } from '../../core/study/weather-input.ts';
import { Speller, SPELLINGS } from '../contract/file-text.ts';
import { MAX_BYTES } from '../contract/host.ts';
import { type ReadFault, streamBounded } from '../files/read-bounded.ts';
import { accepted } from './read-input.ts';
import { Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';

/** What a file says, and the hash of its bytes; or what kept it from being read. */
type Read = { readonly ok: true; readonly hash: string; readonly year: Checked<WeatherYear> };
type ReadOrFault = Read | { readonly ok: false; readonly fault: ReadFault };

/**
 * Reads a file as it streams in: its text, its bytes' hash and its rows go by piece by piece. Bytes that turn out to be no UTF-8 are
 * begun again in the other spelling.
 */
async function stream(path: string, mapping: WeatherMapping | null): Promise<ReadOrFault> {
  const [{ WeatherReader }, { growingHash }] = await Promise.all([
    import('../../core/sky/weather/weather-reader.ts'),
    import('../../core/scheme/hash.ts'),
  ]);
  for (const spelling of SPELLINGS) {
    const [speller, reader, hash] = [new Speller(spelling), new WeatherReader(mapping), growingHash()];
    try {
      // The hash is that of the whole file, wherever its rows end.
      const fault = await streamBounded(path, MAX_BYTES, (piece) => {
        hash.add(piece);
        reader.push(speller.push(piece));
        return true;
      });
      if (fault !== null) return { ok: false, fault };
      reader.push(speller.finish());
    } catch (error) {
      if (spelling === 'utf-8' && error instanceof TypeError) continue;
      throw error;
    }
    return { ok: true, hash: hash.text(), year: reader.finish() };
  }
  throw new Error('Latin 1 spells every byte');
}

async function read(path: string, scheme: Scheme, screen: Screen): Promise<WeatherInput | ReadFault> {
  const { weatherInput } = await import('../../core/study/weather-input.ts');
  const kept = scheme.weather ?? null;
  const name = basename(path);
  const own = kept !== null && kept.file === name ? kept : null;
  let file = await stream(path, own?.mapping ?? null);
  if (!file.ok) return file.fault;
  const { hash } = file;
  if (own !== null && own.hash !== hash)
    screen.note(`note: ${path}: this file has other content than the ${own.file} that the scheme went by.\n`);
  // The file that the scheme goes by is read as the scheme says, also under another name; another one that does not say what its
  // columns are is most likely laid out as the scheme's own.
  const isUnknown = !file.year.ok && file.year.faults.some((fault) => fault.code === 'unknown-form');
  let mapping = own?.mapping ?? null;
  if (own === null && kept !== null && kept.mapping !== null && (kept.hash === hash || isUnknown)) {
    mapping = kept.mapping;
    file = await stream(path, mapping);
    if (!file.ok) return file.fault;
  }
  const input = weatherInput(scheme, { name, hash: file.hash }, file.year, mapping);
  // What the weather is warned of stands in the report.
  return accepted(path, input, { ...screen, note: () => undefined });
}

const isFault = (outcome: WeatherInput | ReadFault): outcome is ReadFault => 'code' in outcome;

/** The weather file that the user named. @throws {Refusal} with every fault and its place */
export async function readWeatherFile(path: string, scheme: Scheme, screen: Screen): Promise<WeatherInput> {
  const outcome = await read(path, scheme, screen);
  if (isFault(outcome)) throw new Refusal(`--weather ${path}: ${outcome.message}; check the name and the folder.`);
  return outcome;
}

/**
 * The weather file that the scheme goes by, where it lies beside the scheme. One that is not there is told, and the check goes on
 * by its design days; one that has faults is refused, since its author meant it to count.
 */
export async function weatherBeside(schemePath: string, scheme: Scheme, screen: Screen): Promise<WeatherInput | null> {
  const kept = scheme.weather ?? null;
  if (kept === null) return null;
  // A name, never a way out of the scheme's folder.
  const path = join(dirname(schemePath), basename(kept.file));
  const outcome = await read(path, scheme, screen);
  if (!isFault(outcome)) return outcome;
  const fault = {
    level: 'warning',
    code: 'no-weather',
    place: 'weather.file',
    message: `${kept.file} does not lie beside the scheme, so only the clear design days are checked`,
    cure: 'put it there, or name it with --weather',
  } as const;
  screen.note(`note: ${schemePath}: ${faultLine(fault)}.\n`);
  return null;
}
