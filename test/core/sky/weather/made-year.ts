import type { WeatherMapping } from '../../../../core/sky/weather/mapping.ts';

/** A made-up hourly year as a table, for spoiling in one place at a time. Local time UTC+1, labelled by the end of the hour. */
export const HEAD = 'when;global;air;pressure';

export type Row = { when: string; global: string; air: string; pressure: string };

export function madeYear(year = 2023): Row[] {
  const rows: Row[] = [];
  const start = Date.UTC(year, 0, 1);
  const hours = (Date.UTC(year + 1, 0, 1) - start) / 3_600_000;
  for (let h = 0; h < hours; h++) {
    const end = new Date(start + (h + 1) * 3_600_000).toISOString();
    const sun = Math.max(0, Math.sin((((h % 24) - 5.5) / 12) * Math.PI));
    rows.push({
      when: `${end.slice(0, 10)} ${end.slice(11, 16)}`,
      global: (800 * sun).toFixed(1),
      air: (12 + 8 * Math.sin(((h - 2900) / 8760) * 2 * Math.PI) + 4 * sun).toFixed(1),
      pressure: '101300',
    });
  }
  return rows;
}

export const asText = (rows: readonly Row[], head = HEAD): string =>
  `a made-up year\n${head}\n${rows.map((r) => `${r.when};${r.global};${r.air};${r.pressure}`).join('\n')}\n`;

/** How it is to be read. */
export const MAPPING: WeatherMapping = {
  name: 'station on the roof',
  delimiter: ';',
  decimal: '.',
  headLine: 2,
  time: { columns: ['when'], form: 'YYYY-MM-DD HH:mm', offset_h: 1, label: 'end', shift_min: 0 },
  air: 'mean',
  columns: [
    { quantity: 'global_Wm2', column: 'global', unit: 'W/m2' },
    { quantity: 'tAir_C', column: 'air', unit: 'C' },
    { quantity: 'pressure_hPa', column: 'pressure', unit: 'Pa' },
  ],
  missing: ['-999'],
  place: { latitude: 45, longitude: 15, elevation: 100 },
};
