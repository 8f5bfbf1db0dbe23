import { cellText, cutCells } from './cells.ts';
import { type FaultList, MOST_FAULTS } from './fault-list.ts';
import type { RowPlan } from './plan.ts';
import { stampInstant_ms } from './time-form.ts';

/** A year in steps of a minute; more is no year of weather. */
const MOST_ROWS = 366 * 24 * 60;
/** Room for a year of hours at first; it doubles when it is full. */
const FIRST_ROWS = 9000;

/** The rows as they stand in the file, before they are checked against each other. */
export type Raw = {
  readonly label_ms: Float64Array;
  readonly line: Int32Array;
  readonly values: readonly Float64Array[];
  readonly rows: number;
};

/** A row with too few cells: the last of a file that breaks off, or one like others; the next line with anything on it tells. */
type Short = { readonly number: number; readonly message: string };

const isBlank = (line: string): boolean => line.trim() === '';

/**
 * Takes the lines below the heads of a table one by one and keeps their numbers: a file is never held whole. What a blank line or
 * a short row means is known only from what follows; both are held back until then.
 */
export class RowScan {
  readonly #plan: RowPlan;
  readonly #faults: FaultList;
  readonly #starts: Int32Array;
  readonly #delimiter: number;
  readonly #missing: ReadonlySet<string>;
  #label_ms = new Float64Array(FIRST_ROWS);
  #line = new Int32Array(FIRST_ROWS);
  #values: Float64Array[];
  #rows = 0;
  /** Blank lines that are faults if a row follows: each is one, so more than make the file hopeless need not be held. */
  #blank: { readonly line: string; readonly number: number }[] = [];
  #short: Short | null = null;
  /** The rows are over: notes follow, or so much is wrong that reading on serves nobody. */
  #isOver = false;

  constructor(plan: RowPlan, faults: FaultList) {
    this.#plan = plan;
    this.#faults = faults;
    this.#starts = new Int32Array(plan.heads.length + 2);
    this.#delimiter = plan.delimiter.charCodeAt(0);
    this.#missing = new Set(['', ...plan.missing]);
    this.#values = plan.columns.map(() => new Float64Array(FIRST_ROWS));
  }

  /** Whether a further line can still say anything. */
  get wantsMore(): boolean {
    return !this.#isOver || this.#short !== null;
  }

  /** How many blank lines are held until it is known what they mean. */
  get held(): number {
    return this.#blank.length;
  }

  take(line: string, number: number): void {
    if (isBlank(line)) {
      if (this.#plan.endsAtBlank) this.#isOver = true;
      else if (!this.#isOver && this.#blank.length <= MOST_FAULTS) this.#blank.push({ line, number });
      return;
    }
    this.#tellShort(false);
    // Blank lines between rows are rows with nothing in their cells.
    for (const blank of this.#blank) {
      this.#keep(blank.line, blank.number);
      this.#tellShort(false);
    }
    this.#blank = [];
    this.#keep(line, number);
  }

  /** To be called when the file is at its end. */
  finish(): Raw {
    this.#tellShort(true);
    if (this.#rows === 0 && !this.#faults.failed)
      this.#faults.add('error', 'empty', '', 'there are no rows', 'choose a file with a year of rows below its heads');
    return {
      label_ms: this.#label_ms.subarray(0, this.#rows),
      line: this.#line.subarray(0, this.#rows),
      values: this.#values.map((column) => column.subarray(0, this.#rows)),
      rows: this.#rows,
    };
  }

  #tellShort(isLast: boolean): void {
    if (this.#short === null) return;
    const { number, message } = this.#short;
    this.#short = null;
    const place = `line ${number}`;
    if (isLast)
      this.#faults.add('error', 'cut-short', place, `the last row breaks off: ${message}`, 'fetch the file again');
    else this.#faults.add('error', 'cells', place, message, 'mend the row, or check the delimiter');
  }

  #keep(line: string, number: number): void {
    if (this.#isOver || this.#faults.hopeless) {
      this.#isOver = true;
      return;
    }
    if (this.#rows >= MOST_ROWS) {
      const cure = 'give one year, in steps of a minute or longer';
      this.#faults.add('error', 'too-long', `line ${number}`, `more than ${MOST_ROWS} rows`, cure);
      this.#isOver = true;
      return;
    }
    const label = this.#read(line, number);
    if (label === null) return;
    this.#label_ms[this.#rows] = label;
    this.#line[this.#rows] = number;
    this.#rows++;
  }

  /**
   * Puts the numbers of a line into the row after the last.
   * @returns the instant printed in the line [UTC ms], or null when the line is no row (a fault was told)
   */
  #read(line: string, number: number): number | null {
    const { heads, time, columns, decimal } = this.#plan;
    const place = `line ${number}`;
    const cells = cutCells(line, this.#delimiter, this.#starts);
    if (cells !== heads.length) {
      this.#short = { number, message: `${cells} cells where the head has ${heads.length}` };
      // Only what has too few can be broken off.
      if (cells > heads.length) this.#tellShort(false);
      return null;
    }
    const text = time.columns.map((c) => cellText(line, this.#starts, c)).join(' ');
    const stamp = time.form.read(text, time.year);
    if (!stamp) {
      const message = `\`${text}\` is no time of the form that was given`;
      this.#faults.add('error', 'time', place, message, 'check the form and the columns of the time');
      return null;
    }
    if (this.#rows === this.#label_ms.length) this.#grow();
    for (let k = 0; k < columns.length; k++) {
      const { index } = columns[k]!;
      const cell = cellText(line, this.#starts, index);
      const isMissing = this.#missing.has(cell);
      const value = isMissing ? Number.NaN : Number(decimal === ',' ? cell.replace(',', '.') : cell);
      if (Number.isNaN(value) && !isMissing) {
        const cure = 'mend the cell, or name the mark for missing values';
        this.#faults.add('error', 'number', `${place}, ${heads[index]}`, `\`${cell}\` is not a number`, cure);
      }
      this.#values[k]![this.#rows] = value;
    }
    return stampInstant_ms(stamp, time.ahead_min);
  }

  #grow(): void {
    const room = Math.min(MOST_ROWS, 2 * this.#rows);
    const wider = (column: Float64Array<ArrayBuffer>): Float64Array<ArrayBuffer> => {
      const next = new Float64Array(room);
      next.set(column);
      return next;
    };
    this.#label_ms = wider(this.#label_ms);
    this.#values = this.#values.map((column) => wider(column as Float64Array<ArrayBuffer>));
    const line = new Int32Array(room);
    line.set(this.#line);
    this.#line = line;
  }
}
