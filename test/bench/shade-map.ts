import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { availableParallelism } from 'node:os';
import { resolve } from 'node:path';
import { Worker } from 'node:worker_threads';
import { seenSamples, sunOnReceptors } from '../../core/shade/exposure.ts';
import { columnsFor, type Light, sortLight } from '../../core/shade/exposure-light.ts';
import { type Exposure, type ExposureJob, exposureJob, SLICE } from '../../core/shade/exposure-slice.ts';
import { type Receptors, rowsOf } from '../../core/shade/skyline-groups.ts';
import { makeOccluders } from '../../core/shade/skyline-occluders.ts';
import { type MakeTileWorker, TilePool } from '../../core/study/tile-pool.ts';
import { type BlockField, blockField, fieldReceptors } from '../helpers/block-field.ts';
import { isHidden, meshOf } from '../helpers/ray-casts.ts';
import { yearLight } from '../helpers/year-light.ts';
import type { Row } from './row.ts';

const median = (values: number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1] as number;
const RUNS = 5;

/** Sun hours and beam of a year at five-minute steps, against a ray cast for every sample in front of the receptor. */
export async function benchMap(): Promise<Row[]> {
  const rows: Row[] = [];
  const light = yearLight(51.5, 5);
  for (const detailed of [false, true]) rows.push(yearRow(light, detailed));
  rows.push(...growthRows(light));
  rows.push(...(await coreRows(light)));
  return rows;
}

function yearRow(light: Light, detailed: boolean): Row {
  const count = 10_000;
  const field = blockField(7, 200, detailed);
  const receptors = fieldReceptors(field, count, 3);
  const asked = samplesAsked(light, receptors);
  const caster = makeCaster(field, light, receptors);
  const times: number[] = [];
  timeMap(field, light, receptors);
  // Turn about, so that a busy machine slows both alike.
  for (let run = 0; run < RUNS; run++) {
    times.push(timeMap(field, light, receptors));
    for (let row = run * 389; row < count; row += RUNS * 389) caster.cast(row);
  }
  const ours = asked / median(times);
  const others = caster.samples / caster.seconds;
  return {
    what: `year of sun, 10000 receptors, 200 blocks${detailed ? ' in detail' : ''} [samples]`,
    ours_perSecond: ours,
    other: 'three-mesh-bvh 0.9.17',
    other_perSecond: others,
    ratio: ours / others,
    note: `${detailed ? 'with overhangs, fins, floating blocks; ' : ''}step 5 min; ${((100 * caster.equal) / caster.samples).toFixed(4)} % of ${caster.samples} samples equal; map in ${median(times).toFixed(3)} s (fastest ${Math.min(...times).toFixed(3)} s), everything prepared within; one ray a sample, timed on every 389th receptor`,
  };
}

/** Samples in front of the receptors: those that a caster has to cast. */
function samplesAsked(light: Light, r: Receptors): number {
  const counts = new Map<string, number>();
  let sum = 0;
  for (let row = 0; row < r.x.length; row++) {
    const key = `${r.nx[row]},${r.ny[row]},${r.nz[row]}`;
    let n = counts.get(key);
    if (n === undefined) {
      n = 0;
      for (let i = 0; i < light.sx.length; i++)
        if (r.nx[row]! * light.sx[i]! + r.ny[row]! * light.sy[i]! + r.nz[row]! * light.sz[i]! > 0) n++;
      counts.set(key, n);
    }
    sum += n;
  }
  return sum;
}

/** Seconds for a map, from the solids on: occluders, sorted light and all. */
function timeMap(field: BlockField, light: Light, r: Receptors): number {
  const start = performance.now();
  const o = makeOccluders(field.solids, field.shaders);
  const { minutes } = sunOnReceptors(o, sortLight(light, columnsFor(light.sx.length)), r);
  const seconds = (performance.now() - start) / 1000;
  if (!minutes.every(Number.isFinite)) throw new Error('the map holds what is no number');
  return seconds;
}

type Caster = { samples: number; equal: number; seconds: number; cast(row: number): void };

/** Casts every sample in front of a receptor, and compares. Only the casting is timed; building the tree is not. */
function makeCaster(field: BlockField, light: Light, r: Receptors): Caster {
  const mesh = meshOf(field.solids, field.shaders);
  const o = makeOccluders(field.solids, field.shaders);
  const sorted = sortLight(light, columnsFor(light.sx.length));
  const { covered } = sunOnReceptors(o, sorted, r);
  const hidden = new Uint8Array(light.sx.length);
  const s = [0, 0, 0];
  const caster: Caster = {
    samples: 0,
    equal: 0,
    seconds: 0,
    cast(row) {
      const p = [r.x[row]!, r.y[row]!, r.z[row]!];
      const n = [r.nx[row]!, r.ny[row]!, r.nz[row]!];
      hidden.fill(2);
      const start = performance.now();
      for (let i = 0; i < light.sx.length; i++) {
        s[0] = light.sx[i]!;
        s[1] = light.sy[i]!;
        s[2] = light.sz[i]!;
        if (n[0]! * s[0] + n[1]! * s[1] + n[2]! * s[2] > 0) hidden[i] = isHidden(mesh, p, n, s) ? 1 : 0;
      }
      caster.seconds += (performance.now() - start) / 1000;
      const seen = seenSamples(o, sorted, r, row);
      for (let i = 0; i < light.sx.length; i++) {
        if (hidden[i] === 2) continue;
        caster.samples++;
        const clear = hidden[i] === 0 && covered[row] === 0;
        if (clear === (seen[i] === 1)) caster.equal++;
      }
    },
  };
  return caster;
}

/** How the cost of a receptor grows with blocks, and that of a map with receptors. The first line of each is the measure. */
function growthRows(light: Light): Row[] {
  const rows: Row[] = [];
  const row = (what: string, perSecond: number, first: number, note: string): void => {
    rows.push({
      what,
      ours_perSecond: perSecond,
      other: 'the first of the series',
      other_perSecond: first,
      ratio: perSecond / first,
      note,
    });
  };
  let first = 0;
  for (const blocks of [50, 200, 1000, 5000]) {
    const field = blockField(7, blocks);
    const receptors = fieldReceptors(field, 4000, 3);
    const seconds = median([0, 1, 2].map(() => timeMap(field, light, receptors)));
    first ||= 4000 / seconds;
    row(
      `year, 4000 receptors, ${blocks} blocks [receptors]`,
      4000 / seconds,
      first,
      `${((seconds / 4000) * 1e6).toFixed(1)} µs a receptor`,
    );
  }
  first = 0;
  const field = blockField(7, 200);
  for (const count of [1000, 10_000, 100_000]) {
    const receptors = fieldReceptors(field, count, 3);
    const seconds = median([0, 1, 2].slice(0, count > 50_000 ? 1 : 3).map(() => timeMap(field, light, receptors)));
    first ||= count / seconds;
    row(
      `year, 200 blocks, ${count} receptors [receptors]`,
      count / seconds,
      first,
      `${((seconds / count) * 1e6).toFixed(1)} µs a receptor`,
    );
  }
  return rows;
}

/**
 * The pool with one worker thread and with one a core, with sky and ground light, as blocks and receptors grow; and the memory
 * of a large map in a process of its own.
 */
async function coreRows(light: Light): Promise<Row[]> {
  const script = resolve(import.meta.dirname, 'shade-map-worker.js');
  const cores = availableParallelism();
  const rows: Row[] = [];
  for (const [blocks, count] of SIZES) {
    const field = blockField(7, blocks);
    const receptors = fieldReceptors(field, count, 3);
    const job = exposureJob(field.solids, field.shaders, light, receptors, { diffuse_Whm2: 1, reflected_Whm2: 1 });
    const one = await runOnPool(script, job, 1);
    const all = await runOnPool(script, job, cores);
    if (one.bytes !== all.bytes) throw new Error('the number of workers changed the result');
    rows.push({
      what: `year, sky and ground too, ${blocks} blocks, ${count} receptors, ${cores} workers`,
      ours_perSecond: count / all.seconds,
      other: 'one worker',
      other_perSecond: count / one.seconds,
      ratio: one.seconds / all.seconds,
      note: `same bytes from both; ${((all.seconds / count) * 1e6).toFixed(1)} µs a receptor`,
    });
  }
  const large = JSON.parse(execFileSync(process.execPath, [script, '--memory'], { encoding: 'utf8' })) as {
    seconds: number;
    peak_MB: number;
  };
  rows.push({
    what: 'year, sky and ground too, 100000 receptors [receptors]',
    ours_perSecond: 100_000 / large.seconds,
    other: '',
    other_perSecond: null,
    ratio: null,
    note: `peak memory of the whole process ${large.peak_MB.toFixed(0)} MB (bar: 500 MB)`,
  });
  return rows;
}

/** Blocks and receptors. */
const SIZES = [
  [50, 16_384],
  [200, 16_384],
  [1000, 16_384],
  [5000, 16_384],
  [200, 4096],
  [200, 65_536],
] as const;

/** Works a job out on the pool that the command uses. Workers are warm: a first tile has started them. */
async function runOnPool(script: string, job: ExposureJob, size: number): Promise<{ seconds: number; bytes: string }> {
  const make: MakeTileWorker = (hear, die) => {
    const worker = new Worker(script);
    worker.on('message', hear);
    worker.on('error', (error) => die(String(error)));
    return { post: (message) => worker.postMessage(message), end: () => void worker.terminate() };
  };
  const pool = new TilePool(make, size);
  try {
    const first = { ...job, receptors: rowsOf(job.receptors, 0, SLICE) };
    await pool.run(Array.from({ length: size }, () => first));
    const start = performance.now();
    const outcome = await pool.run([job]);
    const seconds = (performance.now() - start) / 1000;
    if (outcome.kind !== 'done') throw new Error(outcome.kind === 'failed' ? outcome.message : outcome.kind);
    const { minutes, beam, sky, ground } = outcome.values[0] as Exposure;
    const bytes = createHash('sha256');
    for (const column of [minutes, beam, sky, ground]) bytes.update(new Uint8Array(column.buffer));
    return { seconds, bytes: bytes.digest('hex') };
  } finally {
    pool.close();
  }
}
