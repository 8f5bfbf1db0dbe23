import { type Command, Option } from 'commander';
import type { Model } from '../../core/form/model.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { Document } from '../../core/sheet/drawing.ts';
import type { ShadowMoment } from '../../core/sheet/shadow-moment.ts';
import type { Declare } from './declare.ts';
import { keepApart } from './outputs-apart.ts';
import { clock, dates, whole } from './option-values.ts';
import { readScheme } from './read-input.ts';
import { Refusal } from './refusal.ts';
import type { SetFile } from '../files/save-set.ts';
import { namedSheets, sheetFiles, type SheetFiles, writeSheetFiles } from './sheet-files.ts';
import { paperOptions, seasonsOption } from './sheet.ts';
import { shadowText } from './shadow-text.ts';
import { today } from './today.ts';

type Options = SheetFiles & {
  readonly on?: readonly string[];
  readonly seasons?: true;
  readonly from: number;
  readonly to: number;
  readonly every: number;
  readonly geojson?: string;
  readonly csv?: true;
  readonly json?: true;
  readonly scale?: number;
  readonly paper: 'A4' | 'A3' | 'A2' | 'A1';
  readonly portrait?: true;
  readonly perPage?: number;
  readonly number?: string;
  readonly units?: 'metric' | 'imperial';
};

/** Moments of one call: more would be days of drawing, and a mistake. */
const MOST_MOMENTS = 2000;

const HELP = `
Without --on: 21 March, 21 June and 21 December of the scheme's year. Times are what the clock on the wall shows.
Without --scale: the largest standard scale that fits. Several pages in SVG or PNG get a number before the file's ending.

Examples:
  shadewright shadows scheme.json --pdf study.pdf --from 09:00 --to 15:00 --every 180
  shadewright shadows scheme.json --seasons --paper A2 --pdf year.pdf
  shadewright shadows scheme.json --on 2025-06-21 --every 60 --pdf june.pdf --scale 500 --paper A2
  shadewright shadows scheme.json --on 2025-06-21 --scale '1"=40 ft' --units imperial --pdf june.pdf
  shadewright shadows scheme.json --on 2025-03-21,2025-12-21 --geojson shadows.geojson --csv`;

const timeOf = (minute: number): string =>
  `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;

function timesOf({ from, to, every }: Options): readonly string[] {
  if (to < from)
    throw new Refusal(`shadewright shadows: --to ${timeOf(to)} lies before --from ${timeOf(from)}; give a later time.`);
  const times: string[] = [];
  for (let minute = from; minute <= to && minute < 24 * 60; minute += every) times.push(timeOf(minute));
  return times;
}

/** Options that say how sheets are drawn. */
const OF_SHEETS = ['paper', 'scale', 'units', 'portrait', 'perPage', 'number', 'dpi'] as const;

/** @throws {Refusal} when a drawing is described and none is asked for: what does nothing would be taken for done */
function refuseIdle(command: Command, { pdf, svg, png }: Options): void {
  if (pdf !== undefined || svg !== undefined || png !== undefined) return;
  const idle = OF_SHEETS.find((name) => command.getOptionValueSource(name) === 'cli');
  if (idle === undefined) return;
  const word = command.options.find((option) => option.attributeName() === idle)?.long ?? idle;
  throw new Refusal(
    `shadewright shadows: ${word} says how the sheets are drawn, and none is asked for; add --pdf FILE, --svg FILE or --png FILE, or leave it out.`,
  );
}

async function sheetOf(
  scheme: Scheme,
  model: Model,
  moments: readonly ShadowMoment[],
  options: Options,
): Promise<Document> {
  const [{ shadowSheet }, { schemeHash }, { ENGINE_VERSION }] = await Promise.all([
    import('../../core/sheet/shadow-sheet.ts'),
    import('../../core/scheme/hash.ts'),
    import('../../core/study/engine.ts'),
  ]);
  const drawn = shadowSheet({
    scheme,
    model,
    moments,
    scale: options.scale ?? null,
    paper: options.paper,
    landscape: options.portrait !== true,
    ...(options.perPage === undefined ? {} : { perPage: options.perPage }),
    ...(options.units === undefined ? {} : { units: options.units }),
    ...(options.number === undefined ? {} : { number: options.number }),
    drawn: today(),
    engine: ENGINE_VERSION,
    hash: schemeHash(scheme),
  });
  if (drawn.ok) return drawn.value;
  throw new Refusal(...drawn.faults.map((f) => `shadewright shadows: ${f.message}; ${f.cure}.`));
}

/** `shadewright shadows`: the shadow study, as a table, as sheets to scale and as GeoJSON. */
export const declareShadows: Declare = (program, screen) => {
  const command = program
    .command('shadows')
    .description('work out where shadows fall before and after, and draw the study to scale')
    .argument('<SCHEME>', 'the scheme file')
    .option('--on <DATES>', 'civil dates with commas between them', dates)
    .addOption(seasonsOption())
    .addOption(new Option('--from <TIME>', 'first time of the clock').argParser(clock).default(540, '09:00'))
    .addOption(new Option('--to <TIME>', 'last time of the clock').argParser(clock).default(1020, '17:00'))
    .addOption(new Option('--every <MIN>', 'between the times').argParser(whole(1, 720, 'minutes')).default(60))
    .option('--geojson <FILE>', 'write the shadows as GeoJSON, in longitude and latitude')
    .option('--csv', 'print the table as CSV')
    .option('--json', 'print the table as JSON')
    .addOption(new Option('--paper <SIZE>', 'paper').choices(['A4', 'A3', 'A2', 'A1']).default('A3'));
  paperOptions(command)
    .addHelpText('after', HELP)
    .action(async (path: string, options: Options) => {
      if (options.json && options.csv)
        throw new Refusal('shadewright shadows: both --json and --csv were given; give one of the two.');
      const written = [...namedSheets(options), { as: '--geojson', path: options.geojson }];
      await keepApart('shadows', [{ as: 'the scheme', path }], written);
      refuseIdle(command, options);
      const { scheme } = await readScheme(path, screen);
      const [{ buildModel }, { shadowMoments }, { seasonDates, usualDates }] = await Promise.all([
        import('../../core/form/build-model.ts'),
        import('../../core/study/shadow-moments.ts'),
        import('../../core/study/sheet-document.ts'),
      ]);
      const on = options.on ?? (options.seasons ? seasonDates(scheme) : usualDates(scheme));
      const times = timesOf(options);
      if (on.length * times.length > MOST_MOMENTS) {
        throw new Refusal(
          `shadewright shadows: ${on.length * times.length} moments were asked for; at most ${MOST_MOMENTS} are drawn at once, so take fewer dates or a longer --every.`,
        );
      }
      const model = buildModel(scheme);
      const moments = shadowMoments(scheme, model, on, times);
      const files: SetFile[] = [];
      let pages = 0;
      if (options.pdf !== undefined || options.svg !== undefined || options.png !== undefined) {
        const study = await sheetOf(scheme, model, moments, options);
        pages = study.pages.length;
        files.push(...(await sheetFiles(study, options, 'shadows')));
      }
      if (options.geojson !== undefined) {
        const { shadowGeoJson } = await import('../../core/sheet/geojson.ts');
        files.push([options.geojson, `${JSON.stringify(shadowGeoJson(scheme, model, moments))}\n`]);
      }
      await writeSheetFiles(files, options, pages, screen);
      for (const [file] of files) screen.note(`written: ${file}\n`);
      screen.out(shadowText(scheme, moments, options.csv ? 'csv' : options.json ? 'json' : 'text'));
    });
};
