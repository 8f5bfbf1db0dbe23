import type { Model, Stage } from '../../core/form/model.ts';
import type { Checked, Fault } from '../../core/scheme/fault.ts';
import type { ShadingMask } from '../../core/shade/sky-view-mask.ts';
import type { Scheme, SheetSet } from '../../core/scheme/schema.ts';
import type { LimitSet } from '../../core/limits/limit-set.ts';
import type { SkyModel } from '../../core/sky/transpose.ts';
import type { Finding } from '../../core/limits/finding.ts';
import type { Bar } from '../../core/sizing/sensitivity.ts';
import type { Sweep, Swept } from '../../core/sizing/sweep.ts';
import type { Ways } from '../../core/sizing/ways.ts';
import type { Document } from '../../core/sheet/drawing.ts';
import type { TableGuess } from '../../core/sky/weather/guess-table.ts';
import type { WeatherMapping } from '../../core/sky/weather/mapping.ts';
import type { Comparison } from '../../core/study/compare.ts';
import type { CheckResult } from '../../core/study/check-result.ts';
import type { MomentResult } from '../../core/study/moment.ts';
import type { SunYear } from '../../core/study/sun-year.ts';
import type { ExposureMapAsk, MapPlan } from '../../core/study/exposure-map.ts';
import type { NeighbourLight } from '../../core/study/exposure-neighbours.ts';
import type { YearSubject } from '../../core/study/year-subject.ts';
import type { WeatherFacts } from '../../core/study/weather-facts.ts';
import type { Observer } from '../../core/sun/position.ts';
import type { SunPath } from '../../core/sun/sun-path.ts';
import type { WhenSun } from '../../core/sun/when-sun-at.ts';

/** What a day brings: the ends of the day as clock times, for the slider. */
export type DayEnds = {
  readonly date: string;
  readonly sunrise_ms: number | null;
  readonly sunset_ms: number | null;
  readonly transit_ms: number;
  readonly state: 'rises' | 'never-rises' | 'never-sets';
};

/** The weather file that the scheme goes by, as it was chosen in this session. */
export type WeatherAtHand = {
  readonly name: string;
  readonly bytes: Uint8Array;
  readonly hash: string;
  readonly mapping: WeatherMapping | null;
};

/** One finding of a check, and what the check was made with. */
export type FindingAsk = {
  readonly limitSet: LimitSet;
  readonly skyModel: SkyModel;
  readonly weather: WeatherAtHand | null;
  readonly finding: Finding;
};

/** A sheet and what it is told beyond the scheme. */
export type SheetAsk = {
  readonly set: SheetSet;
  readonly drawn: string;
  readonly notes: readonly Fault[];
  /** For findings; other sheets do not look at it. */
  readonly weather: WeatherAtHand | null;
};

/** Everything that workers do for the desk: what is asked, and what comes back. Tasks that need the scheme are sent it once. */
export type Tasks = {
  /** Read a scheme file. */
  read: { ask: { text: string }; answer: Checked<Scheme> };
  /** Write a scheme file. */
  write: { ask: { scheme: Scheme }; answer: string };
  /** The scheme as shapes, and the sun on them at a moment. The model comes only when asked for: it changes less often. */
  moment: {
    ask: { instant_ms: number; date: string; wantModel: boolean };
    answer: { model: Model | null; moment: MomentResult; day: DayEnds };
  };
  /** `weather`: the year at hand, which the scheme goes by. */
  check: { ask: { notes: readonly Fault[]; weather: WeatherAtHand | null }; answer: CheckResult };
  /** Direct sun on something through a year. */
  year: { ask: { subject: YearSubject; stage: Stage; year: number }; answer: SunYear };
  /** What receptors keep of their daylight and sun, or what a window of the proposal has of it. */
  light: { ask: { window: string | null; trees: boolean }; answer: Checked<NeighbourLight> };
  /** The points and jobs of an exposure map, for the pool. @see map-run.ts */
  mapPlan: { ask: ExposureMapAsk; answer: Checked<MapPlan> };
  /** The lines of the sun path. `window`: what hides the sky from it is wanted too, and the scheme is needed. */
  sunPath: {
    ask: { observer: Observer; zone: string; year: number; window: string | null };
    answer: { path: SunPath; mask: ShadingMask | null };
  };
  /** When the sun comes nearest to a direction. */
  whenSun: {
    ask: { observer: Observer; azimuth_rad: number; altitude_rad: number; near_ms: number };
    answer: WhenSun;
  };
  /** The zone that a place most likely keeps, null where none is known; and whether a zone given strays far from the sun there. */
  zoneOf: {
    ask: { latitude: number; longitude: number; zone: string; instant_ms: number };
    answer: { suggested: string | null; isOdd: boolean };
  };
  /** A weather file read and summed up; `guess` comes with a table that does not say what its columns are. */
  weather: {
    ask: { bytes: Uint8Array; mapping: WeatherMapping | null; observer: Observer; zone: string };
    answer: { hash: string; facts: Checked<WeatherFacts>; guess: TableGuess | null };
  };
  /** How a room that is over comes within: the smallest change of each lever. */
  ways: { ask: FindingAsk; answer: Ways };
  /** Which input moves a finding most. */
  sensitivity: { ask: FindingAsk; answer: readonly Bar[] };
  /** The sizing of windows on paper. */
  sizingSheet: { ask: { sweep: Sweep; target_Wh: number | null; drawn: string }; answer: Document };
  /** What windows take in over the depths of a device, or the g of its glass. `target_Wh`: summer gain to come down to. */
  sweep: { ask: { windows: readonly string[]; swept: Swept; target_Wh: number | null }; answer: Sweep };
  /** Variants of the scheme side by side; the first is what the others are compared with. */
  compare: {
    ask: {
      variants: readonly { readonly name: string; readonly scheme: Scheme }[];
      weather: WeatherAtHand | null;
    };
    answer: Comparison;
  };
  /** The findings as a file: a table, or the report that can be recomputed. */
  findingsFile: { ask: { result: CheckResult; form: 'csv' | 'json' }; answer: string };
  /** The findings on paper. `drawn`: the date of the drawing, YYYY-MM-DD. */
  report: { ask: { result: CheckResult; drawn: string; weather: WeatherAtHand | null }; answer: Checked<Document> };
  /** Any sheet, from its settings. `drawn`: the date of the drawing, YYYY-MM-DD. */
  sheet: { ask: SheetAsk; answer: Checked<Document> };
  /** The shadows of a study as a table, or as shapes in longitude and latitude. */
  shadowFile: { ask: { set: SheetSet; form: 'csv' | 'geojson' }; answer: string };
};

export type Task = keyof Tasks;
export type AskOf<T extends Task> = Tasks[T]['ask'];
export type AnswerOf<T extends Task> = Tasks[T]['answer'];

/** What is posted to a worker. `scheme` is null when the worker already holds that revision. */
export type Work = {
  readonly task: Task;
  readonly ask: AskOf<Task>;
  readonly revision: number;
  readonly scheme: Scheme | null;
};
