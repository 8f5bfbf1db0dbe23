import type { Checked, Fault } from '../../scheme/fault.ts';
import { FaultList } from './fault-list.ts';
import { isJrc, JRC_HEAD_LINES, jrcPlan, mayBeJrc } from './jrc.ts';
import { type Line, LineCutter, LONGEST_LINE } from './line-cutter.ts';
import { mappedPlan } from './mapped.ts';
import type { WeatherMapping } from './mapping.ts';
import type { RowPlan } from './plan.ts';
import { RowScan } from './row-scan.ts';
import { isTmy3, tmy3Plan } from './tmy3.ts';
import type { WeatherYear } from './weather-year.ts';
import { yearOfRows } from './year-of-rows.ts';

/** A year in steps of a minute with a few columns is some tens of megabytes; what is longer is not read. */
const LONGEST = 100_000_000;

/** The rows of a file whose head has been understood. */
type Table = {
  readonly plan: RowPlan;
  readonly scan: RowScan;
  readonly faults: FaultList;
  readonly notes: readonly Fault[];
};

/**
 * Reads a year of weather from text that comes in pieces: TMY3, a typical year of the Joint Research Centre, or any table of hourly
 * or sub-hourly rows with a mapping. Of the text it holds the head and a line; of the rows, their numbers. A mapping, when there is
 * one, decides; otherwise the file says what it is.
 */
export class WeatherReader {
  readonly #mapping: WeatherMapping | null;
  readonly #cutter = new LineCutter((line) => this.#take(line));
  /** Lines so far, until the head is understood. */
  #head: string[] = [];
  #table: Table | null = null;
  /** Why the file is none that can be read, known before its end. */
  #refused: readonly Fault[] | null = null;

  constructor(mapping: WeatherMapping | null) {
    this.#mapping = mapping;
  }

  /** @returns whether more of the file can still change the outcome */
  push(piece: string): boolean {
    if (!this.#wantsMore) return false;
    this.#cutter.push(piece);
    if (this.#wantsMore) this.#refuseTooLong(this.#cutter.rest);
    return this.#wantsMore;
  }

  /** Whether the file is refused for its length: what follows, and what the rest of its bytes are, matters to nobody. */
  get isTooLong(): boolean {
    return (this.#refused ?? this.#table?.faults.all() ?? []).some((fault) => fault.code === 'too-long');
  }

  /** @returns the year with warnings, or every fault by line, with its cure */
  finish(): Checked<WeatherYear> {
    if (this.#wantsMore) this.#cutter.finish();
    if (this.#refused === null && this.#table === null) this.#understand();
    if (this.#refused !== null) return { ok: false, faults: this.#refused };
    const { plan, scan, faults, notes } = this.#table as Table;
    const read = yearOfRows(plan, scan.finish(), faults);
    return read.ok ? { ...read, notes: [...notes, ...read.notes] } : read;
  }

  get #wantsMore(): boolean {
    return this.#refused === null && (this.#table === null || this.#table.scan.wantsMore);
  }

  /**
   * Refuses the file when a line of it, whole or not, is too long to be one or goes on beyond the most that is read. Of the two it
   * tells the one that is met first, so that the outcome does not depend on where the text is cut.
   */
  #refuseTooLong({ text, number, before }: Line): void {
    const left = LONGEST - before;
    if (text.length <= Math.min(left, LONGEST_LINE)) return;
    const isEndless = left >= LONGEST_LINE;
    const place = isEndless ? `line ${number}` : '';
    const message = isEndless
      ? `a line of more than ${LONGEST_LINE} characters is no row of a table`
      : `more than ${LONGEST / 1e6} million characters, more than a year of minutes needs`;
    this.#refused = [{ level: 'error', code: 'too-long', place, message, cure: 'give one year' }];
  }

  #take(line: Line): void {
    if (this.#wantsMore) this.#refuseTooLong(line);
    if (!this.#wantsMore) return;
    if (this.#table !== null) this.#table.scan.take(line.text, line.number);
    else {
      this.#head.push(line.text);
      if (this.#isHeadWhole()) this.#understand();
    }
  }

  /** Whether the lines so far are all that is needed to know how the rows are to be read, or that they cannot be. */
  #isHeadWhole(): boolean {
    const lines = this.#head;
    if (this.#mapping !== null) return lines.length >= this.#mapping.headLine;
    if (lines.length < 2) return false;
    return isTmy3(lines) || isJrc(lines) || !mayBeJrc(lines) || lines.length >= JRC_HEAD_LINES;
  }

  #understand(): void {
    const lines = this.#head;
    this.#head = [];
    const plan = this.#planOf(lines);
    if (!plan.ok) {
      this.#refused = plan.faults;
      return;
    }
    const faults = new FaultList();
    this.#table = { plan: plan.value, scan: new RowScan(plan.value, faults), faults, notes: plan.notes };
  }

  #planOf(lines: readonly string[]): Checked<RowPlan> {
    if (this.#mapping !== null) return mappedPlan(lines, this.#mapping);
    if (isTmy3(lines)) return tmy3Plan(lines);
    if (isJrc(lines)) return jrcPlan(lines);
    const message = 'the file is neither a TMY3 table nor a typical year of the Joint Research Centre';
    const cure = 'say which column is what, in a mapping';
    return { ok: false, faults: [{ level: 'error', code: 'unknown-form', place: 'line 1', message, cure }] };
  }
}
