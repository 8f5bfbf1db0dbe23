import type { Checked, Fault } from '../../scheme/fault.ts';
import { headCells } from './cells.ts';
import { findColumns, headNumber, type KnownColumn } from './known-columns.ts';
import { timeForm } from './time-form.ts';
import type { RowPlan } from './plan.ts';
import type { WeatherPlace } from './weather-year.ts';

const COLUMNS: readonly KnownColumn[] = [
  { quantity: 'global_Wm2', head: 'G(h)', unit: 'W/m2' },
  { quantity: 'beamNormal_Wm2', head: 'Gb(n)', unit: 'W/m2' },
  { quantity: 'diffuse_Wm2', head: 'Gd(h)', unit: 'W/m2' },
  { quantity: 'tAir_C', head: 'T2m', unit: 'C' },
  { quantity: 'relativeHumidity_pct', head: 'RH', unit: '%' },
  { quantity: 'pressure_hPa', head: 'SP', unit: 'Pa' },
  { quantity: 'windSpeed_ms', head: 'WS10m', unit: 'm/s', optional: true },
];

/** Lines above the column heads: the place, the offset and the year of each month. */
export const JRC_HEAD_LINES = 60;

const headAt = (lines: readonly string[]): number =>
  lines.slice(0, JRC_HEAD_LINES).findIndex((line) => line.startsWith('time(UTC),'));

/** Whether a file begins like a typical year of the Joint Research Centre. */
export const mayBeJrc = (lines: readonly string[]): boolean =>
  (lines[0] ?? '').startsWith('Latitude (decimal degrees):');

/** Whether it is one, by its head. */
export const isJrc = (lines: readonly string[]): boolean => mayBeJrc(lines) && headAt(lines) > 0;

/**
 * A typical year as the Joint Research Centre of the European Commission gives it. Times are UTC. The sunlight was read off
 * satellite images at one instant of the hour, so many hours after the label as the head says; the rest holds at the label.
 * Notes follow the rows after a blank line.
 * @see European Commission, Joint Research Centre, PVGIS user manual, typical meteorological year (format of the CSV download)
 */
export function jrcPlan(lines: readonly string[]): Checked<RowPlan> {
  const at = headAt(lines);
  const heads = headCells(lines[at] ?? '', ',');
  const faults: Fault[] = [];
  const notes: Fault[] = [];
  const { offset_h, place } = readHead(lines.slice(0, at), faults, notes);
  const columns = findColumns(COLUMNS, heads, `line ${at + 1}`, faults);
  const form = timeForm('YYYYMMDD:HHmm');
  if (faults.length > 0 || !form) return { ok: false, faults };
  const plan: RowPlan = {
    kind: 'JRC typical year',
    place,
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
  };
  return { ok: true, value: plan, notes };
}

/** Place and time offset of the irradiance, as the lines above the table give them. */
function readHead(
  lines: readonly string[],
  faults: Fault[],
  notes: Fault[],
): { place: WeatherPlace; offset_h: number } {
  const said = (label: string): number | undefined => {
    const line = lines.find((l) => l.startsWith(`${label}:`));
    return line === undefined ? undefined : Number.parseFloat(line.slice(label.length + 1));
  };
  const within = (name: string, min: number, max: number): number =>
    headNumber(said(name), { min, max, name }, 'head', faults);
  const offset = 'Irradiance Time Offset (h)';
  const latitude_deg = within('Latitude (decimal degrees)', -90, 90);
  const longitude_deg = within('Longitude (decimal degrees)', -180, 180);
  const north = `${Math.abs(latitude_deg)}° ${latitude_deg < 0 ? 'S' : 'N'}`;
  const east = `${Math.abs(longitude_deg)}° ${longitude_deg < 0 ? 'W' : 'E'}`;
  const elevation_m = within('Elevation (m)', -500, 9000);
  const place = { name: `${north} ${east}`, latitude_deg, longitude_deg, elevation_m };
  if (said(offset) !== undefined) return { place, offset_h: within(offset, -1, 1) };
  const message = 'the head gives no time offset of the irradiance; the label is taken for its instant';
  notes.push({
    level: 'warning',
    code: 'no-offset',
    place: 'head',
    message,
    cure: 'fetch the file again from the present service',
  });
  return { place, offset_h: 0 };
}
