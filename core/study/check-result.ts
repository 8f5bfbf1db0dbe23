import type { RoomYear } from '../gain/room-year.ts';
import type { RoomDay } from '../gain/series.ts';
import type { Finding } from '../limits/finding.ts';
import type { LimitSet } from '../limits/limit-set.ts';
import type { Fault } from '../scheme/fault.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import type { SkyModel } from '../sky/transpose.ts';
import type { WeatherUsed } from './weather-input.ts';

/** Everything that a check of a scheme gives: findings, and the columns that they were read from. */
export type CheckResult = {
  /** Version of the engine, from package.json. */
  readonly engine: string;
  /** Content hash of the canonical scheme, hexadecimal. */
  readonly schemeHash: string;
  readonly title: string;
  readonly zone: string;
  readonly latitude_deg: number;
  /** How the sky's light is spread over the dome. */
  readonly skyModel: SkyModel;
  /** Null when the scheme has chosen no set: metrics, and no verdict. */
  readonly limitSet: LimitSet | null;
  readonly days: readonly DayGrid[];
  /** The year of weather that was looked at besides; null: none. */
  readonly weather: WeatherUsed | null;
  readonly rooms: readonly RoomResult[];
  /** Worst first: by margin as a share of the limit, then room id. */
  readonly findings: readonly Finding[];
  /** Rooms by their worst verdict. */
  readonly counts: { readonly over: number; readonly close: number; readonly within: number };
  /** Warnings of the scheme and of the methods. */
  readonly notes: readonly Fault[];
  readonly cautions: readonly string[];
};

export type RoomResult = {
  readonly room: string;
  readonly name: string;
  readonly use: string;
  readonly block: string;
  readonly floor_m2: number;
  readonly glass_m2: number;
  /** Opening area of its windows over floor area. */
  readonly glazingToFloor: number;
  /** Openings in walls over the outside walls of the room, inner side; null where it has none. */
  readonly glazingToWall: number | null;
  readonly windows: readonly WindowResult[];
  /** What it takes in over the weather year; null where the check had none. */
  readonly year: RoomYear | null;
  readonly days: readonly RoomDay[];
};

export type WindowResult = {
  readonly window: string;
  readonly bearing_deg: number;
  readonly tilt_deg: number;
  readonly opening_m2: number;
  readonly glass_m2: number;
  readonly g: number;
  /** Share of the sky dome's light that reaches the glass (cosine-weighted), open vertical glass 0.5; trees as in the mean of the year. */
  readonly skyShare: number;
  /** Visible share of the horizon band in front, 0..1. */
  readonly horizonShare: number;
  /** The ground's counterpart of `skyShare`: open vertical glass 0.5. */
  readonly groundShare: number;
};
