import { signal } from '@preact/signals';
import type { CheckResult } from '../../core/study/check-result.ts';
import type { WeatherAtHand } from '../jobs/tasks.ts';

/** The weather file that the open scheme goes by, when it has been chosen in this session: checks look at its year besides. */
export const weatherAtHand = signal<WeatherAtHand | null>(null);

/** The file that a check looked at: null where it looked at none, or at one that is no longer at hand. */
export function weatherOf(result: CheckResult): WeatherAtHand | null {
  const at = weatherAtHand.peek();
  return at !== null && result.weather?.hash === at.hash ? at : null;
}
