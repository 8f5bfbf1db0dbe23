import { signal } from '@preact/signals';
import type { WeatherAtHand } from '../jobs/tasks.ts';

/** The weather file that the open scheme goes by, when it has been chosen in this session: checks look at its year besides. */
export const weatherAtHand = signal<WeatherAtHand | null>(null);
