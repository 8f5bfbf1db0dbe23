import * as z from 'zod';
import type { FromWorker, Pulse, ToWorker } from '../../core/study/job.ts';
import { taskPerformer } from './perform-task.ts';
import type { Work } from './tasks.ts';

// No code is generated from strings under our content policy, and zod need not try.
z.config({ jitless: true });

/** Most progress messages a second that are worth the post. */
const PROGRESS_EVERY_ms = 100;

const perform = taskPerformer();
let cancelled = 0;

const post = (message: FromWorker<unknown>): void => self.postMessage(message);

/** Lets the inbox be read: a promise alone would not. */
const nextTask = (): Promise<void> =>
  new Promise((go) => {
    const { port1, port2 } = new MessageChannel();
    port1.onmessage = () => {
      port1.close();
      go();
    };
    port2.postMessage(null);
  });

function pulseOf(job: number): Pulse {
  let last = 0;
  return async (done, total) => {
    const now = performance.now();
    if (now - last >= PROGRESS_EVERY_ms) {
      last = now;
      post({ kind: 'progress', job, done, total });
    }
    await nextTask();
    return cancelled === job ? 'stop' : 'go';
  };
}

self.onmessage = async (event: MessageEvent<ToWorker<Work>>) => {
  const message = event.data;
  if (message.kind === 'cancel') {
    cancelled = message.job;
    return;
  }
  const { job, input } = message;
  try {
    post({ kind: 'done', job, result: await perform(input, pulseOf(job)) });
  } catch (error) {
    const text = error instanceof Error ? error.message : String(error);
    post({ kind: 'failed', job, code: 'internal', message: text });
  }
};
