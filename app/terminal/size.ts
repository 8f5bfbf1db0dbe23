import { Option } from 'commander';
import type { Stretch } from '../../core/sizing/shaded-dates.ts';
import type { Sweep, Swept } from '../../core/sizing/sweep.ts';
import type { Declare } from './declare.ts';
import { number } from './option-values.ts';
import { readScheme } from './read-input.ts';
import { Refusal } from './refusal.ts';
import { table } from './table.ts';

type Options = {
  readonly window: string;
  readonly device: Swept;
  readonly target?: number;
  readonly json?: true;
};

const HELP = `
The window's own device is set to every depth in turn (glass: every g), with everything round it standing. Summer is the clear
hottest design day, winter the clear day of the winter solstice. Kept off: the dates between which no sun reaches the glass while it
stands squarely in front of the window (noon for glass that faces the equator); a dash stands for no such dates, or the whole year.

Examples:
  shadewright size scheme.json --window W3 --device overhang
  shadewright size scheme.json --window W3 --device fins --target 4000
  shadewright size scheme.json --window W3 --device glass --json`;

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
const stretchText = (s: Stretch | null): string => (s === null ? '–' : `${dayOfYear(s.from)} to ${dayOfYear(s.to)}`);

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
    `Window ${sweep.window}: ${NAMES[sweep.swept]}`,
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
  ].join('\n');
}

/** `shadewright size`: how deep a window's device must be, summer and winter side by side. */
export const declareSize: Declare = (program, screen) => {
  program
    .command('size')
    .description("sweep the depth of a window's device or its glass, summer and winter side by side")
    .argument('<SCHEME>', 'the scheme file')
    .requiredOption('--window <ID>', 'the window')
    .addOption(
      new Option('--device <KIND>', 'what is sized')
        .choices(['overhang', 'fins', 'both', 'glass'])
        .makeOptionMandatory(),
    )
    .option(
      '--target <WH>',
      'summer gain to come down to, in Wh through the window on the hottest design day',
      number(0, 1e9, 'Wh'),
    )
    .option('--json', 'print JSON')
    .addHelpText('after', HELP)
    .action(async (path: string, { window, device, target, json }: Options) => {
      const { scheme } = await readScheme(path, screen);
      if (!scheme.windows.some((w) => w.id === window)) {
        const known = scheme.windows
          .slice(0, 12)
          .map((w) => w.id)
          .join(', ');
        const cure = known === '' ? 'it has none' : `it has ${known}${scheme.windows.length > 12 ? ' …' : ''}`;
        throw new Refusal(`${path}: --window ${window}: the scheme has no such window; ${cure}.`);
      }
      const [{ sweep }, { createCheckMemo }] = await Promise.all([
        import('../../core/sizing/sweep.ts'),
        import('../../core/gain/gain-memo.ts'),
      ]);
      const swept = sweep(
        scheme,
        window,
        device,
        createCheckMemo(64),
        target === undefined ? {} : { target_Wh: target },
      );
      screen.out(json ? `${JSON.stringify(swept, null, 2)}\n` : asText(swept, target));
    });
};
