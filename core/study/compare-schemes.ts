import { buildModel } from '../form/build-model.ts';
import type { CheckMemo } from '../gain/gain-memo.ts';
import type { LimitSet } from '../limits/limit-set.ts';
import type { Scheme } from '../scheme/schema.ts';
import { checkScheme } from './check.ts';
import { type Comparison, compareVariants, type Variant } from './compare.ts';
import type { Pulse } from './job.ts';
import { shadowMoment } from './shadow-moments.ts';
import type { WeatherInput } from './weather-input.ts';

/** One of the schemes that stand side by side, and what it is judged by. */
export type SchemeVariant = {
  readonly name: string;
  readonly scheme: Scheme;
  readonly limitSet: LimitSet | null;
  /** The year of weather that it goes by, where that is at hand. */
  readonly weather?: WeatherInput | null;
};

/** When the added shadow is compared: civil dates and wall times of each scheme's own site. */
export type CompareMoments = { readonly dates: readonly string[]; readonly times: readonly string[] };

/** Shadow that a variant adds at the moments; none where the sun is down. */
function shadowsOf(scheme: Scheme, { dates, times }: CompareMoments): Variant['shadows'] {
  const model = buildModel(scheme);
  return dates.flatMap((date) =>
    times.flatMap((time) => {
      const { text, change } = shadowMoment(scheme, model, date, time);
      return change === null ? [] : [{ text, added_m2: change.added.area_m2 }];
    }),
  );
}

/**
 * Variants of one scheme, checked and set side by side. The first is what the others are compared with.
 * @param memo   shared, because variants have most of their windows in common
 * @param pulse  called between slices of windows of each
 * @returns      null when `pulse` said stop
 */
export async function compareSchemes(
  variants: readonly SchemeVariant[],
  moments: CompareMoments,
  memo: CheckMemo,
  pulse: Pulse,
): Promise<Comparison | null> {
  const checked: Variant[] = [];
  for (const [i, { name, scheme, limitSet, weather }] of variants.entries()) {
    const result = await checkScheme(
      scheme,
      limitSet,
      [],
      // Each variant is one part of the whole.
      (done, total) => pulse(i + done / Math.max(1, total), variants.length),
      { memo, weather: weather ?? null },
    );
    if (result === null) return null;
    checked.push({ name, result, shadows: shadowsOf(scheme, moments) ?? [] });
  }
  return compareVariants(checked);
}
