import { readFileSync } from 'node:fs';
import { parentPort } from 'node:worker_threads';
import { exposureJob, exposureSlice, joinSlices, slicesOf } from '../../core/shade/exposure-slice.ts';
import { tiler, type ToTiler } from '../../core/study/tile-pool.ts';
import { blockField, fieldReceptors } from '../helpers/block-field.ts';
import { yearLight } from '../helpers/year-light.ts';

/** Most memory that this process held. The system's own account of a child begins with what its parent held; Linux keeps a better one. */
function peak_MB(): number {
  try {
    return Number(/VmHWM:\s+(\d+) kB/.exec(readFileSync('/proc/self/status', 'utf8'))?.[1]) / 1024;
  } catch {
    return process.resourceUsage().maxRSS / 1024;
  }
}

/**
 * Run by the bench of maps in two ways: as a worker thread that works out slices of a job, and with `--memory` as a process
 * of its own that works out one large map and prints how much memory that took at its peak.
 */
if (parentPort) {
  const port = parentPort;
  const hear = tiler((message) => port.postMessage(message));
  port.on('message', (message: ToTiler) => hear(message));
} else if (process.argv.includes('--memory')) {
  const field = blockField(7, 200);
  const receptors = fieldReceptors(field, 100_000, 3);
  const energy = { diffuse_Whm2: 1, reflected_Whm2: 1 };
  const map = exposureJob(field.solids, field.shaders, yearLight(51.5, 5), receptors, energy);
  const start = performance.now();
  const all = joinSlices(Array.from({ length: slicesOf(map) }, (_, i) => exposureSlice(map, i)));
  const seconds = (performance.now() - start) / 1000;
  const check = all.minutes.reduce((sum, m) => sum + m, 0);
  console.log(JSON.stringify({ seconds, check, peak_MB: peak_MB() }));
}
