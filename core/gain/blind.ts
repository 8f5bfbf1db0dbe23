import { BLIND_CONSTANTS, type BlindConstants } from './blind-constants.ts';

/** What the method needs to know of a closed blind: sun side. */
export type BlindProperties = {
  readonly place: 'external' | 'between' | 'internal';
  readonly transmittance: number;
  readonly reflectance: number;
};

/**
 * Solar energy transmittance of glazing with a closed blind, at normal incidence.
 * @param g      of the glazing alone, 0..1; the method holds for 0.15..0.85
 * @param u_Wm2K U-value of the glazing [W/m²K], above 0
 * @param blind  transmittance (0..0.5) and reflectance (0.1..0.8) of the blind, closed and covering all of the glass
 * @returns      g of both together, 0..1
 * @see EN ISO 52022-1:2017, simplified method (form of the equations from memory). Its stated error is −0.02 to +0.10.
 */
export function glazingWithBlind(
  g: number,
  u_Wm2K: number,
  blind: BlindProperties,
  constants: BlindConstants = BLIND_CONSTANTS,
): number {
  const { transmittance: t, reflectance: r } = blind;
  const absorbed = Math.max(0, 1 - t - r);
  if (blind.place === 'external') {
    const { outer, gap } = constants.external;
    const whole = 1 / (1 / u_Wm2K + 1 / outer + 1 / gap);
    return clamp01(t * g + (absorbed * whole) / gap + (t * (1 - g) * whole) / outer);
  }
  if (blind.place === 'internal') {
    const { gap } = constants.internal;
    const whole = 1 / (1 / u_Wm2K + 1 / gap);
    return clamp01(g * (1 - g * r - (absorbed * whole) / gap));
  }
  const { gap } = constants.between;
  const whole = 1 / (1 / u_Wm2K + 1 / gap);
  return clamp01(g * t + (g * (absorbed + (1 - g) * r) * whole) / gap);
}

const clamp01 = (x: number): number => Math.min(1, Math.max(0, x));

/**
 * Where glass and blind lie outside the method's stated range, in words; empty when inside.
 * @see EN ISO 52022-1:2017, scope
 */
export function blindRangeNotes(g: number, blind: BlindProperties): readonly string[] {
  const notes: string[] = [];
  if (g < 0.15 || g > 0.85) notes.push(`glass of g ${g} lies outside the blind method's range 0.15 to 0.85`);
  if (blind.transmittance > 0.5)
    notes.push(`a blind that lets ${blind.transmittance} through lies outside the method's range 0 to 0.5`);
  if (blind.reflectance < 0.1 || blind.reflectance > 0.8)
    notes.push(`a blind that reflects ${blind.reflectance} lies outside the method's range 0.1 to 0.8`);
  return notes;
}
