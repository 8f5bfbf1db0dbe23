import { signal } from '@preact/signals';
import { useEffect, useId, useState } from 'preact/hooks';
import type { Scheme } from '../../core/scheme/schema.ts';
import { hands } from '../jobs/hands.ts';
import { committed } from '../state/document.ts';
import { instant } from '../state/moment.ts';
import { Button } from '../ui/button.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { words } from '../words/words.ts';
import { parsePair } from './parse-degrees.ts';
import { applyPlace, faultsOf, formOf, type PlaceForm, plain, readForm } from './place-form.ts';
import { type FoundPlace, PlaceSearch } from './place-search.tsx';
import './place.css';

const isOpen = signal(false);

export const openPlace = (): void => {
  isOpen.value = true;
};

/** Where the scheme stands and which clock it goes by. */
export function PlaceDialog() {
  const scheme = committed.value;
  return isOpen.value && scheme !== null ? <OpenPlace scheme={scheme} /> : null;
}

type Advice = { readonly suggested: string | null; readonly isOdd: boolean };
const NO_ADVICE: Advice = { suggested: null, isOdd: false };

/** What the coordinates say of the zone; asked anew when either changes. An answer counts only for what it was asked of. */
function useAdvice(form: PlaceForm): Advice {
  const [answer, setAnswer] = useState<(Advice & { readonly of: string; readonly zone: string | null }) | null>(null);
  const { latitude, longitude, zone } = readForm(form);
  useEffect(() => {
    if (latitude === null || longitude === null) return;
    let isWanted = true;
    const ask = { latitude, longitude, zone: zone ?? '', instant_ms: instant.peek()?.instant_ms ?? 0 };
    void hands.quick.run('zoneOf', ask).then((outcome) => {
      if (isWanted && outcome.kind === 'done') setAnswer({ ...outcome.result, of: `${latitude} ${longitude}`, zone });
    });
    return () => {
      isWanted = false;
    };
  }, [latitude, longitude, zone]);
  if (answer === null || answer.of !== `${latitude} ${longitude}`) return NO_ADVICE;
  return { suggested: answer.suggested, isOdd: answer.isOdd && answer.zone === zone };
}

function OpenPlace({ scheme }: { readonly scheme: Scheme }) {
  const [form, setForm] = useState<PlaceForm>(() => formOf(scheme.site));
  const [refused, setRefused] = useState<string | null>(null);
  const advice = useAdvice(form);
  const faults = faultsOf(form);
  const { suggested } = advice;
  const close = (): void => {
    isOpen.value = false;
  };
  const change = (part: Partial<PlaceForm>): void => setForm((now) => ({ ...now, ...part }));
  // Whoever moves the coordinates gets the zone that belongs to them, until a zone is chosen by hand.
  const [isMoved, setMoved] = useState(false);
  useEffect(() => {
    if (!isMoved || suggested === null) return;
    // Asked of the form as it is by then: a zone may have been typed while the answer was on its way.
    setForm((now) => (now.isZoneOwn ? now : { ...now, zone: suggested }));
  }, [suggested, isMoved]);
  const move = (part: Pick<PlaceForm, 'latitude'> | Pick<PlaceForm, 'longitude'>): void => {
    const pair = parsePair(Object.values(part)[0] as string);
    change(pair === null ? part : { latitude: plain(pair[0], 6), longitude: plain(pair[1], 6) });
    setMoved(true);
  };
  const choose = (place: FoundPlace): void => {
    const zone = place.zone === null ? {} : { zone: place.zone, isZoneOwn: false };
    change({ latitude: plain(place.latitude, 6), longitude: plain(place.longitude, 6), ...zone });
    setMoved(true);
  };
  const isGood = Object.values(faults).every((fault) => fault === null);
  const apply = (): void => {
    const why = applyPlace(form);
    if (why === null) close();
    else setRefused(why);
  };
  return (
    <Dialog
      title={words.place.title}
      onClose={close}
      actions={
        <>
          <Button onPress={close}>{words.place.cancel}</Button>
          <Button tone="primary" off={!isGood} onPress={apply}>
            {words.place.apply}
          </Button>
        </>
      }
    >
      <PlaceSearch onChoose={choose} />
      <div class="place-fields">
        <PlaceField
          label={words.place.latitude}
          value={form.latitude}
          fault={faults.latitude}
          onInput={(latitude) => move({ latitude })}
        />
        <PlaceField
          label={words.place.longitude}
          value={form.longitude}
          fault={faults.longitude}
          onInput={(longitude) => move({ longitude })}
        />
        <PlaceField
          label={words.place.elevation}
          value={form.elevation}
          fault={faults.elevation}
          unit="m"
          onInput={(elevation) => change({ elevation })}
        />
      </div>
      <ZoneField form={form} fault={faults.zone} suggested={suggested} onChange={change} />
      {advice.isOdd && faults.zone === null ? (
        <p class="notice" role="alert">
          {words.place.odd}
        </p>
      ) : null}
      {refused === null || refused === '' ? null : (
        <p class="notice" role="alert">
          {refused}
        </p>
      )}
      <p class="soft">{words.place.keep}</p>
    </Dialog>
  );
}

type FieldProps = {
  readonly label: string;
  readonly value: string;
  readonly fault: string | null;
  readonly unit?: string;
  readonly onInput: (value: string) => void;
};

function PlaceField({ label, value, fault, unit, onInput }: FieldProps) {
  const id = useId();
  return (
    <div class="place-field">
      <label for={id}>{label}</label>
      <span>
        <input
          id={id}
          class="field"
          type="text"
          spellcheck={false}
          autoComplete="off"
          aria-invalid={fault !== null}
          aria-describedby={`${id}-fault`}
          value={value}
          onInput={(event) => onInput(event.currentTarget.value)}
        />
        {unit === undefined ? null : <span class="soft">{unit}</span>}
      </span>
      <p id={`${id}-fault`} class="fault-line" role="status">
        {fault}
      </p>
    </div>
  );
}

type ZoneProps = {
  readonly form: PlaceForm;
  readonly fault: string | null;
  readonly suggested: string | null;
  readonly onChange: (part: Partial<PlaceForm>) => void;
};

/** The names of the time zones that this machine knows. */
const zones = (): readonly string[] => Intl.supportedValuesOf('timeZone');

function ZoneField({ form, fault, suggested, onChange }: ZoneProps) {
  const id = useId();
  const differs = suggested !== null && suggested !== form.zone.trim();
  return (
    <div class="place-field zone">
      <label for={id}>{words.place.zone}</label>
      <span>
        <input
          id={id}
          class="field"
          type="text"
          list={`${id}-zones`}
          spellcheck={false}
          autoComplete="off"
          aria-invalid={fault !== null}
          aria-describedby={`${id}-note`}
          value={form.zone}
          onInput={(event) => onChange({ zone: event.currentTarget.value, isZoneOwn: true })}
        />
        <datalist id={`${id}-zones`}>
          {zones().map((zone) => (
            <option key={zone} value={zone} />
          ))}
        </datalist>
        {differs ? (
          <Button onPress={() => onChange({ zone: suggested, isZoneOwn: false })}>{words.place.use(suggested)}</Button>
        ) : null}
      </span>
      <p id={`${id}-note`} class={fault === null ? 'soft' : 'fault-line'} role="status">
        {fault ?? (differs ? words.place.suggested(suggested) : words.place.followed)}
      </p>
    </div>
  );
}
