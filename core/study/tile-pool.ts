import {
  type Exposure,
  type ExposureJob,
  exposureTile,
  type JobHead,
  joinSlices,
  SLICE,
  slicesOf,
} from '../shade/exposure-slice.ts';
import { rowsOf, type Receptors } from '../shade/skyline-groups.ts';
import type { RunJobs } from './run-jobs.ts';

/** What a worker is told: what stands and the light of a job, once; then tiles of it, one at a time. `tile`: its place in the run. */
export type ToTiler =
  | { readonly kind: 'head'; readonly job: number; readonly head: JobHead }
  | { readonly kind: 'tile'; readonly job: number; readonly tile: number; readonly receptors: Receptors };

export type FromTiler =
  | { readonly kind: 'tile'; readonly job: number; readonly tile: number; readonly values: Exposure }
  | { readonly kind: 'failed'; readonly job: number; readonly message: string };

/** A worker as the pool needs it: a Web Worker in the desk, a worker thread in the command. */
export type TileWorker = { post(message: ToTiler): void; end(): void };

/** Makes a worker. `hear` gets what it posts; `die` says that it is gone, and why. */
export type MakeTileWorker = (hear: (message: FromTiler) => void, die: (why: string) => void) => TileWorker;

/** How a run of the pool ended. */
export type PoolOutcome =
  | { readonly kind: 'done'; readonly values: readonly Exposure[] }
  | { readonly kind: 'stopped' }
  | { readonly kind: 'failed'; readonly message: string };

/** A tile that is done: rows `from` on of job number `job` of the run. Tiles arrive in no fixed order. */
export type TileDone = { readonly job: number; readonly from: number; readonly values: Exposure };

/** What a worker does with its messages: both homes hand it theirs. @param post how it answers */
export function tiler(post: (message: FromTiler) => void): (message: ToTiler) => void {
  let held: { readonly job: number; readonly head: JobHead } | null = null;
  return (message) => {
    const { job } = message;
    if (message.kind === 'head') {
      held = message;
      return;
    }
    try {
      if (held?.job !== job) throw new Error('a tile came without its job');
      post({ kind: 'tile', job, tile: message.tile, values: exposureTile(held.head, message.receptors) });
    } catch (error) {
      post({ kind: 'failed', job, message: error instanceof Error ? error.message : String(error) });
    }
  };
}

/** Rows `from` on of one job of the run. */
type Tile = { readonly job: number; readonly from: number };

type Run = {
  /** Number of the run's first job: jobs are numbered on over all runs, so that a late answer is known for what it is. */
  readonly base: number;
  readonly jobs: readonly ExposureJob[];
  readonly tiles: readonly Tile[];
  /** Done tiles, by their place in `tiles`. */
  readonly done: Exposure[];
  readonly onTile: (tile: TileDone) => void;
  readonly onProgress: (done: number, total: number) => void;
  readonly settle: (outcome: PoolOutcome) => void;
  next: number;
  left: number;
};

type Hand = { worker: TileWorker | null; isBusy: boolean; head: number };

/**
 * Workers that share maps. Jobs are cut into tiles of `SLICE` receptors whatever the number of workers; each worker has one
 * tile in hand and gets the next when it has answered; results are put together in the order of the tiles. So the bytes do
 * not depend on how many workers there are, nor on which was faster. A new run stops the one before it. A worker that dies
 * fails the run, and the next run starts a new one in its place.
 */
export class TilePool {
  readonly #make: MakeTileWorker;
  readonly #hands: readonly Hand[];
  #run: Run | null = null;
  #jobs = 0;

  /** @param size how many workers; they start with the first tile that they get */
  constructor(make: MakeTileWorker, size: number) {
    this.#make = make;
    this.#hands = Array.from({ length: Math.max(1, Math.floor(size)) }, () => ({
      worker: null,
      isBusy: false,
      head: -1,
    }));
  }

  /** Works jobs out. @param onTile each tile as it is done @returns their values, in the order of the jobs */
  run(
    jobs: readonly ExposureJob[],
    onTile: (tile: TileDone) => void = () => {},
    onProgress: (done: number, total: number) => void = () => {},
  ): Promise<PoolOutcome> {
    this.stop();
    return new Promise((settle) => {
      const tiles = jobs.flatMap((job, j) =>
        Array.from({ length: slicesOf(job) }, (_, i): Tile => ({ job: j, from: i * SLICE })),
      );
      const base = this.#jobs;
      this.#jobs += jobs.length;
      const run: Run = { base, jobs, tiles, done: [], onTile, onProgress, settle, next: 0, left: tiles.length };
      this.#run = run;
      if (run.left === 0) this.#finish(run);
      else for (const hand of this.#hands) this.#give(hand);
    });
  }

  /** Stops the run: no more tiles are handed out, and those in hand are dropped when they come. */
  stop(): void {
    const run = this.#run;
    this.#run = null;
    run?.settle({ kind: 'stopped' });
  }

  /** Ends the workers, and the run if there is one. */
  close(): void {
    this.stop();
    for (const hand of this.#hands) this.#discard(hand);
  }

  #give(hand: Hand): void {
    const run = this.#run;
    if (run === null || run.next === run.tiles.length || hand.isBusy) return;
    const tile = run.next++;
    const { job: ofRun, from } = run.tiles[tile] as Tile;
    const job = run.base + ofRun;
    const source = run.jobs[ofRun] as ExposureJob;
    try {
      hand.worker ??= this.#connect(hand);
      if (hand.head !== job) {
        const { receptors: _, ...head } = source;
        hand.worker.post({ kind: 'head', job, head });
        hand.head = job;
      }
      hand.isBusy = true;
      hand.worker.post({ kind: 'tile', job, tile, receptors: rowsOf(source.receptors, from, from + SLICE) });
    } catch (error) {
      this.#discard(hand);
      this.#fail(error instanceof Error ? error.message : String(error));
    }
  }

  #connect(hand: Hand): TileWorker {
    const worker: TileWorker = this.#make(
      (message) => {
        if (hand.worker === worker) this.#hear(hand, message);
      },
      (why) => {
        if (hand.worker !== worker) return;
        this.#discard(hand);
        this.#fail(why);
      },
    );
    return worker;
  }

  #hear(hand: Hand, message: FromTiler): void {
    hand.isBusy = false;
    const run = this.#run;
    if (run !== null && message.job >= run.base) {
      if (message.kind === 'failed') {
        this.#fail(message.message);
        return;
      }
      const { job, from } = run.tiles[message.tile] as Tile;
      run.done[message.tile] = message.values;
      run.left--;
      run.onTile({ job, from, values: message.values });
      run.onProgress(run.tiles.length - run.left, run.tiles.length);
      if (run.left === 0 && this.#run === run) this.#finish(run);
    }
    this.#give(hand);
  }

  #finish(run: Run): void {
    this.#run = null;
    const values = run.jobs.map((_, j) => joinSlices(run.done.filter((_, i) => run.tiles[i]?.job === j)));
    run.settle({ kind: 'done', values });
  }

  #fail(message: string): void {
    const run = this.#run;
    this.#run = null;
    run?.settle({ kind: 'failed', message });
  }

  #discard(hand: Hand): void {
    hand.worker?.end();
    hand.worker = null;
    hand.isBusy = false;
    hand.head = -1;
  }
}

/** Runs jobs on a pool, for studies. Rejects when a worker dies or fails. */
export const onPool =
  (pool: TilePool): RunJobs =>
  async (jobs, pulse) => {
    let isOver = false;
    const outcome = await pool.run(
      jobs,
      () => {},
      (done, total) => {
        void pulse(done, total).then((answer) => {
          if (answer === 'stop' && !isOver) pool.stop();
        });
      },
    );
    isOver = true;
    if (outcome.kind === 'failed') throw new Error(outcome.message);
    return outcome.kind === 'done' ? outcome.values : null;
  };
