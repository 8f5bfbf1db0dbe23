import type { Pulse } from '../../core/study/job.ts';
import type { Screen } from './screen.ts';

const BETWEEN_ms = 100;

/**
 * A pulse for long work: about ten times a second it rewrites one line on the notes' stream, when a person watches it, and
 * lets the program hear an interrupt. `done` wipes the line.
 */
export function progress(screen: Screen, what: string): { readonly pulse: Pulse; readonly done: () => void } {
  let last_ms = performance.now();
  let isDrawn = false;
  return {
    pulse: async (done, total) => {
      const now_ms = performance.now();
      if (now_ms - last_ms < BETWEEN_ms) return 'go';
      last_ms = now_ms;
      if (screen.isWatched) {
        isDrawn = true;
        screen.redraw(`${what}: ${Math.floor((100 * done) / Math.max(total, 1))} %`);
      }
      await new Promise((go) => setImmediate(go));
      return 'go';
    },
    done: () => {
      if (isDrawn) screen.redraw('');
    },
  };
}
