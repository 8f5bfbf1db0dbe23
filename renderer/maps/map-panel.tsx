import { signal } from '@preact/signals';
import { useId } from 'preact/hooks';
import { civil } from '../state/moment.ts';
import { Choice } from '../ui/choice.tsx';
import { fixed } from '../ui/format.ts';
import { words } from '../words/words.ts';
import type { MapFaces, MapGround } from './map-ask.ts';
import type { Quantity } from './map-picture.ts';
import {
  askForSpan,
  cells,
  faces,
  ground,
  isChangeWanted,
  type MapWhen,
  quantity,
  spacing_m,
  span,
  step_min,
  when,
} from './map-state.ts';
import { cellSize, wholeDate } from './map-words.ts';

const STEPS_min = [1, 2, 5, 10, 15, 30, 60];
const SPACINGS_m = [0.25, 0.5, 1, 2, 5, 10];
const isOpen = signal(false);

/** The button that opens what is asked of the map. */
export function MapButton() {
  const of = quantity.value;
  return (
    <button
      type="button"
      class="button"
      aria-expanded={isOpen.value}
      aria-controls="map-panel"
      onClick={() => {
        isOpen.value = !isOpen.value;
      }}
    >
      {of === 'off' ? words.maps.button : `${words.maps.button}: ${words.maps.quantity[of]}`}
    </button>
  );
}

/** What is asked of the map. */
export function MapPanel() {
  if (!isOpen.value) return null;
  const close = (): void => {
    isOpen.value = false;
  };
  return (
    <section
      id="map-panel"
      class="map-panel"
      aria-label={words.maps.panel}
      onKeyDown={(event) => {
        if (event.key === 'Escape') close();
      }}
    >
      <Choice<Quantity | 'off'>
        label={words.maps.show}
        value={quantity.value}
        options={[
          { value: 'off', text: words.maps.off },
          { value: 'sun', text: words.maps.quantity.sun },
          { value: 'energy', text: words.maps.quantity.energy },
        ]}
        onChoose={(value) => {
          quantity.value = value;
          if (value === 'off') isChangeWanted.value = false;
        }}
      />
      {quantity.value === 'off' ? null : <Asked />}
    </section>
  );
}

function Asked() {
  const { date } = civil.value;
  const year = date.slice(0, 4);
  return (
    <>
      <Pick<MapWhen>
        label={words.maps.when}
        value={when.value}
        options={[
          ['day', words.maps.day(wholeDate(date))],
          ['turns', words.maps.turns],
          ['span', words.maps.span],
          ['year', words.maps.year(year)],
        ]}
        onPick={(value) => {
          if (value === 'span') askForSpan();
          else when.value = value;
        }}
      />
      {when.value === 'span' ? <Span /> : null}
      <Pick<MapFaces>
        label={words.maps.faces}
        value={faces.value}
        options={Object.entries(words.maps.facesOf) as [MapFaces, string][]}
        onPick={(value) => {
          faces.value = value;
        }}
      />
      <Pick<MapGround>
        label={words.maps.ground}
        value={ground.value}
        options={Object.entries(words.maps.groundOf) as [MapGround, string][]}
        onPick={(value) => {
          ground.value = value;
        }}
      />
      <div class="map-pair">
        <Pick
          label={words.maps.step}
          value={`${step_min.value}`}
          options={STEPS_min.map((n) => [`${n}`, words.maps.minutes(`${n}`)])}
          onPick={(value) => {
            step_min.value = Number(value);
          }}
        />
        <Pick
          label={words.maps.spacing}
          value={`${spacing_m.value}`}
          options={SPACINGS_m.map((n) => [`${n}`, words.maps.metres(cellSize(n))])}
          onPick={(value) => {
            spacing_m.value = Number(value);
          }}
        />
      </div>
      <p class="map-count">
        <span class="soft">{words.maps.cells(fixed(cells.value, 0))}</span>
      </p>
    </>
  );
}

function Span() {
  const { first, last } = span.value;
  const field = (label: string, value: string, set: (date: string) => void) => (
    <input
      class="field"
      type="date"
      aria-label={label}
      min="1900-01-01"
      max="2100-12-31"
      value={value}
      onChange={(event) => {
        if (event.currentTarget.value !== '') set(event.currentTarget.value);
      }}
    />
  );
  return (
    <div class="map-span">
      {field(words.maps.first, first, (date) => {
        span.value = { ...span.value, first: date };
      })}
      {field(words.maps.last, last, (date) => {
        span.value = { ...span.value, last: date };
      })}
    </div>
  );
}

type PickProps<T extends string> = {
  readonly label: string;
  readonly value: T;
  readonly options: readonly (readonly [T, string])[];
  readonly onPick: (value: T) => void;
};

/** A labelled list to pick from. */
function Pick<T extends string>({ label, value, options, onPick }: PickProps<T>) {
  const id = useId();
  return (
    <div class="map-pick">
      <label for={id}>{label}</label>
      <select id={id} class="field" value={value} onChange={(event) => onPick(event.currentTarget.value as T)}>
        {options.map(([key, text]) => (
          <option key={key} value={key}>
            {text}
          </option>
        ))}
      </select>
    </div>
  );
}
