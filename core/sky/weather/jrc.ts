import type { Checked, Fault } from '../../scheme/fault.ts';
import { headCells } from './cells.ts';
import { UNITS, type Unit } from './mapping.ts';
import { readRows } from './read-rows.ts';
import { timeForm } from './time-form.ts';
import type { Quantity, WeatherYear } from './weather-year.ts';

const COLUMNS: readonly (readonly [Quantity, string, Unit])[] = [
  ['global_Wm2', 'G(h)', 'W/m2'],
  ['beamNormal_Wm2', 'Gb(n)', 'W/m2'],
  ['diffuse_Wm2', 'Gd(h)', 'W/m2'],
  ['tAir_C', 'T2m', 'C'],
  ['relativeHumidity_pct', 'RH', '%'],
  ['pressure_hPa', 'SP', 'Pa'],
  ['windSpeed_ms', 'WS10m', 'm/s'],
];

/** Lines above the column heads: the place, the offset and the year of each month. */
const HEAD_LINES = 60;

const headAt = (lines: readonly string[]): number =>
  lines.slice(0, HEAD_LINES).findIndex((line) => line.startsWith('time(UTC),'));

/** Whether a file is a typical year of the Joint Research Centre. */
export const isJrc = (lines: readonly string[]): boolean =>
  (lines[0] ?? '').startsWith('Latitude (decimal degrees):') && headAt(lines) > 0;

/**
 * A typical year as the Joint Research Centre of the European Commission gives it. Times are UTC. The sunlight was read off
 * satellite images at one instant of the hour, so many hours after the label as the head says; the rest holds at the label.
 * Notes follow the rows after a blank line.
 * @see European Commission, Joint Research Centre, PVGIS user manual, typical meteorological year (format of the CSV download)
 */
export function readJrc(lines: readonly string[]): Checked<WeatherYear> {
  const at = headAt(lines);
  const heads = headCells(lines[at] ?? '', ',');
  const faults: Fault[] = [];
  const notes: Fault[] = [];
  const said = (label: string): number => {
    const line = lines.slice(0, at).find((l) => l.startsWith(label));
    return line === undefined ? Number.NaN : Number.parseFloat(line.slice(line.indexOf(':') + 1));
  };
  const within = (label: string, min: number, max: number): number => {
    const value = said(label);
    if (value >= min && value <= max) return value;
    const message = `\`${label}\` must give a number from ${min} to ${max}, got ${Number.isNaN(value) ? 'none' : value}`;
    faults.push({ level: 'error', code: 'place', place: 'head', message, cure: 'fetch the file again' });
    return 0;
  };
  const latitude_deg = within('Latitude (decimal degrees)', -90, 90);
  const longitude_deg = within('Longitude (decimal degrees)', -180, 180);
  const elevation_m = within('Elevation (m)', -500, 9000);
  let offset_h = said('Irradiance Time Offset (h)');
  if (Number.isNaN(offset_h)) {
    offset_h = 0;
    notes.push({
      level: 'warning',
      code: 'no-offset',
      place: 'head',
      message: 'the head gives no time offset of the irradiance; the label is taken for its instant',
      cure: 'fetch the file again from the present service',
    });
  } else if (Math.abs(offset_h) > 1) {
    faults.push({
      level: 'error',
      code: 'offset',
      place: 'head',
      message: `a time offset of ${offset_h} h is more than a row`,
      cure: 'fetch the file again',
    });
  }
  const columns = COLUMNS.flatMap(([quantity, head, unit]) => {
    const index = heads.indexOf(head);
    if (index < 0)
      faults.push({
        level: 'error',
        code: 'column',
        place: `line ${at + 1}`,
        message: `there is no column \`${head}\``,
        cure: 'fetch the file again, or read it with a mapping',
      });
    const conversion = UNITS[quantity][unit];
    return index < 0 || !conversion ? [] : [{ quantity, index, conversion }];
  });
  const form = timeForm('YYYYMMDD:HHmm');
  if (faults.length > 0 || !form) return { ok: false, faults };
  const read = readRows({
    kind: 'JRC typical year',
    place: { name: `${latitude_deg}° N, ${longitude_deg}° E`, latitude_deg, longitude_deg, elevation_m },
    lines,
    firstRow: at + 1,
    heads,
    delimiter: ',',
    decimal: '.',
    time: { columns: [0], form, year: 2001, ahead_min: 0 },
    label: 'instant',
    shift_min: offset_h * 60,
    air: 'at-label',
    columns,
    missing: ['-9999', '-9999.0', 'NaN'],
    endsAtBlank: true,
  });
  return read.ok ? { ...read, notes: [...notes, ...read.notes] } : read;
}
