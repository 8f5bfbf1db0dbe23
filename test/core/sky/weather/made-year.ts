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

/** The same rows in the form of a TMY3 table: hours labelled by their end, 24:00 the last of a day. */
export function asTmy3(rows: readonly Row[]): string {
  const lines = rows.map(({ when, global, air }) => {
    const isMidnight = when.endsWith('00:00');
    const end = new Date(`${when.replace(' ', 'T')}Z`).getTime();
    const [year, month, day] = new Date(isMidnight ? end - 1 : end).toISOString().slice(0, 10).split('-');
    return `${month}/${day}/${year},${isMidnight ? '24:00' : when.slice(11)},${global},${global},${global},${air},5.0,1013`;
  });
  const heads =
    'Date (MM/DD/YYYY),Time (HH:MM),GHI (W/m^2),DNI (W/m^2),DHI (W/m^2),Dry-bulb (C),Dew-point (C),Pressure (mbar)';
  return `000000,"MADE UP",XX,1.0,45.000,15.000,100\n${heads}\n${lines.join('\n')}\n`;
}

/** The same rows in the form of a typical year of the Joint Research Centre, with notes below the table. */
export function asJrc(rows: readonly Row[]): string {
  const lines = rows.map(({ when, global, air, pressure }) => {
    const start = new Date(new Date(`${when.replace(' ', 'T')}Z`).getTime() - 3_600_000).toISOString();
    return `${start.slice(0, 10).replaceAll('-', '')}:${start.slice(11, 13)}00,${air},60.0,${global},${global},${global},${pressure}`;
  });
  const place = 'Latitude (decimal degrees): 45.0\nLongitude (decimal degrees): 15.0\nElevation (m): 100.0';
  const head = `${place}\nIrradiance Time Offset (h): 0.2\nmonth,year\n1,2010\n`;
  return `${head}time(UTC),T2m,RH,G(h),Gb(n),Gd(h),SP\n${lines.join('\n')}\n\nT2m: air\nmade up\n`;
}

/** How the table is to be read. */
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
