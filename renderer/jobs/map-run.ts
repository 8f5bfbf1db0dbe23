import { faultLine } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { ExposureMapAsk } from '../../core/study/exposure-map.ts';
import { blankPicture, fillIn, type MapPicture } from '../maps/map-picture.ts';
import type { MapRun } from './map-runner.ts';
import { runExposureMap } from './run-exposure-map.ts';

/** How a map that was begun ended. */
export type MapOutcome = { readonly kind: 'done' | 'stopped' } | { readonly kind: 'failed'; readonly message: string };

type Watch = {
  /** The map as it will be laid out, before any of it is known. */
  readonly onBegin: (picture: MapPicture) => void;
  /** Something of it has arrived. */
  readonly onTile: () => void;
  readonly onProgress: (done: number, total: number) => void;
};

let running: MapRun | null = null;

/** Works a map out on the pool of workers; a new one stops the one before it. */
export async function runMap(of: Scheme, ask: ExposureMapAsk, watch: Watch): Promise<MapOutcome> {
  running?.stop();
  let picture: MapPicture | null = null;
  running = runExposureMap(of, ask, {
    onPlan: (places) => {
      picture = blankPicture(places);
      watch.onBegin(picture);
    },
    onTile: (tiles) => {
      if (picture === null) return;
      for (const { surface, stages, from, values } of tiles) fillIn(picture, surface, stages, from, values);
      watch.onTile();
    },
    onProgress: watch.onProgress,
  });
  const outcome = await running.done;
  if (outcome.kind !== 'done') return outcome;
  const { result } = outcome;
  return result.ok ? { kind: 'done' } : { kind: 'failed', message: result.faults.map(faultLine).join(' · ') };
}

export function stopMap(): void {
  running?.stop();
}
