import type { CheckMemo } from '../../core/gain/gain-memo.ts';
import type { LimitSet } from '../../core/limits/limit-set.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { WeatherInput } from '../../core/study/weather-input.ts';
import type { CheckResult } from '../../core/study/check-result.ts';
import type { Pulse } from '../../core/study/job.ts';
import { weatherFor } from './weather-for.ts';
import type { Declare } from './declare.ts';
import { keepApart } from './outputs-apart.ts';
import { progress } from './progress.ts';
import { accepted, readLimits, readScheme } from './read-input.ts';
import { EXIT, Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';
import { today } from './today.ts';
import { writeOutput } from './write-output.ts';

type Options = {
  readonly limits?: string;
  readonly json?: true;
  readonly csv?: true;
  readonly pdf?: string;
  readonly working?: string;
  readonly weather?: string;
};

const HELP = `
Rooms are judged by the limit set that the scheme names, or by the file given. Exit status 1 says that a room is over.

Examples:
  shadewright check scheme.json
  shadewright check scheme.json --pdf report.pdf
  shadewright check scheme.json --limits our-brief.limits.json --json > report.json
  shadewright check scheme.json --working 2.4
  shadewright check scheme.json --weather greensboro.csv`;

async function limitsFor(path: string, scheme: Scheme, options: Options, screen: Screen): Promise<LimitSet | null> {
  if (options.limits !== undefined) return readLimits(options.limits, screen);
  const { limitsOfScheme } = await import('../files/shipped-limits.ts');
  return accepted(path, limitsOfScheme(scheme), screen);
}

/** @throws {Refusal} when the scheme has no such room, naming those it has */
function refuseRoom(scheme: Scheme, room: string): void {
  if (scheme.rooms.some((r) => r.id === room)) return;
  const known = scheme.rooms.map((r) => r.id).slice(0, 12);
  throw new Refusal(
    `shadewright check: --working: the scheme has no room ${JSON.stringify(room)}; it has ${known.join(', ')}${scheme.rooms.length > 12 ? ' …' : ''}.`,
  );
}

/** The working of every finding of a room, as text. */
async function workingOfRoom(result: CheckResult, scheme: Scheme, room: string): Promise<string> {
  const findings = result.findings.filter((f) => f.room === room);
  const [{ workingOf }, { workingText }] = await Promise.all([
    import('../../core/limits/working.ts'),
    import('./working-text.ts'),
  ]);
  return workingText(findings.map((f) => workingOf(result, scheme, f)));
}

/** What the check was made with. */
type Known = { readonly memo: CheckMemo; readonly weather: WeatherInput | null };

/** The report with, for each room that is over, the ways to bring its worst finding within. */
async function pdfReport(result: CheckResult, scheme: Scheme, known: Known, pulse: Pulse): Promise<Uint8Array> {
  const [{ findingsReport }, { waysOfOver }, { pdfOf }] = await Promise.all([
    import('../../core/sheet/findings-report.ts'),
    import('../../core/study/ways-of-over.ts'),
    import('../files/print-document.ts'),
  ]);
  const ways = await waysOfOver(result, scheme, known.memo, pulse, known.weather?.months ?? null);
  return pdfOf(findingsReport(result, scheme, { drawn: today(), ways: ways ?? [] }));
}

async function report(result: CheckResult, scheme: Scheme, known: Known, screen: Screen): Promise<Uint8Array> {
  const { pulse, done } = progress(screen, 'looking for ways to pass');
  const bytes = await pdfReport(result, scheme, known, pulse);
  done();
  return bytes;
}

/** `shadewright check`: every room against its limits. */
export const declareCheck: Declare = (program, screen, end) => {
  program
    .command('check')
    .description('check what the rooms of a scheme take in against limits')
    .argument('<SCHEME>', 'the scheme file')
    .option('--limits <FILE>', 'judge by this limit set and not by the one that the scheme names')
    .option('--json', 'print the whole report as JSON, which `verify` can recompute')
    .option('--csv', 'print the findings as CSV')
    .option('--pdf <FILE>', 'write the report as PDF')
    .option('--weather <FILE>', 'look at a year of weather besides: TMY3, JRC typical year, or as the scheme maps it')
    .option('--working <ROOM>', 'show how the numbers of a room were reached')
    .addHelpText('after', HELP)
    .action(async (path: string, options: Options) => {
      if (options.json && options.csv)
        throw new Refusal('shadewright check: both --json and --csv were given; give one of the two.');
      await keepApart(
        'check',
        [
          { as: 'the scheme', path },
          { as: 'the limit set', path: options.limits },
          { as: 'the weather file', path: options.weather },
        ],
        [{ as: '--pdf', path: options.pdf }],
      );
      const { scheme, notes } = await readScheme(path, screen);
      const limitSet = await limitsFor(path, scheme, options, screen);
      const weather = await weatherFor(path, scheme, options.weather, screen);
      if (options.working !== undefined) refuseRoom(scheme, options.working);
      const [{ checkScheme }, { createCheckMemo }] = await Promise.all([
        import('../../core/study/check.ts'),
        import('../../core/gain/gain-memo.ts'),
      ]);
      const memo = createCheckMemo(Math.max(600, scheme.windows.length));
      const { pulse, done } = progress(screen, 'checking');
      const result = await checkScheme(scheme, limitSet, notes, pulse, { weather, memo });
      done();
      if (result === null) throw new Error('the check was stopped');
      if (options.pdf !== undefined) {
        await writeOutput(options.pdf, await report(result, scheme, { memo, weather }, screen));
        screen.note(`report written to ${options.pdf}\n`);
      }
      screen.out(await printed(result, scheme, limitSet, options));
      if (result.counts.over > 0) end(EXIT.over);
    });
};

async function printed(
  result: CheckResult,
  scheme: Scheme,
  limitSet: LimitSet | null,
  options: Options,
): Promise<string> {
  if (options.json) {
    const { reportJson } = await import('../../core/study/report-json.ts');
    const report: Record<string, unknown> = { ...reportJson(result, scheme, limitSet) };
    if (options.working !== undefined) {
      const { workingOf } = await import('../../core/limits/working.ts');
      report.working = result.findings
        .filter((f) => f.room === options.working)
        .map((f) => workingOf(result, scheme, f));
    }
    return `${JSON.stringify(report, null, 2)}\n`;
  }
  if (options.csv) {
    const [{ writeCsv }, { findingsTable }] = await Promise.all([
      import('../../core/sheet/csv.ts'),
      import('../../core/sheet/data-tables.ts'),
    ]);
    return writeCsv(findingsTable(result));
  }
  if (options.working !== undefined) return workingOfRoom(result, scheme, options.working);
  const { checkText } = await import('./check-text.ts');
  return checkText(result);
}
