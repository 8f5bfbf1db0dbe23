import { PARTS, type Part } from '../gain/series.ts';
import { civilOf } from '../sun/civil.ts';
import type { Limit } from './limit-set.ts';
import { METRICS } from './metric.ts';
import type { MetricId } from './metric-id.ts';
import type { Reading } from './reading.ts';
import type { DayFacts, RoomFacts } from './room-facts.ts';

/** What a sentence is made of. */
export type ReasonInput = {
  readonly facts: RoomFacts;
  readonly days: DayFacts;
  readonly reading: Reading;
  readonly metric: MetricId;
  readonly clock: readonly [string, string] | null;
  readonly judged: { readonly limit: Limit; readonly value: number } | null;
};

const PART_WORDS: { readonly [P in Part]: string } = {
  beam: 'direct sun',
  circumsolar: 'the glow round the sun',
  sky: 'the sky',
  horizon: 'the bright horizon',
  ground: 'the ground',
};

const COMPASS = ['north', 'north-east', 'east', 'south-east', 'south', 'south-west', 'west', 'north-west'] as const;

/** A true bearing as one of eight words. */
export const compassWord = (bearing_deg: number): string =>
  COMPASS[Math.round((((bearing_deg % 360) + 360) % 360) / 45) % 8] as string;

const percent = (share: number): string => `${Math.round(100 * share)} %`;

/** A quantity to three figures. */
export function shown(value: number): string {
  return value.toFixed(decimals(value));
}

/** Decimals that show three figures of a quantity. */
function decimals(value: number): number {
  const size = Math.abs(value);
  return size >= 100 ? 0 : size >= 10 ? 1 : 2;
}

/** How a period that is no day stands in a sentence. */
const OF_NO_DAY: { readonly [M in MetricId]?: string } = {
  'season-gain': ' over the warm half-year, every day clear',
  'year-gain': ' over the weather year',
  'warm-gain': ' over the warm half of the weather year',
  'hours-above': ' over the weather year',
};

function againstLimit({ reading, metric, judged }: ReasonInput): string {
  const { unit } = METRICS[metric];
  if (!judged) return `${shown(reading.value)} ${unit}`;
  const gap = reading.value - judged.value;
  // All three to the digits of the limit, as in the list of findings, so that they add up as they are read.
  const alike = (value: number): string => value.toFixed(decimals(judged.value));
  if (gap === 0) return `${alike(reading.value)} ${unit}, just at the limit`;
  const side = gap > 0 ? 'above' : 'below';
  if (Number(alike(gap)) === 0)
    return `${alike(reading.value)} ${unit}, just ${side} the limit of ${alike(judged.value)}`;
  return `${alike(reading.value)} ${unit}, ${alike(Math.abs(gap))} ${side} the limit of ${alike(judged.value)}`;
}

/** A day's name as it stands in a sentence: a date as it is, anything else with its article. */
const dayWords = (name: string): string => (/^\d/.test(name) ? name : `the ${name}`);

function whenWords({ reading, days, metric, clock }: ReasonInput): string {
  const grid = days.grids.find((g) => g.key === reading.day);
  if (!grid) return OF_NO_DAY[metric] ?? '';
  if (metric === 'year-peak' && reading.step !== null)
    return `, in the hour about ${civilOf(grid.instant_ms[reading.step]!, days.zone).text} of the weather year`;
  if (reading.step !== null) {
    if (reading.value === 0) return ` on ${dayWords(grid.name)}`;
    return ` at ${civilOf(grid.instant_ms[reading.step]!, days.zone).time} on ${dayWords(grid.name)}`;
  }
  return clock
    ? ` as the mean from ${clock[0]} to ${clock[1]} on ${dayWords(grid.name)}`
    : ` over ${dayWords(grid.name)}`;
}

function throughWords({ facts, reading }: ReasonInput): string {
  const through = reading.through;
  if (!through) return '';
  const window = facts.windows.find((w) => w.id === through.window);
  const facing = window ? (window.tilt_deg > 0 ? `, facing ${compassWord(window.bearing_deg)}` : ', a rooflight') : '';
  return facts.windows.length === 1
    ? `all through window ${through.window}${facing}`
    : `${percent(through.share)} of it through window ${through.window}${facing}`;
}

function partWords({ facts, days, reading }: ReasonInput): string {
  const [first, second] = [...PARTS].sort((a, b) => reading.parts[b] - reading.parts[a]) as [Part, Part];
  if (!(reading.parts[first] > 0)) return '';
  const also = reading.parts[second] >= 0.1 ? ` and ${percent(reading.parts[second])} from ${PART_WORDS[second]}` : '';
  const at = days.grids.findIndex((g) => g.key === reading.day);
  const window = facts.days[at]?.windows.find((w) => w.window === reading.through?.window);
  const lit =
    window && reading.step !== null && window.sunlit[reading.step]! > 0
      ? `; the sun is then on ${percent(window.sunlit[reading.step]!)} of its glass`
      : '';
  return `, ${percent(reading.parts[first])} from ${PART_WORDS[first]}${also}${lit}`;
}

/** One sentence: how much, when, through which window, and what kind of light. */
export function reasonOf(input: ReasonInput): string {
  const through = throughWords(input);
  if (input.metric === 'glazing-to-floor') {
    const openings = input.facts.windows.reduce((sum, w) => sum + w.opening_m2, 0);
    const areas = `${shown(openings)} m² of openings to ${shown(input.facts.room.floor_m2)} m² of floor`;
    return `${areas}: ${againstLimit(input)}.`;
  }
  if (through === '') return `${againstLimit(input)}${whenWords(input)}: no sun or sky light comes in.`;
  return `${againstLimit(input)}${whenWords(input)}: ${through}${partWords(input)}.`;
}
