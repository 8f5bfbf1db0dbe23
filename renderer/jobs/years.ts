import { textPieces } from '../../app/contract/file-text.ts';
import type { WeatherMonths } from '../../core/gain/weather-run.ts';
import type { Checked } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { readWeather } from '../../core/sky/weather/read-weather.ts';
import { type WeatherInput, weatherInput } from '../../core/study/weather-input.ts';
import type { WeatherAtHand } from './tasks.ts';

/** The year of weather read last: a check after an edit need not read the file again. */
export class Years {
  #key = '';
  #input: Checked<WeatherInput> | null = null;

  of(scheme: Scheme, { name, bytes, hash, mapping }: WeatherAtHand): Checked<WeatherInput> {
    const key = JSON.stringify([hash, mapping, scheme.site]);
    if (this.#input !== null && key === this.#key) return this.#input;
    this.#key = key;
    this.#input = weatherInput(scheme, { name, hash }, readWeather(textPieces(bytes), mapping), mapping);
    return this.#input;
  }

  /** The same; null where there is none, or none that goes with the site. */
  inputOf(scheme: Scheme, weather: WeatherAtHand | null): WeatherInput | null {
    const input = weather === null ? null : this.of(scheme, weather);
    return input?.ok ? input.value : null;
  }

  /** Its months alone. */
  monthsOf(scheme: Scheme, weather: WeatherAtHand | null): WeatherMonths | null {
    return this.inputOf(scheme, weather)?.months ?? null;
  }
}
