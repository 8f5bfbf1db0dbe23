import { fixed, area as squareMetres } from './numerals.ts';

/** Units of a drawing. They change what is printed, never what is worked out. */
export type SheetUnits = 'metric' | 'imperial';

/** The international foot, exact since 1959: Federal Register 24, 5348. */
export const FOOT_m = 0.3048;
const INCH_m = FOOT_m / 12;

/** Scales of a foot rule: inches of paper to a foot of ground, then inches to tens of feet. Common practice, no source. */
const FOOT_SCALES: readonly (readonly [ratio: number, words: string])[] = [
  [12, '1" = 1\'-0"'],
  [16, '3/4" = 1\'-0"'],
  [24, '1/2" = 1\'-0"'],
  [32, '3/8" = 1\'-0"'],
  [48, '1/4" = 1\'-0"'],
  [64, '3/16" = 1\'-0"'],
  [96, '1/8" = 1\'-0"'],
  [120, '1" = 10\''],
  [192, '1/16" = 1\'-0"'],
  [240, '1" = 20\''],
  [360, '1" = 30\''],
  [480, '1" = 40\''],
  [600, '1" = 50\''],
  [720, '1" = 60\''],
  [1200, '1" = 100\''],
  [2400, '1" = 200\''],
  [4800, '1" = 400\''],
  [6000, '1" = 500\''],
  [12000, '1" = 1000\''],
];
/** Ratios of the foot rule, largest drawing first. */
export const IMPERIAL_SCALES: readonly number[] = FOOT_SCALES.map(([ratio]) => ratio);

const ratioWords = (scale: number): string => `1:${Number.isInteger(scale) ? scale : scale.toFixed(2)}`;

/** A scale in words: `1:500`, or as a foot rule says it, `1" = 20' (1:240)`. */
export function scaleWords(scale: number, units: SheetUnits = 'metric'): string {
  const said = units === 'imperial' ? FOOT_SCALES.find(([ratio]) => ratio === scale)?.[1] : undefined;
  return said === undefined ? ratioWords(scale) : `${said} (${ratioWords(scale)})`;
}

/** Inches as written by hand: `1`, `3/4`, `1 1/2`, `1-1/2`, `0.5`. NaN for anything else. */
function inches(text: string): number {
  const [, whole, top, bottom] = /^(?:(\d+(?:\.\d+)?)(?:[ -](?=\d+\/))?)?(?:(\d+)\/(\d+))?$/u.exec(text.trim()) ?? [];
  if (whole === undefined && top === undefined) return Number.NaN;
  return Number(whole ?? 0) + (top === undefined ? 0 : Number(top) / Number(bottom));
}

/**
 * A scale as a person writes it: `500`, `1:500`, `1"=20'`, `1/16"=1'-0"`, `1/8 in = 1 ft`.
 * @returns the ratio, NaN for what is no scale
 */
export function readScale(text: string): number {
  const plain = /^(?:1\s*:\s*)?(\d+(?:\.\d+)?)$/u.exec(text.trim());
  if (plain) return Number(plain[1]);
  const [, paper, feet, rest] =
    /^([\d ./-]+?)\s*(?:"|″|in)\s*=\s*(\d+(?:\.\d+)?)\s*(?:'|′|ft)(?:\s*-?\s*(\d+(?:\.\d+)?)\s*(?:"|″|in))?$/u.exec(
      text.trim(),
    ) ?? [];
  if (paper === undefined) return Number.NaN;
  const ratio = (Number(feet) * 12 + Number(rest ?? 0)) / inches(paper);
  return Number.isFinite(ratio) && ratio > 0 ? Math.round(ratio * 1e6) / 1e6 : Number.NaN;
}

/** A height on a plan: metres or feet, one decimal, without its unit, which the key names. */
export const planHeight = (m: number, units: SheetUnits): string => (units === 'imperial' ? m / FOOT_m : m).toFixed(1);

/** An area with its unit. */
export function areaText(m2: number, units: SheetUnits): string {
  if (units === 'metric') return squareMetres(m2);
  return `${fixed(m2 / (FOOT_m * FOOT_m), 0)}\u00a0sq\u00a0ft`;
}

/** A length of a dimension line: metres to the centimetre, or feet and inches to the eighth of an inch. */
export function dimension(m: number, units: SheetUnits): string {
  if (units === 'metric') return fixed(m, 2);
  const eighths = Math.round(m / (INCH_m / 8));
  const feet = Math.floor(eighths / 96);
  const whole = Math.floor((eighths % 96) / 8);
  const part = eighths % 8;
  const top = part / (part % 4 === 0 ? 4 : part % 2 === 0 ? 2 : 1);
  const fraction = part === 0 ? '' : ` ${top}/${(8 * top) / part}`;
  return `${feet}'-${whole}${fraction}"`;
}
