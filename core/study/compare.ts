import type { Finding, Verdict } from '../limits/finding.ts';
import type { CheckResult } from './check-result.ts';

/** One room under one limit, in each variant. Null where a variant has no such room or sets no such limit. */
export type ComparedRow = {
  readonly room: string;
  readonly roomName: string;
  readonly limit: string;
  readonly metricName: string;
  readonly unit: string;
  readonly values: readonly (number | null)[];
  readonly verdicts: readonly (Verdict | null)[];
  /** Value of each variant less that of the first; null where either is missing. */
  readonly changes: readonly (number | null)[];
};

/** Shadow that each variant adds at one moment. */
export type ComparedShadow = { readonly text: string; readonly added_m2: readonly (number | null)[] };

export type ComparedVariant = {
  readonly name: string;
  readonly schemeHash: string;
  readonly counts: CheckResult['counts'];
  /** Set that its findings were judged by; null: none. */
  readonly limitSet: string | null;
};

export type Comparison = {
  readonly variants: readonly ComparedVariant[];
  readonly rows: readonly ComparedRow[];
  readonly shadows: readonly ComparedShadow[];
  /** What makes the columns hard to compare, such as different limit sets. */
  readonly notes: readonly string[];
};

/** What one variant brings to the table. Shadows are optional, and matched by their text (date and civil time). */
export type Variant = {
  readonly name: string;
  readonly result: CheckResult;
  readonly shadows?: readonly { readonly text: string; readonly added_m2: number }[];
};

const keyOf = (f: Finding): string => `${f.room}\u0000${f.limit}\u0000${f.day ?? ''}`;

/** Worst excess of a row over its limit in any variant, as a share of the limit: what the table is sorted by. */
function worst(findings: readonly (Finding | undefined)[]): number {
  return Math.max(
    ...findings.map((f) => (f?.margin == null || !f.limitValue ? -Infinity : f.margin / Math.abs(f.limitValue))),
  );
}

function row(findings: readonly (Finding | undefined)[]): ComparedRow {
  const known = findings.find((f): f is Finding => f !== undefined) as Finding;
  const values = findings.map((f) => f?.value ?? null);
  const first = values[0] ?? null;
  return {
    room: known.room,
    roomName: known.roomName,
    limit: known.limit,
    metricName: known.metricName,
    unit: known.unit,
    values,
    verdicts: findings.map((f) => f?.verdict ?? null),
    changes: values.map((v) => (v === null || first === null ? null : v - first)),
  };
}

/**
 * Variants of one scheme side by side: every finding in a row with a column a variant, worst first, and the shadow that each
 * adds at the moments asked for. Rooms are matched by id. The first variant is what the others are compared with.
 */
export function compareVariants(variants: readonly Variant[]): Comparison {
  const byKey = new Map<string, (Finding | undefined)[]>();
  variants.forEach((variant, i) => {
    for (const finding of variant.result.findings) {
      const list = byKey.get(keyOf(finding)) ?? new Array<Finding | undefined>(variants.length).fill(undefined);
      list[i] = finding;
      byKey.set(keyOf(finding), list);
    }
  });
  const groups = [...byKey.entries()].sort(([ka, a], [kb, b]) => worst(b) - worst(a) || (ka < kb ? -1 : 1));
  const texts = [...new Set(variants.flatMap((v) => (v.shadows ?? []).map((s) => s.text)))];
  const sets = new Set(variants.map((v) => v.result.limitSet?.id ?? null));
  const engines = new Set(variants.map((v) => v.result.engine));
  return {
    variants: variants.map((v) => ({
      name: v.name,
      schemeHash: v.result.schemeHash,
      counts: v.result.counts,
      limitSet: v.result.limitSet?.id ?? null,
    })),
    rows: groups.map(([, list]) => row(list)),
    shadows: texts.map((text) => ({
      text,
      added_m2: variants.map((v) => v.shadows?.find((s) => s.text === text)?.added_m2 ?? null),
    })),
    notes: [
      ...(sets.size > 1 ? ['The variants are judged by different limit sets.'] : []),
      ...(engines.size > 1 ? ['The variants were worked out by different versions of the engine.'] : []),
    ],
  };
}
