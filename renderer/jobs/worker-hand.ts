import type { Scheme } from '../../core/scheme/schema.ts';
import type { FromWorker, ToWorker } from '../../core/study/job.ts';
import type { AnswerOf, AskOf, Task, Work } from './tasks.ts';

/** How a job ended. `superseded`: a newer one was asked for before this one was done. */
export type Outcome<T> =
  | { readonly kind: 'done'; readonly result: T; readonly superseded: boolean }
  | { readonly kind: 'stopped' }
  | { readonly kind: 'failed'; readonly message: string };

/** The part of `Worker` that is used, so that tests can stand in for one. */
export type WorkerLike = {
  postMessage(message: unknown): void;
  terminate(): void;
  onmessage: ((event: MessageEvent) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
  onmessageerror: ((event: MessageEvent) => void) | null;
};

type Job = {
  readonly number: number;
  readonly work: Omit<Work, 'scheme' | 'revision'>;
  readonly scheme: Scheme | null;
  readonly onProgress: (done: number, total: number) => void;
  readonly settle: (outcome: Outcome<never>) => void;
  superseded: boolean;
};

/** A worker that has not answered a cancel after this long is ended and started anew. */
const PATIENCE_ms = 5000;

/**
 * One worker and its one job in flight. Asking for another cancels the job in flight, and of several waiting only the newest is
 * kept; the new one is posted when the old one has answered, so a worker's inbox never fills. Nothing here ever throws or falls
 * back to the main thread: a worker that dies is a failed outcome, and the next job gets a new worker.
 */
export class WorkerHand {
  readonly #make: () => WorkerLike;
  #worker: WorkerLike | null = null;
  #flight: Job | null = null;
  #next: Job | null = null;
  #count = 0;
  #patience: ReturnType<typeof setTimeout> | null = null;
  #held: Scheme | null = null;
  #revision = 0;

  constructor(make: () => WorkerLike) {
    this.#make = make;
  }

  run<T extends Task>(
    task: T,
    ask: AskOf<T>,
    scheme: Scheme | null = null,
    onProgress: (done: number, total: number) => void = () => {},
  ): Promise<Outcome<AnswerOf<T>>> {
    return new Promise((settle) => {
      const job: Job = { number: ++this.#count, work: { task, ask }, scheme, onProgress, settle, superseded: false };
      if (this.#flight === null) return this.#start(job);
      this.#next?.settle({ kind: 'stopped' });
      this.#next = job;
      this.#cancelFlight();
    });
  }

  /** Stops the job in flight and forgets the one that waits. */
  stop(): void {
    this.#next?.settle({ kind: 'stopped' });
    this.#next = null;
    if (this.#flight !== null) this.#cancelFlight();
  }

  /** Ends the worker for good; whatever was asked of it is stopped. */
  close(): void {
    this.stop();
    this.#discard();
    this.#finish({ kind: 'stopped' });
  }

  #start(job: Job): void {
    this.#flight = job;
    try {
      this.#worker ??= this.#connect();
      const isNews = job.scheme !== null && job.scheme !== this.#held;
      if (isNews) {
        this.#held = job.scheme;
        this.#revision++;
      }
      const work: Work = { ...job.work, revision: this.#revision, scheme: isNews ? job.scheme : null };
      this.#worker.postMessage({ kind: 'run', job: job.number, input: work } satisfies ToWorker<Work>);
    } catch (error) {
      this.#discard();
      this.#finish({ kind: 'failed', message: error instanceof Error ? error.message : String(error) });
    }
  }

  #connect(): WorkerLike {
    const worker = this.#make();
    worker.onmessage = (event) => this.#hear(event.data as FromWorker<never>);
    worker.onerror = (event) => this.#die(event.message || 'the worker could not be started');
    worker.onmessageerror = () => this.#die('a message of the worker could not be read');
    return worker;
  }

  #hear(message: FromWorker<never>): void {
    const job = this.#flight;
    if (job === null || message.job !== job.number) return;
    if (message.kind === 'progress') {
      if (!job.superseded) job.onProgress(message.done, message.total);
    } else if (message.kind === 'failed') {
      this.#finish({ kind: 'failed', message: message.message });
    } else if (message.result === null) {
      this.#finish({ kind: 'stopped' });
    } else {
      this.#finish({ kind: 'done', result: message.result, superseded: job.superseded });
    }
  }

  #cancelFlight(): void {
    const job = this.#flight;
    if (job === null || job.superseded) return;
    job.superseded = true;
    this.#worker?.postMessage({ kind: 'cancel', job: job.number } satisfies ToWorker<Work>);
    this.#patience = setTimeout(() => {
      this.#discard();
      this.#finish({ kind: 'stopped' });
    }, PATIENCE_ms);
  }

  #die(message: string): void {
    this.#discard();
    this.#finish({ kind: 'failed', message });
  }

  #discard(): void {
    this.#worker?.terminate();
    this.#worker = null;
    this.#held = null;
  }

  #finish(outcome: Outcome<never>): void {
    if (this.#patience !== null) clearTimeout(this.#patience);
    this.#patience = null;
    const job = this.#flight;
    const next = this.#next;
    this.#flight = null;
    this.#next = null;
    job?.settle(outcome);
    if (next !== null) this.#start(next);
  }
}
