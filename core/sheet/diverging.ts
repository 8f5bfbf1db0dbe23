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

/** What stands for no change on a dark ground. */
const DARK_MIDDLE = [62, 66, 72] as const;

/** On a dark ground each side runs the other way, so that what stands out is the greater change there too. */
const DARK_STOPS = [...STOPS.slice(0, 5).reverse(), DARK_MIDDLE, ...STOPS.slice(6).reverse()];

/**
 * The scale of differences: orange where something is lost, purple where it is gained. On a light ground nothing is near white
 * and each side darkens steadily away from it; on a dark ground nothing is a dark grey and each side brightens. The sides keep
 * apart for eyes that tell no red from green.
 * @param t −1..1, brought into that range
 * @returns red, green, blue, 0..255
 * @see C. A. Brewer, ColorBrewer 2.0 (Apache 2.0), scheme PuOr with eleven classes, read linearly between them
 */
export function divergingRgb(t: number, isOnDark = false): readonly [number, number, number] {
  const stops = isOnDark ? DARK_STOPS : STOPS;
  const place = ((Math.min(1, Math.max(-1, t)) + 1) / 2) * (stops.length - 1);
  const i = Math.min(stops.length - 2, Math.floor(place));
  const [a, b] = [stops[i] as (typeof STOPS)[0], stops[i + 1] as (typeof STOPS)[0]];
  const between = (k: 0 | 1 | 2): number => Math.round(a[k] + (b[k] - a[k]) * (place - i));
  return [between(0), between(1), between(2)];
}
