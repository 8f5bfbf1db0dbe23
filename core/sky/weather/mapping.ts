import type { Fault } from '../../scheme/fault.ts';
import { timeForm } from './time-form.ts';
import type { Label, Quantity } from './weather-year.ts';

/** Units that a column may come in. Energy units stand for the sum over the row's interval. */
export type Unit =
  | 'W/m2'
  | 'kW/m2'
  | 'Wh/m2'
  | 'kWh/m2'
  | 'kJ/m2'
  | 'MJ/m2'
  | 'C'
  | 'F'
  | 'K'
  | 'Pa'
  | 'hPa'
  | 'kPa'
  | '%'
  | 'share'
  | 'm/s';

/** How any table of weather is read: which column is what. Saved in the scheme, so that the file is read the same way again. */
export type WeatherMapping = {
  /** What the user calls the file. */
  readonly name: string;
  readonly delimiter: ',' | ';' | '\t';
  readonly decimal: '.' | ',';
  /** Line of the column heads, 1 = first. Rows follow it. */
  readonly headLine: number;
  readonly time: {
    /** Heads of the columns that make up the time, joined by a blank. */
    readonly columns: readonly string[];
    /** Such as `YYYY-MM-DD HH:mm`; see `timeForm`. */
    readonly form: string;
    /** The year, where the form has none. */
    readonly year?: number;
    /** Hours that the clock of the file runs ahead of UTC, fixed all year: −12 to 14. */
    readonly offset_h: number;
    readonly label: Label;
    /** Minutes to add to the printed time before it means what `label` says. */
    readonly shift_min: number;
  };
  /** Whether temperature and the rest are means over the same interval or were read at the printed time. */
  readonly air: 'mean' | 'at-label';
  readonly columns: readonly { readonly quantity: Quantity; readonly column: string; readonly unit: Unit }[];
  /** What stands where a value is missing, beside an empty cell. */
  readonly missing: readonly string[];
  readonly place: {
    readonly latitude: number | null;
    readonly longitude: number | null;
    readonly elevation: number | null;
  };
};

/** kept = (value + shift)·factor, the factor for energies depending on the step. */
export type Conversion = { readonly shift: number; readonly factor: (step_min: number) => number };

const times = (factor: number, shift = 0): Conversion => ({ shift, factor: () => factor });
const sumOf_J = (joules: number): Conversion => ({ shift: 0, factor: (step_min) => joules / (step_min * 60) });

const SUNLIGHT: { readonly [U in Unit]?: Conversion } = {
  'W/m2': times(1),
  'kW/m2': times(1000),
  'Wh/m2': sumOf_J(3600),
  'kWh/m2': sumOf_J(3.6e6),
  'kJ/m2': sumOf_J(1000),
  'MJ/m2': sumOf_J(1e6),
};
const WARMTH: { readonly [U in Unit]?: Conversion } = { C: times(1), F: times(5 / 9, -32), K: times(1, -273.15) };

/** The units in which each quantity may come, and how they are brought to the unit it is kept in. */
export const UNITS: { readonly [Q in Quantity]: { readonly [U in Unit]?: Conversion } } = {
  global_Wm2: SUNLIGHT,
  beamNormal_Wm2: SUNLIGHT,
  diffuse_Wm2: SUNLIGHT,
  tAir_C: WARMTH,
  dewPoint_C: WARMTH,
  relativeHumidity_pct: { '%': times(1), share: times(100) },
  pressure_hPa: { Pa: times(0.01), hPa: times(1), kPa: times(10) },
  windSpeed_ms: { 'm/s': times(1) },
  groundReflectance: { share: times(1), '%': times(0.01) },
};

const error = (code: string, place: string, message: string, cure: string): Fault => ({
  level: 'error',
  code,
  place,
  message,
  cure,
});

/** Faults of a mapping as it stands, before any file is read. @param place path of the mapping in the scheme, such as `weather` */
export function checkMapping(mapping: WeatherMapping, place: string): readonly Fault[] {
  const faults: Fault[] = checkTime(mapping.time, `${place}.time`);
  const seen = new Set<Quantity>();
  mapping.columns.forEach(({ quantity, unit }, i) => {
    const units = UNITS[quantity];
    if (units?.[unit] === undefined) {
      const known = Object.keys(units ?? {}).join(', ');
      faults.push(
        error('unit', `${place}.columns[${i}].unit`, `${quantity} does not come in ${unit}`, `choose one of ${known}`),
      );
    }
    if (seen.has(quantity)) {
      faults.push(error('repeated', `${place}.columns[${i}]`, `${quantity} is named twice`, 'keep one of the two'));
    }
    seen.add(quantity);
  });
  return [...faults, ...wantedQuantities(seen, `${place}.columns`)];
}

function checkTime(time: WeatherMapping['time'], place: string): Fault[] {
  const faults: Fault[] = [];
  const form = timeForm(time.form);
  const { year = Number.NaN } = time;
  if (!form) {
    const message = `\`${time.form}\` does not say where month, day and hour stand`;
    faults.push(
      error('time-form', `${place}.form`, message, 'write YYYY, MM, DD, HH and mm, such as `YYYY-MM-DD HH:mm`'),
    );
  } else if (!form.hasYear && !(Number.isInteger(year) && year >= 1900 && year <= 2100)) {
    const message = 'the form has no year, and none from 1900 to 2100 is given';
    faults.push(
      error('time-year', `${place}.year`, message, 'give the year of the file; 2001 where it is a typical year'),
    );
  }
  if (time.columns.length === 0) {
    faults.push(
      error('missing', `${place}.columns`, 'no column is named for the time', 'name one or more column heads'),
    );
  }
  if (!(time.offset_h >= -12 && time.offset_h <= 14)) {
    const message = `the clock must run from −12 to 14 h ahead of UTC, got ${time.offset_h}`;
    const cure = 'give the fixed offset of the file’s clock, such as 1 for central European standard time';
    faults.push(error('out-of-range', `${place}.offset_h`, message, cure));
  }
  if (!(Math.abs(time.shift_min) <= 120)) {
    const message = `the shift must be within 120 minutes, got ${time.shift_min}`;
    const cure = 'give the minutes from the printed time to the instant or edge it stands for';
    faults.push(error('out-of-range', `${place}.shift_min`, message, cure));
  }
  return faults;
}

/** What every year of weather must have: air temperature, and sunlight from which the rest can be worked out. */
export function wantedQuantities(has: ReadonlySet<Quantity>, place: string): readonly Fault[] {
  const faults: Fault[] = [];
  if (!has.has('tAir_C')) faults.push(error('missing', place, 'no column is named for the air temperature', 'name it'));
  if (!has.has('global_Wm2') && !(has.has('beamNormal_Wm2') && has.has('diffuse_Wm2'))) {
    faults.push(
      error(
        'missing',
        place,
        'neither global irradiance nor beam and diffuse are there',
        'name the column of global, or those of beam and diffuse',
      ),
    );
  }
  return faults;
}
