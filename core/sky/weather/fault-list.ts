import type { Fault } from '../../scheme/fault.ts';

/** So many faults of a kind are told one by one; a file that is wrong in every row is wrong in one way. */
const TOLD = 5;
/** With more errors than this, so much is wrong that reading on serves nobody. */
export const MOST_FAULTS = 200;

/** Faults of a file, gathered by kind so that ten thousand equal ones become five and a count. */
export class FaultList {
  readonly #told: Fault[] = [];
  readonly #counts = new Map<string, number>();
  #errors = 0;

  add(level: Fault['level'], code: string, place: string, message: string, cure: string): void {
    const count = (this.#counts.get(code) ?? 0) + 1;
    this.#counts.set(code, count);
    if (level === 'error') this.#errors++;
    if (count <= TOLD) this.#told.push({ level, code, place, message, cure });
  }

  get failed(): boolean {
    return this.#errors > 0;
  }

  /** Whether so much is wrong that reading on serves nobody. */
  get hopeless(): boolean {
    return this.#errors > MOST_FAULTS;
  }

  all(): readonly Fault[] {
    return this.#told.map((fault) => {
      const count = this.#counts.get(fault.code) ?? 0;
      const last = this.#told.findLast((f) => f.code === fault.code) === fault;
      return last && count > TOLD ? { ...fault, message: `${fault.message}; ${count - TOLD} more like this` } : fault;
    });
  }
}
