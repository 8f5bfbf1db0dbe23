import { availableParallelism } from 'node:os';
import { Option } from 'commander';
import type { ExposureDates } from '../../core/study/exposure-dates.ts';
import type { ExposureResult } from '../../core/study/exposure.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { Declare } from './declare.ts';
import { date, dates, number, whole } from './option-values.ts';
import { progress } from './progress.ts';
import { accepted, readScheme } from './read-input.ts';
import { Refusal } from './refusal.ts';
import { table } from './table.ts';

type Options = {
  readonly on?: readonly string[];
  readonly between?: readonly string[];
  readonly year?: number;
  readonly step: number;
  readonly spacing: number;
  readonly threads?: number;
  readonly before?: true;
  readonly json?: true;
  readonly csv?: true;
};

const HELP = `
Without --on, --between and --year: 21 March of the scheme's year. Energy is that of a clear sky, in Wh/m² on the receptor's own plane.
An area's numbers are the means of its points.

Examples:
  shadewright exposure scheme.json --on 2025-03-21
  shadewright exposure scheme.json --between 2025-04-01 2025-09-30 --step 10 --json
  shadewright exposure scheme.json --year 2025 --csv > year.csv`;

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
        '--between: it takes two dates, the first and the last day; give --between 2025-04-01 2025-09-30.',
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

function asText(rows: readonly Row[], result: ExposureResult): string {
  const days = result.dates.length;
  const period = days === 1 ? result.dates[0] : `${days} days, ${result.dates[0]} to ${result.dates.at(-1)}`;
  const hours = (minutes: number) =>
    `${Math.floor(minutes / 60)} h ${String(Math.round(minutes % 60)).padStart(2, '0')}`;
  return [
    `Sun on ${rows.length} receptors, ${result.stage} the proposal: ${period}, sampled every ${result.step_min} minutes; clear sky.`,
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
        hours(row.sunMinutes),
        row.beam.toFixed(0),
        row.sky.toFixed(0),
        row.ground.toFixed(0),
      ]),
    ),
  ].join('\n');
}

async function asCsv(rows: readonly Row[]): Promise<string> {
  const { writeCsv } = await import('../../core/sheet/csv.ts');
  return writeCsv({
    header: ['id', 'sun minutes', 'beam Wh/m²', 'sky Wh/m²', 'ground Wh/m²'],
    rows: rows.map((row) => COLUMNS.map((column) => row[column])),
  });
}

/** `shadewright exposure`: sun and energy on the receptors of a scheme. */
export const declareExposure: Declare = (program, screen) => {
  program
    .command('exposure')
    .description('add up sun hours and energy on the receptors of a scheme')
    .argument('<SCHEME>', 'the scheme file')
    .option('--on <DATES...>', 'civil dates', dates)
    .option(
      '--between <DATES...>',
      'the first and the last civil date',
      (text: string, before: readonly string[] | undefined) => [...(before ?? []), date(text)],
    )
    .option('--year <Y>', 'a whole civil year', whole(1900, 2100, 'a year'))
    .addOption(new Option('--step <MIN>', 'minutes between samples').argParser(whole(1, 60, 'minutes')).default(5))
    .addOption(
      new Option('--spacing <M>', 'between the points of areas').argParser(number(0.01, 1000, 'metres')).default(1),
    )
    .option('--threads <N>', 'worker threads that share the work; all cores unless given', whole(1, 64, 'threads'))
    .option('--before', 'as it stands now, without the proposal')
    .option('--json', 'print JSON')
    .option('--csv', 'print CSV')
    .addHelpText('after', HELP)
    .action(async (path: string, options: Options) => {
      if (options.json && options.csv)
        throw new Refusal('shadewright exposure: both --json and --csv were given; give one of the two.');
      const { scheme } = await readScheme(path, screen);
      const period = await periodOf(scheme, options);
      const [{ exposureStudy }, { buildModel }, { withThreads }] = await Promise.all([
        import('../../core/study/exposure.ts'),
        import('../../core/form/build-model.ts'),
        import('./tile-threads.ts'),
      ]);
      const ask = {
        ...period,
        step_min: options.step,
        spacing_m: options.spacing,
        stage: options.before ? ('before' as const) : ('after' as const),
      };
      const { pulse, done } = progress(screen, 'adding up');
      const study = await withThreads(options.threads ?? availableParallelism(), (run) =>
        exposureStudy(scheme, buildModel(scheme), ask, pulse, run),
      );
      done();
      if (study === null) throw new Error('the study was stopped');
      const result = accepted(study.ok ? path : 'shadewright exposure', study, screen);
      const rows = result.receptors.map(
        ({ id, sunMinutes, beam, sky, ground }): Row => ({ id, sunMinutes, beam, sky, ground }),
      );
      screen.out(
        options.json ? `${JSON.stringify(rows, null, 2)}\n` : options.csv ? await asCsv(rows) : asText(rows, result),
      );
    });
};
