/** What a weather file may bring, each named with the unit it is kept in. */
export type Quantity =
  | 'global_Wm2'
  | 'beamNormal_Wm2'
  | 'diffuse_Wm2'
  | 'tAir_C'
  | 'dewPoint_C'
  | 'relativeHumidity_pct'
  | 'pressure_hPa'
  | 'windSpeed_ms'
  | 'groundReflectance';

/** The parts of sunlight among them. */
export const RADIATION: readonly Quantity[] = ['global_Wm2', 'beamNormal_Wm2', 'diffuse_Wm2'];

/** What the time printed in a row says of its sunlight: the start, the middle or the end of its interval, or one instant. */
export type Label = 'start' | 'middle' | 'end' | 'instant';

/** Where the file says it was taken. */
export type WeatherPlace = {
  readonly name: string;
  /** Null where the file does not say. */
  readonly latitude_deg: number | null;
  readonly longitude_deg: number | null;
  readonly elevation_m: number | null;
};

/**
 * A year of weather in columns, one row an interval, in the order of the calendar. The months of a typical year come from
 * different years, so that instants jump between months; rows still follow each other as the hours of one year do.
 */
export type WeatherYear = {
  /** What the file is, such as `NREL TMY3`. */
  readonly kind: string;
  readonly place: WeatherPlace;
  readonly rows: number;
  readonly step_min: number;
  readonly label: Label;
  /** The interval that the sunlight of the row stands for; where it was read at one instant, the interval centred on that [UTC ms]. */
  readonly start_ms: Float64Array;
  readonly end_ms: Float64Array;
  /** Minutes from the middle of that interval to where temperature and the rest hold; null when they too are means over it. */
  readonly airOffset_min: number | null;
  /** Month and day of the date printed in the row, 1 = January. */
  readonly month: Uint8Array;
  readonly day: Uint8Array;
  /** A column, or null when the file has none. No column holds gaps: short ones were filled (and told), long ones refused. */
  readonly columns: { readonly [Q in Quantity]: Float64Array | null };
};
