import * as z from 'zod';

/** Units that a column of a weather file may come in. Energy units stand for the sum over the row's interval. */
const Unit = z.enum([
  'W/m2',
  'kW/m2',
  'Wh/m2',
  'kWh/m2',
  'kJ/m2',
  'MJ/m2',
  'C',
  'F',
  'K',
  'Pa',
  'hPa',
  'kPa',
  '%',
  'share',
  'm/s',
]);

const Quantity = z.enum([
  'global_Wm2',
  'beamNormal_Wm2',
  'diffuse_Wm2',
  'tAir_C',
  'dewPoint_C',
  'relativeHumidity_pct',
  'pressure_hPa',
  'windSpeed_ms',
  'groundReflectance',
]);

const head = z.string().max(500);
const short = z.string().max(60);

/** How a table of weather is read: which column is what. Ranges that depend on one another are checked where the file is read. */
export const Mapping = z.looseObject({
  name: z.string().max(2000),
  delimiter: z.enum([',', ';', '\t']),
  decimal: z.enum(['.', ',']),
  headLine: z.int().min(1).max(1000).describe('line of the column heads, 1 = first'),
  time: z.looseObject({
    columns: z.array(head).min(1).max(6),
    form: short.describe('such as `YYYY-MM-DD HH:mm`'),
    year: z.int().min(1900).max(2100).exactOptional().describe('where the form has none'),
    offset_h: z.number().min(-12).max(14).describe('hours that the clock of the file runs ahead of UTC, all year'),
    label: z.enum(['start', 'middle', 'end', 'instant']).describe('what of its interval the time printed in a row is'),
    shift_min: z.number().min(-1440).max(1440).default(0),
  }),
  air: z
    .enum(['mean', 'at-label'])
    .default('mean')
    .describe('whether temperature and the rest are means over the interval or were read at the printed time'),
  columns: z.array(z.looseObject({ quantity: Quantity, column: head, unit: Unit })).max(9),
  missing: z.array(short).max(20).default([]).describe('what stands where a value is missing, beside an empty cell'),
  place: z.looseObject({
    latitude: z.number().min(-90).max(90).nullable(),
    longitude: z.number().min(-180).max(180).nullable(),
    elevation: z.number().min(-500).max(9000).nullable(),
  }),
});

/** The weather year that a scheme goes by: the file's name and content, not its data. */
export const Weather = z.looseObject({
  file: z.string().min(1).max(500).describe('name of the file, without its folder'),
  hash: z.string().max(128).describe('SHA-256 of its bytes, in hexadecimal'),
  mapping: Mapping.nullable().describe('null where the file says itself what its columns are'),
});
export type Weather = z.output<typeof Weather>;
