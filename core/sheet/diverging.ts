/** From a loss through nothing to a gain: red, green and blue, 0..255, at even steps from −1 to 1. */
const STOPS: readonly (readonly [number, number, number])[] = [
  [127, 59, 8],
  [179, 88, 6],
  [224, 130, 20],
  [253, 184, 99],
  [254, 224, 182],
  [247, 247, 247],
  [216, 218, 235],
  [178, 171, 210],
  [128, 115, 172],
  [84, 39, 136],
  [45, 0, 75],
];

/**
 * The scale of differences: orange where something is lost, purple where it is gained, near white where nothing changes. The
 * two sides keep apart for eyes that tell no red from green, and each darkens steadily away from nothing.
 * @param t −1..1, brought into that range
 * @returns red, green, blue, 0..255
 * @see C. A. Brewer, ColorBrewer 2.0 (Apache 2.0), scheme PuOr with eleven classes, read linearly between them
 */
export function divergingRgb(t: number): readonly [number, number, number] {
  const place = ((Math.min(1, Math.max(-1, t)) + 1) / 2) * (STOPS.length - 1);
  const i = Math.min(STOPS.length - 2, Math.floor(place));
  const [a, b] = [STOPS[i] as (typeof STOPS)[0], STOPS[i + 1] as (typeof STOPS)[0]];
  const between = (k: 0 | 1 | 2): number => Math.round(a[k] + (b[k] - a[k]) * (place - i));
  return [between(0), between(1), between(2)];
}
