import type { WindowForm } from '../form/model.ts';
import type { RoomGain } from '../gain/gain-run.ts';
import type { RoomYear } from '../gain/room-year.ts';
import type { DayGrid } from '../sky/day-grid.ts';

/** A room with everything that a limit may look at. `year` is there where the check was given a year of weather. */
export type RoomFacts = RoomGain & { readonly year?: RoomYear | null };

/** The site's side of it: the days that were run (those of the rooms first, then the months of a weather year) and where they were. */
export type DayFacts = {
  readonly grids: readonly DayGrid[];
  readonly zone: string;
  readonly latitude_deg: number;
};

export type Bearing = 'N' | 'E' | 'S' | 'W';

/** The quarter a true bearing lies in: N from 315° to 45°, and so on; a bearing on the edge belongs to the next one clockwise. */
export function quarterOf(bearing_deg: number): Bearing {
  const quarters: readonly Bearing[] = ['N', 'E', 'S', 'W'];
  return quarters[Math.floor(((((bearing_deg + 45) % 360) + 360) % 360) / 90)] as Bearing;
}

/** The quarters with the largest opening area; rooflights belong to none. Empty for a room without wall windows. */
export function mostGlazed(windows: readonly WindowForm[]): readonly Bearing[] {
  const area = { N: 0, E: 0, S: 0, W: 0 };
  for (const w of windows) if (w.tilt_deg > 0) area[quarterOf(w.bearing_deg)] += w.opening_m2;
  const most = Math.max(area.N, area.E, area.S, area.W);
  if (!(most > 0)) return [];
  return (['N', 'E', 'S', 'W'] as const).filter((q) => area[q] >= most * (1 - 1e-9));
}
