import { useState } from 'preact/hooks';
import type { Fault } from '../../core/scheme/fault.ts';
import type { WeatherFacts } from '../../core/study/weather-facts.ts';
import { Button } from '../ui/button.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { fixed, placeOnEarth } from '../ui/format.ts';
import { words } from '../words/words.ts';
import { MappingDialog } from './mapping-dialog.tsx';
import { MonthTable } from './month-table.tsx';
import {
  chooseWeather,
  isAtHand,
  isReadingWeather,
  isUnknown,
  reading,
  takeOffWeather,
  type WeatherReading,
  weatherOfScheme,
} from './weather-state.ts';
import './weather.css';

/** The weather year that the scheme goes by: choose it, see what it holds, and say how it is read. */
export function WeatherPanel() {
  const kept = weatherOfScheme.value;
  const now = reading.value;
  if (isReadingWeather.value)
    return (
      <p class="weather-empty soft" role="status">
        {words.weather.reading}
      </p>
    );
  if (now !== null && now.outcome.kind === 'faults') return <Unread reading={now} faults={now.outcome.faults} />;
  if (kept === null || now === null || now.outcome.kind !== 'read' || !isAtHand.value) return <Nothing />;
  return <Read reading={now} facts={now.outcome.facts} notes={now.outcome.notes} />;
}

function Nothing() {
  const kept = weatherOfScheme.value;
  return (
    <div class="weather-empty">
      <h3>{kept === null ? words.weather.none : words.weather.label}</h3>
      <p class="soft">{kept === null ? words.weather.noneLine : words.weather.absent(kept.file)}</p>
      <div class="weather-actions">
        <Button onPress={() => void chooseWeather()}>{words.weather.choose}</Button>
        {kept === null ? null : (
          <Button tone="plain" onPress={takeOffWeather}>
            {words.weather.take}
          </Button>
        )}
      </div>
    </div>
  );
}

type UnreadProps = { readonly reading: WeatherReading; readonly faults: readonly Fault[] };

/** A file that could not be read: every fault with its place and cure, and the way to say what its columns are. */
function Unread({ reading: now, faults }: UnreadProps) {
  const [isMapping, setMapping] = useState(false);
  const unknown = isUnknown(now);
  const name = now.file.name;
  return (
    <div class="weather-empty">
      <h3>{unknown ? words.weather.unknown(name) : words.weather.unread(name)}</h3>
      {unknown ? <p class="soft">{words.weather.unknownLine}</p> : <FaultList faults={faults} />}
      <div class="weather-actions">
        {now.guess === null ? null : (
          <Button tone={unknown ? 'primary' : 'usual'} onPress={() => setMapping(true)}>
            {words.weather.map}
          </Button>
        )}
        <Button onPress={() => void chooseWeather()}>{words.weather.other}</Button>
      </div>
      {isMapping ? <MappingDialog reading={now} onClose={() => setMapping(false)} /> : null}
    </div>
  );
}

const FaultList = ({ faults }: { readonly faults: readonly Fault[] }) => (
  <ul class="weather-faults">
    {faults.map((fault) => (
      <li key={`${fault.place} ${fault.code} ${fault.message}`} class="fault">
        <p>
          {fault.place === '' ? null : <code>{fault.place}: </code>}
          {fault.message}
        </p>
        {fault.cure === '' ? null : <p class="soft">{fault.cure}</p>}
      </li>
    ))}
  </ul>
);

type ReadProps = {
  readonly reading: WeatherReading;
  readonly facts: WeatherFacts;
  readonly notes: readonly Fault[];
};

function Read({ reading: now, facts, notes }: ReadProps) {
  const [open, setOpen] = useState<'notes' | 'mapping' | null>(null);
  const close = (): void => setOpen(null);
  return (
    <div class="weather">
      <div class="weather-facts">
        <h3 title={now.file.name}>{now.file.name}</h3>
        <p class="soft line">
          {[facts.kind, facts.place.name].filter((text) => text !== '' && text !== now.file.name).join(', ')}
        </p>
        <p class="soft">{whereOf(facts)}</p>
        <p class="soft">{words.weather.rows(fixed(facts.rows, 0), fixed(facts.step_min, 0))}</p>
        <Missing facts={facts} />
        <div class="weather-actions">
          {notes.length === 0 ? null : (
            <Button onPress={() => setOpen('notes')}>{words.weather.notes(notes.length)}</Button>
          )}
          {now.mapping === null ? null : <Button onPress={() => setOpen('mapping')}>{words.weather.map}</Button>}
          <Button onPress={() => void chooseWeather()}>{words.weather.other}</Button>
          <Button tone="plain" onPress={takeOffWeather}>
            {words.weather.take}
          </Button>
        </div>
      </div>
      <div class="weather-months">
        <MonthTable summary={facts.summary} />
      </div>
      {open === 'mapping' ? <MappingDialog reading={now} onClose={close} /> : null}
      {open === 'notes' ? (
        <Dialog
          title={words.weather.notesTitle(now.file.name)}
          onClose={close}
          actions={<Button onPress={close}>{words.weather.close}</Button>}
        >
          <FaultList faults={notes} />
        </Dialog>
      ) : null}
    </div>
  );
}

function whereOf({ place }: WeatherFacts): string {
  const { latitude_deg, longitude_deg, elevation_m } = place;
  if (latitude_deg === null || longitude_deg === null) return words.weather.noPlace;
  const where = placeOnEarth(latitude_deg, longitude_deg);
  return elevation_m === null ? where : words.weather.at(where, fixed(elevation_m, 0));
}

function Missing({ facts }: { readonly facts: WeatherFacts }) {
  if (facts.missing.length === 0) return null;
  const text = words.weather.missing(facts.missing.map((quantity) => words.weather.quantity[quantity]).join('; '));
  return (
    <p class="soft missing" title={text}>
      {text}
    </p>
  );
}
