import type { Conversion } from './mapping.ts';
import type { TimeForm } from './time-form.ts';
import type { Label, Quantity, WeatherPlace } from './weather-year.ts';

/** How the rows of one file are read, whatever its format: what a format's reader or a mapping comes down to. */
export type RowPlan = {
  readonly kind: string;
  readonly place: WeatherPlace;
  /** What the columns are called, for telling faults; a row has as many cells. */
  readonly heads: readonly string[];
  readonly delimiter: ',' | ';' | '\t';
  readonly decimal: '.' | ',';
  readonly time: {
    readonly columns: readonly number[];
    readonly form: TimeForm;
    readonly year: number;
    readonly ahead_min: number;
  };
  readonly label: Label;
  readonly shift_min: number;
  readonly air: 'mean' | 'at-label';
  readonly columns: readonly { readonly quantity: Quantity; readonly index: number; readonly conversion: Conversion }[];
  readonly missing: readonly string[];
  /** The rows end at the first blank line (notes follow); otherwise only the end of the file may be blank. */
  readonly endsAtBlank: boolean;
};
