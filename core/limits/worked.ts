import type { RoomYear } from '../gain/room-year.ts';
import type { RoomDay } from '../gain/series.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import type { SkyModel } from '../sky/transpose.ts';
import type { WorkingStep } from './finding.ts';
import type { LimitSet } from './limit-set.ts';

/** What of a check's result a working is read from. A `CheckResult` is one. */
export type Worked = {
  readonly zone: string;
  readonly skyModel: SkyModel;
  readonly limitSet: LimitSet | null;
  readonly days: readonly DayGrid[];
  readonly rooms: readonly {
    readonly room: string;
    readonly floor_m2: number;
    readonly windows: readonly WorkedWindow[];
    readonly days: readonly RoomDay[];
    readonly year?: RoomYear | null;
  }[];
  readonly weather?: { readonly file: string; readonly kind: string } | null;
};

export type WorkedWindow = {
  readonly window: string;
  readonly bearing_deg: number;
  readonly tilt_deg: number;
  readonly opening_m2: number;
  readonly glass_m2: number;
  readonly skyShare: number;
};

type Extra = { readonly formula?: string; readonly place?: string; readonly note?: string };

/** One line of a working. */
export const line = (label: string, value: number | string, unit: string, extra: Extra = {}): WorkingStep => ({
  label,
  value,
  unit,
  ...extra,
});

/** Place of an entry of the scheme by its id, such as `windows[2]`; empty when it is not there. */
export function placeOfId(entries: readonly { readonly id: string }[], id: string, list: string): string {
  const at = entries.findIndex((e) => e.id === id);
  return at < 0 ? '' : `${list}[${at}]`;
}
