/** Lower limits of the classes of clearness 2 to 8; a value on a limit belongs to the class above. */
const CLEARNESS = [1.065, 1.23, 1.5, 1.95, 2.8, 4.5, 6.2] as const;

/**
 * F11, F12, F13, F21, F22, F23 for the eight classes, overcast to clear: all-sites composite.
 * R. Perez et al., Solar Energy 44, 271–289 (1990).
 */
const BRIGHTNESS: readonly (readonly [number, number, number, number, number, number])[] = [
  [-0.008, 0.588, -0.062, -0.06, 0.072, -0.022],
  [0.13, 0.683, -0.151, -0.019, 0.066, -0.029],
  [0.33, 0.487, -0.221, 0.055, -0.064, -0.026],
  [0.568, 0.187, -0.295, 0.109, -0.152, -0.014],
  [0.873, -0.392, -0.362, 0.226, -0.462, 0.001],
  [1.132, -1.237, -0.412, 0.288, -0.823, 0.056],
  [1.06, -1.6, -0.359, 0.264, -1.127, 0.131],
  [0.678, -0.327, -0.25, 0.156, -1.377, 0.251],
];

/** What the description of a sky by Perez asks for. */
export type PerezInput = {
  readonly beamNormal_Wm2: number;
  readonly diffuse_Wm2: number;
  readonly extraterrestrial_Wm2: number;
  /** Relative air mass, not corrected for pressure. */
  readonly airMass: number;
  readonly zenith_rad: number;
};

/** A sky as Perez describes it. */
export type PerezSky = {
  /** Clearness ε: 1 overcast, above 6 clear. */
  readonly clearness: number;
  /** Brightness Δ. */
  readonly brightness: number;
  /** Class of clearness, 1 to 8. */
  readonly bin: number;
};

/**
 * Clearness and brightness of a sky. Without diffuse light the clearness has no bound (class 8, brightness 0); without any
 * light at all it is called overcast (class 1).
 * @see R. Perez et al., Solar Energy 44, 271–289 (1990), with κ = 1.041 for the zenith angle in radians
 */
export function perezSky(input: PerezInput): PerezSky {
  const { beamNormal_Wm2: beam, diffuse_Wm2: diffuse, zenith_rad: z } = input;
  if (!(diffuse > 0)) {
    return beam > 0
      ? { clearness: Number.POSITIVE_INFINITY, brightness: 0, bin: 8 }
      : { clearness: 1, brightness: 0, bin: 1 };
  }
  const k = 1.041 * z * z * z;
  const clearness = ((diffuse + beam) / diffuse + k) / (1 + k);
  let bin = 1;
  for (const limit of CLEARNESS) if (clearness >= limit) bin++;
  return { clearness, brightness: (diffuse * input.airMass) / input.extraterrestrial_Wm2, bin };
}

/** How strongly the sky is bright round the sun (f1, 0 or more) and along the horizon (f2, of either sign). */
export function perezBrightness(input: PerezInput): {
  readonly f1: number;
  readonly f2: number;
  readonly sky: PerezSky;
} {
  const sky = perezSky(input);
  const c = BRIGHTNESS[sky.bin - 1] as (typeof BRIGHTNESS)[number];
  const z = input.zenith_rad;
  return {
    f1: Math.max(0, c[0] + c[1] * sky.brightness + c[2] * z),
    f2: c[3] + c[4] * sky.brightness + c[5] * z,
    sky,
  };
}
