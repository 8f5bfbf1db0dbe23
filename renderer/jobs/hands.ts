import { WorkerHand } from './worker-hand.ts';

const make = (): Worker => new Worker(new URL('./study.worker.ts', import.meta.url), { type: 'module' });

/**
 * One hand a kind of work, so that a check never holds up the shadow of a moving clock. Workers start with their first job.
 */
export const hands = {
  /** Reads schemes, sets sheets. */
  clerk: new WorkerHand(make),
  /** Writes a scheme that is being saved: nothing else may push it aside. */
  writer: new WorkerHand(make),
  /** Writes unsaved work, again and again; the newest is enough. */
  keeper: new WorkerHand(make),
  /** The moment on the massing. */
  moment: new WorkerHand(make),
  check: new WorkerHand(make),
  /** What is worked out beside the check for the room that is open. */
  ways: new WorkerHand(make),
  sensitivity: new WorkerHand(make),
  sizing: new WorkerHand(make),
  compare: new WorkerHand(make),
  sheets: new WorkerHand(make),
  year: new WorkerHand(make),
  /** The light of neighbours and amenity areas. */
  light: new WorkerHand(make),
  /** Lays out exposure maps; the pool of tile workers then works them out. */
  mapPlan: new WorkerHand(make),
  sunPath: new WorkerHand(make),
  weather: new WorkerHand(make),
  /** What is answered at once: a moment for a place in the sky, a zone for a place on Earth. */
  quick: new WorkerHand(make),
} as const;
