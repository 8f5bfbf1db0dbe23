import type { Checked, Fault } from '../../scheme/fault.ts';
import { headCells } from './cells.ts';
import { checkMapping, UNITS, type WeatherMapping } from './mapping.ts';
import { timeForm } from './time-form.ts';
import type { RowPlan } from './plan.ts';

/** Any table of weather, read as its mapping says. Faults of the mapping are placed in the scheme, faults of the file in its lines. */
export function mappedPlan(lines: readonly string[], mapping: WeatherMapping): Checked<RowPlan> {
  const wrong = checkMapping(mapping, 'weather');
  const form = timeForm(mapping.time.form);
  if (wrong.length > 0 || !form) return { ok: false, faults: wrong };
  const heads = headCells(lines[mapping.headLine - 1] ?? '', mapping.delimiter);
  const faults: Fault[] = [];
  const find = (head: string, place: string): number => {
    const index = heads.indexOf(head);
    if (index < 0) {
      const there = heads.slice(0, 40).join(', ');
      faults.push({
        level: 'error',
        code: 'column',
        place,
        message: `line ${mapping.headLine} of the file has no column \`${head}\``,
        cure: `choose one of: ${there}`,
      });
    }
    return index;
  };
  const time = mapping.time.columns.map((head, i) => find(head, `weather.time.columns[${i}]`));
  const columns = mapping.columns.flatMap(({ quantity, column, unit }, i) => {
    const index = find(column, `weather.columns[${i}].column`);
    const conversion = UNITS[quantity][unit];
    return conversion ? [{ quantity, index, conversion }] : [];
  });
  if (faults.length > 0) return { ok: false, faults };
  const { latitude, longitude, elevation } = mapping.place;
  const plan: RowPlan = {
    kind: 'table',
    place: { name: mapping.name, latitude_deg: latitude, longitude_deg: longitude, elevation_m: elevation },
    heads,
    delimiter: mapping.delimiter,
    decimal: mapping.decimal,
    time: { columns: time, form, year: mapping.time.year ?? 2001, ahead_min: mapping.time.offset_h * 60 },
    label: mapping.time.label,
    shift_min: mapping.time.shift_min,
    air: mapping.air,
    columns,
    missing: mapping.missing,
    endsAtBlank: false,
  };
  return { ok: true, value: plan, notes: [] };
}
