import type { Fault } from '../scheme/fault.ts';
import { ASHRAE_NOTE, type AshraeAir, ashraeTau } from './ashrae-tau.ts';
import { BIRD_NOTE, type BirdAir, birdHulstrom } from './bird.ts';
import type { ClearSun, ModelNote, SplitSky } from './clear-sun.ts';
import { HAURWITZ_NOTE, haurwitz } from './haurwitz.ts';
import { INEICHEN_NOTE, ineichenPerez } from './ineichen.ts';
import { outOfRange } from './range.ts';
import { SOLIS_NOTE, type SolisAir, simplifiedSolis } from './solis.ts';

/** A model that splits beam and diffuse, with what it needs to know of the air. */
export type SplitAir =
  | { readonly model: 'ineichen-perez'; readonly linkeTurbidity: number }
  | ({ readonly model: 'bird' } & BirdAir)
  | ({ readonly model: 'ashrae-tau' } & AshraeAir)
  | ({ readonly model: 'solis' } & SolisAir);

/** Any clear-sky model. */
export type ClearAir = SplitAir | { readonly model: 'haurwitz' };

/** What each model is, needs and is good for. To add one: a file with its function and note, a member above, a line in each table here. */
export const CLEAR_SKY_MODELS: { readonly [M in ClearAir['model']]: ModelNote } = {
  'ineichen-perez': INEICHEN_NOTE,
  bird: BIRD_NOTE,
  'ashrae-tau': ASHRAE_NOTE,
  solis: SOLIS_NOTE,
  haurwitz: HAURWITZ_NOTE,
};

/**
 * Beam and diffuse under a cloudless sky [W/m²]. Inputs that a user gave have been through `checkClearAir` and
 * `checkClearSun` before.
 */
export function clearSky(sun: ClearSun, air: SplitAir): SplitSky {
  switch (air.model) {
    case 'ineichen-perez':
      return ineichenPerez(sun, air.linkeTurbidity);
    case 'bird':
      return birdHulstrom(sun, air);
    case 'ashrae-tau':
      return ashraeTau(sun, air);
    case 'solis':
      return simplifiedSolis(sun, air);
  }
}

/** Global on the level under a cloudless sky, by any model [W/m²]. */
export const clearGlobal = (sun: ClearSun, air: ClearAir): number =>
  air.model === 'haurwitz' ? haurwitz(sun) : clearSky(sun, air).global_Wm2;

/** Faults of what a user says of the air: every number that the model needs, against the span in which it may be used. */
export function checkClearAir(air: ClearAir, place: string): readonly Fault[] {
  const values = air as unknown as { readonly [key: string]: number | undefined };
  const faults = CLEAR_SKY_MODELS[air.model].needs.flatMap((need) =>
    outOfRange(values[need.key], need, `${place === '' ? '' : `${place}.`}${need.key}`),
  );
  if (air.model === 'ashrae-tau' && air.edition !== 2009 && air.edition !== 2013) {
    faults.push({
      level: 'error',
      code: 'unknown-edition',
      place: `${place}.edition`,
      message: `the edition must be 2009 or 2013, got ${String(air.edition)}`,
      cure: 'name the edition that the optical depths were taken from; 2013 stands for all later ones',
    });
  }
  return faults;
}

/** Faults of what a user says of the place: pressure and height. */
export const checkClearSun = (sun: Pick<ClearSun, 'pressure_hPa' | 'elevation_m'>, place: string): readonly Fault[] => [
  ...outOfRange(
    sun.pressure_hPa,
    { name: 'pressure', unit: 'hPa', min: 300, max: 1100, usual: '1013.25 at the sea' },
    `${place}.pressure`,
  ),
  ...outOfRange(
    sun.elevation_m,
    { name: 'elevation', unit: 'm', min: -500, max: 9000, usual: '0' },
    `${place}.elevation`,
  ),
];

/** What must be said of a result: that the sun stood lower than the model is good for. Empty where there is nothing to say. */
export function clearSkyNote(model: ClearAir['model'], apparentAltitude_deg: number): string {
  const note = CLEAR_SKY_MODELS[model];
  return apparentAltitude_deg > 0 && apparentAltitude_deg < note.lowestAltitude_deg
    ? `sun at ${apparentAltitude_deg.toFixed(1)}°, below the ${note.lowestAltitude_deg}° down to which ${note.name} is good`
    : '';
}
