import type { Finding } from '../limits/finding.ts';
import type { LimitSet } from '../limits/limit-set.ts';
import type { Scheme } from '../scheme/schema.ts';
import { withoutVariants } from '../scheme/variants.ts';
import { writeScheme } from '../scheme/write.ts';
import type { CheckResult, RoomResult } from './check-result.ts';

/** A check as a file that stands alone: the scheme and the limits it was made from are in it, so that anyone can work it out again. */
export type ReportFile = {
  readonly format: 'shadewright-report';
  readonly version: 1;
  readonly engine: string;
  readonly schemeHash: string;
  readonly title: string;
  readonly zone: string;
  readonly skyModel: string;
  readonly counts: CheckResult['counts'];
  readonly findings: readonly Finding[];
  /** Areas [m²] and shares; the day's curves are left out, because they follow from the scheme. */
  readonly rooms: readonly Omit<RoomResult, 'days' | 'year'>[];
  /** The weather file that was looked at besides, by name and content: it is not in the report. */
  readonly weather: CheckResult['weather'];
  readonly days: readonly {
    readonly key: string;
    readonly name: string;
    readonly date: string;
    readonly step_min: number;
  }[];
  readonly notes: CheckResult['notes'];
  readonly cautions: readonly string[];
  readonly limitSet: LimitSet | null;
  /** The canonical scheme. */
  readonly scheme: unknown;
};

/** The report of a check, ready for JSON. @param limitSet the set it was judged by */
export function reportJson(result: CheckResult, scheme: Scheme, limitSet: LimitSet | null): ReportFile {
  const { engine, schemeHash, title, zone, skyModel, counts, findings, notes, cautions } = result;
  return {
    format: 'shadewright-report',
    version: 1,
    engine,
    schemeHash,
    title,
    zone,
    skyModel,
    counts,
    findings,
    rooms: result.rooms.map(({ days: _, year: __, ...room }) => room),
    weather: result.weather,
    days: result.days.map(({ key, name, date, step_min }) => ({ key, name, date, step_min })),
    notes,
    cautions,
    limitSet,
    scheme: JSON.parse(writeScheme(withoutVariants(scheme))),
  };
}

/** How far a number may differ, as a share of it: a report may have been through a program that shortens its numbers. */
export const SAME_SHARE = 1e-9;

const isSame = (a: unknown, b: unknown): boolean =>
  typeof a === 'number' && typeof b === 'number'
    ? Math.abs(a - b) <= SAME_SHARE * Math.max(1, Math.abs(a), Math.abs(b))
    : a === b;

const isObject = (value: unknown): value is { readonly [key: string]: unknown } =>
  typeof value === 'object' && value !== null;

/** One place at which a report says something else than what was worked out again. */
export type Difference = { readonly place: string; readonly said: unknown; readonly found: unknown };

/**
 * Where a report departs from one worked out again, place by place, in the order of the fields.
 * @param most stop after so many
 */
export function reportDifferences(said: unknown, found: unknown, most: number, place = ''): readonly Difference[] {
  if (!isObject(said) || !isObject(found) || Array.isArray(said) !== Array.isArray(found))
    return isSame(said, found) ? [] : [{ place, said, found }];
  const differences: Difference[] = [];
  for (const key of new Set([...Object.keys(found), ...Object.keys(said)])) {
    const inner = Array.isArray(found) ? `${place}[${key}]` : place === '' ? key : `${place}.${key}`;
    differences.push(...reportDifferences(said[key], found[key], most - differences.length, inner));
    if (differences.length >= most) break;
  }
  return differences;
}
