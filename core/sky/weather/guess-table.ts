import { headCells } from './cells.ts';
import { type Unit, UNITS, type WeatherMapping } from './mapping.ts';
import { timeForm } from './time-form.ts';
import type { Quantity } from './weather-year.ts';

/** What a table looks like, to begin a mapping from: the user has the last word on all of it. */
export type TableGuess = {
  readonly delimiter: WeatherMapping['delimiter'];
  readonly decimal: WeatherMapping['decimal'];
  /** Line of the column heads, 1 = first. */
  readonly headLine: number;
  readonly heads: readonly string[];
  /** The first rows, cell by cell. */
  readonly sample: readonly (readonly string[])[];
  readonly time: { readonly columns: readonly string[]; readonly form: string };
  readonly columns: WeatherMapping['columns'];
};

/** So many lines are looked at. */
const LOOKED_AT = 60;
/** And so many characters of them. */
const LOOKED_AT_MOST = 200_000;
const SAMPLED = 4;
const DELIMITERS = ['\t', ';', ','] as const;

/** Words in a head that name a quantity, more telling ones first; common use, no source. */
const NAMES: readonly (readonly [Quantity, RegExp])[] = [
  ['beamNormal_Wm2', /\b(dni|beam|direct|normal)\b|gb\(n\)/],
  ['diffuse_Wm2', /\b(dhi|diffuse|diff)\b|gd\(h\)/],
  ['global_Wm2', /\b(ghi|global|solar|irradiance|radiation)\b|^g\(h\)/],
  ['dewPoint_C', /dew/],
  ['tAir_C', /\b(temp|temperature|air|dry|t2m|tair|t)\b/],
  ['relativeHumidity_pct', /\b(rh|humidity|hum)\b/],
  ['pressure_hPa', /\b(pressure|press|sp)\b/],
  ['windSpeed_ms', /\bwind ?speed\b|\bws10m\b|\bwspd\b/],
  ['groundReflectance', /albedo|reflectance/],
];

/** Units as they are written in heads, in brackets or behind the name. */
const UNIT_NAMES: readonly (readonly [Unit, RegExp])[] = [
  ['kWh/m2', /kwh\s*\/\s*m/],
  ['Wh/m2', /wh\s*\/\s*m/],
  ['kW/m2', /kw\s*\/\s*m/],
  ['W/m2', /w\s*\/\s*m/],
  ['kJ/m2', /kj\s*\/\s*m/],
  ['MJ/m2', /mj\s*\/\s*m/],
  ['kPa', /kpa/],
  ['hPa', /hpa|mbar/],
  ['Pa', /\bpa\b/],
  ['F', /°\s*f|[([]f[)\]]|\bdeg ?f/],
  ['K', /[([]k[)\]]/],
  ['%', /%/],
];

const USUAL_UNIT: { readonly [Q in Quantity]: Unit } = {
  global_Wm2: 'W/m2',
  beamNormal_Wm2: 'W/m2',
  diffuse_Wm2: 'W/m2',
  tAir_C: 'C',
  dewPoint_C: 'C',
  relativeHumidity_pct: '%',
  pressure_hPa: 'hPa',
  windSpeed_ms: 'm/s',
  groundReflectance: 'share',
};

/** Forms of printed times, tried in order on the first rows. */
const FORMS = [
  'YYYY-MM-DDTHH:mm:ss',
  'YYYY-MM-DDTHH:mm',
  'YYYY-MM-DD HH:mm:ss',
  'YYYY-MM-DD HH:mm',
  'YYYY/MM/DD HH:mm',
  'DD.MM.YYYY HH:mm:ss',
  'DD.MM.YYYY HH:mm',
  'DD/MM/YYYY HH:mm',
  'MM/DD/YYYY HH:mm',
  'YYYYMMDD:HHmm',
  'YYYYMMDD HH:mm',
  'YYYYMMDDHHmm',
  'YYYY MM DD HH mm',
  'YYYY MM DD HH',
  'MM DD HH',
];

/**
 * A first guess at how a table is to be read.
 * @param text of the file, whole or in pieces; its beginning is looked at
 * @returns null when no line of it looks like the head of a table
 */
export function guessTable(text: string | Iterable<string>): TableGuess | null {
  const lines = beginningOf(text)
    .replace(/^\ufeff/, '')
    .split('\n', LOOKED_AT);
  const delimiter = likelyDelimiter(lines);
  const counts = lines.map((line) => headCells(line, delimiter).length);
  const wide = Math.max(...counts);
  const head = counts.findIndex((count, i) => count === wide && isHead(headCells(lines[i] ?? '', delimiter)));
  if (wide < 2 || head < 0) return null;
  const heads = headCells(lines[head] ?? '', delimiter);
  const sample = lines
    .slice(head + 1)
    .filter((line) => line.trim() !== '')
    .slice(0, SAMPLED)
    .map((line) => headCells(line, delimiter));
  const decimal = delimiter !== ',' && sample.some((row) => row.some((c) => /^[-+]?\d+,\d+$/.test(c))) ? ',' : '.';
  return {
    delimiter,
    decimal,
    headLine: head + 1,
    heads,
    sample,
    time: likelyTime(heads, sample),
    columns: likelyColumns(heads),
  };
}

function beginningOf(text: string | Iterable<string>): string {
  let beginning = '';
  for (const piece of typeof text === 'string' ? [text] : text) {
    beginning += piece;
    if (beginning.length >= LOOKED_AT_MOST) break;
  }
  return beginning.slice(0, LOOKED_AT_MOST);
}

/** The delimiter that cuts most lines into one and the same number of cells. */
function likelyDelimiter(lines: readonly string[]): TableGuess['delimiter'] {
  const score = (delimiter: string): number => {
    const counts = new Map<number, number>();
    for (const line of lines) {
      const count = headCells(line, delimiter).length;
      if (count > 1) counts.set(count, (counts.get(count) ?? 0) + 1);
    }
    return Math.max(0, ...counts.values());
  };
  return DELIMITERS.reduce((best, d) => (score(d) > score(best) ? d : best), DELIMITERS[0]);
}

/** Heads are words: most of their cells are no numbers, and hardly any is empty. */
function isHead(cells: readonly string[]): boolean {
  const words = cells.filter((cell) => /[A-Za-z]{1}/.test(cell) && !/^[-+\d.,:/ T]+$/.test(cell));
  return words.length > cells.length / 2;
}

function likelyColumns(heads: readonly string[]): WeatherMapping['columns'] {
  const taken = new Set<string>();
  return NAMES.flatMap(([quantity, name]) => {
    const column = heads.find((head) => !taken.has(head) && name.test(head.toLowerCase().replace(/_/g, ' ')));
    if (column === undefined) return [];
    taken.add(column);
    const small = column.toLowerCase();
    const found = UNIT_NAMES.find(([unit, form]) => UNITS[quantity][unit] !== undefined && form.test(small));
    return [{ quantity, column, unit: found?.[0] ?? USUAL_UNIT[quantity] }];
  }).sort((a, b) => ORDER.indexOf(a.quantity) - ORDER.indexOf(b.quantity));
}

const ORDER = Object.keys(USUAL_UNIT) as readonly Quantity[];

/** One column, or several neighbours from the first on, whose text reads as a time by one of the usual forms. */
function likelyTime(heads: readonly string[], sample: readonly (readonly string[])[]): TableGuess['time'] {
  for (const form of FORMS) {
    const reader = timeForm(form);
    for (let count = 1; count <= 5; count++) {
      for (let first = 0; first + count <= Math.min(heads.length, 6); first++) {
        const texts = sample.map((row) => row.slice(first, first + count).join(' '));
        if (texts.length > 0 && texts.every((text) => reader?.read(text, 2001) != null))
          return { columns: heads.slice(first, first + count), form };
      }
    }
  }
  return { columns: heads.slice(0, 1), form: 'YYYY-MM-DD HH:mm' };
}
