import type { Fault } from '../../scheme/fault.ts';
import { UNITS, type Unit } from './mapping.ts';
import type { RowPlan } from './plan.ts';
import type { Quantity } from './weather-year.ts';

/** A column that files of one form have: what it is, what it is called, its unit, and whether the file may lack it. */
export type KnownColumn = {
  readonly quantity: Quantity;
  readonly head: string;
  readonly unit: Unit;
  readonly optional?: true;
};

/** Where the known columns stand in a file's head; those that should be there and are not become faults. */
export function findColumns(
  known: readonly KnownColumn[],
  heads: readonly string[],
  place: string,
  faults: Fault[],
): RowPlan['columns'] {
  return known.flatMap(({ quantity, head, unit, optional }) => {
    const index = heads.indexOf(head);
    const conversion = UNITS[quantity][unit];
    if (index >= 0 && conversion) return [{ quantity, index, conversion }];
    if (!optional) {
      const message = `there is no column \`${head}\``;
      faults.push({
        level: 'error',
        code: 'column',
        place,
        message,
        cure: 'fetch the file again, or read it with a mapping',
      });
    }
    return [];
  });
}

/** A number of a file's head, or 0 and a fault when it is missing or outside its span. */
export function headNumber(
  value: number | undefined,
  span: { readonly min: number; readonly max: number; readonly name: string },
  place: string,
  faults: Fault[],
): number {
  if (value !== undefined && value >= span.min && value <= span.max) return value;
  const got = value === undefined || Number.isNaN(value) ? 'none' : value;
  const message = `${span.name} must be from ${span.min} to ${span.max}, got ${got}`;
  faults.push({ level: 'error', code: 'head', place, message, cure: 'mend the head of the file, or fetch it again' });
  return 0;
}
