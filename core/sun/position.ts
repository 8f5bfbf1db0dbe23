/** Where the observer stands, and the air there. */
export type Observer = {
  readonly latitude_deg: number;
  readonly longitude_deg: number;
  readonly elevation_m: number;
  /** Station pressure [hPa]; absent: the standard atmosphere at the elevation. Only refraction depends on it. */
  readonly pressure_hPa?: number;
  /** Air temperature [°C]; absent: 12. Only refraction depends on it. */
  readonly temperature_C?: number;
  /** Terrestrial minus universal time [s]; absent: the published polynomials for the year. */
  readonly deltaT_s?: number;
};

/** The sun for one observer at one instant. */
export type SunPosition = {
  /** Clockwise from true north, [0, 360). */
  readonly azimuth_deg: number;
  /** True (geometric, topocentric) altitude, without refraction. */
  readonly altitude_deg: number;
  /** With refraction. */
  readonly apparentAltitude_deg: number;
  /** Apparent minus mean solar time [min]. */
  readonly equationOfTime_min: number;
  /** Distance from the Earth [au]. */
  readonly distance_au: number;
};
