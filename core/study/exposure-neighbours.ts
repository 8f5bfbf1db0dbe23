import type { Model, ReceptorForm, Stage } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import { unit, type Vec3 } from '../plane/vec.ts';
import type { Checked, Fault } from '../scheme/fault.ts';
import { DEFAULT_YEAR, type Scheme } from '../scheme/schema.ts';
import { pointOn } from '../form/panel.ts';
import type { TreesInLight } from '../sheet/light-trees.ts';
import { sunOnReceptors } from '../shade/exposure.ts';
import { facing, levelGrid, cellsOfOutline } from '../shade/exposure-grid.ts';
import { columnsFor, sortLight } from '../shade/exposure-light.ts';
import { type PeriodSky, periodSky } from '../shade/exposure-period.ts';
import { pointSky } from '../shade/sky-view-mask.ts';
import type { Receptors } from '../shade/skyline-groups.ts';
import { makeOccluders, type Occluders } from '../shade/skyline-occluders.ts';
import {
  type HalfYears,
  halfYears,
  inWinterHalf,
  keptShare,
  probableSunlight,
  type SunlightLevel,
  sunlightLevel,
  sunlitShare,
  weighted,
} from '../shade/sunlight-hours.ts';
import { checkAsk, shadersAt, tooManyPoints } from './exposure.ts';
import { exposureDates } from './exposure-dates.ts';
import type { Pulse } from './job.ts';
import { type BuiltOver, builtShare, receptorNotes } from './receptor-notes.ts';

/** What is asked: a year for probable sunlight, and one date for sun on ground and levels of exposure. */
export type NeighbourAsk = {
  /** Absent: the scheme's year, or 2025. */
  readonly year?: number;
  /** Absent: 21 March of that year. */
  readonly date?: string;
  /** Hours of sun that an area is asked for; absent: 2. */
  readonly hours?: number;
  /** Absent: 5. */
  readonly step_min?: number;
  /** Of the grid on areas; absent: 0.5. */
  readonly spacing_m?: number;
  /** Long-run share of possible sunshine, January to December, 0..1; absent: every hour of sun above the horizon counts. */
  readonly sunshine?: readonly number[];
  /** Whether crowns of trees count; absent: they are left out (common practice, no source). */
  readonly trees?: boolean;
};

/** A number before, after, and after as a share of before. */
export type BeforeAfter = { readonly before: number; readonly after: number; readonly kept: number };

/** The light of a point or a window's centre. */
export type PointLight = {
  readonly kind: 'point' | 'window';
  readonly id: string;
  /** Share of an even dome on its plane, 0..1. */
  readonly skyView: BeforeAfter;
  /** CIE overcast sky on its plane over that on open level ground, 0..1: the vertical sky component where it stands upright. */
  readonly skyComponent: BeforeAfter;
  /** Probable sunlight hours as shares of an open place's year, 0..1. */
  readonly annual: BeforeAfter;
  readonly winter: BeforeAfter;
  /** Sun time on the date [min], and the level that it reaches. */
  readonly sunMinutes: BeforeAfter;
  readonly level: { readonly before: SunlightLevel; readonly after: SunlightLevel };
};

/** The sun of an amenity area: the share of it, built-over parts left out, that has the hours asked for on the date. */
export type AreaLight = { readonly kind: 'area'; readonly id: string; readonly share: BeforeAfter };

export type NeighbourLight = {
  readonly year: number;
  readonly date: string;
  readonly hours: number;
  /** Hours of sun of an open place in the year, as weighted. */
  readonly openHours: number;
  readonly trees: TreesInLight;
  /** In the order of the scheme. */
  readonly receptors: readonly (PointLight | AreaLight)[];
};

/**
 * What neighbours and amenity areas keep of their daylight and sun.
 * @returns null when `pulse` said stop; faults where the question cannot be answered
 */
export async function neighbourLight(
  scheme: Scheme,
  model: Model,
  ask: NeighbourAsk,
  pulse: Pulse,
): Promise<Checked<NeighbourLight> | null> {
  const year = ask.year ?? scheme.year ?? DEFAULT_YEAR;
  const date = ask.date ?? `${year}-03-21`;
  const hours = ask.hours ?? 2;
  const step_min = ask.step_min ?? 5;
  const spacing_m = ask.spacing_m ?? 0.5;
  const days = exposureDates({ year });
  const day = exposureDates({ dates: [date] });
  const faults = [
    ...(days.ok ? [] : days.faults),
    ...(day.ok ? [] : day.faults),
    ...checkNeighbours(model, step_min, spacing_m),
  ];
  if (!days.ok || !day.ok || faults.length > 0) return { ok: false, faults };
  const run: Run = {
    model,
    year: yearOf(scheme, model, days.value, step_min, ask.sunshine ?? null),
    day: periodSky(scheme.site, model.north_rad, day.value, step_min),
    hours,
    spacing_m,
    before: occludersAt(model, 'before', ask.trees ?? false),
    after: occludersAt(model, 'after', ask.trees ?? false),
  };
  const receptors: (PointLight | AreaLight)[] = [];
  const built: (readonly BuiltOver[])[] = [];
  for (const [i, receptor] of model.receptors.entries()) {
    if (receptor.kind === 'area') {
      const area = areaLight(run, receptor);
      receptors.push(area.light);
      built.push(area.built);
    } else {
      receptors.push(pointLight(run, receptor));
      built.push([]);
    }
    if ((await pulse(i + 1, model.receptors.length)) === 'stop') return null;
  }
  const openHours = run.year.open_min / 60;
  const notes = [
    ...treeNotes(scheme, ask),
    ...levelNotes(scheme, date),
    ...receptorNotes(model, ['before', 'after'], built),
  ];
  return { ok: true, value: { year, date, hours, openHours, trees: treesIn(scheme, ask), receptors }, notes };
}

type Run = {
  readonly model: Model;
  readonly year: HalfYears;
  readonly day: PeriodSky;
  readonly hours: number;
  readonly spacing_m: number;
  readonly before: Occluders;
  readonly after: Occluders;
};

const occludersAt = (model: Model, stage: Stage, trees: boolean): Occluders =>
  makeOccluders(solidsAt(model.solids, stage), shadersAt(model, stage), trees ? model.trees : []);

const treesIn = (scheme: Scheme, ask: NeighbourAsk): TreesInLight =>
  scheme.trees.length === 0 ? 'none' : ask.trees === true ? 'counted' : 'left-out';

/** Trees are left out of such figures (common practice, no source). */
function treeNotes(scheme: Scheme, ask: NeighbourAsk): Fault[] {
  if (treesIn(scheme, ask) !== 'left-out') return [];
  return [
    {
      level: 'warning',
      code: 'trees-left-out',
      place: 'trees',
      message: 'the light of neighbours is worked out without the trees',
      cure: 'ask for it with trees where they belong in the comparison, such as a dense belt of evergreens',
    },
  ];
}

/** EN 17037 looks at one day from 1 February to 21 March; in the south no such span was found stated, and nothing is said. */
function levelNotes(scheme: Scheme, date: string): Fault[] {
  const day = date.slice(5);
  if (scheme.site.latitude < 0 || (day >= '02-01' && day <= '03-21')) return [];
  if (scheme.receptors.every((r) => r.kind === 'area')) return [];
  return [
    {
      level: 'warning',
      code: 'level-day',
      place: 'date',
      message: `EN 17037 looks at one day from 1 February to 21 March, not at ${date}`,
      cure: 'read the level of exposure as a comparison only, or ask for a day in that span',
    },
  ];
}

function yearOf(
  scheme: Scheme,
  model: Model,
  dates: readonly string[],
  step_min: number,
  sunshine: readonly number[] | null,
): HalfYears {
  const sky = periodSky(scheme.site, model.north_rad, dates, step_min);
  const southern = scheme.site.latitude < 0;
  const dateOf = (row: number): string => dates[sky.day[row]!] as string;
  const winter = sky.day.map((d) => (inWinterHalf(dates[d] as string, southern) ? 1 : 0));
  const light =
    sunshine === null ? sky.light : weighted(sky.light, (row) => sunshine[Number(dateOf(row).slice(5, 7)) - 1] ?? 1);
  return halfYears(light, Uint8Array.from(winter));
}

const beforeAfter = (before: number, after: number): BeforeAfter => ({ before, after, kept: keptShare(before, after) });

function pointLight(run: Run, r: Exclude<ReceptorForm, { kind: 'area' }>): PointLight {
  const [at, normal] = r.kind === 'point' ? [r.at, unit(r.normal)] : windowCentre(r);
  const [was, is] = [run.before, run.after].map((o) => {
    const receptors = facing([at], normal);
    const p = probableSunlight(o, run.year, receptors);
    const sun = onDate(o, run.day, receptors).minutes[0]!;
    return { ...pointSky(o, at, normal), annual: p.annual[0]!, winter: p.winter[0]!, sun };
  }) as [PointSample, PointSample];
  return {
    kind: r.kind,
    id: r.id,
    skyView: beforeAfter(was.skyView, is.skyView),
    skyComponent: beforeAfter(was.skyComponent, is.skyComponent),
    annual: beforeAfter(was.annual, is.annual),
    winter: beforeAfter(was.winter, is.winter),
    sunMinutes: beforeAfter(was.sun, is.sun),
    level: { before: sunlightLevel(was.sun), after: sunlightLevel(is.sun) },
  };
}

type PointSample = { skyView: number; skyComponent: number; annual: number; winter: number; sun: number };

function windowCentre(r: ReceptorForm): readonly [Vec3, Vec3] {
  if (r.panel === undefined) throw new RangeError(`the model holds no panel for receptor ${JSON.stringify(r.id)}`);
  return [pointOn(r.panel, r.panel.width_m / 2, r.panel.height_m / 2, 0), r.panel.normal];
}

/** An area's share with so many hours of sun, and how much of it is built over before and after. */
function areaLight(
  run: Run,
  r: Extract<ReceptorForm, { kind: 'area' }>,
): { readonly light: AreaLight; readonly built: readonly BuiltOver[] } {
  const { receptors } = levelGrid(r.outline, r.level, run.spacing_m);
  const was = onDate(run.before, run.day, receptors);
  const is = onDate(run.after, run.day, receptors);
  const share = (sun: typeof was): number => sunlitShare(sun.minutes, sun.covered, run.hours);
  return {
    light: { kind: 'area', id: r.id, share: beforeAfter(share(was), share(is)) },
    built: [
      { stage: 'before', share: builtShare(was.covered) },
      { stage: 'after', share: builtShare(is.covered) },
    ],
  };
}

const onDate = (o: Occluders, day: PeriodSky, receptors: Receptors) =>
  sunOnReceptors(o, sortLight(day.light, columnsFor(day.light.sx.length)), receptors);

function checkNeighbours(model: Model, step_min: number, spacing_m: number): Fault[] {
  const points = model.receptors.reduce(
    (sum, r) => sum + (r.kind === 'area' ? cellsOfOutline(r.outline, spacing_m) : 1),
    0,
  );
  return [...checkAsk(step_min, spacing_m, 366), ...tooManyPoints(points)];
}
