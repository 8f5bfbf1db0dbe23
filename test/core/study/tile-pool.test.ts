import { describe, expect, it } from 'vitest';
import { type Exposure, type ExposureJob, exposureJob, SLICE, slicesOf } from '../../../core/shade/exposure-slice.ts';
import { runHere } from '../../../core/study/run-jobs.ts';
import {
  type MakeTileWorker,
  onPool,
  type TileDone,
  TilePool,
  tiler,
  type ToTiler,
} from '../../../core/study/tile-pool.ts';
import { blockField, fieldReceptors } from '../../helpers/block-field.ts';
import { yearLight } from '../../helpers/year-light.ts';

const field = blockField(5, 12, true);
const light = yearLight(51.5, 60);
const job = (count: number, start: number): ExposureJob =>
  exposureJob(field.solids, field.shaders, light, fieldReceptors(field, count, start), {
    diffuse_Whm2: 2,
    reflected_Whm2: 1,
  });
const jobs = [job(2 * SLICE + 100, 3), job(SLICE + 1, 4)];
const go = async () => 'go' as const;

type Staged = {
  readonly make: MakeTileWorker;
  readonly made: { tiles: number; ended: boolean; die(why: string): void }[];
};

/** Workers in this thread that answer later, each in its own time, and get copies of what they are sent, as real ones do. */
function staged(wait: (worker: number, tile: number) => number = () => 0): Staged {
  const made: Staged['made'] = [];
  const make: MakeTileWorker = (hear, die) => {
    const number = made.length;
    const own = { tiles: 0, ended: false, die };
    made.push(own);
    const work = tiler((answer) => {
      if (!own.ended) hear(structuredClone(answer));
    });
    return {
      post: (message: ToTiler) => {
        const copy = structuredClone(message);
        if (copy.kind === 'tile') setTimeout(() => work(copy), wait(number, own.tiles++));
        else work(copy);
      },
      end: () => {
        own.ended = true;
      },
    };
  };
  return { make, made };
}

const bytes = (e: Exposure): string =>
  [e.minutes, e.beam, e.sky, e.ground, e.covered]
    .map((c) => Buffer.from(c.buffer, c.byteOffset, c.byteLength).toString('base64'))
    .join();

describe('a pool of workers', () => {
  it('gives the same bytes with 1, 2, 3 and 9 workers as without any, whoever is faster', async () => {
    const here = await runHere(jobs, go);
    const expected = (here as readonly Exposure[]).map(bytes);
    expect(here?.[0]?.minutes.some((m) => m > 0)).toBe(true);
    for (const size of [1, 2, 3, 9]) {
      const { make, made } = staged((worker, tile) => (worker * 7 + tile * 5) % 11);
      const pool = new TilePool(make, size);
      const outcome = await pool.run(jobs);
      if (outcome.kind !== 'done') throw new Error(outcome.kind);
      expect(outcome.values.map(bytes)).toEqual(expected);
      expect(made).toHaveLength(Math.min(size, 5));
      pool.close();
      expect(made.every((w) => w.ended)).toBe(true);
    }
  });

  it('hands out every tile once, each with its rows, and says how far it is', async () => {
    const { make } = staged();
    const tiles: TileDone[] = [];
    const steps: string[] = [];
    const outcome = await new TilePool(make, 2).run(
      jobs,
      (tile) => tiles.push(tile),
      (done, total) => steps.push(`${done}/${total}`),
    );
    if (outcome.kind !== 'done') throw new Error(outcome.kind);
    expect(steps).toEqual(['1/5', '2/5', '3/5', '4/5', '5/5']);
    expect(tiles.map((t) => `${t.job}:${t.from}`).sort()).toEqual(['0:0', '0:2048', '0:4096', '1:0', '1:2048']);
    for (const { job: j, from, values } of tiles)
      expect([...values.beam]).toEqual([...(outcome.values[j]?.beam.subarray(from, from + values.beam.length) ?? [])]);
  });

  it('stops midway, drops what comes late, and takes the next run on with the same workers', async () => {
    const { make, made } = staged(() => 1);
    const pool = new TilePool(make, 2);
    let seen = 0;
    const stopped = pool.run(jobs, () => {
      if (++seen === 2) pool.stop();
    });
    expect(await stopped).toEqual({ kind: 'stopped' });
    expect(seen).toBe(2);
    const again = await pool.run(jobs);
    expect(again.kind).toBe('done');
    expect(seen).toBe(2);
    expect(made).toHaveLength(2);
  });

  it('stops a run for the sake of a newer one', async () => {
    const pool = new TilePool(staged(() => 1).make, 2);
    const old = pool.run(jobs);
    const outcome = await pool.run([jobs[1] as ExposureJob]);
    expect(await old).toEqual({ kind: 'stopped' });
    const here = await runHere([jobs[1] as ExposureJob], go);
    expect(outcome.kind === 'done' && outcome.values.map(bytes)).toEqual(here?.map(bytes));
  });

  it('fails the run when a worker dies, and starts another for the next', async () => {
    const { make, made } = staged(() => 1);
    const pool = new TilePool(make, 2);
    const run = pool.run(jobs);
    made[1]?.die('out of memory');
    expect(await run).toEqual({ kind: 'failed', message: 'out of memory' });
    expect(made[1]?.ended).toBe(true);
    expect((await pool.run(jobs)).kind).toBe('done');
    expect(made).toHaveLength(3);
  });

  it('fails the run with the words of a tile that cannot be worked out, or of a worker that cannot start', async () => {
    const bad = { ...jobs[1], light: null } as unknown as ExposureJob;
    expect((await new TilePool(staged().make, 1).run([bad])).kind).toBe('failed');
    const none: MakeTileWorker = () => {
      throw new Error('no threads here');
    };
    expect(await new TilePool(none, 2).run(jobs)).toEqual({ kind: 'failed', message: 'no threads here' });
  });

  it('has nothing to do for a run without points', async () => {
    expect(slicesOf(job(0, 3))).toBe(0);
    const outcome = await new TilePool(staged().make, 2).run([job(0, 3)]);
    expect(outcome.kind === 'done' && outcome.values[0]?.minutes.length).toBe(0);
  });

  it('serves a study: stops when its pulse says so, and throws what went wrong', async () => {
    const run = onPool(new TilePool(staged(() => 1).make, 2));
    expect((await run(jobs, go))?.map(bytes)).toEqual((await runHere(jobs, go))?.map(bytes));
    expect(await run(jobs, async (done) => (done >= 2 ? 'stop' : 'go'))).toBeNull();
    const { make, made } = staged(() => 1);
    const failing = onPool(new TilePool(make, 1))(jobs, go);
    made[0]?.die('gone');
    await expect(failing).rejects.toThrow('gone');
  });
});
