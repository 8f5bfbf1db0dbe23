import type { Fault } from '../scheme/fault.ts';
import type { Mm } from './drawing.ts';
import { IMPERIAL_SCALES, type SheetUnits, scaleWords } from './sheet-units.ts';

/** Scales that a ruler knows: those of ISO 5455, with 1:25, 1:250, 1:1250 and 1:2500 of everyday use. */
export const SCALES: readonly number[] = [10, 20, 25, 50, 100, 200, 250, 500, 1000, 1250, 2500, 5000, 10000];

/** How large something is, or may be: metres on the ground or millimetres on paper. */
type Size = readonly [width: number, height: number];

/** Whether something fits into a frame on paper at a scale. */
export const fits = (size_m: Size, frame: Size, scale: number): boolean =>
  (size_m[0] * 1000) / scale <= frame[0] + 1e-9 && (size_m[1] * 1000) / scale <= frame[1] + 1e-9;

/** The standard scales of a drawing's units. */
export const standardScales = (units: SheetUnits): readonly number[] =>
  units === 'imperial' ? IMPERIAL_SCALES : SCALES;

/** The largest standard scale at which something fits into a frame; null when none does. */
export const bestScale = (size_m: Size, frame: readonly [Mm, Mm], units: SheetUnits = 'metric'): number | null =>
  standardScales(units).find((s) => fits(size_m, frame, s)) ?? null;

/**
 * The scale asked for, or the best that fits where none is asked for; a fault that says which would fit where it does not.
 * @param wanted_m  what best fit tries to show as well, such as the shadows round the scheme; at least `size_m`
 */
export function chooseScale(
  asked: number | null,
  size_m: Size,
  wanted_m: Size,
  frame: readonly [Mm, Mm],
  what: string,
  units: SheetUnits = 'metric',
): number | Fault {
  const scales = standardScales(units);
  const fitting = bestScale(size_m, frame, units);
  if (asked === null) {
    // One step smaller than need be, at most: long shadows of low sun must not shrink the scheme to a stamp.
    if (fitting !== null)
      return fits(wanted_m, frame, fitting) ? fitting : (scales[scales.indexOf(fitting) + 1] ?? fitting);
  } else if (fits(size_m, frame, asked)) return asked;
  const large = `${size_m[0].toFixed(1)} m × ${size_m[1].toFixed(1)} m`;
  const room = `${frame[0].toFixed(0)} mm × ${frame[1].toFixed(0)} mm`;
  return {
    level: 'error',
    code: 'scale-too-large',
    place: '',
    message: `the scheme is ${large}, which at ${asked === null ? 'every standard scale' : scaleWords(asked, units)} is larger than the ${room} that ${what} leaves for a drawing`,
    cure: fitting === null ? 'take larger paper' : `${scaleWords(fitting, units)} fits, or take larger paper`,
  };
}
