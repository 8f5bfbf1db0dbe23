import { useEffect, useId, useRef, useState } from 'preact/hooks';
import type { Answer } from '../../app/contract/host.ts';
import { host } from '../bridge/host.ts';
import { placeOnEarth } from '../ui/format.ts';
import { words } from '../words/words.ts';

type Found = Answer<'place:search'>;
export type FoundPlace = Found['places'][number];

/** Typing faster than this asks once [ms]. */
const PAUSE_ms = 140;

const countries = new Intl.DisplayNames([navigator.language || 'en-GB'], { type: 'region', fallback: 'code' });
const whereOf = ({ country, region }: FoundPlace): string =>
  [region, country === '' ? '' : countries.of(country)].filter((t) => t !== '').join(', ');

type Answered = { readonly text: string; readonly found: Found | null; readonly failure: string | null };

/** Asks the host for places a moment after the last letter; an answer to an older text is dropped. */
function usePlaces(text: string): Answered | null {
  const [answered, setAnswered] = useState<Answered | null>(null);
  useEffect(() => {
    if (text.trim() === '') {
      setAnswered(null);
      return;
    }
    let isWanted = true;
    const timer = setTimeout(async () => {
      const reply = await host['place:search']({ text: text.slice(0, 120) });
      if (!isWanted) return;
      setAnswered(
        reply.ok ? { text, found: reply.value, failure: null } : { text, found: null, failure: reply.message },
      );
    }, PAUSE_ms);
    return () => {
      isWanted = false;
      clearTimeout(timer);
    };
  }, [text]);
  return answered;
}

/** A field for the name of a town, with the places that begin so; arrow keys and Enter choose. */
export function PlaceSearch({ onChoose }: { readonly onChoose: (place: FoundPlace) => void }) {
  const [text, setText] = useState('');
  const [at, setAt] = useState(0);
  // A choice closes the list until the next letter.
  const [isOpen, setOpen] = useState(false);
  const answered = usePlaces(isOpen ? text : '');
  const places = answered?.found?.places ?? [];
  const id = useId();
  const list = useRef<HTMLDivElement>(null);
  useEffect(() => {
    list.current?.children[at]?.scrollIntoView({ block: 'nearest' });
  }, [at]);
  const choose = (place: FoundPlace | undefined): void => {
    if (place === undefined) return;
    setText(`${place.name}, ${place.country}`);
    setOpen(false);
    onChoose(place);
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const step = { ArrowDown: 1, ArrowUp: -1 }[event.key];
    if (step !== undefined && places.length > 0) setAt((at + step + places.length) % places.length);
    else if (event.key === 'Enter') choose(places[at]);
    else if (event.key === 'Escape' && isOpen && places.length > 0) setOpen(false);
    else return;
    event.preventDefault();
    event.stopPropagation();
  };
  const isShown = isOpen && answered !== null;
  return (
    <div class="place-search">
      <label for={`${id}-field`}>{words.place.search}</label>
      <input
        id={`${id}-field`}
        class="field"
        type="text"
        role="combobox"
        autoComplete="off"
        spellcheck={false}
        placeholder={words.place.searchHint}
        aria-autocomplete="list"
        aria-expanded={places.length > 0}
        aria-controls={`${id}-list`}
        aria-activedescendant={places.length > 0 ? `${id}-${at}` : undefined}
        value={text}
        onInput={(event) => {
          setText(event.currentTarget.value);
          setAt(0);
          setOpen(true);
        }}
        onKeyDown={onKeyDown}
      />
      <div
        id={`${id}-list`}
        ref={list}
        role="listbox"
        aria-label={words.place.search}
        class="place-list"
        hidden={places.length === 0}
      >
        {places.map((place, i) => (
          // biome-ignore lint/a11y/useKeyWithClickEvents: the field that owns the list has the keys
          <div
            key={`${place.latitude} ${place.longitude} ${place.name}`}
            id={`${id}-${i}`}
            role="option"
            tabIndex={-1}
            aria-selected={i === at}
            onPointerEnter={() => setAt(i)}
            onClick={() => choose(place)}
          >
            <span class="name">{place.name}</span>
            <span class="soft">{whereOf(place)}</span>
            <span class="where">{placeOnEarth(place.latitude, place.longitude)}</span>
          </div>
        ))}
      </div>
      <p class="soft" role="status">
        {isShown ? sayOf(answered) : ''}
      </p>
    </div>
  );
}

function sayOf({ found, failure, text }: Answered): string {
  if (failure !== null) return words.place.failed(failure);
  if (found === null || text.trim() === '') return '';
  if (found.places.length === 0) return words.place.none;
  return `${words.place.found(found.places.length)}. ${found.credit}`;
}
