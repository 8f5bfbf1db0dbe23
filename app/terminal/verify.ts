import { nestsTooDeep } from '../../core/scheme/nesting.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { WeatherInput } from '../../core/study/weather-input.ts';
import type { Difference, ReportFile } from '../../core/study/report-json.ts';
import type { Declare } from './declare.ts';
import { progress } from './progress.ts';
import { accepted, readText } from './read-input.ts';
import { EXIT, Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';

/** Differences that are named; one is enough for the report not to hold. */
const MOST_NAMED = 10;
/** What is compared: everything that a reader would rely on. */
const COMPARED = ['schemeHash', 'title', 'zone', 'skyModel', 'counts', 'findings', 'rooms', 'days'] as const;
/** Words that go with every result: the same version says them the same, and none may be left out. Others may stand beside them. */
const WORDS = ['notes', 'cautions'] as const;

/** What a report should say in words and does not. Another version may have worded it otherwise. */
function leftOut(said: Partial<ReportFile>, found: ReportFile): readonly Difference[] {
  if (said.engine !== found.engine) return [];
  return WORDS.flatMap((key) => {
    const list: unknown = said[key];
    const words = new Set((Array.isArray(list) ? list : []).map((word) => JSON.stringify(word)));
    return found[key].flatMap((word, i) =>
      words.has(JSON.stringify(word)) ? [] : [{ place: `${key}[${i}]`, said: undefined, found: word }],
    );
  });
}

const HELP = `
The scheme and the limits are in the report; every number is worked out from them again. Numbers count as the same within a share of
1e-9 (for those below 1: within 1e-9), because a report may have been through a program that shortens numbers. Notes and cautions
must all be there where the same version wrote them. Exit status 0 says that the report holds, 1 that it does not, 2 that the file is
no report.

Examples:
  shadewright check scheme.json --json > report.json
  shadewright verify report.json`;

function shown(value: unknown): string {
  if (value === undefined) return 'nothing';
  const text = JSON.stringify(value);
  return text.length > 80 ? `${text.slice(0, 79)}…` : text;
}

/** One place where the report departs from what was worked out again, and by how much where both are numbers. */
function differenceText({ place, said, found }: Difference): string {
  const both = `${place}: the report says ${shown(said)}, worked out again it is ${shown(found)}`;
  if (typeof said !== 'number' || typeof found !== 'number') return `${both}.`;
  const share = found === 0 ? '' : `, ${(100 * Math.abs((said - found) / found)).toPrecision(3)} %`;
  return `${both} (apart by ${Math.abs(said - found).toPrecision(3)}${share}).`;
}

async function readReport(path: string): Promise<Partial<ReportFile>> {
  const text = await readText(path);
  let read: unknown;
  try {
    read = JSON.parse(text.charCodeAt(0) === 0xfeff ? text.slice(1) : text);
  } catch {
    throw new Refusal(`${path}: the file is not valid JSON; give what shadewright check --json printed.`);
  }
  if (nestsTooDeep(read))
    throw new Refusal(`${path}: the file nests deeper than any report; give what shadewright check --json printed.`);
  const report = (typeof read === 'object' && read !== null ? read : {}) as Partial<ReportFile>;
  if (report.format !== 'shadewright-report')
    throw new Refusal(`${path}: format: this is not a report; give what shadewright check --json printed.`);
  if (report.version !== 1)
    throw new Refusal(
      `${path}: version: ${shown(report.version)} is not one that this program reads; use the program that wrote it.`,
    );
  return report;
}

/** The year of weather that a report rests on: its content is checked against the hash that the report names. */
async function weatherOf(
  said: Partial<ReportFile>,
  path: string,
  file: string | undefined,
  scheme: Scheme,
  screen: Screen,
): Promise<WeatherInput | null> {
  const named = said.weather ?? null;
  if (named === null) return null;
  if (file === undefined)
    throw new Refusal(
      `${path}: weather: the report rests on the weather file ${shown(named.file)}, which is not in it; give it with --weather.`,
    );
  const { readWeatherFile } = await import('./read-weather.ts');
  const read = await readWeatherFile(file, scheme, screen);
  if (read.used.hash !== named.hash)
    throw new Refusal(
      `${file}: this is not the weather that the report rests on: its content differs from that of ${shown(named.file)}; give the same file.`,
    );
  return read;
}

/** `shadewright verify`: works a report out again and says whether it holds. */
export const declareVerify: Declare = (program, screen, end) => {
  program
    .command('verify')
    .description('work a JSON report out again and say whether its numbers hold')
    .argument('<REPORT>', 'what check --json printed')
    .addHelpText('after', HELP)
    .option('--weather <FILE>', 'the weather file that the report names, where it names one')
    .action(async (path: string, options: { weather?: string }) => {
      const said = await readReport(path);
      const [{ loadScheme }, { checkLimitSet }, { checkScheme }, { SAME_SHARE, reportDifferences, reportJson }] =
        await Promise.all([
          import('../../core/scheme/load.ts'),
          import('../../core/limits/load-limits.ts'),
          import('../../core/study/check.ts'),
          import('../../core/study/report-json.ts'),
        ]);
      const loaded = loadScheme(JSON.stringify(said.scheme ?? null));
      const scheme = accepted(`${path}: scheme`, loaded, screen);
      const limitSet = said.limitSet === null ? null : accepted(path, checkLimitSet(said.limitSet, 'limitSet'), screen);
      const weather = await weatherOf(said, path, options.weather, scheme, screen);
      const { pulse, done } = progress(screen, 'verifying');
      // Without the notes of reading: a report from the desk may be of a scheme that was never read from a file.
      const result = await checkScheme(scheme, limitSet, [], pulse, { weather });
      done();
      if (result === null) throw new Error('the check was stopped');
      // By way of JSON, so that what it cannot say (such as infinity) reads alike on both sides.
      const found = JSON.parse(JSON.stringify(reportJson(result, scheme, limitSet))) as ReportFile;
      const pick = (report: Partial<ReportFile>) => Object.fromEntries(COMPARED.map((key) => [key, report[key]]));
      const differences = [...reportDifferences(pick(said), pick(found), MOST_NAMED), ...leftOut(said, found)].slice(
        0,
        MOST_NAMED,
      );
      const engine =
        said.engine === found.engine ? '' : ` (written by engine ${said.engine}, worked out by ${found.engine})`;
      if (differences.length > 0) {
        const more = differences.length === MOST_NAMED ? `, the first ${MOST_NAMED} places are` : '';
        screen.out(
          [
            `The report does not hold${engine}${more}:`,
            ...differences.map((d) => `  ${differenceText(d)}`),
            'To have one that holds, print it again with shadewright check --json.',
            '',
          ].join('\n'),
        );
        end(EXIT.over);
        return;
      }
      screen.out(
        `The report holds: ${found.findings.length} findings of ${found.rooms.length} rooms come out the same within a share of ${SAME_SHARE}${engine}.\n`,
      );
    });
};
