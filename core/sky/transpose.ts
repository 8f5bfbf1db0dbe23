import * as maths from '../maths/maths.ts';
import { perezBrightness } from './perez.ts';

/** The sky at one moment and how the plane lies in it. */
export type PlaneInput = {
  readonly beamNormal_Wm2: number;
  readonly diffuse_Wm2: number;
  /** On the level: what the ground reflects. */
  readonly global_Wm2: number;
  /** Facing the sun outside the air. */
  readonly extraterrestrial_Wm2: number;
  /** Relative air mass (Kasten–Young), not corrected for pressure; only Perez asks for it. */
  readonly airMass: number;
  /** Zenith angle of the sun [rad]. */
  readonly zenith_rad: number;
  /** Cosine of the angle between the sun and the plane's normal; at or below 0 the sun is behind the plane. */
  readonly cosIncidence: number;
  /** 0 faces up, π/2 a wall, above that it faces down [rad]. */
  readonly tilt_rad: number;
  /** 0..1. */
  readonly groundReflectance: number;
};

/** Irradiance on a plane, part by part, because each part is shaded in its own way [W/m²]. */
export type PlaneParts = {
  readonly beam: number;
  /** Sky light from close around the sun: shaded as the beam is. */
  readonly circumsolar: number;
  /** From the evenly bright dome: proportional to the share of the sky that the plane sees. */
  readonly sky: number;
  /** From the band along the horizon: may be negative, where the horizon is darker than the dome. */
  readonly horizon: number;
  readonly ground: number;
};

export type SkyModel = 'isotropic' | 'hay-davies' | 'perez';

/** What each model is, for the working and for the choice on screen. */
export const SKY_MODELS: {
  readonly [M in SkyModel]: { readonly name: string; readonly source: string; readonly valid: string };
} = {
  isotropic: {
    name: 'evenly bright sky',
    source:
      'H. C. Hottel, B. B. Woertz, Transactions of the ASME 64, 91–104 (1942); B. Y. H. Liu, R. C. Jordan, ASHRAE Transactions 67, 526–541 (1961)',
    valid: 'overcast skies; gives too little on the sunny side under a clear sky',
  },
  'hay-davies': {
    name: 'Hay–Davies 1980',
    source: 'J. E. Hay, J. A. Davies, Proceedings of the First Canadian Solar Radiation Data Workshop, 59–72 (1980)',
    valid: 'all skies with the sun above the horizon; no brightening of the horizon',
  },
  perez: {
    name: 'Perez 1990',
    source:
      'R. Perez, P. Ineichen, R. Seals, J. Michalsky, R. Stewart, Solar Energy 44, 271–289 (1990), all-sites composite',
    valid: 'all skies with the sun above the horizon; results step a little between its eight classes of clearness',
  },
};

/** cos 89°: Hay–Davies divides by the height of the sun; below 1° it stands still. */
const LOWEST_HAY_DAVIES = 0.01745;
/** cos 85°: the same in Perez, as in the paper. */
const LOWEST_PEREZ = maths.cos((85 * Math.PI) / 180);

/**
 * Irradiance on an unshaded plane with a free horizon, its parts apart. With the sun at or below the horizon no beam and an
 * evenly bright sky are taken, whichever the model: the models say nothing of twilight.
 * @see `SKY_MODELS` for each model's source
 */
export function planeIrradiance(model: SkyModel, input: PlaneInput): PlaneParts {
  const { diffuse_Wm2: diffuse, tilt_rad, groundReflectance } = input;
  const up = maths.cos(input.zenith_rad);
  const ground = (input.global_Wm2 * groundReflectance * (1 - maths.cos(tilt_rad))) / 2;
  const dome = (1 + maths.cos(tilt_rad)) / 2;
  const facing = Math.max(0, input.cosIncidence);
  if (!(up > 0)) return { beam: 0, circumsolar: 0, sky: diffuse * dome, horizon: 0, ground };
  const beam = input.beamNormal_Wm2 * facing;
  if (model === 'isotropic' || !(diffuse > 0))
    return { beam, circumsolar: 0, sky: Math.max(0, diffuse) * dome, horizon: 0, ground };
  if (model === 'hay-davies') {
    const like = input.beamNormal_Wm2 / input.extraterrestrial_Wm2;
    const ratio = facing / Math.max(up, LOWEST_HAY_DAVIES);
    return { beam, circumsolar: diffuse * like * ratio, sky: diffuse * (1 - like) * dome, horizon: 0, ground };
  }
  const { f1, f2 } = perezBrightness(input);
  const circumsolar = (diffuse * f1 * facing) / Math.max(up, LOWEST_PEREZ);
  const sky = diffuse * (1 - f1) * dome;
  const horizon = diffuse * f2 * maths.sin(tilt_rad);
  // A dark horizon can outweigh the rest on a plane that faces away from the sun or down; there is no negative light.
  return circumsolar + sky + horizon > 0
    ? { beam, circumsolar, sky, horizon, ground }
    : { beam, circumsolar: 0, sky: 0, horizon: 0, ground };
}

/** All parts together [W/m²]. */
export const planeTotal = (p: PlaneParts): number => p.beam + p.circumsolar + p.sky + p.horizon + p.ground;
