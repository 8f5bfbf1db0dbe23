import { type Exposure, type ExposureJob, exposureSlice, joinSlices, slicesOf } from '../shade/exposure-slice.ts';
import type { Pulse } from './job.ts';

/** Works jobs out, wherever: their values in the order of the jobs, or null when `pulse` said stop. The same bytes from each home. */
export type RunJobs = (jobs: readonly ExposureJob[], pulse: Pulse) => Promise<readonly Exposure[] | null>;

/** Slice by slice in this thread, letting others in between. */
export const runHere: RunJobs = async (jobs, pulse) => {
  const total = jobs.reduce((sum, job) => sum + slicesOf(job), 0);
  let done = 0;
  const values: Exposure[] = [];
  for (const job of jobs) {
    const slices: Exposure[] = [];
    for (let i = 0; i < slicesOf(job); i++) {
      slices.push(exposureSlice(job, i));
      if ((await pulse(++done, total)) === 'stop') return null;
    }
    values.push(joinSlices(slices));
  }
  return values;
};
