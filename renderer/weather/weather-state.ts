import { computed, effect, signal } from '@preact/signals';
import { applyEdit } from '../../core/scheme/edit.ts';
import { type Fault, faultLine } from '../../core/scheme/fault.ts';
import type { Weather } from '../../core/scheme/weather-schema.ts';
import type { TableGuess } from '../../core/sky/weather/guess-table.ts';
import type { WeatherMapping } from '../../core/sky/weather/mapping.ts';
import type { WeatherFacts } from '../../core/study/weather-facts.ts';
import { host } from '../bridge/host.ts';
import { hands } from '../jobs/hands.ts';
import { committed, edit, file as schemeFile, scheme } from '../state/document.ts';
import { tell } from '../state/messages.ts';
import { weatherAtHand } from '../state/weather-at-hand.ts';
import { words } from '../words/words.ts';

/** A file that was chosen in this session: its data stay here and never go into the scheme. */
export type WeatherFile = { readonly name: string; readonly bytes: Uint8Array };

export type WeatherReading = {
  readonly file: WeatherFile;
  readonly hash: string;
  readonly mapping: WeatherMapping | null;
  readonly guess: TableGuess | null;
  readonly outcome:
    | { readonly kind: 'read'; readonly facts: WeatherFacts; readonly notes: readonly Fault[] }
    | { readonly kind: 'faults'; readonly faults: readonly Fault[] };
};

/** The file read last, whether or not it could be. */
export const reading = signal<WeatherReading | null>(null);
export const isReadingWeather = signal(false);

/** What the open scheme goes by. */
export const weatherOfScheme = computed<Weather | null>(() => scheme.value?.weather ?? null);

/** Whether the file at hand is the one that the scheme goes by, read as the scheme says. */
export const isAtHand = computed(() => {
  const [kept, now] = [weatherOfScheme.value, reading.value];
  if (kept === null || now === null || now.outcome.kind !== 'read') return false;
  return now.hash === kept.hash && isSameMapping(now.mapping, kept.mapping);
});

const isSameMapping = (a: WeatherMapping | null, b: WeatherMapping | null): boolean =>
  JSON.stringify(a) === JSON.stringify(b);

// Faults of a file belong to the scheme that it was chosen for.
effect(() => {
  if (schemeFile.value === null || reading.peek()?.outcome.kind === 'faults') reading.value = null;
});

effect(() => {
  const now = reading.value;
  weatherAtHand.value =
    isAtHand.value && now !== null
      ? { name: now.file.name, bytes: now.file.bytes, hash: now.hash, mapping: now.mapping }
      : null;
});

/** Whether the file does not say itself what its columns are. */
export const isUnknown = (now: WeatherReading): boolean =>
  now.outcome.kind === 'faults' && now.outcome.faults.some((fault) => fault.code === 'unknown-form');

export async function chooseWeather(): Promise<void> {
  const reply = await host['weather:open'](null);
  if (!reply.ok) return tell('failure', words.weather.failed(reply.message));
  if (reply.value !== null) await takeWeather(reply.value);
}

/** A file that was chosen or dropped. The one that the scheme goes by is read as the scheme says. */
export async function takeWeather(file: WeatherFile): Promise<void> {
  const kept = weatherOfScheme.peek();
  await readFile(file, kept?.file === file.name ? kept.mapping : null);
}

/** Reads the file and, when that goes well, makes it the one that the scheme goes by. */
export async function readFile(file: WeatherFile, mapping: WeatherMapping | null): Promise<void> {
  const of = scheme.peek();
  if (of === null) return;
  const { latitude, longitude, elevation, zone } = of.site;
  isReadingWeather.value = true;
  const outcome = await hands.weather.run('weather', {
    bytes: file.bytes,
    mapping,
    observer: { latitude_deg: latitude, longitude_deg: longitude, elevation_m: elevation },
    zone,
  });
  isReadingWeather.value = false;
  if (outcome.kind === 'failed')
    return tell('failure', words.status.workerFailed(words.weather.label, outcome.message));
  if (outcome.kind !== 'done' || outcome.superseded) return;
  const { hash, facts, guess } = outcome.result;
  reading.value = {
    file,
    hash,
    mapping,
    guess,
    outcome: facts.ok
      ? { kind: 'read', facts: facts.value, notes: facts.notes }
      : { kind: 'faults', faults: facts.faults },
  };
  if (!facts.ok || scheme.peek() !== of) return;
  const before = of.weather;
  if (before?.file === file.name && before.hash !== hash) tell('news', words.weather.changed(file.name));
  keep({ file: file.name, hash, mapping });
}

/** Has the scheme go by a file, as one step; nothing is done where it does so already. */
function keep(weather: { file: string; hash: string; mapping: WeatherMapping | null } | null): void {
  const of = committed.peek();
  if (of === null) return;
  const now = of.weather ?? null;
  const isSame =
    weather !== null &&
    now !== null &&
    now.hash === weather.hash &&
    now.file === weather.file &&
    isSameMapping(now.mapping, weather.mapping);
  if (isSame) return;
  const next = applyEdit(of, { kind: 'set-head', field: 'weather', value: weather });
  if (next.ok) edit(weather === null ? words.weather.editOff : words.weather.editSet, () => next.value);
  else tell('failure', next.faults.map(faultLine).join(' · '));
}

export function takeOffWeather(): void {
  keep(null);
  reading.value = null;
}
