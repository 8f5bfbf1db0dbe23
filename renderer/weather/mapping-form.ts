import { headCells } from '../../core/sky/weather/cells.ts';
import type { TableGuess } from '../../core/sky/weather/guess-table.ts';
import { type Unit, UNITS, type WeatherMapping } from '../../core/sky/weather/mapping.ts';
import type { Label, Quantity } from '../../core/sky/weather/weather-year.ts';

/** The fields of the dialog as they are typed. */
export type MappingForm = {
  readonly name: string;
  readonly delimiter: WeatherMapping['delimiter'];
  readonly decimal: WeatherMapping['decimal'];
  readonly headLine: string;
  /** Heads, parted by semicolons. */
  readonly timeColumns: string;
  readonly form: string;
  readonly year: string;
  readonly offset: string;
  readonly label: Label;
  readonly shift: string;
  readonly air: WeatherMapping['air'];
  /** The head of each quantity's column; empty: not in the file. */
  readonly columns: { readonly [Q in Quantity]: { readonly column: string; readonly unit: Unit } };
  readonly missing: string;
  readonly latitude: string;
  readonly longitude: string;
  readonly elevation: string;
};

export const QUANTITIES = Object.keys(UNITS) as readonly Quantity[];
/** The units that a quantity may come in, the usual one first. */
export const unitsOf = (quantity: Quantity): readonly Unit[] => Object.keys(UNITS[quantity]) as Unit[];

const text = (value: number | null | undefined): string =>
  value === null || value === undefined ? '' : String(value).replace('-', '−');

const USUAL: { readonly [Q in Quantity]?: Unit } = { pressure_hPa: 'hPa' };

function columnsOf(columns: WeatherMapping['columns']): MappingForm['columns'] {
  const entries = QUANTITIES.map((quantity) => {
    const found = columns.find((c) => c.quantity === quantity);
    const unit = found?.unit ?? USUAL[quantity] ?? (unitsOf(quantity)[0] as Unit);
    return [quantity, { column: found?.column ?? '', unit }];
  });
  return Object.fromEntries(entries) as MappingForm['columns'];
}

/** The fields of a mapping that was read by before. */
export const formOfMapping = (mapping: WeatherMapping): MappingForm => ({
  name: mapping.name,
  delimiter: mapping.delimiter,
  decimal: mapping.decimal,
  headLine: String(mapping.headLine),
  timeColumns: mapping.time.columns.join('; '),
  form: mapping.time.form,
  year: text(mapping.time.year),
  offset: text(mapping.time.offset_h),
  label: mapping.time.label,
  shift: text(mapping.time.shift_min),
  air: mapping.air,
  columns: columnsOf(mapping.columns),
  missing: mapping.missing.join('; '),
  latitude: text(mapping.place.latitude),
  longitude: text(mapping.place.longitude),
  elevation: text(mapping.place.elevation),
});

/**
 * The fields that a guess fills.
 * @param offset_h hours that the standard time of the site runs ahead of UTC
 */
export const formOfGuess = (guess: TableGuess, name: string, offset_h: number): MappingForm =>
  formOfMapping({
    name,
    delimiter: guess.delimiter,
    decimal: guess.decimal,
    headLine: guess.headLine,
    time: { ...guess.time, offset_h, label: 'end', shift_min: 0 },
    air: 'mean',
    columns: guess.columns,
    missing: [],
    place: { latitude: null, longitude: null, elevation: null },
  });

const list = (value: string): readonly string[] =>
  value
    .split(';')
    .map((part) => part.trim())
    .filter((part) => part !== '');

/** A number as it is typed; null for an empty field, NaN for what is none. */
const number = (value: string): number | null =>
  value.trim() === '' ? null : Number(value.replace('−', '-').replace(',', '.'));

/** Fields that hold no number where they must or may hold one. */
export type BadField = 'headLine' | 'year' | 'offset' | 'shift' | 'latitude' | 'longitude' | 'elevation';

/** The mapping that the fields mean; what is wrong beyond plain numbers is told when the file is read. */
export function readMappingForm(form: MappingForm): WeatherMapping | readonly BadField[] {
  const numbers = {
    headLine: number(form.headLine),
    year: number(form.year),
    offset: number(form.offset),
    shift: number(form.shift) ?? 0,
    latitude: number(form.latitude),
    longitude: number(form.longitude),
    elevation: number(form.elevation),
  };
  const isBad = (field: BadField): boolean => Number.isNaN(numbers[field]);
  const bad = (Object.keys(numbers) as BadField[]).filter(
    (field) => isBad(field) || ((field === 'headLine' || field === 'offset') && numbers[field] === null),
  );
  if (!(Number.isInteger(numbers.headLine) && (numbers.headLine ?? 0) >= 1 && (numbers.headLine ?? 0) <= 1000))
    if (!bad.includes('headLine')) bad.push('headLine');
  if (bad.length > 0) return bad;
  return {
    name: form.name.trim(),
    delimiter: form.delimiter,
    decimal: form.decimal,
    headLine: numbers.headLine ?? 1,
    time: {
      columns: list(form.timeColumns),
      form: form.form.trim(),
      ...(numbers.year === null ? {} : { year: numbers.year }),
      offset_h: numbers.offset ?? 0,
      label: form.label,
      shift_min: numbers.shift,
    },
    air: form.air,
    columns: QUANTITIES.flatMap((quantity) => {
      const { column, unit } = form.columns[quantity];
      return column === '' ? [] : [{ quantity, column, unit }];
    }),
    missing: list(form.missing),
    place: { latitude: numbers.latitude, longitude: numbers.longitude, elevation: numbers.elevation },
  };
}

/** So much of a file is looked at for its heads [bytes]; heads stand in the first thousand lines. */
const LOOKED_AT = 200_000;
const ROWS = 3;

/** The heads and first rows of a table, cut as the form says. */
export function sampleOf(
  bytes: Uint8Array,
  delimiter: string,
  headLine: number,
): { readonly heads: readonly string[]; readonly rows: readonly (readonly string[])[] } {
  const lines = new TextDecoder()
    .decode(bytes.subarray(0, LOOKED_AT))
    .replace(/^\ufeff/, '')
    .split('\n');
  const cells = (line: string | undefined): readonly string[] => (line === undefined ? [] : headCells(line, delimiter));
  return {
    heads: cells(lines[headLine - 1]).filter((head) => head !== ''),
    rows: lines
      .slice(headLine)
      .filter((line) => line.trim() !== '')
      .slice(0, ROWS)
      .map(cells),
  };
}
