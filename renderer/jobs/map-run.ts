import type { Checked } from '../../core/scheme/fault.ts';
import { faultLine } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { ExposureMap, ExposureMapAsk } from '../../core/study/exposure-map.ts';
import { blankPicture, fillIn, type MapPicture, type Values } from '../maps/map-picture.ts';
import { hands } from './hands.ts';

/** How a map that was begun ended. */
export type MapOutcome = { readonly kind: 'done' | 'stopped' } | { readonly kind: 'failed'; readonly message: string };

type Watch = {
  /** The map as it will be laid out, before any of it is known. */
  readonly onBegin: (picture: MapPicture) => void;
  /** Something of it has arrived. */
  readonly onTile: () => void;
  readonly onProgress: (done: number, total: number) => void;
};

/** Works a map out in workers; a new one stops the one before it. */
export async function runMap(of: Scheme, ask: ExposureMapAsk, watch: Watch): Promise<MapOutcome> {
  const outcome = await hands.map.run('map', ask, of, watch.onProgress);
  if (outcome.kind === 'failed') return outcome;
  if (outcome.kind === 'stopped' || outcome.superseded) return { kind: 'stopped' };
  return arrived(outcome.result, watch);
}

function arrived(result: Checked<ExposureMap>, watch: Watch): MapOutcome {
  if (!result.ok) return { kind: 'failed', message: result.faults.map(faultLine).join(' · ') };
  const surfaces = result.value.surfaces.map(({ surface, panel, grid, before, after }) => ({
    surface,
    panel,
    grid,
    there: { before: before !== null, after: after !== null },
  }));
  const picture = blankPicture(surfaces);
  watch.onBegin(picture);
  result.value.surfaces.forEach(({ before, after }, i) => {
    const put = (stage: 'before' | 'after', values: Values | null): void => {
      if (values !== null) fillIn(picture, i, [stage], 0, values);
    };
    put('before', before);
    put('after', after);
  });
  watch.onTile();
  return { kind: 'done' };
}

export function stopMap(): void {
  hands.map.stop();
}
