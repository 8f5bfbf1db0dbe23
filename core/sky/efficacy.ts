import * as maths from '../maths/maths.ts';
import { type PerezInput, perezSky } from './perez.ts';

type Four = readonly [number, number, number, number];

/** a, b, c, d for global, diffuse and beam, by class of clearness. Perez et al. 1990, table 4. */
const EFFICACY: readonly { readonly global: Four; readonly diffuse: Four; readonly beam: Four }[] = [
  { global: [96.63, -0.47, 11.5, -9.16], diffuse: [97.24, -0.46, 12.0, -8.91], beam: [57.2, -4.55, -2.98, 117.12] },
  { global: [107.54, 0.79, 1.79, -1.19], diffuse: [107.22, 1.15, 0.59, -3.95], beam: [98.99, -3.46, -1.21, 12.38] },
  { global: [98.73, 0.7, 4.4, -6.95], diffuse: [104.97, 2.96, -5.53, -8.77], beam: [109.83, -4.9, -1.71, -8.81] },
  { global: [92.72, 0.56, 8.36, -8.31], diffuse: [102.39, 5.59, -13.95, -13.9], beam: [110.34, -5.84, -1.99, -4.56] },
  { global: [86.73, 0.98, 7.1, -10.94], diffuse: [100.71, 5.94, -22.75, -23.74], beam: [106.36, -3.97, -1.75, -6.16] },
  { global: [88.34, 1.39, 6.06, -7.6], diffuse: [106.42, 3.83, -36.15, -28.83], beam: [107.19, -1.25, -1.51, -26.73] },
  { global: [78.63, 1.47, 4.93, -11.37], diffuse: [141.88, 1.9, -53.24, -14.03], beam: [105.75, 0.77, -1.26, -34.44] },
  { global: [99.65, 1.86, -4.46, -3.15], diffuse: [152.23, 0.35, -45.27, -7.98], beam: [101.18, 1.58, -1.1, -8.29] },
];

/** Darker skies than this were not measured; the logarithm stands still here. */
const DARKEST = 0.01;

/** Luminous efficacy of daylight [lm/W]. */
export type Efficacy = { readonly global: number; readonly diffuse: number; readonly beam: number };

/** Water in the air from the dew point, as brought down to the ground [cm]. @see R. Perez et al. (1990) */
export const waterFromDewPoint_cm = (dewPoint_C: number): number => maths.exp(0.07 * dewPoint_C - 0.075);

/**
 * How many lumens a watt of daylight carries. Good for the sun above about 3°; with the sun below the horizon the value of the
 * horizon is given.
 * @param dewPoint_C  dew point of the air [°C]
 * @returns  about 115 for an overcast sky, 130 to 150 for clear blue sky, about 100 for the beam of a high sun [lm/W]
 * @see R. Perez et al., Solar Energy 44, 271–289 (1990), eqs 6–8 and table 4
 */
export function daylightEfficacy(input: PerezInput, dewPoint_C: number): Efficacy {
  const sky = perezSky(input);
  const row = EFFICACY[sky.bin - 1] as (typeof EFFICACY)[number];
  const water = waterFromDewPoint_cm(dewPoint_C);
  const z = Math.min(input.zenith_rad, Math.PI / 2);
  const bright = maths.log(Math.max(DARKEST, sky.brightness));
  const even = ([a, b, c, d]: Four): number => a + b * water + c * maths.cos(z) + d * bright;
  const [a, b, c, d] = row.beam;
  return {
    global: even(row.global),
    diffuse: even(row.diffuse),
    beam: Math.max(0, a + b * water + c * maths.exp(5.73 * z - 5) + d * sky.brightness),
  };
}
