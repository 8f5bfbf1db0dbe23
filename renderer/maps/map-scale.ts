import { cividisRgb } from '../../core/sheet/cividis.ts';
import { divergingRgb } from '../../core/sheet/diverging.ts';
import type { Quantity, Side } from './map-picture.ts';

/** Round ends of a scale, as multiples of a power of ten, and into how many steps each is cut. */
const ENDS: readonly (readonly [number, number])[] = [
  [1, 4],
  [1.2, 4],
  [1.5, 3],
  [2, 4],
  [2.5, 5],
  [3, 3],
  [4, 4],
  [5, 5],
  [6, 3],
  [8, 4],
  [10, 5],
];

export type MapUnit = 'h' | 'Wh/m²' | 'kWh/m²';

/** How the numbers of a map become colours, and the numbers that stand beside them, in the unit that is shown. */
export type MapScale = {
  /** A scale from nothing up, or one with losses and gains on either side of nothing. */
  readonly isSigned: boolean;
  readonly unit: MapUnit;
  /** What a number of the map is multiplied by to be shown in the unit. */
  readonly factor: number;
  /** The end of the scale, as shown. */
  readonly most: number;
  readonly ticks: readonly number[];
  readonly decimals: number;
};

/** From this many on, energy is shown in kWh/m² [Wh/m²]. */
const KILO_FROM = 20_000;

/**
 * A scale with round ends for numbers of a size.
 * @param size   the greatest number of the map, without its sign: hours or Wh/m²
 * @param share  what each is multiplied by first, such as 1/4 for the mean of four days
 */
export function scaleFor(quantity: Quantity, side: Side, size: number, share: number): MapScale {
  const isKilo = quantity === 'energy' && size * share >= KILO_FROM;
  const factor = share * (isKilo ? 1e-3 : 1);
  const shown = Math.max(size * factor, quantity === 'sun' ? 0.5 : 1e-3);
  const power = 10 ** Math.floor(Math.log10(shown) + 1e-9);
  const [end, steps] = ENDS.find(([e]) => e * power >= shown * (1 - 1e-9)) ?? [10, 5];
  const most = end * power;
  const isSigned = side === 'change';
  const step = most / steps;
  const ticks = Array.from({ length: (isSigned ? 2 : 1) * steps + 1 }, (_, i) => (isSigned ? -most : 0) + i * step);
  const decimals = Math.max(0, Math.min(3, -Math.floor(Math.log10(step) + 1e-9) + (isWhole(step / power) ? 0 : 1)));
  return { isSigned, unit: quantity === 'sun' ? 'h' : isKilo ? 'kWh/m²' : 'Wh/m²', factor, most, ticks, decimals };
}

const isWhole = (v: number): boolean => Math.abs(v - Math.round(v)) < 1e-9;

/** Colours of a map by number: nothing there, nothing of it, then the scale from its one end to the other. */
export const NOTHING = 0;
export const NONE = 1;
const FIRST = 2;
const LAST = 254;

/** Entry of the colour table for a number of the map; null is nothing. */
export function shadeOf(scale: MapScale, value: number | null): number {
  if (value === null) return NOTHING;
  const t = (value * scale.factor) / scale.most;
  if (scale.isSigned) return FIRST + Math.round(((Math.max(-1, Math.min(1, t)) + 1) / 2) * (LAST - FIRST));
  return t <= 1e-9 ? NONE : FIRST + Math.round(Math.min(1, t) * (LAST - FIRST));
}

type Rgb8 = readonly [number, number, number];

/** The colour table: red, green, blue and cover of each entry, 0..255. @param none the grey that says: none of it */
export function colourTable(isSigned: boolean, none: Rgb8): Uint8Array {
  const table = new Uint8Array(256 * 4);
  for (let i = NONE; i <= LAST; i++) {
    const t = (i - FIRST) / (LAST - FIRST);
    const rgb = i === NONE ? none : isSigned ? divergingRgb(2 * t - 1) : cividisRgb(t);
    table.set([...rgb, 255], i * 4);
  }
  return table;
}
