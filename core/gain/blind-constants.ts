/**
 * Thermal constants of the simplified blind method [W/m²K]. Values from memory, not read in the standard: check a licensed
 * copy. They stand here by themselves so that they can be corrected without touching the method.
 */
export type BlindConstants = {
  readonly external: { readonly outer: number; readonly gap: number };
  readonly internal: { readonly gap: number };
  readonly between: { readonly gap: number };
  readonly source: string;
};

/** The set the checks use. */
export const BLIND_CONSTANTS: BlindConstants = {
  external: { outer: 5, gap: 10 },
  internal: { gap: 30 },
  between: { gap: 3 },
  source: 'EN ISO 52022-1 (formerly EN 13363-1): value from memory, check a licensed copy',
};

/** A second set, remembered from a later text; kept so that the difference can be shown. */
export const BLIND_CONSTANTS_LATER: BlindConstants = {
  external: { outer: 6, gap: 18 },
  internal: { gap: 18 },
  between: { gap: 3 },
  source: 'EN ISO 52022-1, later text: value from memory, check a licensed copy',
};
