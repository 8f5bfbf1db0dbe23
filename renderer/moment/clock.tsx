import { computed } from '@preact/signals';
import { useState } from 'preact/hooks';
import { civilOf } from '../../core/sun/civil.ts';
import { seasons } from '../../core/sun/seasons.ts';
import { scheme } from '../state/document.ts';
import { civil, instant, minutesOf, moveDays, setDate, setTime, timeOf } from '../state/moment.ts';
import { day } from '../state/studies.ts';
import { Button } from '../ui/button.tsx';
import { Choice } from '../ui/choice.tsx';
import { dayAndMonth } from '../ui/format.ts';
import { BackIcon, ForwardIcon } from '../ui/icons.tsx';
import { words } from '../words/words.ts';
import './clock.css';

const STEP_min = 5;

type Preset = keyof typeof words.moment.preset;

/** The solstices and equinoxes of the year that is shown, as dates of the site. */
const presets = computed(() => {
  const zone = scheme.value?.site.zone;
  if (zone === undefined) return [];
  const s = seasons(Number(civil.value.date.slice(0, 4)));
  const at: readonly (readonly [Preset, number])[] = [
    ['marchEquinox', s.marchEquinox_ms],
    ['juneSolstice', s.juneSolstice_ms],
    ['septemberEquinox', s.septemberEquinox_ms],
    ['decemberSolstice', s.decemberSolstice_ms],
  ];
  return at.map(([preset, ms]) => {
    const { date } = civilOf(ms, zone);
    const name = `${words.moment.preset[preset]}, ${dayAndMonth(date)}`;
    return { value: date, text: dayAndMonth(date, 'short'), tip: name };
  });
});

/** The clock: the moment that the massing shows, in the site's civil time. */
export function Clock() {
  return (
    <section class="clock" aria-label={words.moment.label}>
      <div class="clock-date">
        <Button icon tone="plain" label={words.moment.earlierDay} onPress={() => moveDays(-1)}>
          <BackIcon />
        </Button>
        <input
          class="field"
          type="date"
          aria-label={words.moment.date}
          min="1900-01-01"
          max="2100-12-31"
          value={civil.value.date}
          onChange={(event) => setDate(event.currentTarget.value)}
        />
        <Button icon tone="plain" label={words.moment.laterDay} onPress={() => moveDays(1)}>
          <ForwardIcon />
        </Button>
      </div>
      <Choice label={words.moment.presets} options={presets.value} value={civil.value.date} onChoose={setDate} />
      <DaySlider />
      <TimeField />
      <ClockNote />
    </section>
  );
}

const shareOfDay = (instant_ms: number | null, zone: string): number | null =>
  instant_ms === null ? null : minutesOf(civilOf(instant_ms, zone).time) / 1440;

/** The day from midnight to midnight, with the time that the sun is up marked on it. */
function DaySlider() {
  const zone = scheme.value?.site.zone ?? 'UTC';
  const ends = day.value;
  const from = ends?.state === 'never-sets' ? 0 : shareOfDay(ends?.sunrise_ms ?? null, zone);
  const to = ends?.state === 'never-sets' ? 1 : shareOfDay(ends?.sunset_ms ?? null, zone);
  const minutes = minutesOf(civil.value.time);
  return (
    <div class="day-slider">
      <svg class="day-band" aria-hidden="true">
        <rect class="night" x="0" y="0" width="100%" height="100%" />
        {from === null || to === null ? null : <DayBand from={from} to={to} />}
      </svg>
      <input
        type="range"
        min="0"
        max="1435"
        step={STEP_min}
        value={minutes}
        aria-label={words.moment.timeOfDay}
        aria-valuetext={civil.value.time}
        onInput={(event) => setTime(timeOf(Number(event.currentTarget.value)))}
      />
      <div class="day-ticks" aria-hidden="true">
        {[0, 6, 12, 18, 24].map((hour) => (
          <span key={hour} style={{ left: `${(hour / 24) * 100}%` }}>
            {hour}
          </span>
        ))}
      </div>
    </div>
  );
}

/** Daylight on the slider; where the sun sets after midnight it wraps round. */
function DayBand({ from, to }: { from: number; to: number }) {
  const part = (a: number, b: number) => (
    <rect class="day" x={`${a * 100}%`} y="0" width={`${(b - a) * 100}%`} height="100%" />
  );
  return from <= to ? (
    part(from, to)
  ) : (
    <>
      {part(0, to)}
      {part(from, 1)}
    </>
  );
}

function TimeField() {
  const [isBad, setBad] = useState(false);
  return (
    <input
      class="field time-field"
      type="text"
      inputMode="numeric"
      aria-label={words.moment.time}
      aria-invalid={isBad}
      title={isBad ? words.moment.badTime : undefined}
      value={civil.value.time}
      onChange={(event) => setBad(!setTime(event.currentTarget.value))}
      onBlur={(event) => {
        setBad(false);
        event.currentTarget.value = civil.peek().time;
      }}
    />
  );
}

/** How the clock was read where it was put forward or back. */
function ClockNote() {
  const note = instant.value?.note ?? null;
  return note === null ? null : (
    <p class="clock-note" role="status">
      {note}
    </p>
  );
}
