import type { Checked } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { type ExposureMap, type ExposureMapAsk, finishMap, type MapPlace } from '../../core/study/exposure-map.ts';
import { type MapTile, mapTiles } from '../../core/study/map-tile.ts';
import type { FromTiler, MakeTileWorker, TileDone, TilePool } from '../../core/study/tile-pool.ts';
import type { Outcome, WorkerHand, WorkerLike } from './worker-hand.ts';

/** A pool's worker over a Web Worker, or what stands in for one. */
export const tileWorkerOver =
  (make: () => WorkerLike): MakeTileWorker =>
  (hear, die) => {
    const worker = make();
    worker.onmessage = (event) => hear(event.data as FromTiler);
    worker.onerror = (event) => die(event.message || 'the worker could not be started');
    worker.onmessageerror = () => die('a message of the worker could not be read');
    return { post: (message) => worker.postMessage(message), end: () => worker.terminate() };
  };

export type MapRun = {
  /** How it ended; a question that cannot be answered is `done` with its faults. */
  readonly done: Promise<Outcome<Checked<ExposureMap>>>;
  readonly stop: () => void;
};

/** What is heard of a map on its way. */
export type MapWatch = {
  /** The surfaces as they will be laid out, before anything of them is known. */
  readonly onPlan?: (places: readonly MapPlace[]) => void;
  readonly onTile?: (tiles: readonly MapTile[]) => void;
  readonly onProgress?: (done: number, total: number) => void;
};

export type RunMap = (scheme: Scheme, ask: ExposureMapAsk, watch: MapWatch) => MapRun;

/**
 * Runs exposure maps on a pool of workers: laid out in one worker, worked out by all. Tiles arrive as they are done, in no
 * fixed order; the whole comes at the end. A new run stops the one before it.
 */
export function mapRunner(hand: WorkerHand, pool: TilePool): RunMap {
  return (scheme, ask, watch) => {
    let isStopped = false;
    let isPooled = false;
    pool.stop();
    const work = async (): Promise<Outcome<Checked<ExposureMap>>> => {
      const laid = await hand.run('mapPlan', ask, scheme);
      if (laid.kind !== 'done') return laid;
      if (isStopped || laid.superseded) return { kind: 'stopped' };
      const plan = laid.result;
      if (!plan.ok) return { kind: 'done', result: plan, superseded: false };
      watch.onPlan?.(plan.value.places);
      isPooled = true;
      const onTile = (tile: TileDone): void => watch.onTile?.(mapTiles(plan.value, tile));
      const run = await pool.run(plan.value.jobs, onTile, watch.onProgress);
      isPooled = false;
      if (run.kind !== 'done') return run;
      const value = finishMap(plan.value, run.values);
      return { kind: 'done', result: { ok: true, value, notes: plan.notes }, superseded: false };
    };
    return {
      done: work(),
      stop: () => {
        if (isStopped) return;
        isStopped = true;
        if (isPooled) pool.stop();
      },
    };
  };
}
