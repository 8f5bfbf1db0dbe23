import { earthDistance_au } from './heliocentric.ts';
import { daysFromJ2000 } from './julian.ts';
import { lowestBetween } from './root.ts';
import { instantOfTerrestrial_ms } from './terrestrial.ts';

/** When the Earth is nearest to the sun and farthest from it [UTC ms], and how far. */
export type Apsides = {
  readonly perihelion_ms: number;
  readonly perihelion_au: number;
  readonly aphelion_ms: number;
  readonly aphelion_au: number;
};

/** A second, in days. The extremes are flat; nearer than this double precision does not tell. */
const NEAR_days = 1 / 86400;

/**
 * Perihelion and aphelion of a year. Almanacs may differ by some tens of minutes, the shortened series being flat there; the
 * distances agree to some millionths.
 * @param year 1900 to 2100
 * @throws {RangeError} outside 1860 to 2149
 */
export function apsides(year: number): Apsides {
  const distance = (days_TT: number): number => earthDistance_au(days_TT / 365250);
  const between = (month: number): [number, number] => [
    daysFromJ2000(Date.UTC(year, month - 1, -6)),
    daysFromJ2000(Date.UTC(year, month - 1, 16)),
  ];
  const near = lowestBetween(distance, ...between(1), NEAR_days);
  const far = lowestBetween((t) => -distance(t), ...between(7), NEAR_days);
  return {
    perihelion_ms: instantOfTerrestrial_ms(near),
    perihelion_au: distance(near),
    aphelion_ms: instantOfTerrestrial_ms(far),
    aphelion_au: distance(far),
  };
}
