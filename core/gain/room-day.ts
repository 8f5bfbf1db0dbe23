import type { RoomDay, WindowDay } from './series.ts';

/**
 * What a room takes in on a day: the sum of its windows, step by step.
 * @param steps number of steps of the day, for a room without windows
 */
export function roomDay(room: string, day: string, windows: readonly WindowDay[], steps: number): RoomDay {
  const total_W = new Float64Array(steps);
  for (const window of windows) for (let i = 0; i < steps; i++) total_W[i] = total_W[i]! + window.total_W[i]!;
  return { room, day, total_W, windows };
}

/** Energy of a column of watts over a day [Wh]. */
export function energy_Wh(watts: Float64Array, step_min: number): number {
  let sum = 0;
  for (const w of watts) sum += w;
  return (sum * step_min) / 60;
}
