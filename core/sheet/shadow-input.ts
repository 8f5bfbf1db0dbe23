import type { Model } from '../form/model.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { PaperName } from './paper.ts';
import type { SheetUnits } from './sheet-units.ts';
import type { ShadowMoment } from './shadow-moment.ts';

export type ShadowSheetInput = {
  readonly scheme: Scheme;
  readonly model: Model;
  /** In the order in which they are drawn: along the rows. */
  readonly moments: readonly ShadowMoment[];
  /** Such as 500 for 1:500; null: the largest standard scale that shows the scheme and the shadow it adds. */
  readonly scale: number | null;
  readonly paper: PaperName;
  readonly landscape: boolean;
  /** Diagrams a page, at most. */
  readonly perPage?: number;
  /** Level of the ground that the shadows were worked out on [m]. */
  readonly level_m?: number;
  /** Drawing number. */
  readonly number?: string;
  /** Date of the drawing, YYYY-MM-DD. */
  readonly drawn: string;
  readonly engine: string;
  readonly hash: string;
  readonly language?: string;
  /** Absent: metric. */
  readonly units?: SheetUnits;
};

/** What the sheet is called. */
export const SUBJECT = 'Shadow study';
