import { cividisRgb } from '../../core/sheet/cividis.ts';
import { divergingRgb } from '../../core/sheet/diverging.ts';
import type { Quantity, Side } from './map-picture.ts';

/** Steps between the numbers of a scale, as multiples of a power of ten, the plainest first. */
const STEPS = [1, 2, 5, 2.5, 3, 4] as const;
const FEWEST_STEPS = 3;
const MOST_STEPS = 6;

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
  const { step, steps } = roundSteps(shown);
  const most = steps * step;
  const isSigned = side === 'change';
  const ticks = Array.from({ length: (isSigned ? 2 : 1) * steps + 1 }, (_, i) => (isSigned ? i - steps : i) * step);
  const decimals = [0, 1, 2, 3].find((d) => isWhole(step * 10 ** d)) ?? 4;
  return { isSigned, unit: quantity === 'sun' ? 'h' : isKilo ? 'kWh/m²' : 'Wh/m²', factor, most, ticks, decimals };
}

/** Round steps that reach a length with little to spare. */
function roundSteps(length: number): { readonly step: number; readonly steps: number } {
  const power = 10 ** Math.floor(Math.log10(length) + 1e-9);
  let best = { step: length, steps: 1, over: Infinity };
  for (const multiple of [...STEPS, ...STEPS.map((m) => m / 10)]) {
    const step = multiple * power;
    const steps = Math.ceil(length / step - 1e-9);
    if (steps < FEWEST_STEPS || steps > MOST_STEPS) continue;
    const over = steps * step - length;
    if (over < best.over - 1e-9 * length) best = { step, steps, over };
  }
  return best;
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

/** The colour table: red, green, blue and 255 of each entry. @param nothing of what has no number @param none the grey that says: none of it */
export function colourTable(isSigned: boolean, nothing: Rgb8, none: Rgb8, isOnDark: boolean): Uint8Array {
  const table = new Uint8Array(256 * 4);
  for (let i = NOTHING; i <= LAST; i++) {
    const t = (i - FIRST) / (LAST - FIRST);
    const scaled = isSigned ? divergingRgb(2 * t - 1, isOnDark) : cividisRgb(t);
    const rgb = i === NOTHING ? nothing : i === NONE ? none : scaled;
    table.set([...rgb, 255], i * 4);
  }
  return table;
}
