import type { Checked, Fault } from '../../scheme/fault.ts';
import { headCells } from './cells.ts';
import { UNITS, type Unit } from './mapping.ts';
import { readRows } from './read-rows.ts';
import { timeForm } from './time-form.ts';
import type { Quantity, WeatherYear } from './weather-year.ts';

const COLUMNS: readonly (readonly [Quantity, string, Unit])[] = [
  ['global_Wm2', 'GHI (W/m^2)', 'W/m2'],
  ['beamNormal_Wm2', 'DNI (W/m^2)', 'W/m2'],
  ['diffuse_Wm2', 'DHI (W/m^2)', 'W/m2'],
  ['tAir_C', 'Dry-bulb (C)', 'C'],
  ['dewPoint_C', 'Dew-point (C)', 'C'],
  ['relativeHumidity_pct', 'RHum (%)', '%'],
  ['pressure_hPa', 'Pressure (mbar)', 'hPa'],
  ['windSpeed_ms', 'Wspd (m/s)', 'm/s'],
];

/** Whether a file's second line is that of a TMY3 table. */
export const isTmy3 = (lines: readonly string[]): boolean =>
  (lines[1] ?? '').startsWith('Date (MM/DD/YYYY),Time (HH:MM)');

/**
 * A typical year in the TMY3 form: hours labelled by their end, 01:00 to 24:00, in standard time all year; sunlight is the mean
 * over the hour before the label, temperature and the rest hold at the label.
 * @see S. Wilcox, W. Marion, Users Manual for TMY3 Data Sets, NREL/TP-581-43156 (2008)
 */
export function readTmy3(lines: readonly string[]): Checked<WeatherYear> {
  const station = headCells(lines[0] ?? '', ',');
  const heads = headCells(lines[1] ?? '', ',');
  const [id = '', name = '', region = '', ...numbers] = station;
  const [ahead_h, latitude_deg, longitude_deg, elevation_m] = numbers.map((cell) =>
    cell === '' ? Number.NaN : Number(cell),
  );
  const faults: Fault[] = [];
  const within = (value: number | undefined, min: number, max: number, what: string): number => {
    if (value !== undefined && value >= min && value <= max) return value;
    const message = `${what} must be from ${min} to ${max}, got ${value === undefined || Number.isNaN(value) ? 'none' : value}`;
    faults.push({
      level: 'error',
      code: 'station',
      place: 'line 1',
      message,
      cure: 'the first line holds code, name, region, hours from UTC, latitude, longitude, elevation; fetch the file again',
    });
    return 0;
  };
  const ahead = within(ahead_h, -12, 14, 'the clock, in hours ahead of UTC,');
  const place = {
    name: [name, region].filter((s) => s !== '').join(', ') || id,
    latitude_deg: within(latitude_deg, -90, 90, 'latitude'),
    longitude_deg: within(longitude_deg, -180, 180, 'longitude'),
    elevation_m: within(elevation_m, -500, 9000, 'elevation'),
  };
  const columns = COLUMNS.flatMap(([quantity, head, unit]) => {
    const index = heads.indexOf(head);
    if (index < 0 && quantity !== 'windSpeed_ms' && quantity !== 'relativeHumidity_pct') {
      faults.push({
        level: 'error',
        code: 'column',
        place: 'line 2',
        message: `there is no column \`${head}\``,
        cure: 'fetch the file again, or read it with a mapping',
      });
    }
    const conversion = UNITS[quantity][unit];
    return index < 0 || !conversion ? [] : [{ quantity, index, conversion }];
  });
  const form = timeForm('MM/DD/YYYY HH:mm');
  if (faults.length > 0 || !form) return { ok: false, faults };
  return readRows({
    kind: 'TMY3',
    place,
    lines,
    firstRow: 2,
    heads,
    delimiter: ',',
    decimal: '.',
    time: { columns: [0, 1], form, year: 2001, ahead_min: ahead * 60 },
    label: 'end',
    shift_min: 0,
    air: 'at-label',
    columns,
    missing: ['-9900', '-9900.0', '-9999'],
    endsAtBlank: false,
  });
}
