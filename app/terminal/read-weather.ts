import { basename, dirname, join } from 'node:path';
import { faultLine } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { WeatherInput } from '../../core/study/weather-input.ts';
import type { ReadFault } from '../files/read-bounded.ts';
import { accepted } from './read-input.ts';
import { Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';
import { streamWeather } from './stream-weather.ts';

async function read(path: string, scheme: Scheme, screen: Screen): Promise<WeatherInput | ReadFault> {
  const { weatherInput } = await import('../../core/study/weather-input.ts');
  const kept = scheme.weather ?? null;
  const name = basename(path);
  const own = kept !== null && kept.file === name ? kept : null;
  let file = await streamWeather(path, own?.mapping ?? null);
  if (!file.ok) return file.fault;
  const { hash } = file;
  if (own !== null && hash !== null && own.hash !== hash)
    screen.note(`note: ${path}: this file has other content than the ${own.file} that the scheme went by.\n`);
  // The file that the scheme goes by is read as the scheme says, also under another name; another one that does not say what its
  // columns are is most likely laid out as the scheme's own.
  const isUnknown = !file.year.ok && file.year.faults.some((fault) => fault.code === 'unknown-form');
  let mapping = own?.mapping ?? null;
  if (own === null && kept !== null && kept.mapping !== null && (kept.hash === hash || isUnknown)) {
    mapping = kept.mapping;
    file = await streamWeather(path, mapping);
    if (!file.ok) return file.fault;
  }
  // Without a hash the file was too long: there is no year to keep it with.
  const input = weatherInput(scheme, { name, hash: file.hash ?? '' }, file.year, mapping);
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
