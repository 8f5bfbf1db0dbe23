import type { WeatherYear } from './weather-year.ts';

/** Sums and means of a month or a year. A sum is null where the file has no such column. */
export type WeatherSum = {
  readonly rows: number;
  readonly global_kWhm2: number | null;
  readonly beamNormal_kWhm2: number | null;
  readonly diffuse_kWhm2: number | null;
  readonly tAirLowest_C: number;
  readonly tAirMean_C: number;
  readonly tAirHighest_C: number;
};

export type WeatherSummary = {
  readonly year: WeatherSum;
  readonly months: readonly (WeatherSum & { readonly month: number })[];
};

/** What a year of weather comes to, by the months printed in its rows. */
export function weatherSummary(weather: WeatherYear): WeatherSummary {
  const all = Array.from({ length: weather.rows }, (_, i) => i);
  const months = Array.from({ length: 12 }, (_, m) => ({
    month: m + 1,
    ...sumOf(
      weather,
      all.filter((i) => weather.month[i] === m + 1),
    ),
  }));
  return { year: sumOf(weather, all), months };
}

function sumOf(weather: WeatherYear, rows: readonly number[]): WeatherSum {
  const { columns, step_min } = weather;
  const energy = (column: Float64Array | null): number | null =>
    column && (rows.reduce((sum, i) => sum + column[i]!, 0) * step_min) / 60_000;
  const air = columns.tAir_C;
  const temperatures = air ? rows.map((i) => air[i]!) : [];
  return {
    rows: rows.length,
    global_kWhm2: energy(columns.global_Wm2),
    beamNormal_kWhm2: energy(columns.beamNormal_Wm2),
    diffuse_kWhm2: energy(columns.diffuse_Wm2),
    tAirLowest_C: temperatures.reduce((a, b) => Math.min(a, b), Number.POSITIVE_INFINITY),
    tAirMean_C: temperatures.reduce((a, b) => a + b, 0) / temperatures.length,
    tAirHighest_C: temperatures.reduce((a, b) => Math.max(a, b), Number.NEGATIVE_INFINITY),
  };
}
