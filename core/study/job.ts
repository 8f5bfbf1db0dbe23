/** Everything that crosses a worker boundary; every message names its job. */
export type ToWorker<In> = { kind: 'run'; job: number; input: In } | { kind: 'cancel'; job: number };
export type FromWorker<Out> =
  | { kind: 'progress'; job: number; done: number; total: number }
  | { kind: 'done'; job: number; result: Out }
  | { kind: 'failed'; job: number; code: 'bad-input' | 'internal'; message: string };
/** Called between slices of long work; awaits a macrotask so that a worker can hear `cancel`. */
export type Pulse = (done: number, total: number) => Promise<'go' | 'stop'>;
/** One body for command, worker and test: awaits `pulse` between slices, resolves to null when told to stop. */
export type Job<In, Out> = (input: In, pulse: Pulse) => Promise<Out | null>;
