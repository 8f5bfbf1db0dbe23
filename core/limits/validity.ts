import { blindRangeNotes } from '../gain/blind.ts';
import { DEG } from '../units/angle.ts';
import type { Reading } from './reading.ts';
import type { DayFacts, RoomFacts } from './room-facts.ts';

/** Below this the clear-sky models and the air mass are not to be leaned on [°]. */
const LOW_SUN_deg = 2;
/** Windows wider than this see enough of the sky to make one mean of it doubtful [m]; common practice, no source. */
const WIDE_m = 10;

/** Where a number leaves the range of the methods behind it, in words. */
export function validityNotes(facts: RoomFacts, days: DayFacts, reading: Reading): readonly string[] {
  const notes: string[] = [];
  const grid = days.grids.find((g) => g.key === reading.day);
  if (grid && reading.step !== null && reading.value > 0) {
    const altitude_deg = grid.altitude_rad[reading.step]! / DEG;
    if (altitude_deg < LOW_SUN_deg)
      notes.push(`the sun stands at ${altitude_deg.toFixed(1)}°, where clear-sky models are weak`);
  }
  for (const w of facts.windows) {
    if (w.width_m > WIDE_m || w.height_m > WIDE_m)
      notes.push(`window ${w.id} is larger than ${WIDE_m} m: its mean says little about its parts`);
    for (const blind of w.blinds)
      for (const note of blindRangeNotes(w.glass.g, blind)) notes.push(`window ${w.id}: ${note}`);
    for (const blind of w.blinds)
      if (blind.closedAbove === undefined && blind.closedFrom === undefined && blind.closedTo === undefined)
        notes.push(
          `blind ${blind.id} of window ${w.id} says neither when nor above what it is closed, and counts as open`,
        );
  }
  return notes;
}
