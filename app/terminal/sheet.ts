import { type Command, Option } from 'commander';
import { faultLine } from '../../core/scheme/fault.ts';
import type { Scheme, SheetSet } from '../../core/scheme/schema.ts';
import type { Declare } from './declare.ts';
import { dates, scale, times, whole } from './option-values.ts';
import { keepApart } from './outputs-apart.ts';
import { progress } from './progress.ts';
import { accepted, readLimits, readScheme } from './read-input.ts';
import { Refusal } from './refusal.ts';
import { namedSheets, sheetFiles, type SheetFiles, writeSheetFiles } from './sheet-files.ts';
import { today } from './today.ts';
import { weatherFor } from './weather-for.ts';

type Options = SheetFiles & {
  readonly on?: readonly string[];
  readonly seasons?: true;
  readonly at?: readonly string[];
  readonly window?: string;
  readonly block?: string;
  readonly limits?: string;
  readonly weather?: string;
  readonly scale?: number;
  readonly paper?: 'A4' | 'A3' | 'A2' | 'A1';
  readonly portrait?: true;
  readonly trees?: boolean;
  readonly perPage?: number;
  readonly number?: string;
  readonly units?: 'metric' | 'imperial';
};

const HELP = `
WHAT is a kind of sheet, or the id of a sheet set that the scheme holds:
  shadow-study   shadows before and after, at --on and --at
  sun-path       the sun's way through the year; with --window, what hides the sky from that window
  facades        sun hours over the outside walls of the proposal, or of --block
  exposure-plan  sun hours over roofs and ground, before and after
  section        a window with its overhang and the noon sun of both solstices; needs --window
  light          sun on open ground, sun and sky light of neighbours' windows, before and after; trees left out
                 (common practice, no source) unless --trees is given
  findings       the rooms against their limits, as shadewright check --pdf writes it

Without --scale: the largest standard scale that fits. Without --on: 21 March, 21 June and 21 December of the scheme's year.
Options change what a sheet set says for this call only. Several pages in SVG or PNG get a number before the file's ending.

Examples:
  shadewright sheet facades scheme.json --on 2025-03-21 --pdf facades.pdf
  shadewright sheet section scheme.json --window W10 --scale 20 --paper A3 --pdf w10.pdf
  shadewright sheet sun-path scheme.json --window W10 --svg w10-sky.svg
  shadewright sheet S1 scheme.json --pdf study.pdf`;

const blank = (kind: string): SheetSet => ({
  id: 'sheet',
  name: '',
  kind,
  dates: [],
  times: [],
  paper: 'A3',
  landscape: true,
});

/** The sheet set that is meant: one of the scheme's by its id, or a blank one of a kind; then what the options say. */
async function setOf(scheme: Scheme, what: string, options: Options): Promise<SheetSet> {
  const [{ isSheetKind, SHEET_KINDS }, { seasonDates }] = await Promise.all([
    import('../../core/study/sheet-kinds.ts'),
    import('../../core/study/sheet-document.ts'),
  ]);
  const saved = scheme.sheets.find((s) => s.id === what);
  if (saved === undefined && !isSheetKind(what)) {
    const ids = scheme.sheets.map((s) => s.id);
    throw new Refusal(
      `shadewright sheet: ${JSON.stringify(what)} is neither a kind of sheet nor a sheet set of the scheme; kinds: ${SHEET_KINDS.join(', ')}; sets: ${ids.join(', ') || 'none'}.`,
    );
  }
  const from: SheetSet = saved ?? blank(what);
  const { on, at, window, block, paper, portrait, perPage } = options;
  if (options.trees !== undefined && from.kind !== 'light')
    throw new Refusal(
      `shadewright sheet: --${options.trees ? '' : 'no-'}trees goes with light, not with ${from.kind}; leave it out.`,
    );
  return {
    ...from,
    ...(options.seasons ? { dates: [...seasonDates(scheme)] } : on === undefined ? {} : { dates: [...on] }),
    ...(at === undefined ? {} : { times: [...at] }),
    ...(window === undefined ? {} : { window }),
    ...(block === undefined ? {} : { block }),
    ...(options.scale === undefined ? {} : { scale: options.scale }),
    ...(options.trees === undefined ? {} : { trees: options.trees }),
    ...(options.units === undefined ? {} : { units: options.units }),
    ...(paper === undefined ? {} : { paper }),
    ...(portrait === undefined ? {} : { landscape: false }),
    ...(perPage === undefined ? {} : { perPage }),
    ...(options.number === undefined ? {} : { number: options.number }),
  };
}

/** The dates of the year that a shadow study is most often asked for. */
export const seasonsOption = (): Option =>
  new Option('--seasons', 'both solstices and both equinoxes of the scheme’s year').conflicts('on');

/** Options that say how a drawing lies on paper, shared by the commands that draw. */
export const paperOptions = (command: Command): Command =>
  command
    .option('--pdf <FILE>', 'write the sheets as PDF')
    .option('--svg <FILE>', 'write the sheets as SVG')
    .option('--png <FILE>', 'write the sheets as PNG')
    .option('--scale <SCALE>', `scale of the drawing, such as 500, 1:500 or 1"=40'`, scale)
    .addOption(new Option('--units <UNITS>', 'units of the drawing').choices(['metric', 'imperial']))
    .option('--portrait', 'stand the paper upright')
    .option('--per-page <N>', 'diagrams a page, at most', whole(1, 60, 'diagrams'))
    .option('--number <TEXT>', 'drawing number for the title block')
    .addOption(new Option('--dpi <N>', 'resolution of PNG').argParser(whole(36, 1200, 'dots per inch')).default(150));

/** `shadewright sheet`: any sheet of a scheme, to scale where it is one. */
export const declareSheet: Declare = (program, screen) => {
  const command = program
    .command('sheet')
    .description(
      'draw a sheet of a scheme: shadow study, sun path, facades, roofs and ground, section, light, findings',
    )
    .argument('<WHAT>', 'kind of sheet, or id of a sheet set of the scheme')
    .argument('<SCHEME>', 'the scheme file')
    .option('--on <DATES>', 'civil dates with commas between them', dates)
    .addOption(seasonsOption())
    .option('--at <TIMES>', 'times of the clock with commas between them', times)
    .option('--window <ID>', 'window of a section or of a shading mask')
    .option('--block <ID>', 'block whose facades are drawn')
    .option('--trees', 'light: count the crowns of trees too')
    .option('--no-trees', 'light: leave trees out, also where a sheet set counts them')
    .option('--limits <FILE>', 'judge findings by this limit set and not by the one that the scheme names')
    .option('--weather <FILE>', 'findings: look at this year of weather besides')
    .addOption(new Option('--paper <SIZE>', 'paper').choices(['A4', 'A3', 'A2', 'A1']));
  paperOptions(command)
    .addHelpText('after', HELP)
    .action(async (what: string, path: string, options: Options) => {
      if (options.pdf === undefined && options.svg === undefined && options.png === undefined)
        throw new Refusal('shadewright sheet: no file is asked for; give --pdf FILE, --svg FILE or --png FILE.');
      const read = [
        { as: 'the scheme', path },
        { as: 'the limit set', path: options.limits },
        { as: 'the weather file', path: options.weather },
      ];
      await keepApart('sheet', read, namedSheets(options));
      const { scheme, notes } = await readScheme(path, screen);
      const set = await setOf(scheme, what, options);
      const [{ buildModel }, { sheetDocument }] = await Promise.all([
        import('../../core/form/build-model.ts'),
        import('../../core/study/sheet-document.ts'),
      ]);
      const limitSet = set.kind === 'findings' ? await limitsFor(path, scheme, options.limits, screen) : null;
      const weather = set.kind === 'findings' ? await weatherFor(path, scheme, options.weather, screen) : null;
      const { pulse, done } = progress(screen, 'drawing');
      const context = { drawn: today(), limitSet, notes, weather };
      const made = await sheetDocument(scheme, buildModel(scheme), set, context, pulse);
      done();
      if (made === null) throw new Error('the drawing was stopped');
      if (!made.ok) throw new Refusal(...made.faults.map((f) => `shadewright sheet: ${f.message}; ${f.cure}.`));
      for (const note of made.notes) screen.note(`note: ${faultLine(note)}.\n`);
      const files = await sheetFiles(made.value, options, 'sheet');
      await writeSheetFiles(files, options, made.value.pages.length, screen);
      for (const [file] of files) screen.out(`written: ${file}\n`);
    });
};

async function limitsFor(path: string, scheme: Scheme, limits: string | undefined, screen: Parameters<Declare>[1]) {
  if (limits !== undefined) return readLimits(limits, screen);
  const { limitsOfScheme } = await import('../files/shipped-limits.ts');
  return accepted(path, limitsOfScheme(scheme), screen);
}
