import { existsSync } from 'node:fs';
import { resolve } from 'node:path';
import { Worker } from 'node:worker_threads';
import { slicesOf } from '../../core/shade/exposure-slice.ts';
import { runHere, type RunJobs } from '../../core/study/run-jobs.ts';
import { type FromTiler, type MakeTileWorker, onPool, TilePool } from '../../core/study/tile-pool.ts';

/** The built worker: beside the command, or one folder up from a part of it that is loaded late. */
function workerFile(): string {
  const places = ['.', '..'].map((up) => resolve(import.meta.dirname, up, 'tile-worker.js'));
  const found = places.find((place) => existsSync(place));
  if (found === undefined) throw new Error('tile-worker.js is missing beside the command; build it again');
  return found;
}

const thread: MakeTileWorker = (hear, die) => {
  const worker = new Worker(workerFile());
  worker.on('message', (message: FromTiler) => hear(message));
  worker.on('messageerror', () => die('a message of a worker thread could not be read'));
  worker.on('error', (error) => die(error instanceof Error ? error.message : String(error)));
  worker.on('exit', (status) => die(`a worker thread ended with status ${status}`));
  return { post: (message) => worker.postMessage(message), end: () => void worker.terminate() };
};

/**
 * Runs a study whose maps are shared by worker threads, and ends them with it. One thread, or one tile of work, stays in this
 * one: a worker takes longer to start than that.
 * @param threads how many, 1 or more
 */
export async function withThreads<T>(threads: number, study: (run: RunJobs) => Promise<T>): Promise<T> {
  const pool = new TilePool(thread, threads);
  const run: RunJobs = (jobs, pulse) => {
    const tiles = jobs.reduce((sum, job) => sum + slicesOf(job), 0);
    return threads > 1 && tiles > 1 ? onPool(pool)(jobs, pulse) : runHere(jobs, pulse);
  };
  try {
    return await study(run);
  } finally {
    pool.close();
  }
}
