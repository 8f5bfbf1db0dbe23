import type { Model } from '../form/model.ts';
import type { Finding } from '../limits/finding.ts';
import type { Worked, WorkedWindow } from '../limits/worked.ts';
import type { Fault } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { Ways } from '../sizing/ways.ts';

/** What of a check the report prints. A `CheckResult` is one. */
export type ReportResult = Omit<Worked, 'rooms'> & {
  readonly engine: string;
  readonly schemeHash: string;
  readonly title: string;
  readonly rooms: readonly ReportRoom[];
  /** Worst first. */
  readonly findings: readonly Finding[];
  readonly counts: { readonly over: number; readonly close: number; readonly within: number };
  readonly notes: readonly Fault[];
  readonly cautions: readonly string[];
};

export type ReportRoom = Omit<Worked['rooms'][number], 'windows'> & {
  readonly name: string;
  readonly use: string;
  readonly block: string;
  readonly glass_m2: number;
  readonly glazingToFloor: number;
  readonly glazingToWall: number | null;
  readonly windows: readonly (WorkedWindow & { readonly g: number })[];
};

/** What the report may be told beyond the check and its scheme. */
export type ReportExtra = {
  /** Date of the report, YYYY-MM-DD, handed in. */
  readonly drawn?: string;
  /** Ways to pass that were worked out, for any of the findings. */
  readonly ways?: readonly Ways[];
  readonly language?: string;
};

/** Everything the pages of a report are drawn from. */
export type Report = {
  readonly result: ReportResult;
  readonly scheme: Scheme;
  /** The scheme as shapes, for the plans. */
  readonly model: Model;
  readonly ways: readonly Ways[];
  readonly drawn: string;
};
