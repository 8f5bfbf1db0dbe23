import * as maths from '../maths/maths.ts';
import { relativeAirMass1966, SEA_LEVEL_hPa } from './air-mass.ts';
import { DIRINT_FACTORS } from './dirint-factors.ts';
import { extraterrestrialSpencer, SOLAR_CONSTANT } from './extraterrestrial.ts';

/** Global irradiance on the level, split into beam facing the sun and diffuse on the level [W/m²]. */
export type Split = { readonly beamNormal_Wm2: number; readonly diffuse_Wm2: number };

/** One measured or modelled value of global irradiance and the sun at its instant. */
export type GlobalReading = {
  readonly global_Wm2: number;
  /** True zenith angle, without refraction [rad]. */
  readonly zenith_rad: number;
  /** 1 = 1 January, of the instant in UTC. */
  readonly dayOfYear: number;
};

/** Below this height of the sun its cosine stands still, so that clearness does not run away at sunrise (86.3°). */
const LOWEST_COS = 0.065;
/** Lower sun than this gives no beam: the fits have no data there. */
const LOWEST_SUN_rad = (87 * Math.PI) / 180;
/** The air mass at which the DISC fit stops. */
const LONGEST_PATH = 12;

export const SPLIT_NOTES = {
  erbs: {
    name: 'Erbs 1982',
    source: 'D. G. Erbs, S. A. Klein, J. A. Duffie, Solar Energy 28, 293–302 (1982)',
    needs: 'global irradiance',
    valid: 'hourly values, sun at 3° or higher; the beam of single hours scatters widely',
  },
  disc: {
    name: 'DISC 1987',
    source:
      'E. L. Maxwell, A quasi-physical model for converting hourly global horizontal to direct normal insolation, SERI/TR-215-3087 (1987)',
    needs: 'global irradiance, pressure',
    valid: 'hourly values, sun at 3° or higher',
  },
  dirint: {
    name: 'DIRINT 1992',
    source: 'R. Perez, P. Ineichen, E. Maxwell, R. Seals, A. Zelenka, ASHRAE Transactions 98 (1), 354–369 (1992)',
    needs: 'a series of global irradiance, pressure; better with dew point',
    valid: 'hourly values in order, sun at 3° or higher',
  },
} as const;

/**
 * Clearness index: global over what would arrive without air, 0 to `most`.
 * @param constant_Wm2  the solar constant that the fit was made with
 */
export function clearnessIndex(reading: GlobalReading, constant_Wm2: number, most = 1): number {
  const outside =
    extraterrestrialSpencer(reading.dayOfYear, constant_Wm2) * Math.max(maths.cos(reading.zenith_rad), LOWEST_COS);
  return Math.min(most, Math.max(0, reading.global_Wm2 / outside));
}

/** Diffuse is what global leaves after the beam on the level; never below 0, where a fit gives more beam than there is light. */
const rest = (reading: GlobalReading, beam: number): number =>
  Math.max(0, reading.global_Wm2 - beam * maths.cos(reading.zenith_rad));

const sunless = (reading: GlobalReading): boolean =>
  !(reading.global_Wm2 >= 0) || !(reading.zenith_rad <= LOWEST_SUN_rad);

/**
 * Diffuse share from the clearness alone.
 * @returns beam and diffuse [W/m²]; with the sun below 3° all of it is diffuse
 * @see D. G. Erbs, S. A. Klein, J. A. Duffie, Solar Energy 28, 293–302 (1982)
 */
export function erbs(reading: GlobalReading): Split {
  if (sunless(reading)) return { beamNormal_Wm2: 0, diffuse_Wm2: Math.max(0, reading.global_Wm2) };
  const k = clearnessIndex(reading, SOLAR_CONSTANT.astm_Wm2);
  const share =
    k <= 0.22 ? 1 - 0.09 * k : k <= 0.8 ? 0.9511 + k * (-0.1604 + k * (4.388 + k * (-16.638 + k * 12.336))) : 0.165;
  const diffuse = reading.global_Wm2 * share;
  return { beamNormal_Wm2: (reading.global_Wm2 - diffuse) / maths.cos(reading.zenith_rad), diffuse_Wm2: diffuse };
}

/** DISC's intermediate values, which DIRINT goes on from. */
type Disc = { readonly beam: number; readonly clearness: number; readonly airMass: number };

function discBeam(reading: GlobalReading, pressure_hPa: number): Disc {
  const k = clearnessIndex(reading, SOLAR_CONSTANT.disc_Wm2);
  const airMass = Math.min(LONGEST_PATH, (relativeAirMass1966(reading.zenith_rad) * pressure_hPa) / SEA_LEVEL_hPa);
  if (sunless(reading)) return { beam: 0, clearness: k, airMass };
  const cloudy = k <= 0.6;
  const a = cloudy ? 0.512 + k * (-1.56 + k * (2.286 - k * 2.222)) : -5.743 + k * (21.77 + k * (-27.49 + k * 11.56));
  const b = cloudy ? 0.37 + 0.962 * k : 41.4 + k * (-118.5 + k * (66.05 + k * 31.9));
  const c = cloudy ? -0.28 + k * (0.932 - k * 2.048) : -47.01 + k * (184.2 + k * (-222 + k * 73.81));
  const m = airMass;
  const clearest = 0.866 + m * (-0.122 + m * (0.0121 + m * (-0.000653 + m * 1.4e-5)));
  const share = clearest - (a + b * maths.exp(c * m));
  return {
    beam: Math.max(0, share * extraterrestrialSpencer(reading.dayOfYear, SOLAR_CONSTANT.disc_Wm2)),
    clearness: k,
    airMass,
  };
}

/**
 * Beam from clearness and air mass.
 * @param pressure_hPa  station pressure
 * @see E. L. Maxwell, SERI/TR-215-3087 (1987)
 */
export function disc(reading: GlobalReading, pressure_hPa: number): Split {
  const { beam } = discBeam(reading, pressure_hPa);
  return { beamNormal_Wm2: beam, diffuse_Wm2: rest(reading, beam) };
}

const CLEARNESS_LIMITS = [0.24, 0.4, 0.56, 0.7, 0.8] as const;
const ZENITH_LIMITS_deg = [25, 40, 55, 70, 80] as const;
const STEADINESS_LIMITS = [0.015, 0.035, 0.07, 0.15, 0.3] as const;
const WATER_LIMITS_cm = [1, 2, 3] as const;
const UNKNOWN_STEADINESS = 6;
const UNKNOWN_WATER = 4;

/** Class of a value, 0 first; a value on a limit belongs to the class above. */
const classOf = (value: number, limits: readonly number[]): number => limits.filter((limit) => value >= limit).length;

/** What a series for DIRINT brings beside the readings. */
export type DirintSeries = {
  readonly readings: readonly GlobalReading[];
  /** Station pressure: one for all, or one each [hPa]. */
  readonly pressure_hPa: number | ArrayLike<number>;
  /** Dew points [°C]; absent: the water in the air is not known. */
  readonly dewPoint_C?: ArrayLike<number>;
  /** False when the readings do not follow each other in time; the steadiness of the sky is then not known. */
  readonly inOrder?: boolean;
};

/**
 * Beam from a series: DISC, corrected for how clear, how steady and how humid the sky is. Steadiness of an hour is the mean
 * change of clearness to the hour before and the hour after; at the ends of a series the one neighbour counts alone.
 * @see R. Perez et al., ASHRAE Transactions 98 (1), 354–369 (1992)
 */
export function dirint(series: DirintSeries): Split[] {
  const { readings, pressure_hPa, dewPoint_C, inOrder = true } = series;
  const pressure = (i: number): number =>
    typeof pressure_hPa === 'number' ? pressure_hPa : (pressure_hPa[i] as number);
  const first = readings.map((reading, i) => discBeam(reading, pressure(i)));
  const clearness = first.map(({ clearness: k, airMass }) =>
    Math.min(1, Math.max(0, k / (1.031 * maths.exp(-1.4 / (0.9 + 9.4 / airMass)) + 0.1))),
  );
  return readings.map((reading, i) => {
    const { beam } = first[i] as Disc;
    if (!(beam > 0)) return { beamNormal_Wm2: 0, diffuse_Wm2: Math.max(0, reading.global_Wm2) };
    const steadiness = inOrder ? classOf(unsteadiness(clearness, i), STEADINESS_LIMITS) : UNKNOWN_STEADINESS;
    const water = dewPoint_C
      ? classOf(maths.exp(0.07 * (dewPoint_C[i] as number) - 0.075), WATER_LIMITS_cm)
      : UNKNOWN_WATER;
    const row =
      classOf(clearness[i] as number, CLEARNESS_LIMITS) * 6 +
      classOf((reading.zenith_rad * 180) / Math.PI, ZENITH_LIMITS_deg);
    const corrected = beam * ((DIRINT_FACTORS[row] as readonly number[])[steadiness * 5 + water] as number);
    return { beamNormal_Wm2: corrected, diffuse_Wm2: rest(reading, corrected) };
  });
}

/** Mean change of clearness to the neighbours; NaN neighbours (sun below the horizon) count as none. */
function unsteadiness(clearness: readonly number[], i: number): number {
  const here = clearness[i] as number;
  const steps = [clearness[i - 1], clearness[i + 1]]
    .filter((k): k is number => k !== undefined && !Number.isNaN(k))
    .map((k) => Math.abs(here - k));
  return steps.length === 0 ? 0 : steps.reduce((a, b) => a + b, 0) / steps.length;
}
