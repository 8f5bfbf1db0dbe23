import { computed, effect, signal, untracked } from '@preact/signals';
import type { Model } from '../../core/form/model.ts';
import { DEFAULT_YEAR, type Scheme } from '../../core/scheme/schema.ts';
import type { CheckResult } from '../../core/study/check-result.ts';
import type { MomentResult } from '../../core/study/moment.ts';
import type { SunYear } from '../../core/study/sun-year.ts';
import { hands } from '../jobs/hands.ts';
import type { DayEnds } from '../jobs/tasks.ts';
import { committed, notes, scheme } from './document.ts';
import { civil, instant } from './moment.ts';
import { weatherAtHand } from './weather-at-hand.ts';
import { type YearSubject, yearSubjectOf } from './year-subject.ts';

/** How a piece of work stands. The last result stays where it was until a newer one takes its place. */
export type JobState =
  | { readonly kind: 'idle' }
  | { readonly kind: 'working'; readonly done: number; readonly total: number }
  | { readonly kind: 'stopped' }
  | { readonly kind: 'failed'; readonly message: string };

const IDLE: JobState = { kind: 'idle' };
const working = (done = 0, total = 0): JobState => ({ kind: 'working', done, total });

/** A result and the scheme that it was worked out from: another scheme now means that it is out of date. */
type From<T> = { readonly scheme: Scheme; readonly value: T };

// The scheme as shapes, and the sun on it at the moment.

export const model = signal<From<Model> | null>(null);
export const moment = signal<From<MomentResult> | null>(null);
export const day = signal<DayEnds | null>(null);
export const momentJob = signal<JobState>(IDLE);

async function studyMoment(of: Scheme, instant_ms: number, date: string): Promise<void> {
  momentJob.value = working();
  const wantModel = model.peek()?.scheme !== of;
  const outcome = await hands.moment.run('moment', { instant_ms, date, wantModel }, of);
  if (scheme.peek() !== of) return;
  if (outcome.kind === 'failed') momentJob.value = outcome;
  if (outcome.kind !== 'done') return;
  if (outcome.result.model !== null) model.value = { scheme: of, value: outcome.result.model };
  moment.value = { scheme: of, value: outcome.result.moment };
  day.value = outcome.result.day;
  if (!outcome.superseded) momentJob.value = IDLE;
}

// The check of the rooms.

export const check = signal<From<CheckResult> | null>(null);
export const checkJob = signal<JobState>(IDLE);
export const isCheckStale = computed(() => check.value !== null && check.value.scheme !== scheme.value);

/** How long the scheme must rest before it is checked by itself [ms]: not after every key. */
const REST_ms = 250;
/** Shorter work is not worth a line on the screen [ms]. */
const PATIENCE_ms = 400;

/** The check has run long enough for its progress to be shown. */
export const isCheckSlow = signal(false);
let checked: Scheme | null = null;
let checkedWeather: string | undefined;

export async function runCheck(): Promise<void> {
  const of = committed.peek();
  if (of === null) return;
  checked = of;
  checkedWeather = weatherAtHand.peek()?.hash;
  checkJob.value = working();
  isCheckSlow.value = false;
  const patience = setTimeout(() => {
    isCheckSlow.value = checkJob.peek().kind === 'working';
  }, PATIENCE_ms);
  const ask = { notes: notes.peek(), weather: weatherAtHand.peek() };
  const outcome = await hands.check.run('check', ask, of, (done, total) => {
    checkJob.value = working(done, total);
  });
  clearTimeout(patience);
  if (outcome.kind === 'done') {
    if (outcome.superseded) return;
    isCheckSlow.value = false;
    check.value = { scheme: of, value: outcome.result };
    checkJob.value = IDLE;
  } else if (committed.peek() === of && checked === of) {
    isCheckSlow.value = false;
    checkJob.value = outcome;
  }
}

export function stopCheck(): void {
  hands.check.stop();
}

// The year of sun on what is selected.

export const yearSubject = computed<YearSubject | null>(() =>
  scheme.value === null
    ? null
    : yearSubjectOf({ model: model.value?.value ?? null, check: check.value?.value ?? null }),
);

export const sunYearResult = signal<(From<SunYear> & { readonly subject: YearSubject }) | null>(null);
export const yearJob = signal<JobState>(IDLE);
/** The strip is drawn only when it can be seen: its owner says so. */
export const isYearShown = signal(false);

async function studyYear(of: Scheme, subject: YearSubject): Promise<void> {
  yearJob.value = working();
  const ask = { subject: subject.asked, stage: subject.stage, year: of.year ?? DEFAULT_YEAR };
  const outcome = await hands.year.run('year', ask, of, (done, total) => {
    yearJob.value = working(done, total);
  });
  if (outcome.kind === 'failed') yearJob.value = outcome;
  if (outcome.kind !== 'done' || outcome.superseded) return;
  sunYearResult.value = { scheme: of, value: outcome.result, subject };
  yearJob.value = IDLE;
}

/** Forgets what belongs to a scheme that has left the desk. */
function clear(): void {
  model.value = null;
  moment.value = null;
  day.value = null;
  check.value = null;
  sunYearResult.value = null;
  momentJob.value = IDLE;
  checked = null;
  checkJob.value = IDLE;
  yearJob.value = IDLE;
}

/** Starts the studies that follow the scheme and the clock by themselves. */
export function followScheme(): void {
  effect(() => {
    const of = scheme.value;
    const at = instant.value;
    if (of === null || at === null) return untracked(clear);
    const { date } = civil.value;
    untracked(() => void studyMoment(of, at.instant_ms, date));
  });

  effect(() => {
    const of = committed.value;
    const isOtherWeather = weatherAtHand.value?.hash !== checkedWeather;
    if (of === null || ((of === checked || of === check.peek()?.scheme) && !isOtherWeather)) return;
    const rest = setTimeout(() => void runCheck(), REST_ms);
    return () => clearTimeout(rest);
  });

  let asked: { of: Scheme; subject: string } | null = null;
  effect(() => {
    const of = scheme.value;
    const subject = yearSubject.value;
    if (of === null || subject === null || !isYearShown.value) return;
    const key = JSON.stringify([subject.asked, subject.stage]);
    if (asked?.of === of && asked.subject === key) return;
    asked = { of, subject: key };
    untracked(() => void studyYear(of, subject));
  });
}
