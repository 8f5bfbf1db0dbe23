import { buildModel } from '../../core/form/build-model.ts';
import type { Model } from '../../core/form/model.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { Pulse } from '../../core/study/job.ts';
import type { AnswerOf, AskOf, Task } from './tasks.ts';

/** The scheme that a worker was last sent, and its shapes once somebody needs them. */
export class Held {
  readonly scheme: Scheme;
  #model: Model | null = null;

  constructor(scheme: Scheme) {
    this.scheme = scheme;
  }

  get model(): Model {
    this.#model ??= buildModel(this.scheme);
    return this.#model;
  }
}

/** Does one kind of task; null when the pulse said stop. */
export type Performer<T extends Task> = (ask: AskOf<T>, held: () => Held, pulse: Pulse) => Promise<AnswerOf<T> | null>;
export type Performers = { readonly [T in Task]: Performer<T> };
