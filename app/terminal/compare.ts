import { basename } from 'node:path';
import type { ComparedRow, Comparison } from '../../core/study/compare.ts';
import { MOST_SIDE_BY_SIDE, variantsOf, withoutVariants } from '../../core/scheme/variants.ts';
import type { SchemeVariant } from '../../core/study/compare-schemes.ts';
import type { DataTable } from '../../core/sheet/csv.ts';
import type { Declare } from './declare.ts';
import { dates, times } from './option-values.ts';
import { progress } from './progress.ts';
import { accepted, readScheme } from './read-input.ts';
import { EXIT, Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';
import { table } from './table.ts';
import { weatherFor } from './weather-for.ts';

type Options = {
  readonly on?: readonly string[];
  readonly at?: readonly string[];
  readonly json?: true;
  readonly csv?: true;
};

const HELP = `
The first scheme is what the others are compared with; rooms are matched by their ids. Each is judged by the limits that it names. Shadows are
those that a scheme adds to the ground at the dates and times given: 21 March, 21 June and 21 December at 09:00, 12:00 and 15:00 unless told
otherwise. One scheme named alone stands beside the variants that are kept with it, as the last.
Exit status 1 says that a room of the last scheme is over.

Examples:
  shadewright compare before.scheme.json after.scheme.json
  shadewright compare yard.scheme.json
  shadewright compare a.scheme.json b.scheme.json c.scheme.json --on 2025-12-21 --at 10:00,12:00,14:00 --csv`;

async function besideEachOther(paths: readonly string[], screen: Screen): Promise<readonly SchemeVariant[]> {
  const { limitsOfScheme } = await import('../files/shipped-limits.ts');
  const variants: SchemeVariant[] = [];
  for (const path of paths) {
    const { scheme } = await readScheme(path, screen);
    const own = { name: basename(path).replace(/(\.scheme)?\.json$/i, ''), scheme: withoutVariants(scheme) };
    // A scheme that is named alone stands beside what is kept with it, as in the desk: last.
    for (const one of paths.length === 1 ? [...variantsOf(scheme), own] : [own])
      variants.push({
        ...one,
        limitSet: accepted(path, limitsOfScheme(one.scheme), screen),
        weather: await weatherFor(path, one.scheme, undefined, screen),
      });
  }
  return variants;
}

const number = (value: number | null): string => (value === null ? '–' : value.toFixed(Math.abs(value) < 100 ? 1 : 0));
const signed = (value: number | null): string => (value === null ? '–' : `${value > 0 ? '+' : ''}${number(value)}`);

/** The row of each room and limit in which anything changes, or is over anywhere. */
const isTelling = (row: ComparedRow): boolean =>
  row.verdicts.includes('over') || row.changes.some((change) => change === null || Math.abs(change) > 1e-9);

function asText({ variants, rows, shadows, notes }: Comparison): string {
  const names = variants.map((v) => v.name);
  const counts = table(
    [
      { head: 'variant', align: 'left' },
      ...(['over', 'close', 'within'] as const).map((head) => ({ head, align: 'right' as const })),
      { head: 'limits', align: 'left' },
    ],
    variants.map((v) => [v.name, `${v.counts.over}`, `${v.counts.close}`, `${v.counts.within}`, v.limitSet ?? 'none']),
  );
  const telling = rows.filter(isTelling);
  const findings = table(
    [
      { head: 'room', align: 'left' },
      { head: 'name', align: 'left' },
      { head: 'unit', align: 'left' },
      ...names.flatMap((name, i) => [
        { head: name, align: 'right' as const },
        ...(i === 0 ? [] : [{ head: 'change', align: 'right' as const }]),
        { head: '', align: 'left' as const },
      ]),
      { head: 'of', align: 'left' },
    ],
    telling.map((row) => [
      row.room,
      row.roomName,
      row.unit,
      ...names.flatMap((_, i) => [
        number(row.values[i] ?? null),
        ...(i === 0 ? [] : [signed(row.changes[i] ?? null)]),
        row.verdicts[i] ?? '',
      ]),
      row.metricName,
    ]),
  );
  const added = table(
    [{ head: 'shadow added, m²', align: 'left' }, ...names.map((head) => ({ head, align: 'right' as const }))],
    shadows.map((s) => [s.text, ...s.added_m2.map(number)]),
  );
  return [
    counts,
    ...(telling.length > 0 ? [findings] : ['No room is over, and nothing changes in any room.', '']),
    ...(shadows.length > 0 ? [added] : []),
    ...notes.map((note) => `${note}\n`),
  ].join('\n');
}

/** Every row with a column for each variant's value, verdict and change. */
function asTable({ variants, rows, shadows }: Comparison): DataTable {
  return {
    header: [
      'room',
      'name',
      'what',
      'unit',
      ...variants.flatMap((v) => [`${v.name} value [unit]`, `${v.name} change [unit]`, `${v.name} verdict`]),
    ],
    rows: [
      ...rows.map((row) => [
        row.room,
        row.roomName,
        row.metricName,
        row.unit,
        ...variants.flatMap((_, i) => [row.values[i] ?? null, row.changes[i] ?? null, row.verdicts[i] ?? null]),
      ]),
      ...shadows.map((s) => [
        '',
        '',
        `shadow added, ${s.text}`,
        'm²',
        ...s.added_m2.flatMap((area) => [
          area,
          area === null || s.added_m2[0] == null ? null : area - s.added_m2[0],
          null,
        ]),
      ]),
    ],
  };
}

/** `shadewright compare`: variants of one scheme side by side. */
export const declareCompare: Declare = (program, screen, end) => {
  program
    .command('compare')
    .description('set variants of one scheme side by side: findings, gains and the shadow each adds')
    .argument(
      '<SCHEMES...>',
      'two or more scheme files, or one with variants kept in it; the first is what the others are compared with',
    )
    .option('--on <DATES>', 'civil dates of the shadows, with commas between them', dates)
    .option('--at <TIMES>', 'times of the clock, with commas between them', times)
    .option('--json', 'print JSON')
    .option('--csv', 'print every row as CSV')
    .addHelpText('after', HELP)
    .action(async (paths: readonly string[], options: Options) => {
      if (options.json && options.csv)
        throw new Refusal('shadewright compare: both --json and --csv were given; give one of the two.');
      if (paths.length > MOST_SIDE_BY_SIDE)
        throw new Refusal(
          `shadewright compare: ${paths.length} schemes were given; at most ${MOST_SIDE_BY_SIDE} fit side by side.`,
        );
      const variants = await besideEachOther(paths, screen);
      if (variants.length < 2)
        throw new Refusal(
          'shadewright compare: one scheme was given, and no variants are kept with it; name two or more to compare.',
        );
      const [{ compareSchemes }, { createCheckMemo }, { USUAL_TIMES, usualDates }] = await Promise.all([
        import('../../core/study/compare-schemes.ts'),
        import('../../core/gain/gain-memo.ts'),
        import('../../core/study/sheet-document.ts'),
      ]);
      const [first] = variants as readonly [SchemeVariant, ...SchemeVariant[]];
      const moments = { dates: options.on ?? usualDates(first.scheme), times: options.at ?? USUAL_TIMES };
      const { pulse, done } = progress(screen, 'comparing');
      const compared = await compareSchemes(variants, moments, createCheckMemo(2000), pulse);
      done();
      if (compared === null) throw new Error('the comparison was stopped');
      if (options.json) screen.out(`${JSON.stringify(compared, null, 2)}\n`);
      else if (options.csv) {
        const { writeCsv } = await import('../../core/sheet/csv.ts');
        screen.out(writeCsv(asTable(compared)));
      } else {
        const { CAUTIONS } = await import('../../core/limits/cautions.ts');
        screen.out(`${asText(compared)}\n${CAUTIONS.join('\n')}\n`);
      }
      if ((compared.variants.at(-1)?.counts.over ?? 0) > 0) end(EXIT.over);
    });
};
