import { computed, signal } from '@preact/signals';
import { checkLimitSet } from '../../core/limits/load-limits.ts';
import type { Limit, LimitSet } from '../../core/limits/limit-set.ts';
import { METRICS } from '../../core/limits/metric.ts';
import type { MetricId } from '../../core/limits/metric-id.ts';
import type { Fault } from '../../core/scheme/fault.ts';
import { freeId } from '../../core/sizing/lever.ts';
import { shippedLimits } from '../jobs/limit-set.ts';
import { committed } from '../state/document.ts';
import { performEdit } from '../state/perform-edit.ts';
import { words } from '../words/words.ts';

/** What was wrong with the last change of the set; it was not made. */
export const limitFaults = signal<readonly Fault[]>([]);

/** The set that the scheme is judged by, and whether it stands in the scheme itself and can be changed. */
export const chosen = computed<{ readonly set: LimitSet; readonly isOwn: boolean } | null>(() => {
  const limits = committed.value?.limits ?? null;
  if (limits === null) return null;
  if (typeof limits !== 'string') {
    const checked = checkLimitSet(limits, 'limits');
    return checked.ok ? { set: checked.value, isOwn: true } : null;
  }
  const set = shippedLimits().find((known) => known.id === limits);
  return set === undefined ? null : { set, isOwn: false };
});

const put = (value: unknown, name: string): readonly Fault[] =>
  performEdit({ kind: 'together', edits: [{ kind: 'set-head', field: 'limits', value }], name });

/** @param id of a shipped set; empty: none */
export function choose(id: string): void {
  limitFaults.value = [];
  put(id === '' ? null : id, words.limits.editChoose);
}

/** Changes the scheme's own set, or says what is wrong and leaves it. */
export function changeSet(part: Partial<LimitSet>): void {
  const now = chosen.peek();
  if (now === null || !now.isOwn) return;
  const checked = checkLimitSet({ ...now.set, ...part }, 'limits');
  limitFaults.value = checked.ok ? [] : checked.faults;
  if (checked.ok) put(checked.value, words.limits.editSet);
}

/** The set that is chosen copied into the scheme, where it can be changed; its values keep saying where they come from. */
export function copyChosen(): void {
  const now = chosen.peek();
  if (now === null) return;
  const { set } = now;
  put(
    { ...set, id: `${set.id}-own`.slice(0, 60), name: words.limits.copyOf(set.name), example: false },
    words.limits.editSet,
  );
}

const blank = (metric: MetricId, id: string): Limit => ({
  id,
  name: METRICS[metric].name,
  metric,
  comparison: 'at-most',
  value: 60,
  unit: METRICS[metric].unit,
  source: words.limits.newSource,
  checked: null,
});

/** A set with one limit to begin with. */
export function beginOwn(): void {
  const set: LimitSet = {
    format: 'shadewright-limits',
    version: 1,
    id: 'own',
    name: words.limits.ownName,
    example: false,
    note: '',
    close: 0.1,
    limits: [blank('peak-gain', 'limit-1')],
  };
  put(set, words.limits.editSet);
}

export function addLimit(): void {
  const now = chosen.peek();
  if (now?.isOwn) changeSet({ limits: [...now.set.limits, blank('peak-gain', freeId(now.set.limits, 'limit'))] });
}

export function removeLimit(id: string): void {
  const now = chosen.peek();
  if (now?.isOwn) changeSet({ limits: now.set.limits.filter((limit) => limit.id !== id) });
}

/** Changes one limit. A field set to undefined goes; a metric brings its unit, and takes what it does not look at. */
export function changeLimit(id: string, part: { readonly [F in keyof Limit]?: Limit[F] | undefined }): void {
  const now = chosen.peek();
  if (!now?.isOwn) return;
  const limits = now.set.limits.map((limit) => {
    if (limit.id !== id) return limit;
    const next: Record<string, unknown> = { ...limit, ...part };
    for (const key of Object.keys(next)) if (next[key] === undefined) delete next[key];
    return part.metric === undefined ? (next as Limit) : fitted(next as Limit, limit.metric, part.metric);
  });
  changeSet({ limits });
}

/** The limit for another metric; a name that only named the metric before goes with it. */
function fitted(limit: Limit, before: MetricId, metric: MetricId): Limit {
  const { days, clock, above, ...rest } = limit;
  return {
    ...rest,
    name: limit.name === METRICS[before].name ? METRICS[metric].name : limit.name,
    unit: METRICS[metric].unit,
    ...(METRICS[metric].byDay && days !== undefined ? { days } : {}),
    ...(metric === 'mean-gain' ? { clock: clock ?? ['07:30', '17:30'] } : {}),
    ...(metric === 'hours-above' ? { above: above ?? 25 } : {}),
  };
}
