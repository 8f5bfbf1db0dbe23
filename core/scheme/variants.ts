import type { Scheme } from './schema.ts';

/** Another state of a scheme that is kept with it, to be compared with. */
export type KeptVariant = { readonly name: string; readonly scheme: Scheme };

/** As many as can be read side by side, the scheme itself counted. */
export const MOST_SIDE_BY_SIDE = 8;

/** The variants that are kept with a scheme. */
// Reading has checked them as schemes; the schema, which cannot hold itself, knows them as objects only.
export const variantsOf = (scheme: Scheme): readonly KeptVariant[] =>
  (scheme.variants ?? []) as unknown as readonly KeptVariant[];

/** The scheme alone, as it is drawn, checked and printed: what is kept beside it changes no result and no hash. */
export function withoutVariants(scheme: Scheme): Scheme {
  if (scheme.variants === undefined) return scheme;
  const { variants: _, ...alone } = scheme;
  return alone as Scheme;
}

/** The scheme with these variants; with none the field is gone. A variant has no variants of its own. */
export function withVariants(scheme: Scheme, variants: readonly KeptVariant[]): Scheme {
  const alone = withoutVariants(scheme);
  if (variants.length === 0) return alone;
  return { ...alone, variants: variants.map((kept) => ({ ...kept, scheme: withoutVariants(kept.scheme) })) };
}
