import { availableParallelism } from 'node:os';
import { Option } from 'commander';
import { CAUTIONS } from '../../core/limits/cautions.ts';
import type { Checked } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { ExposureDates } from '../../core/study/exposure-dates.ts';
import type { ExposureResult } from '../../core/study/exposure.ts';
import type { Declare } from './declare.ts';
import { counted, hoursText, lowSunText, periodText } from './exposure-words.ts';
import { dates, number, shares, whole } from './option-values.ts';
import { progress } from './progress.ts';
import { accepted, readScheme } from './read-input.ts';
import { Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';
import { table } from './table.ts';

type Options = {
  readonly on?: readonly string[];
  readonly between?: readonly string[];
  readonly year?: number;
  readonly step: number;
  readonly spacing?: number;
  readonly threads?: number;
  readonly before?: true;
  readonly map?: readonly string[];
  readonly light?: true;
  readonly hours?: number;
  readonly sunshine?: readonly number[];
  readonly trees?: true;
  readonly json?: true;
  readonly csv?: true;
};

const HELP = `
Without --on, --between and --year: 21 March of the scheme's year. Energy is that of a clear sky, in Wh/m² on the receptor's own plane;
its sky light comes from an even dome, where check spreads it as the scheme says (Perez unless told otherwise). An area's numbers are the
means of its points that are not built over. Light passes the crowns of trees as each month says; --light leaves trees
out unless --trees is given (common practice, no source).

--map gives each point of the ground, of walls and of roofs, before and after, with the change; --light what receptors keep of their
daylight and sun: sky view factor, sky component, annual and winter probable sunlight hours, sun on one date with its level, and the
share of areas with so many hours of sun.

Examples:
  shadewright exposure scheme.json --on 2025-03-21
  shadewright exposure scheme.json --between 2025-04-01 2025-09-30 --step 10 --json
  shadewright exposure scheme.json --year 2025 --csv > year.csv
  shadewright exposure scheme.json --map ground N4 --year 2025 --spacing 2 --csv > map.csv
  shadewright exposure scheme.json --light --on 2025-03-21 --hours 2`;

/** The period asked for: at most one way of saying it. */
async function periodOf(scheme: Scheme, { on, between, year }: Options): Promise<ExposureDates> {
  if ([on, between, year].filter((said) => said !== undefined).length > 1)
    throw new Refusal(
      'shadewright exposure: only one of --on, --between and --year can say when; leave out the others.',
    );
  if (between) {
    const [first, last, ...more] = between;
    if (first === undefined || last === undefined || more.length > 0)
      throw new Refusal(
        'shadewright exposure: --between takes two dates, the first and the last day; give --between 2025-04-01 2025-09-30.',
      );
    return { between: [first, last] };
  }
  if (year !== undefined) return { year };
  if (on) return { dates: on };
  const { DEFAULT_YEAR } = await import('../../core/scheme/schema.ts');
  return { dates: [`${scheme.year ?? DEFAULT_YEAR}-03-21`] };
}

const COLUMNS = ['id', 'sunMinutes', 'beam', 'sky', 'ground'] as const;

type Row = Pick<ExposureResult['receptors'][number], (typeof COLUMNS)[number]>;

function asText(rows: readonly Row[], result: ExposureResult, lowSun: number | undefined): string {
  return [
    `Sun on ${counted(rows.length, 'receptor')}, ${result.stage} the proposal: ${periodText(result.dates)}, sampled every ${counted(result.step_min, 'minute')}; clear sky${lowSunText(lowSun)}.`,
    '',
    table(
      [
        { head: 'receptor', align: 'left' },
        { head: 'direct sun', align: 'right' },
        { head: 'beam Wh/m²', align: 'right' },
        { head: 'sky Wh/m²', align: 'right' },
        { head: 'ground Wh/m²', align: 'right' },
      ],
      rows.map((row) => [
        row.id,
        hoursText(row.sunMinutes),
        row.beam.toFixed(0),
        row.sky.toFixed(0),
        row.ground.toFixed(0),
      ]),
    ),
    ...CAUTIONS,
    '',
  ].join('\n');
}

async function asCsv(rows: readonly Row[]): Promise<string> {
  const { writeCsv } = await import('../../core/sheet/csv.ts');
  return writeCsv({
    header: ['id', 'sun minutes', 'beam Wh/m²', 'sky Wh/m²', 'ground Wh/m²'],
    rows: rows.map((row) => COLUMNS.map((column) => row[column])),
  });
}

/** Unwraps a study that nothing can stop, and refuses with its faults. */
function answered<T>(path: string, study: Checked<T> | null, screen: Screen): T {
  if (study === null) throw new Error('the study was stopped');
  return accepted(study.ok ? path : 'shadewright exposure', study, screen);
}

type Run = { readonly path: string; readonly scheme: Scheme; readonly options: Options; readonly screen: Screen };

const threadsOf = ({ threads }: Options): number => threads ?? availableParallelism();

async function receptorsOut({ path, scheme, options, screen }: Run): Promise<string> {
  const period = await periodOf(scheme, options);
  const [{ exposureStudy }, { buildModel }, { withThreads }] = await Promise.all([
    import('../../core/study/exposure.ts'),
    import('../../core/form/build-model.ts'),
    import('./tile-threads.ts'),
  ]);
  const ask = {
    ...period,
    step_min: options.step,
    spacing_m: options.spacing ?? 1,
    stage: options.before ? ('before' as const) : ('after' as const),
  };
  const { pulse, done } = progress(screen, 'adding up');
  const study = await withThreads(threadsOf(options), (run) =>
    exposureStudy(scheme, buildModel(scheme), ask, pulse, run),
  );
  done();
  const result = answered(path, study, screen);
  const rows = result.receptors.map(
    ({ id, sunMinutes, beam, sky, ground }): Row => ({ id, sunMinutes, beam, sky, ground }),
  );
  if (options.json) return `${JSON.stringify(rows, null, 2)}\n`;
  return options.csv ? asCsv(rows) : asText(rows, result, scheme.site.lowSun);
}

async function mapOut({ path, scheme, options, screen }: Run, named: readonly string[]): Promise<string> {
  const period = await periodOf(scheme, options);
  const [{ exposureMap }, { buildModel }, { withThreads }, words] = await Promise.all([
    import('../../core/study/exposure-map.ts'),
    import('../../core/form/build-model.ts'),
    import('./tile-threads.ts'),
    import('./exposure-map-text.ts'),
  ]);
  const model = buildModel(scheme);
  const surfaces = words.surfacesNamed(model, named);
  const ask = { ...period, surfaces, step_min: options.step, spacing_m: options.spacing ?? 1 };
  const { pulse, done } = progress(screen, 'mapping');
  const study = await withThreads(threadsOf(options), (run) => exposureMap(scheme, model, ask, pulse, run));
  done();
  const map = answered(path, study, screen);
  return options.json ? words.mapJson(map) : options.csv ? words.mapCsv(map) : words.mapText(map, scheme.site.lowSun);
}

async function lightOut({ path, scheme, options, screen }: Run): Promise<string> {
  if (options.between !== undefined || (options.on?.length ?? 0) > 1)
    throw new Refusal(
      'shadewright exposure: --light asks a year (--year) and one date (--on) for sun on the ground; leave out --between and further dates.',
    );
  const [{ neighbourLight }, { buildModel }, words] = await Promise.all([
    import('../../core/study/exposure-neighbours.ts'),
    import('../../core/form/build-model.ts'),
    import('./exposure-light-text.ts'),
  ]);
  const [on] = options.on ?? [];
  const year = options.year ?? (on === undefined ? undefined : Number(on.slice(0, 4)));
  const ask = {
    step_min: options.step,
    ...(year === undefined ? {} : { year }),
    ...(on === undefined ? {} : { date: on }),
    ...(options.hours === undefined ? {} : { hours: options.hours }),
    ...(options.spacing === undefined ? {} : { spacing_m: options.spacing }),
    ...(options.sunshine === undefined ? {} : { sunshine: options.sunshine }),
    trees: options.trees === true,
  };
  const { pulse, done } = progress(screen, 'weighing light');
  const study = await neighbourLight(scheme, buildModel(scheme), ask, pulse);
  done();
  const light = answered(path, study, screen);
  return options.json
    ? words.lightJson(light)
    : options.csv
      ? words.lightCsv(light)
      : words.lightText(light, scheme.site.lowSun);
}

/** What goes with one kind of question only. */
function checkPairs({ map, light, before, json, csv, ...rest }: Options): void {
  const together = (a: string, b: string): Refusal =>
    new Refusal(`shadewright exposure: both ${a} and ${b} were given; give one of the two.`);
  if (json && csv) throw together('--json', '--csv');
  if (map && light) throw together('--map', '--light');
  if (before && (map || light)) throw together('--before', map ? '--map' : '--light');
  for (const [option, given] of [
    ['--hours', rest.hours],
    ['--sunshine', rest.sunshine],
    ['--trees', rest.trees],
  ] as const)
    if (given !== undefined && !light)
      throw new Refusal(`shadewright exposure: ${option} goes with --light; add --light or leave it out.`);
}

/** `shadewright exposure`: sun and energy on the receptors of a scheme, on its surfaces, and what receptors keep of their light. */
export const declareExposure: Declare = (program, screen) => {
  program
    .command('exposure')
    .description('add up sun hours and energy on receptors and surfaces, and what receptors keep of their light')
    .argument('<SCHEME>', 'the scheme file')
    .option('--on <DATES...>', 'civil dates', dates)
    .option('--between <DATES...>', 'the first and the last civil date', dates)
    .option('--year <Y>', 'a whole civil year', whole(1900, 2100, 'a year'))
    .addOption(new Option('--step <MIN>', 'minutes between samples').argParser(whole(1, 60, 'minutes')).default(5))
    .option('--spacing <M>', 'between points of areas and maps: 1, with --light 0.5', number(0.01, 1000, 'metres'))
    .option('--before', 'as it stands now, without the proposal')
    .option('--map <WHAT...>', 'a map of ground, walls, roofs or the block of an id, before and after')
    .option('--light', 'what receptors keep of their daylight and sun')
    .option('--hours <N>', 'with --light: hours of sun that areas are asked for (2)', number(0.1, 24, 'hours'))
    .option('--sunshine <SHARES>', 'with --light: twelve monthly shares of possible sunshine', shares)
    .option('--trees', 'with --light: count the crowns of trees too')
    .option('--threads <N>', 'worker threads that share the work (all cores)', whole(1, 64, 'threads'))
    .option('--json', 'print JSON')
    .option('--csv', 'print CSV')
    .addHelpText('after', HELP)
    .action(async (path: string, options: Options) => {
      checkPairs(options);
      const { scheme } = await readScheme(path, screen);
      const run = { path, scheme, options, screen };
      screen.out(
        options.map ? await mapOut(run, options.map) : options.light ? await lightOut(run) : await receptorsOut(run),
      );
    });
};
