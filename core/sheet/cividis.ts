/** Every seventeenth entry of the published table of 256, red, green and blue, 0..1. */
const STOPS: readonly (readonly [number, number, number])[] = [
  [0.0, 0.135112, 0.304751],
  [0.0, 0.18161, 0.421859],
  [0.117612, 0.225935, 0.434308],
  [0.208926, 0.272546, 0.424809],
  [0.279411, 0.318677, 0.423031],
  [0.342246, 0.364939, 0.428559],
  [0.401418, 0.41179, 0.440708],
  [0.458366, 0.459552, 0.460457],
  [0.51792, 0.508454, 0.472707],
  [0.582087, 0.55867, 0.468118],
  [0.648222, 0.610553, 0.454801],
  [0.716177, 0.664384, 0.432386],
  [0.785965, 0.720438, 0.399613],
  [0.857809, 0.778969, 0.353259],
  [0.93218, 0.840159, 0.28588],
  [0.995737, 0.909344, 0.217772],
];

/**
 * The cividis scale: perceptually even, and the same to eyes that tell no red from green.
 * @param t 0..1, brought into that range
 * @returns red, green, blue, 0..255
 * @see J. R. Nuñez, C. R. Anderton, R. S. Renslow, PLoS ONE 13(7), e0199239 (2018); table as published with matplotlib (CC0),
 *      read linearly between its sixteenth parts
 */
export function cividisRgb(t: number): readonly [number, number, number] {
  const place = Math.min(1, Math.max(0, t)) * (STOPS.length - 1);
  const i = Math.min(STOPS.length - 2, Math.floor(place));
  const [a, b] = [STOPS[i] as (typeof STOPS)[0], STOPS[i + 1] as (typeof STOPS)[0]];
  const between = (k: 0 | 1 | 2): number => Math.round(255 * (a[k] + (b[k] - a[k]) * (place - i)));
  return [between(0), between(1), between(2)];
}

/** The same scale as #rrggbb. */
export function cividis(t: number): string {
  const parts = cividisRgb(t).map((part) => part.toString(16).padStart(2, '0'));
  return `#${parts.join('')}`;
}
