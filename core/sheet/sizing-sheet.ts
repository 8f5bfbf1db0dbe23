import type { Scheme } from '../scheme/schema.ts';
import type { Sweep, SweepPoint, Swept } from '../sizing/sweep.ts';
import { niceStep } from './day-curve.ts';
import type { Document, Mark, Mm, Stroke } from './drawing.ts';
import { ACCENT, FRAME, INK, OVER, RULE, SOFT, THIN } from './ink.ts';
import { leading, line, paragraph, rect, words } from './marks.ts';
import { READ } from './measure.ts';
import { fixed } from './numerals.ts';
import { finishPages, type PaperName, type Rect } from './paper.ts';
import { DRAWING_CAUTIONS, type Note, pageAreas, placeNotes, withNotes } from './side-panel.ts';
import { shortHash, titleBlock } from './title-block.ts';
import { CAUTIONS } from '../limits/cautions.ts';

export type SizingSheetInput = {
  readonly scheme: Scheme;
  /** One page each. */
  readonly sweeps: readonly Sweep[];
  /** Summer gain to come down to [Wh]; null: none was asked for. */
  readonly target_Wh: number | null;
  readonly paper: PaperName;
  readonly drawn: string;
  readonly engine: string;
  readonly hash: string;
  readonly number?: string;
  readonly language?: string;
};

const NAMES: { readonly [S in Swept]: string } = {
  overhang: 'depth of the overhang',
  fins: 'depth of fins on both sides',
  both: 'depth of overhang and fins together',
  glass: 'g of the glass',
};

const SUMMER: Stroke = { colour: OVER, width: 0.6 };
/** Dashed, so that the two are told apart in black and white. */
const WINTER: Stroke = { colour: ACCENT, width: 0.6, dash: [3, 1.6] };
const MARKED: Stroke = { colour: INK, width: 0.25, dash: [0.8, 0.8] };

/** What windows take in over the depths of a device or the g of their glass, summer and winter, as curves and as a table. */
export function sizingSheet(input: SizingSheetInput): Document {
  const { scheme, paper } = input;
  const areas = pageAreas(paper, true);
  const pages: { title: string; marks: readonly Mark[] }[] = [];
  const spill: Note[] = [];
  for (const sweep of input.sweeps) {
    const title = `${windowWords(sweep)}: ${NAMES[sweep.swept]}`;
    const beside = panel(input, sweep, areas.panel[0] as Rect, title);
    if (spill.length === 0) spill.push(...beside.spill);
    pages.push({ title, marks: [...drawing(input, sweep, areas.drawing, title), ...beside.marks] });
  }
  return {
    title: [scheme.title, 'Sizing'].filter((t) => t !== '').join(' – '),
    author: scheme.author,
    language: input.language ?? 'en-GB',
    pages: finishPages(
      withNotes(pages, spill, paper, true),
      paper,
      true,
      `scheme ${shortHash(input.hash)}, drawn ${input.drawn}`,
    ),
  };
}

const windowWords = ({ windows }: Sweep): string =>
  windows.length === 1 ? `Window ${windows[0]}` : `Windows ${windows.join(', ')}`;
const amountWords = (sweep: Sweep, amount: number): string =>
  sweep.unit === '' ? `g ${fixed(amount, 2)}` : `${fixed(amount, 2)} m`;

function drawing(input: SizingSheetInput, sweep: Sweep, area: Rect, title: string): readonly Mark[] {
  const head = paragraph(title, area.x, area.y, area.width, { size: 4.6, face: 'semibold' }, 2);
  const rows = sweep.points.length + 2;
  const tableHeight = Math.min(area.height * 0.55, rows * leading(READ) + 4);
  const top = area.y + head.height + 3;
  const plot = { ...area, y: top, height: area.y + area.height - top - tableHeight - 6 };
  return [
    ...head.marks,
    ...curves(input, sweep, plot),
    ...figures(sweep, { ...area, y: plot.y + plot.height + 6, height: tableHeight }),
  ];
}

/** Both curves over the settings, with what the windows have now, the target, and what meets it. */
function curves({ target_Wh }: SizingSheetInput, sweep: Sweep, area: Rect): readonly Mark[] {
  const { points } = sweep;
  const plot = { x: area.x + 14, y: area.y + 8, width: area.width - 22, height: area.height - 22 };
  const most_kWh = Math.max(...points.map((p) => Math.max(p.summer_Wh, p.winter_Wh)), target_Wh ?? 0, 1) / 1000;
  const step = niceStep(most_kWh * 1.05, 5);
  const top = Math.ceil((most_kWh * 1.05) / step) * step;
  const [first, last] = [points[0]?.amount ?? 0, points.at(-1)?.amount ?? 1];
  const x = (amount: number): Mm => plot.x + ((amount - first) / (last - first || 1)) * plot.width;
  const y = (wh: number): Mm => plot.y + plot.height * (1 - wh / 1000 / top);
  const marks: Mark[] = [words('kWh a day', area.x, area.y + READ * 0.75, { colour: SOFT })];
  for (let v = 0; v <= top + 1e-9; v += step) {
    marks.push(line(plot.x, y(v * 1000), plot.x + plot.width, y(v * 1000), RULE));
    marks.push(words(fixed(v, step < 1 ? 1 : 0), plot.x - 2, y(v * 1000) + READ * 0.35, { anchor: 'end' }));
  }
  const every = Math.max(1, Math.round(points.length / 8));
  for (let i = 0; i < points.length; i += every) {
    const at = (points[i] as SweepPoint).amount;
    marks.push(line(x(at), plot.y + plot.height, x(at), plot.y + plot.height + 1.2, THIN));
    marks.push(words(fixed(at, sweep.unit === '' ? 2 : 1), x(at), plot.y + plot.height + 5, { anchor: 'middle' }));
  }
  marks.push(
    words(sweep.unit === '' ? 'g of the glass' : 'depth, m', plot.x + plot.width, plot.y + plot.height + 10, {
      anchor: 'end',
      colour: SOFT,
    }),
    rect(plot.x, plot.y, plot.width, plot.height, { stroke: FRAME }),
  );
  const mark = (amount: number, text: string, row: number): void => {
    marks.push(line(x(amount), plot.y, x(amount), plot.y + plot.height, MARKED));
    const end = x(amount) > plot.x + plot.width * 0.8;
    marks.push(
      words(text, x(amount) + (end ? -1.2 : 1.2), plot.y + 4 + row * leading(READ), { anchor: end ? 'end' : 'start' }),
    );
  };
  if (sweep.now !== null && sweep.now >= Math.min(first, last) && sweep.now <= Math.max(first, last))
    mark(sweep.now, 'now', 0);
  if (target_Wh !== null) {
    marks.push(line(plot.x, y(target_Wh), plot.x + plot.width, y(target_Wh), MARKED));
    marks.push(words('target', plot.x + plot.width - 1, y(target_Wh) - 1.2, { anchor: 'end' }));
    if (sweep.meetsTarget !== null) mark(sweep.meetsTarget, `${amountWords(sweep, sweep.meetsTarget)} meets it`, 1);
  }
  const curve = (of: (p: SweepPoint) => number, stroke: Stroke): Mark => ({
    kind: 'path',
    runs: [points.map((p) => [x(p.amount), y(of(p))] as const)],
    closed: false,
    stroke,
  });
  marks.push(
    curve((p) => p.summer_Wh, SUMMER),
    curve((p) => p.winter_Wh, WINTER),
  );
  return [{ kind: 'group', label: `Gain of ${windowWords(sweep)}: summer and winter`, marks }];
}

const COLUMNS = ['setting', 'summer, kWh', 'summer peak, W', 'winter, kWh', 'sun kept off'] as const;
const MONTHS = 'Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec'.split(' ');
const dayWords = (date: string): string => `${Number(date.slice(8))} ${MONTHS[Number(date.slice(5, 7)) - 1]}`;

/** The points in figures, as many as there is room for, evenly taken. */
function figures(sweep: Sweep, area: Rect): readonly Mark[] {
  const pitch = leading(READ);
  const room = Math.max(1, Math.floor(area.height / pitch) - 1);
  const every = Math.ceil(sweep.points.length / room);
  const shown = sweep.points.filter((_, i) => i % every === 0);
  const width = area.width / COLUMNS.length;
  const cells = (texts: readonly string[], y: Mm, colour: string): readonly Mark[] =>
    texts.map((text, c) => words(text, area.x + width * (c + 1) - 4, y, { anchor: 'end', colour }));
  const head = area.y + READ;
  const marks: Mark[] = [
    ...cells(COLUMNS, head, SOFT),
    line(area.x, head + 1.4, area.x + area.width, head + 1.4, RULE),
  ];
  shown.forEach((p, i) => {
    const off =
      p.keptOff === null
        ? '–'
        : `${dayWords(p.keptOff.from)} ${p.keptOff.fromTime} to ${dayWords(p.keptOff.to)} ${p.keptOff.toTime}`;
    const texts = [
      amountWords(sweep, p.amount),
      fixed(p.summer_Wh / 1000, 2),
      fixed(p.summerPeak_W, 0),
      fixed(p.winter_Wh / 1000, 2),
      sweep.swept === 'glass' ? '' : off,
    ];
    marks.push(...cells(texts, head + pitch * (i + 1) + 0.6, INK));
  });
  return marks;
}

function panel(input: SizingSheetInput, sweep: Sweep, area: Rect, title: string) {
  const key = keyMarks(area);
  const facts = {
    subject: title,
    number: input.number ?? '',
    date: input.drawn,
    engine: input.engine,
    hash: input.hash,
    scale: '',
  };
  const top = area.y + area.height - titleBlock(area.x, 0, area.width, input.scheme, facts).height;
  const cautions: Note = { heading: 'Cautions', lines: [...DRAWING_CAUTIONS.lines, CAUTIONS[2] as string] };
  const notes = placeNotes(
    [conclusion(sweep, input.target_Wh), HOW, cautions],
    [{ x: area.x, y: area.y + key.height + 4, end: top - 4 }],
    area.width,
  );
  const placed = titleBlock(area.x, top, area.width, input.scheme, facts);
  return { marks: [...key.marks, ...notes.marks, ...placed.marks], spill: notes.spill };
}

function keyMarks(area: Rect): { readonly marks: readonly Mark[]; readonly height: Mm } {
  const row = (i: number, stroke: Stroke, text: string): readonly Mark[] => {
    const y = area.y + 3 + i * 6;
    return [line(area.x, y, area.x + 12, y, stroke), words(text, area.x + 15, y + READ * 0.35)];
  };
  return {
    marks: [
      ...row(0, SUMMER, 'summer: clear hottest design day'),
      ...row(1, WINTER, 'winter: clear day of the solstice'),
    ],
    height: 14,
  };
}

function conclusion(sweep: Sweep, target_Wh: number | null): Note {
  const lines = [sweep.now === null ? 'Now: none, or several that differ.' : `Now: ${amountWords(sweep, sweep.now)}.`];
  if (target_Wh !== null) {
    const aim = `the summer’s gain down to ${fixed(target_Wh / 1000, 2)} kWh a day`;
    lines.push(
      sweep.meetsTarget === null
        ? `No setting tried brings ${aim}.`
        : `${amountWords(sweep, sweep.meetsTarget)} brings ${aim}.`,
    );
  }
  if (sweep.swept !== 'glass')
    lines.push(
      sweep.enough === null
        ? 'Every step tried still saves 1 % or more of the summer’s gain without it.'
        : `${sweep.enough === 0 ? 'No depth is worth having: every' : `Beyond ${amountWords(sweep, sweep.enough)} a further`} step saves less than 1 % of the summer’s gain without it.`,
    );
  return { heading: 'What it shows', lines };
}

const HOW: Note = {
  heading: 'How it was worked out',
  lines: [
    'Each setting in turn, with everything that stands round the windows; heat through the glass in five-minute steps under a clear sky. Summer is the hottest design day, winter the day of the solstice.',
    'Sun kept off: the dates, with the hour that is meant, between which no sun reaches the glass while it stands squarely in front of it, which for glass that faces the equator is noon.',
  ],
};
