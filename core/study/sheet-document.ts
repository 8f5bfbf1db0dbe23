import type { Model } from '../form/model.ts';
import { createCheckMemo } from '../gain/gain-memo.ts';
import type { LimitSet } from '../limits/limit-set.ts';
import type { Checked, Fault } from '../scheme/fault.ts';
import { schemeHash } from '../scheme/hash.ts';
import { DEFAULT_YEAR, type Scheme, type SheetSet } from '../scheme/schema.ts';
import type { Document } from '../sheet/drawing.ts';
import { findingsReport } from '../sheet/findings-report.ts';
import { lightReport } from '../sheet/light-report.ts';
import { sectionSheet } from '../sheet/section-sheet.ts';
import { shadowSheet } from '../sheet/shadow-sheet.ts';
import type { SheetUnits } from '../sheet/sheet-units.ts';
import { sunPathDocument } from '../sheet/sun-path.ts';
import { shortHash } from '../sheet/title-block.ts';
import { civilOf, isDate } from '../sun/civil.ts';
import { seasons } from '../sun/seasons.ts';
import { sunPath } from '../sun/sun-path.ts';
import { checkScheme } from './check.ts';
import type { CheckResult } from './check-result.ts';
import { ENGINE_VERSION } from './engine.ts';
import { neighbourLight } from './exposure-neighbours.ts';
import type { Pulse } from './job.ts';
import { exposurePlanSheet, facadeSheet } from './map-sheets.ts';
import { isSheetKind, SHEET_KINDS } from './sheet-kinds.ts';
import { shadowMoment } from './shadow-moments.ts';
import { waysOfOver } from './ways-of-over.ts';
import type { WeatherInput } from './weather-input.ts';
import { windowMask } from './window-mask.ts';

/** What a sheet is told beyond the scheme and its own settings. */
export type SheetContext = {
  /** Date of the drawing, YYYY-MM-DD, handed in: nothing here reads a clock. */
  readonly drawn: string;
  /** What findings are judged by; null: metrics without verdicts. Other sheets do not ask for it. */
  readonly limitSet: LimitSet | null;
  /** The year of weather that findings look at besides the design days; absent or null: none. */
  readonly weather?: WeatherInput | null;
  /** Warnings of the loader, which findings print. */
  readonly notes?: readonly Fault[];
  /** A check of this very scheme by this very set, so that findings need not run it again. */
  readonly check?: CheckResult;
  /** BCP 47; absent: en-GB. */
  readonly language?: string;
};

/** Moments of one set of sheets: more would be days of drawing, and a mistake. */
export const MOST_MOMENTS = 2000;
/** The times of a set that names none. */
export const USUAL_TIMES = ['09:00', '12:00', '15:00'] as const;

/** The dates of a set that names none. */
export function usualDates(scheme: Scheme): readonly string[] {
  const year = scheme.year ?? DEFAULT_YEAR;
  return [`${year}-03-21`, `${year}-06-21`, `${year}-12-21`];
}

/** Solstices and equinoxes of the scheme's year, each on the date that the site's calendar shows at that instant. */
export function seasonDates(scheme: Scheme): readonly string[] {
  const at = seasons(scheme.year ?? DEFAULT_YEAR);
  return [at.marchEquinox_ms, at.juneSolstice_ms, at.septemberEquinox_ms, at.decemberSolstice_ms].map(
    (instant_ms) => civilOf(instant_ms, scheme.site.zone).date,
  );
}

/**
 * Any sheet of a scheme from its saved settings: what command, desk and print draw.
 * @param model  `buildModel(scheme)`
 * @param set    its `kind` one of `SHEET_KINDS`; no dates: 21 March, June and December; no times: 09:00, 12:00, 15:00; no scale: best fit
 * @param pulse  called between pieces of long work
 * @returns      null when `pulse` said stop; faults, each with its cure, where the sheet cannot be drawn
 */
export async function sheetDocument(
  scheme: Scheme,
  model: Model,
  set: SheetSet,
  context: SheetContext,
  pulse: Pulse,
): Promise<Checked<Document> | null> {
  if (!isSheetKind(set.kind))
    return refuse(
      'unknown-sheet',
      'kind',
      `no sheet is called ${JSON.stringify(set.kind)}`,
      `known: ${SHEET_KINDS.join(', ')}`,
    );
  const badDate = set.dates.findIndex((d) => !isDate(d) || d < '1900' || d >= '2101');
  if (badDate >= 0)
    return refuse(
      'bad-date',
      `dates[${badDate}]`,
      `${JSON.stringify(set.dates[badDate])} is no date of the years 1900 to 2100`,
      'write it as year-month-day, such as 2025-06-21',
    );
  const badTime = set.times.findIndex((t) => !/^([01]\d|2[0-3]):[0-5]\d$/u.test(t));
  if (badTime >= 0)
    return refuse(
      'bad-time',
      `times[${badTime}]`,
      `${JSON.stringify(set.times[badTime])} is no time of the clock`,
      'write it as hours and minutes, such as 09:00',
    );
  const job: SheetJob = { scheme, model, set, context, pulse, ...factsOf(scheme, set, context) };
  switch (set.kind) {
    case 'shadow-study':
      return shadowStudy(job);
    case 'sun-path':
      return sunPathSheets(job);
    case 'facades':
      return facadeSheet(scheme, model, mapAsk(job), pulse);
    case 'exposure-plan':
      return exposurePlanSheet(scheme, model, mapAsk(job), pulse);
    case 'section':
      return section(job);
    case 'light':
      return light(job);
    case 'findings':
      return findings(job);
  }
}

type Facts = {
  readonly drawn: string;
  readonly engine: string;
  readonly hash: string;
  readonly number?: string;
  readonly units?: SheetUnits;
  readonly language?: string;
};
type SheetJob = {
  readonly scheme: Scheme;
  readonly model: Model;
  readonly set: SheetSet;
  readonly context: SheetContext;
  readonly pulse: Pulse;
  readonly facts: Facts;
  readonly dates: readonly string[];
};

function factsOf(scheme: Scheme, set: SheetSet, context: SheetContext): Pick<SheetJob, 'facts' | 'dates'> {
  return {
    dates: set.dates.length > 0 ? set.dates : usualDates(scheme),
    facts: {
      drawn: context.drawn,
      engine: ENGINE_VERSION,
      hash: schemeHash(scheme),
      ...(set.number === undefined ? {} : { number: set.number }),
      ...(set.units === undefined ? {} : { units: set.units }),
      ...(context.language === undefined ? {} : { language: context.language }),
    },
  };
}

const mapAsk = ({ set, dates, facts }: SheetJob) => ({
  ...facts,
  dates,
  scale: set.scale ?? null,
  paper: set.paper,
  landscape: set.landscape,
  ...(set.block === undefined ? {} : { block: set.block }),
});

async function shadowStudy(job: SheetJob): Promise<Checked<Document> | null> {
  const { scheme, model, set, dates, facts, pulse } = job;
  const times = set.times.length > 0 ? set.times : USUAL_TIMES;
  const count = dates.length * times.length;
  if (count > MOST_MOMENTS)
    return refuse(
      'too-many-moments',
      '',
      `${count} moments are asked for, more than ${MOST_MOMENTS}`,
      'take fewer dates or times',
    );
  const moments = [];
  for (const date of dates) {
    for (const time of times) {
      moments.push(shadowMoment(scheme, model, date, time));
      if ((await pulse(moments.length, count)) === 'stop') return null;
    }
  }
  return shadowSheet({
    ...facts,
    scheme,
    model,
    moments,
    scale: set.scale ?? null,
    paper: set.paper,
    landscape: set.landscape,
    ...(set.perPage === undefined ? {} : { perPage: set.perPage }),
  });
}

async function sunPathSheets({ scheme, model, set, facts }: SheetJob): Promise<Checked<Document>> {
  const { site } = scheme;
  const observer = { latitude_deg: site.latitude, longitude_deg: site.longitude, elevation_m: site.elevation };
  const hidden = set.window === undefined ? null : windowMask(model, set.window);
  if (set.window !== undefined && hidden === null) return noWindow(set.window);
  const input = {
    path: sunPath(observer, site.zone, scheme.year ?? DEFAULT_YEAR),
    place: { name: scheme.title, zone: site.zone, ...observer },
    moment: null,
    mask: hidden === null ? null : { of: placeWords(model, set.window ?? ''), hidden },
  };
  const inputs = (['stereographic', 'altitude-azimuth'] as const).map((projection) => ({ ...input, projection }));
  const value = sunPathDocument(inputs, set.paper, set.landscape, {
    title: scheme.title,
    author: scheme.author,
    language: facts.language ?? 'en-GB',
    note: `scheme ${shortHash(facts.hash)}, drawn ${facts.drawn}`,
    block: {
      scheme,
      facts: { number: facts.number ?? '', date: facts.drawn, engine: facts.engine, hash: facts.hash },
    },
  });
  return { ok: true, value, notes: [] };
}

async function section({ scheme, model, set, facts }: SheetJob): Promise<Checked<Document>> {
  if (set.window === undefined) return noWindow(null);
  return sectionSheet({
    ...facts,
    scheme,
    model,
    window: set.window,
    scale: set.scale ?? null,
    paper: set.paper,
  });
}

async function light({ scheme, model, set, dates, facts, pulse }: SheetJob): Promise<Checked<Document> | null> {
  if (model.receptors.length === 0)
    return refuse(
      'no-receptors',
      'receptors',
      'the scheme has no amenity area and no neighbour’s window to report on',
      'add areas, windows of neighbours or points',
    );
  const [first] = dates;
  const found = await neighbourLight(
    scheme,
    model,
    { ...(set.dates.length > 0 && first !== undefined ? { date: first } : {}), trees: set.trees === true },
    pulse,
  );
  if (found === null || !found.ok) return found;
  return { ok: true, value: lightReport({ ...facts, scheme, light: found.value }), notes: found.notes };
}

async function findings({ scheme, context, facts, pulse }: SheetJob): Promise<Checked<Document> | null> {
  const { limitSet } = context;
  const memo = createCheckMemo(Math.max(600, scheme.windows.length));
  const weather = context.weather ?? null;
  const result = context.check ?? (await checkScheme(scheme, limitSet, context.notes ?? [], pulse, { memo, weather }));
  if (result === null) return null;
  const ways = await waysOfOver(result, scheme, memo, pulse, weather?.months ?? null);
  if (ways === null) return null;
  const { drawn, language } = facts;
  const value = findingsReport(result, scheme, { drawn, ways, ...(language === undefined ? {} : { language }) });
  return { ok: true, value, notes: [] };
}

/** What a mask is of, in words. */
const placeWords = (model: Model, id: string): string =>
  model.receptors.some((r) => r.id === id && r.kind === 'point') ? `point ${id}` : `window ${id}`;

const noWindow = (id: string | null): Checked<never> =>
  refuse(
    'no-such-window',
    'window',
    id === null ? 'no window is named for the sheet' : `the scheme has no window ${JSON.stringify(id)}`,
    'name one of the scheme’s windows',
  );

function refuse(code: string, place: string, message: string, cure: string): Checked<never> {
  return { ok: false, faults: [{ level: 'error', code, place, message, cure }] };
}
