import type { Blind, Glass } from '../scheme/schema.ts';
import { glazingWithBlind } from './blind.ts';
import { clockMinutes, inClockWindow } from './clock-window.ts';

/** A window's blind, ready for the steps of a day: when it is closed, and what it then leaves of the glass's gain. */
export type BlindRule = {
  readonly device: string;
  /** g with the blind closed over g of the bare glass, 0..1. */
  readonly closedFactor: number;
  /** Irradiance that reaches the glass above which it is closed [W/m²]; infinity: no such rule. */
  readonly closedAbove_Wm2: number;
  readonly hours: readonly [number, number] | null;
};

/** The blinds of a window behind or in front of its glass. @see core/gain/blind.ts for the closed blind */
export const blindRules = (blinds: readonly Blind[], glass: Glass): readonly BlindRule[] =>
  blinds.map((blind) => {
    const from = blind.closedFrom === undefined ? null : clockMinutes(blind.closedFrom);
    const to = blind.closedTo === undefined ? null : clockMinutes(blind.closedTo);
    return {
      device: blind.id,
      closedFactor: glazingWithBlind(glass.g, glass.u, blind) / glass.g,
      closedAbove_Wm2: blind.closedAbove ?? Number.POSITIVE_INFINITY,
      hours: from === null && to === null ? null : [from ?? 0, to ?? 1440],
    };
  });

/**
 * What the blinds leave of the gain at a step: 1 with all open. A blind is closed in its hours, and whenever the irradiance on
 * the glass stands above its threshold; of several closed blinds the one that leaves least counts (their joint effect is not in
 * the method).
 * @param irradiance_Wm2 all light that reaches the outside of the glass
 */
export function blindFactor(rules: readonly BlindRule[], clock_min: number, irradiance_Wm2: number): number {
  let factor = 1;
  for (const rule of rules) {
    const byHour = rule.hours !== null && inClockWindow(clock_min, rule.hours[0], rule.hours[1]);
    if (byHour || irradiance_Wm2 > rule.closedAbove_Wm2) factor = Math.min(factor, rule.closedFactor);
  }
  return factor;
}
