import type { FaultList } from './fault-list.ts';
import { type Quantity, RADIATION } from './weather-year.ts';

/** The span in which a quantity can be, and what it looks like when it came in another unit. */
type Span = { readonly min: number; readonly max: number; readonly name: string; readonly unit: string };

const SPANS: { readonly [Q in Quantity]: Span } = {
  // Global can pass the extraterrestrial value for minutes under broken cloud; hours do not pass 1500.
  global_Wm2: { min: -20, max: 1600, name: 'global irradiance', unit: 'W/m²' },
  beamNormal_Wm2: { min: -20, max: 1400, name: 'beam irradiance', unit: 'W/m²' },
  diffuse_Wm2: { min: -20, max: 1000, name: 'diffuse irradiance', unit: 'W/m²' },
  tAir_C: { min: -70, max: 58, name: 'air temperature', unit: '°C' },
  dewPoint_C: { min: -90, max: 40, name: 'dew point', unit: '°C' },
  relativeHumidity_pct: { min: 0, max: 110, name: 'relative humidity', unit: '%' },
  pressure_hPa: { min: 300, max: 1100, name: 'pressure', unit: 'hPa' },
  windSpeed_ms: { min: 0, max: 80, name: 'wind speed', unit: 'm/s' },
  groundReflectance: { min: 0, max: 1, name: 'reflectance of the ground', unit: '' },
};

/**
 * Whether a column can be what it is called, in the unit it is said to be in. A column that is wrong and not needed is dropped
 * with a warning. Small negative irradiance (the night offset of an instrument) is set to 0.
 * @returns false when the column is not to be used
 */
export function checkValues(
  quantity: Quantity,
  column: Float64Array,
  head: string,
  line: Int32Array,
  faults: FaultList,
): boolean {
  const span = SPANS[quantity];
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  let lowAt = 0;
  let highAt = 0;
  for (let i = 0; i < column.length; i++) {
    const v = column[i]!;
    if (v < low) [low, lowAt] = [v, i];
    if (v > high) [high, highAt] = [v, i];
  }
  // Nothing but gaps: the filling of gaps tells so.
  if (high === Number.NEGATIVE_INFINITY) return true;
  const needed = RADIATION.includes(quantity) || quantity === 'tAir_C';
  const level = needed ? 'error' : 'warning';
  const drop = needed ? '' : '; the column is left out';
  const tell = (at: number, value: number, hint: string): false => {
    const got = Number(value.toPrecision(6));
    faults.add(
      level,
      'units',
      `line ${line[at]}, ${head}`,
      `${span.name} of ${got} ${span.unit}, outside ${span.min} to ${span.max}${drop}`,
      hint,
    );
    return false;
  };
  if (high > span.max) return tell(highAt, high, hint(quantity, low, high));
  if (low < span.min) return tell(lowAt, low, hint(quantity, low, high));
  if (RADIATION.includes(quantity)) {
    if (high < 50)
      return tell(highAt, high, high > 0 ? hint(quantity, low, high) : 'choose a column with daylight in it');
    if (low < 0) {
      let n = 0;
      for (let i = 0; i < column.length; i++) if (column[i]! < 0) [column[i], n] = [0, n + 1];
      faults.add(
        'warning',
        'below-zero',
        head,
        `${n} values a little below 0 were set to 0`,
        'nothing to do: instruments drift at night',
      );
    }
  }
  return true;
}

/** What the numbers look like, when they are not what they are said to be. */
function hint(quantity: Quantity, low: number, high: number): string {
  if (RADIATION.includes(quantity)) {
    if (high > 1400 && high <= 5200) return 'these look like kJ/m² a row: choose that unit, or mend the value';
    if (high > 0 && high < 0.4) return 'these look like kWh or kW: choose that unit';
    if (high < 5.5) return 'these look like MJ/m² a row or kW/m²: choose that unit';
    return 'choose the unit of the column, or name the mark for missing values';
  }
  if (quantity === 'tAir_C' || quantity === 'dewPoint_C') {
    if (low > 150) return 'these look like kelvin: choose K';
    if (high > 58 && high < 140) return 'these look like degrees Fahrenheit: choose F';
    return 'choose the unit of the column, or name the mark for missing values';
  }
  if (quantity === 'pressure_hPa') {
    if (low > 30_000) return 'these look like pascals: choose Pa';
    if (high < 110) return 'these look like kilopascals: choose kPa';
  }
  return 'choose the unit of the column, or name the mark for missing values';
}
