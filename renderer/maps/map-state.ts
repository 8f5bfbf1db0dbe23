import { computed, effect, signal, untracked } from '@preact/signals';
import type { Model } from '../../core/form/model.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { ExposureDates } from '../../core/study/exposure-dates.ts';
import { civilOf } from '../../core/sun/civil.ts';
import { seasons } from '../../core/sun/seasons.ts';
import { runMap, stopMap } from '../jobs/map-run.ts';
import { scheme } from '../state/document.ts';
import { civil } from '../state/moment.ts';
import { stage } from '../state/stage.ts';
import { type JobState, model } from '../state/studies.ts';
import { cellCount, type MapFaces, type MapGround, mapSurfaces } from './map-ask.ts';
import type { MapPicture, Quantity, Side } from './map-picture.ts';

/** For when a map is asked: the clock's day, the four turning days of its year, a span of dates, or the whole year. */
export type MapWhen = 'day' | 'turns' | 'span' | 'year';

// What is asked for.

export const quantity = signal<Quantity | 'off'>('off');
export const faces = signal<MapFaces>('proposal');
export const ground = signal<MapGround>('site');
export const when = signal<MapWhen>('day');
export const span = signal<{ readonly first: string; readonly last: string }>({
  first: '2025-06-01',
  last: '2025-08-31',
});
/** Turns to a span of dates: the last one asked for, or the summer months of the clock's year where that was of another year. */
export function askForSpan(): void {
  const year = date.peek().slice(0, 4);
  if (!span.peek().last.startsWith(year)) span.value = { first: `${year}-06-01`, last: `${year}-08-31` };
  when.value = 'span';
}

export const step_min = signal(5);
export const spacing_m = signal(1);
export const isChangeWanted = signal(false);

export const isMapOn = computed(() => quantity.value !== 'off');
/** What stands in the map, or what the proposal changes. */
export const side = computed<Side>(() => (isChangeWanted.value ? 'change' : stage.value));

const yearOfClock = computed(() => Number(civil.value.date.slice(0, 4)));

/** The solstices and equinoxes of the clock's year, as dates of the site. */
const turningDays = computed((): readonly string[] => {
  const zone = scheme.value?.site.zone;
  if (zone === undefined) return [];
  const s = seasons(yearOfClock.value);
  const turns = [s.marchEquinox_ms, s.juneSolstice_ms, s.septemberEquinox_ms, s.decemberSolstice_ms];
  return turns.map((ms) => civilOf(ms, zone).date);
});

const date = computed(() => civil.value.date);

/** The dates that are asked for. */
export const mapDates = computed<ExposureDates>(() => {
  if (when.value === 'day') return { dates: [date.value] };
  if (when.value === 'turns') return { dates: turningDays.value };
  return when.value === 'year' ? { year: yearOfClock.value } : { between: [span.value.first, span.value.last] };
});

export const surfaces = computed(() => {
  const shapes = model.value?.value;
  return shapes === undefined ? [] : mapSurfaces(shapes, faces.value, ground.value);
});

export const cells = computed(() => {
  const shapes = model.value?.value;
  return shapes === undefined ? 0 : cellCount(shapes, surfaces.value, spacing_m.value);
});

/** One text for one question about a scheme. */
const asked = computed(() =>
  JSON.stringify([faces.value, ground.value, mapDates.value, step_min.value, spacing_m.value]),
);

// What has come back.

export type ShownMap = {
  readonly key: string;
  readonly scheme: Scheme;
  readonly model: Model;
  readonly picture: MapPicture;
  readonly dates: ExposureDates;
  readonly step_min: number;
  readonly spacing_m: number;
  /** Days whose mean is shown; 1 where the whole is. */
  readonly meanOf: number;
  /** Whether the light of sky and ground is in it: without it there are only sun hours to show. */
  readonly hasEnergy: boolean;
};

export const map = signal<ShownMap | null>(null);
export const mapJob = signal<JobState>({ kind: 'idle' });
/** Counts what arrives, so that drawings know that the numbers of the map have grown. */
export const arrivals = signal(0);
/** A map of no more cells and days than these takes a moment: it is worked out again by itself when the scheme changes. */
const QUICK_CELLS = 10_000;
const QUICK_DAYS = 4;
const isQuick = computed(() => {
  const dates = mapDates.value;
  return cells.value <= QUICK_CELLS && 'dates' in dates && dates.dates.length <= QUICK_DAYS;
});

/** Whether the map on the drawing is one of an earlier scheme, and stays so until it is asked for again. */
export const isMapStale = computed(() => map.value !== null && map.value.scheme !== scheme.value && !isQuick.value);

/** Maps of the scheme on the desk, the latest last. */
let remembered: ShownMap[] = [];
const MOST_REMEMBERED = 6;
/** How long the desk waits for more changes before it begins a map [ms]. */
const PAUSE_ms = 250;
/** The question that is being worked out. */
let inHand: { readonly key: string; readonly scheme: Scheme; readonly hasEnergy: boolean } | null = null;
let waiting: ReturnType<typeof setTimeout> | null = null;

/** Drawings hear of what arrives so many times a second at most: each time they are coloured anew. */
const ARRIVE_EVERY_ms = 150;
let isArriving = false;

function arrive(): void {
  if (isArriving) return;
  isArriving = true;
  setTimeout(() => {
    isArriving = false;
    arrivals.value++;
  }, ARRIVE_EVERY_ms);
}

/** Works out the map that is asked for, or takes it from memory. */
export async function workOutMap(): Promise<void> {
  const [of, shapes] = [scheme.peek(), model.peek()];
  if (of === null || shapes === null || shapes.scheme !== of || surfaces.peek().length === 0) return;
  const key = asked.peek();
  remembered = remembered.filter((m) => m.scheme === of);
  const hasEnergy = quantity.peek() === 'energy';
  const known = remembered.find((m) => m.key === key && (m.hasEnergy || !hasEnergy));
  if (known !== undefined) {
    stopMap();
    inHand = null;
    map.value = known;
    mapJob.value = { kind: 'idle' };
    return;
  }
  if (inHand?.key === key && inHand.scheme === of && (inHand.hasEnergy || !hasEnergy)) return;
  const mine = { key, scheme: of, hasEnergy };
  inHand = mine;
  const ask = {
    ...mapDates.peek(),
    surfaces: surfaces.peek(),
    step_min: step_min.peek(),
    spacing_m: spacing_m.peek(),
    hasDiffuse: hasEnergy,
  };
  const facts = {
    key,
    scheme: of,
    model: shapes.value,
    dates: mapDates.peek(),
    step_min: ask.step_min,
    spacing_m: ask.spacing_m,
  };
  const meanOf = when.peek() === 'turns' ? turningDays.peek().length : 1;
  mapJob.value = { kind: 'working', done: 0, total: 0 };
  let shown: ShownMap | null = null;
  const outcome = await runMap(of, ask, {
    onBegin: (picture) => {
      shown = { ...facts, picture, meanOf, hasEnergy };
      map.value = shown;
    },
    onTile: arrive,
    onProgress: (done, total) => {
      mapJob.value = { kind: 'working', done, total };
    },
  });
  if (inHand !== mine) return;
  inHand = null;
  arrivals.value++;
  mapJob.value = outcome.kind === 'failed' ? outcome : { kind: outcome.kind === 'done' ? 'idle' : 'stopped' };
  if (outcome.kind !== 'done' || shown === null) return;
  remembered = [...remembered, shown].slice(-MOST_REMEMBERED);
}

export function stopWorkingOut(): void {
  stopMap();
}

/** Begins maps when they are switched on or asked differently; after an edit only quick ones, others are marked out of date. */
export function followMaps(): void {
  let last: Scheme | null = null;
  effect(() => {
    const shapes = model.value;
    const of = scheme.value;
    if (!isMapOn.value) untracked(stopMap);
    if (!isMapOn.value || of === null || shapes?.scheme !== of) return;
    const key = asked.value;
    quantity.value;
    untracked(() => {
      const isEdit = last !== null && last !== of && map.peek()?.key === key;
      last = of;
      if (waiting !== null) clearTimeout(waiting);
      if (isEdit && !isQuick.peek()) return;
      waiting = setTimeout(() => void workOutMap(), PAUSE_ms);
    });
  });
}
