const clamp = (v: number): number => Math.max(0, Math.min(255, Math.round(v)));

/**
 * The cividis scale: perceptually even and the same to eyes that tell no red from green.
 * @param t 0..1
 * @returns red, green, blue, 0..255
 * @see J. R. Nuñez, C. R. Anderton, R. S. Renslow, PLoS ONE 13(7), e0199239 (2018); fifth-degree fit as published with
 *      d3-scale-chromatic, within 2/255 of the tables
 */
export function cividis(t: number): readonly [number, number, number] {
  return [
    clamp(-4.54 - t * (35.34 - t * (2381.73 - t * (6402.7 - t * (7024.72 - t * 2710.57))))),
    clamp(32.49 + t * (170.73 + t * (52.82 - t * (131.46 - t * (176.58 - t * 67.37))))),
    clamp(81.24 + t * (442.36 - t * (2482.43 - t * (6167.24 - t * (6614.94 - t * 2475.67))))),
  ];
}
