import { basename, dirname, join } from 'node:path';
import { faultLine } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { WeatherInput } from '../../core/study/weather-input.ts';
import { fileText } from '../contract/file-text.ts';
import { MAX_BYTES } from '../contract/host.ts';
import { readBounded } from '../files/read-bounded.ts';
import { accepted } from './read-input.ts';
import { Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';

async function read(path: string, bytes: Uint8Array, scheme: Scheme, screen: Screen): Promise<WeatherInput> {
  const [{ weatherInput }, { bytesHash }] = await Promise.all([
    import('../../core/study/weather-input.ts'),
    import('../../core/scheme/hash.ts'),
  ]);
  const kept = scheme.weather ?? null;
  const name = basename(path);
  // The file that the scheme goes by is read as the scheme says, also under another name.
  const isKept = kept !== null && (kept.file === name || kept.hash === bytesHash(bytes));
  if (kept !== null && kept.file === name && kept.hash !== bytesHash(bytes))
    screen.note(`note: ${path}: this file has other content than the ${kept.file} that the scheme went by.\n`);
  const text = fileText(bytes);
  let input = weatherInput(scheme, name, bytes, text, isKept ? kept.mapping : null);
  // Another file that does not say what its columns are is most likely laid out as the scheme's own.
  if (!input.ok && !isKept && kept !== null && input.faults.some((fault) => fault.code === 'unknown-form'))
    input = weatherInput(scheme, name, bytes, text, kept.mapping);
  return accepted(path, input, {
    ...screen,
    // What the weather is warned of stands in the report.
    note: () => undefined,
  });
}

/** The weather file that the user named. @throws {Refusal} with every fault and its place */
export async function readWeatherFile(path: string, scheme: Scheme, screen: Screen): Promise<WeatherInput> {
  const outcome = await readBounded(path, MAX_BYTES);
  if (!outcome.ok) throw new Refusal(`--weather ${path}: ${outcome.fault.message}; check the name and the folder.`);
  return read(path, outcome.bytes, scheme, screen);
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
  const outcome = await readBounded(path, MAX_BYTES);
  if (outcome.ok) return read(path, outcome.bytes, scheme, screen);
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
