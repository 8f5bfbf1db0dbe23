import { describe, expect, it } from 'vitest';
import { buildModel } from '../../core/form/build-model.ts';
import { Scheme } from '../../core/scheme/schema.ts';
import type { ToWorker } from '../../core/study/job.ts';
import { type ExposureMapAsk, exposureMap, planMap, surfacesOf } from '../../core/study/exposure-map.ts';
import { TilePool, tiler, type ToTiler } from '../../core/study/tile-pool.ts';
import { mapRunner, tileWorkerOver } from '../../renderer/jobs/map-runner.ts';
import type { Work } from '../../renderer/jobs/tasks.ts';
import { WorkerHand, type WorkerLike } from '../../renderer/jobs/worker-hand.ts';

const scheme = Scheme.parse({
  format: 'shadewright',
  version: 1,
  site: { latitude: 51.45, longitude: -2.59, zone: 'Europe/London' },
  blocks: [
    { id: 'P', standing: 'proposed', box: { at: [0, -8], width: 10, depth: 8 }, height: 15 },
    { id: 'N', standing: 'context', box: { at: [0, 12], width: 10, depth: 8 }, height: 6 },
  ],
});
const model = buildModel(scheme);
const ask: ExposureMapAsk = {
  dates: ['2025-03-21'],
  step_min: 30,
  spacing_m: 0.3,
  surfaces: surfacesOf(model, 'after'),
};

/** A worker in this thread: it answers later, with copies. */
function workerOf(answer: (message: never, post: (message: unknown) => void) => void): WorkerLike {
  const worker: WorkerLike = {
    postMessage: (message) => {
      const copy = structuredClone(message) as never;
      setTimeout(() => answer(copy, (back) => worker.onmessage?.({ data: structuredClone(back) } as MessageEvent)), 1);
    },
    terminate: () => {},
    onmessage: null,
    onerror: null,
    onmessageerror: null,
  };
  return worker;
}

const planner = (): WorkerHand =>
  new WorkerHand(() =>
    workerOf((message: ToWorker<Work>, post) => {
      if (message.kind === 'run')
        post({ kind: 'done', job: message.job, result: planMap(scheme, model, message.input.ask as ExposureMapAsk) });
    }),
  );

function pool(size: number): TilePool {
  const make = (): WorkerLike => {
    let hear: ((message: ToTiler) => void) | null = null;
    return workerOf((message: ToTiler, post) => {
      hear ??= tiler(post);
      hear(message);
    });
  };
  return new TilePool(tileWorkerOver(make), size);
}

describe('an exposure map in the desk', () => {
  it('is the map of the study, and its tiles fill every cell of every surface', async () => {
    const here = await exposureMap(scheme, model, ask, async () => 'go');
    const filled = { before: ask.surfaces.map(() => 0), after: ask.surfaces.map(() => 0) };
    let laid = 0;
    const run = mapRunner(planner(), pool(2))(scheme, ask, {
      onPlan: (places) => {
        laid = places.length;
      },
      onTile: (tiles) => {
        for (const { surface, stages, from, values } of tiles) {
          expect(laid).toBe(ask.surfaces.length);
          if (!here?.ok) throw new Error('refused');
          for (const stage of stages) {
            const whole = here.value.surfaces[surface]?.[stage]?.beam;
            expect([...values.beam]).toEqual([...(whole?.subarray(from, from + values.beam.length) ?? [])]);
            filled[stage][surface]! += values.beam.length;
          }
        }
      },
    });
    expect(await run.done).toEqual({ kind: 'done', result: here, superseded: false });
    if (!here?.ok) throw new Error('refused');
    here.value.surfaces.forEach((s, i) => {
      expect(filled.before[i]).toBe(s.before === null ? 0 : s.grid.cell.length);
      expect(filled.after[i]).toBe(s.after === null ? 0 : s.grid.cell.length);
    });
  });

  it('stops while it is laid out, and while it is worked out', async () => {
    const runMap = mapRunner(planner(), pool(2));
    const early = runMap(scheme, ask, {});
    early.stop();
    expect(await early.done).toEqual({ kind: 'stopped' });
    let late: ReturnType<typeof runMap> | null = null;
    late = runMap(scheme, ask, { onTile: () => late?.stop() });
    expect(await late.done).toEqual({ kind: 'stopped' });
  });

  it('gives way to a newer one', async () => {
    const runMap = mapRunner(planner(), pool(2));
    const old = runMap(scheme, ask, {});
    const next = runMap(scheme, { ...ask, spacing_m: 2 }, {});
    expect(await old.done).toEqual({ kind: 'stopped' });
    expect((await next.done).kind).toBe('done');
  });

  it('hands back what cannot be asked as faults', async () => {
    const outcome = await mapRunner(planner(), pool(1))(scheme, { ...ask, spacing_m: 1e-5 }, {}).done;
    expect(outcome.kind === 'done' && !outcome.result.ok && outcome.result.faults[0]?.message).toMatch(/more than/);
  });
});
