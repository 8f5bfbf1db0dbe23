import { useEffect, useState } from 'preact/hooks';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { AnswerOf, AskOf, Task } from './tasks.ts';
import type { WorkerHand } from './worker-hand.ts';

/** What a panel knows of the work it asked for. `value` stays the last answer while a newer one is worked out. */
export type Study<T> = {
  readonly value: T | null;
  readonly isWorking: boolean;
  /** What went wrong, or null. */
  readonly failure: string | null;
};

const NOTHING = { value: null, isWorking: false, failure: null } as const;

/**
 * Asks a worker for something as long as a panel shows it, anew whenever scheme or key change.
 * @param key  names the question; null asks nothing
 */
export function useStudy<T extends Task>(
  hand: WorkerHand,
  task: T,
  ask: AskOf<T>,
  scheme: Scheme,
  key: string | null,
): Study<AnswerOf<T>> {
  const [study, setStudy] = useState<Study<AnswerOf<T>>>(NOTHING);
  useEffect(() => {
    if (key === null) {
      setStudy(NOTHING);
      return;
    }
    let isWanted = true;
    setStudy((now) => ({ ...now, isWorking: true, failure: null }));
    void hand.run(task, ask, scheme).then((outcome) => {
      if (!isWanted) return;
      if (outcome.kind === 'done' && !outcome.superseded)
        setStudy({ value: outcome.result, isWorking: false, failure: null });
      if (outcome.kind === 'failed') setStudy({ value: null, isWorking: false, failure: outcome.message });
    });
    return () => {
      isWanted = false;
    };
  }, [hand, task, scheme, key]);
  return study;
}
