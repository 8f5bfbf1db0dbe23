import { clockMinutes } from '../gain/clock-window.ts';
import { CHECK_DAYS } from '../gain/check-days.ts';
import type { Checked, Fault } from '../scheme/fault.ts';
import { LimitSetFile } from '../scheme/limit-schema.ts';
import { MOST_NESTED, nestsTooDeep } from '../scheme/nesting.ts';
import { sayIssue } from '../scheme/say-issue.ts';
import { Room } from '../scheme/schema.ts';
import type { LimitSet } from './limit-set.ts';
import { isMetric, METRIC_IDS, METRICS } from './metric.ts';
import type { MetricId } from './metric-id.ts';

const USES: readonly string[] = Room.shape.use.options;
const DAY_KEYS: readonly string[] = CHECK_DAYS.map((d) => d.key);
const list = (words: readonly string[]): string => words.join(', ');

/** The longest limit set that is read, in characters. */
export const MAX_LIMITS_TEXT = 1024 * 1024;

/**
 * Read the text of a limit-set file. Nothing is repaired: either the whole set comes back, or every fault with its place in
 * the file and what would cure it.
 */
export function parseLimitSet(text: string): Checked<LimitSet> {
  if (text.length > MAX_LIMITS_TEXT)
    return failed('too-large', 'the limit set is larger than 1 MB', 'a set is a short list; split it');
  let parsed: unknown;
  try {
    parsed = JSON.parse(text.charCodeAt(0) === 0xfeff ? text.slice(1) : text);
  } catch {
    return failed('not-json', 'the limit set is not valid JSON', 'look for a missing comma, bracket or quote');
  }
  if (nestsTooDeep(parsed))
    return failed('too-deep', `the limit set nests deeper than ${MOST_NESTED} levels`, 'a set is a short list');
  return checkLimitSet(parsed);
}

/**
 * Check a limit set that has been read, such as one written into a scheme.
 * @param place  where it stands, such as `limits` for the one in a scheme; empty for a file of its own
 */
export function checkLimitSet(parsed: unknown, place = ''): Checked<LimitSet> {
  const at = (f: Fault): Fault => ({
    ...f,
    place: place === '' || f.place === '' ? place + f.place : `${place}.${f.place}`,
  });
  if (parsed === null || typeof parsed !== 'object' || Array.isArray(parsed))
    return failed(
      'not-a-limit-set',
      'this is not a limit set',
      'a set is an object with "format": "shadewright-limits"',
    );
  const read = LimitSetFile.safeParse(parsed);
  if (!read.success) return { ok: false, faults: read.error.issues.flatMap((i) => sayIssue(i, parsed)).map(at) };
  const faults = entryFaults(read.data).map(at);
  const errors = faults.filter((f) => f.level === 'error');
  return errors.length > 0
    ? { ok: false, faults }
    : { ok: true, value: read.data as LimitSet, notes: faults.filter((f) => f.level === 'warning') };
}

function failed(code: string, message: string, cure: string): Checked<never> {
  return { ok: false, faults: [{ level: 'error', code, place: '', message, cure }] };
}

type Entry = LimitSetFile['limits'][number];
type Say = (place: string, code: string, message: string, cure: string) => void;

/** What the shape of the file cannot tell: metrics, days, uses and units that do not exist, ids used twice. */
function entryFaults(set: LimitSetFile): Fault[] {
  const faults: Fault[] = [];
  const seen = new Map<string, number>();
  for (const [i, limit] of set.limits.entries()) {
    const say: Say = (field, code, message, cure) => {
      const place = field === '' ? `limits[${i}]` : `limits[${i}].${field}`;
      faults.push({ level: 'error', code, place, message, cure });
    };
    const first = seen.get(limit.id);
    if (first === undefined) seen.set(limit.id, i);
    else say('id', 'same-id', `the id ${limit.id} is also that of limits[${first}]`, 'give each limit its own id');
    if (isMetric(limit.metric)) {
      metricFaults(limit, limit.metric, say);
      listFaults(limit, say);
    } else {
      const message = `there is no metric ${JSON.stringify(limit.metric)}`;
      say('metric', 'unknown-metric', message, `the metrics are ${list(METRIC_IDS)}`);
    }
  }
  return faults;
}

/** What a metric asks of its limit. */
function metricFaults(limit: Entry, id: MetricId, say: Say): void {
  const metric = METRICS[id];
  if (limit.unit !== metric.unit) {
    const message = `${id} is in ${metric.unit}, got ${JSON.stringify(limit.unit)}`;
    say('unit', 'wrong-unit', message, `write "unit": "${metric.unit}" and the value in it`);
  }
  if (id === 'mean-gain' && limit.clock === undefined) {
    const cure = 'add "clock": ["07:30", "17:30"] or your own hours';
    say('', 'missing', 'a mean needs the clock hours it is taken over', cure);
  }
  if (id === 'hours-above' && limit.above === undefined) {
    const cure = 'add "above": 25, in W per m² of floor';
    say('', 'missing', 'hours-above needs the gain that is to be stayed under', cure);
  }
  if (limit.days && !metric.byDay) say('days', 'no-days', `${id} does not look at single days`, 'take days out');
}

/** What does not depend on the metric: hours, days, uses, steps, and where the value comes from. */
function listFaults(limit: Entry, say: Say): void {
  if (limit.clock && clockMinutes(limit.clock[0]) === clockMinutes(limit.clock[1]))
    say('clock', 'empty-stretch', 'the clock hours begin and end together', 'write two different times');
  for (const [k, day] of (limit.days ?? []).entries())
    if (!DAY_KEYS.includes(day)) {
      const message = `there is no design day ${JSON.stringify(day)}`;
      say(`days[${k}]`, 'unknown-day', message, `the days are ${list(DAY_KEYS)}`);
    }
  for (const [k, use] of (limit.uses ?? []).entries())
    if (!USES.includes(use))
      say(`uses[${k}]`, 'unknown-use', `there is no use ${JSON.stringify(use)}`, `the uses are ${list(USES)}`);
  for (const [k, step] of (limit.byGlazing ?? []).entries()) {
    const before = limit.byGlazing?.[k - 1];
    if (before === undefined || step.upTo > before.upTo) continue;
    const message = `the step up to ${step.upTo} % follows the one up to ${before.upTo} %`;
    const cure = 'write the steps from the smallest share of openings to the largest';
    say(`byGlazing[${k}].upTo`, 'not-ascending', message, cure);
  }
  if (limit.source.trim() === '') {
    const cure = 'name the code, page and edition, or "our own brief"';
    say('source', 'missing', 'the limit does not say where it comes from', cure);
  }
}
