import { TilePool } from '../../core/study/tile-pool.ts';
import { hands } from './hands.ts';
import { mapRunner, type RunMap, tileWorkerOver } from './map-runner.ts';

/** Most workers that a map is shared by: each holds its own light and solids. */
const MOST_WORKERS = 8;

const makeTileWorker = (): Worker => new Worker(new URL('./tile.worker.ts', import.meta.url), { type: 'module' });

/** One core is left to the screen. */
const size = Math.min(MOST_WORKERS, Math.max(1, navigator.hardwareConcurrency - 1));

/** The desk's exposure maps; the workers start with the first one. */
export const runExposureMap: RunMap = mapRunner(hands.mapPlan, new TilePool(tileWorkerOver(makeTileWorker), size));
