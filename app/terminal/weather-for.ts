import type { Scheme } from '../../core/scheme/schema.ts';
import type { WeatherInput } from '../../core/study/weather-input.ts';
import type { Screen } from './screen.ts';

/**
 * The year of weather to look at: the file named, or the one that the scheme goes by, where it lies beside it. Loads nothing where
 * there is none.
 */
export async function weatherFor(
  path: string,
  scheme: Scheme,
  named: string | undefined,
  screen: Screen,
): Promise<WeatherInput | null> {
  if (named === undefined && (scheme.weather ?? null) === null) return null;
  const { readWeatherFile, weatherBeside } = await import('./read-weather.ts');
  return named === undefined ? weatherBeside(path, scheme, screen) : readWeatherFile(named, scheme, screen);
}
