type Piece = {
  /** First year the piece does not cover. */
  readonly before: number;
  readonly from: number;
  readonly origin: number;
  /** Coefficients of (y − origin)⁰, ¹, ² … [s] */
  readonly coefficients: readonly number[];
};

const PIECES: readonly Piece[] = [
  {
    from: 1860,
    before: 1900,
    origin: 1860,
    coefficients: [7.62, 0.5737, -0.251754, 0.01680668, -0.0004473624, 1 / 233174],
  },
  { from: 1900, before: 1920, origin: 1900, coefficients: [-2.79, 1.494119, -0.0598939, 0.0061966, -0.000197] },
  { from: 1920, before: 1941, origin: 1920, coefficients: [21.2, 0.84493, -0.0761, 0.0020936] },
  { from: 1941, before: 1961, origin: 1950, coefficients: [29.07, 0.407, -1 / 233, 1 / 2547] },
  { from: 1961, before: 1986, origin: 1975, coefficients: [45.45, 1.067, -1 / 260, -1 / 718] },
  {
    from: 1986,
    before: 2005,
    origin: 2000,
    coefficients: [63.86, 0.3345, -0.060374, 0.0017275, 0.000651814, 0.00002373599],
  },
  { from: 2005, before: 2050, origin: 2000, coefficients: [62.92, 0.32217, 0.005589] },
];

/**
 * Terrestrial minus universal time.
 *
 * The published polynomials stand for the middle of a month, so the value holds for a whole calendar month and steps by some
 * hundredths of a second at its end (the sun moves 1e-6° in a tenth of a second). Predictions run some seconds above what
 * has been measured since 2010; 6 s are 0.00007° of the sun's place.
 * @param year  calendar year in UTC, 1860 to 2149
 * @param month 1 to 12
 * @returns seconds
 * @throws {RangeError} outside those years
 * @see F. Espenak, J. Meeus, Five Millennium Canon of Solar Eclipses, NASA/TP-2006-214141, polynomial expressions for ΔT
 */
export function deltaTOfMonth_s(year: number, month: number): number {
  const y = year + (month - 0.5) / 12;
  if (year >= 2050 && year < 2150) {
    const u = (y - 1820) / 100;
    return -20 + 32 * u * u - 0.5628 * (2150 - y);
  }
  const piece = PIECES.find((p) => year >= p.from && year < p.before);
  if (piece === undefined)
    throw new RangeError(`no ΔT for the year ${year}; the polynomials kept run from 1860 to 2149`);
  const t = y - piece.origin;
  return piece.coefficients.reduceRight((sum, c) => sum * t + c, 0);
}

/**
 * The same for an instant.
 * @param instant_ms UTC milliseconds, years 1860 to 2149
 * @throws {RangeError} outside those years
 */
export function deltaT_s(instant_ms: number): number {
  const d = new Date(instant_ms);
  return deltaTOfMonth_s(d.getUTCFullYear(), d.getUTCMonth() + 1);
}

/** First instant of the calendar month (UTC) after the one the instant lies in: until then `deltaT_s` does not change. */
export function nextMonth_ms(instant_ms: number): number {
  const d = new Date(instant_ms);
  return Date.UTC(d.getUTCFullYear(), d.getUTCMonth() + 1, 1);
}
