import { Option } from 'commander';
import { CAUTIONS } from '../../core/limits/cautions.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { Stretch } from '../../core/sizing/shaded-dates.ts';
import type { Sweep, Swept } from '../../core/sizing/sweep.ts';
import type { Declare } from './declare.ts';
import { keepApart } from './outputs-apart.ts';
import { number } from './option-values.ts';
import { readScheme } from './read-input.ts';
import { Refusal } from './refusal.ts';
import { table } from './table.ts';
import { today } from './today.ts';
import { writeOutput } from './write-output.ts';

type Options = {
  readonly window?: readonly string[];
  readonly wall?: string;
  readonly device: Swept;
  readonly pdf?: string;
  readonly target?: number;
  readonly json?: true;
};

const HELP = `
The own device of each window is set to every depth in turn (glass: every g), with everything round them standing. Summer is the clear
hottest design day, winter the clear day of the winter solstice. Kept off: the dates, with the hour that is meant, between which no sun reaches the glass while it
stands squarely in front of the window (noon for glass that faces the equator); a dash stands for no such dates, or the whole year.

Examples:
  shadewright size scheme.json --window W3 --device overhang
  shadewright size scheme.json --window W3 --device fins --target 4000
  shadewright size scheme.json --window W3,W4 --device glass --json
  shadewright size scheme.json --wall 2.4:3 --device overhang --pdf sizing.pdf`;

/** Each time that the option is given: an id, or several with commas between them. */
const texts = (text: string, before: readonly string[] | undefined): readonly string[] => [...(before ?? []), text];

/** The windows that the call means: those named, or those of a wall. @throws {Refusal} naming those there are */
async function windowsFor(path: string, scheme: Scheme, { window, wall }: Options): Promise<readonly string[]> {
  if ((window === undefined) === (wall === undefined))
    throw new Refusal(
      'shadewright size: name the windows with --window ID, or a wall with --wall ROOM:NUMBER, one of the two.',
    );
  if (window !== undefined) {
    const isWindow = (id: string): boolean => scheme.windows.some((w) => w.id === id);
    // An id may itself hold a comma.
    const named = window.flatMap((text) => (isWindow(text) ? [text] : text.split(',').map((part) => part.trim())));
    for (const id of named) if (!isWindow(id)) throw noWindow(path, scheme, id);
    return [...new Set(named)];
  }
  const [, room, number] = /^(.+):(\d+)$/.exec(wall ?? '') ?? [];
  if (room === undefined)
    throw new Refusal('shadewright size: --wall: write the room and the number of its wall, such as 2.4:3.');
  const { windowsOfWall } = await import('../../core/sizing/sweep.ts');
  const found = windowsOfWall(scheme, room, Number(number));
  if (found.length > 0) return found;
  const walls = scheme.windows.filter((w) => w.room === room && w.wall !== undefined).map((w) => `${room}:${w.wall}`);
  const cure =
    walls.length === 0 ? `room ${room} has no window in a wall` : `there are ${[...new Set(walls)].join(', ')}`;
  throw new Refusal(`${path}: --wall ${wall}: no window stands in that wall; ${cure}.`);
}

function noWindow(path: string, scheme: Scheme, id: string): Refusal {
  const known = scheme.windows.slice(0, 12).map((w) => w.id);
  const cure =
    known.length === 0 ? 'it has none' : `it has ${known.join(', ')}${scheme.windows.length > 12 ? ' …' : ''}`;
  return new Refusal(`${path}: --window ${id}: the scheme has no such window; ${cure}.`);
}

const NAMES: { readonly [S in Swept]: string } = {
  overhang: 'depth of the overhang',
  fins: 'depth of fins on both sides',
  both: 'depth of overhang and fins together',
  glass: 'g of the glass',
};

const amount = (value: number, unit: string): string => `${value.toFixed(2)}${unit === '' ? '' : ` ${unit}`}`;

const MONTHS = 'Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec'.split(' ');

/** Month and day without the year, because the sun is the same from year to year within half a day. */
const dayOfYear = (date: string): string => `${Number(date.slice(8))} ${MONTHS[Number(date.slice(5, 7)) - 1]}`;
const stretchText = (s: Stretch | null): string =>
  s === null ? '–' : `${dayOfYear(s.from)} ${s.fromTime} to ${dayOfYear(s.to)} ${s.toTime}`;

function enoughText(enough: number | null): string {
  if (enough === null) return 'Every step tried still saves 1 % or more of the summer gain of the window without it.';
  const where = enough === 0 ? 'No depth is worth having: every' : `Beyond ${enough.toFixed(2)} m a further`;
  return `${where} step saves less than 1 % of the summer gain of the window without it.`;
}

function conclusion(sweep: Sweep, target: number | undefined): string[] {
  const lines = [sweep.now === null ? 'Now: none, or several that differ.' : `Now: ${amount(sweep.now, sweep.unit)}.`];
  if (target === undefined) {
    lines.push("Give --target WH to be told which setting brings the summer's gain down to it.");
  } else {
    const met = sweep.meetsTarget;
    lines.push(
      met === null
        ? `No setting tried brings the summer's gain down to ${target} Wh.`
        : `${met.toFixed(3)}${sweep.unit === '' ? '' : ` ${sweep.unit}`} brings the summer's gain down to ${target} Wh.`,
    );
  }
  if (sweep.swept !== 'glass') lines.push(enoughText(sweep.enough));
  return lines;
}

function asText(sweep: Sweep, target: number | undefined): string {
  const isGlass = sweep.swept === 'glass';
  return [
    `${sweep.windows.length === 1 ? 'Window' : 'Windows'} ${sweep.windows.join(', ')}: ${NAMES[sweep.swept]}`,
    '',
    table(
      [
        { head: sweep.unit === '' ? 'g' : `depth ${sweep.unit}`, align: 'right' },
        { head: 'summer Wh', align: 'right' },
        { head: 'summer peak W', align: 'right' },
        { head: 'winter Wh', align: 'right' },
        ...(isGlass ? [] : [{ head: 'sun kept off', align: 'left' as const }]),
      ],
      sweep.points.map((p) => [
        p.amount.toFixed(2),
        p.summer_Wh.toFixed(0),
        p.summerPeak_W.toFixed(0),
        p.winter_Wh.toFixed(0),
        ...(isGlass ? [] : [stretchText(p.keptOff)]),
      ]),
    ),
    ...conclusion(sweep, target),
    '',
    ...CAUTIONS,
    '',
  ].join('\n');
}

/** The sweep as a sheet on A3. */
async function sheetOf(scheme: Scheme, swept: Sweep, target: number | undefined): Promise<Uint8Array> {
  const [{ sizingSheet }, { schemeHash }, { ENGINE_VERSION }, { printDocument }] = await Promise.all([
    import('../../core/sheet/sizing-sheet.ts'),
    import('../../core/scheme/hash.ts'),
    import('../../core/study/engine.ts'),
    import('../files/print-document.ts'),
  ]);
  return printDocument(
    sizingSheet({
      scheme,
      sweeps: [swept],
      target_Wh: target ?? null,
      paper: 'A3',
      drawn: today(),
      engine: ENGINE_VERSION,
      hash: schemeHash(scheme),
    }),
  );
}

/** `shadewright size`: how deep a window's device must be, summer and winter side by side. */
export const declareSize: Declare = (program, screen) => {
  program
    .command('size')
    .description("sweep the depth of a window's device or its glass, summer and winter side by side")
    .argument('<SCHEME>', 'the scheme file')
    .option('--window <IDS>', 'the window, or several with commas between them, sized together', texts)
    .option('--wall <ROOM:NUMBER>', 'all windows in one wall of a room')
    .addOption(
      new Option('--device <KIND>', 'what is sized')
        .choices(['overhang', 'fins', 'both', 'glass'])
        .makeOptionMandatory(),
    )
    .option(
      '--target <WH>',
      'summer gain to come down to, in Wh through the windows on the hottest design day',
      number(0, 1e9, 'Wh'),
    )
    .option('--pdf <FILE>', 'write the curves as a sheet')
    .option('--json', 'print JSON')
    .addHelpText('after', HELP)
    .action(async (path: string, options: Options) => {
      const { device, target, json, pdf } = options;
      await keepApart('size', [{ as: 'the scheme', path }], [{ as: '--pdf', path: pdf }]);
      const { scheme } = await readScheme(path, screen);
      const windows = await windowsFor(path, scheme, options);
      const [{ sweep }, { createCheckMemo }] = await Promise.all([
        import('../../core/sizing/sweep.ts'),
        import('../../core/gain/gain-memo.ts'),
      ]);
      const swept = sweep(
        scheme,
        windows,
        device,
        createCheckMemo(64),
        target === undefined ? {} : { target_Wh: target },
      );
      if (pdf !== undefined) {
        await writeOutput(pdf, await sheetOf(scheme, swept, target));
        screen.note(`sheet written to ${pdf}\n`);
      }
      screen.out(json ? `${JSON.stringify(swept, null, 2)}\n` : asText(swept, target));
    });
};
