import type { Checked, Fault } from '../../scheme/fault.ts';
import { headCells } from './cells.ts';
import { findColumns, headNumber, type KnownColumn } from './known-columns.ts';
import { timeForm } from './time-form.ts';
import type { RowPlan } from './plan.ts';

const COLUMNS: readonly KnownColumn[] = [
  { quantity: 'global_Wm2', head: 'GHI (W/m^2)', unit: 'W/m2' },
  { quantity: 'beamNormal_Wm2', head: 'DNI (W/m^2)', unit: 'W/m2' },
  { quantity: 'diffuse_Wm2', head: 'DHI (W/m^2)', unit: 'W/m2' },
  { quantity: 'tAir_C', head: 'Dry-bulb (C)', unit: 'C' },
  { quantity: 'dewPoint_C', head: 'Dew-point (C)', unit: 'C' },
  { quantity: 'relativeHumidity_pct', head: 'RHum (%)', unit: '%', optional: true },
  { quantity: 'pressure_hPa', head: 'Pressure (mbar)', unit: 'hPa' },
  { quantity: 'windSpeed_ms', head: 'Wspd (m/s)', unit: 'm/s', optional: true },
];

/** Whether a file's second line is that of a TMY3 table. */
export const isTmy3 = (lines: readonly string[]): boolean =>
  (lines[1] ?? '').startsWith('Date (MM/DD/YYYY),Time (HH:MM)');

/**
 * A typical year in the TMY3 form: hours labelled by their end, 01:00 to 24:00, in standard time all year; sunlight is the mean
 * over the hour before the label, temperature and the rest hold at the label.
 * @see S. Wilcox, W. Marion, Users Manual for TMY3 Data Sets, NREL/TP-581-43156 (2008)
 */
export function tmy3Plan(lines: readonly string[]): Checked<RowPlan> {
  const station = headCells(lines[0] ?? '', ',');
  const heads = headCells(lines[1] ?? '', ',');
  const [id = '', name = '', region = '', ...numbers] = station;
  const [ahead_h, latitude_deg, longitude_deg, elevation_m] = numbers.map((cell) =>
    cell === '' ? Number.NaN : Number(cell),
  );
  const faults: Fault[] = [];
  const said = (value: number | undefined, min: number, max: number, of: string): number =>
    headNumber(value, { min, max, name: of }, 'line 1', faults);
  const ahead = said(ahead_h, -12, 14, 'the clock, in hours ahead of UTC,');
  const place = {
    name: [name, region].filter((s) => s !== '').join(', ') || id,
    latitude_deg: said(latitude_deg, -90, 90, 'latitude'),
    longitude_deg: said(longitude_deg, -180, 180, 'longitude'),
    elevation_m: said(elevation_m, -500, 9000, 'elevation'),
  };
  const columns = findColumns(COLUMNS, heads, 'line 2', faults);
  const form = timeForm('MM/DD/YYYY HH:mm');
  if (faults.length > 0 || !form) return { ok: false, faults };
  const plan: RowPlan = {
    kind: 'TMY3',
    place,
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
  };
  return { ok: true, value: plan, notes: [] };
}
