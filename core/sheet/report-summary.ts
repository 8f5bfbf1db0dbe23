import type { Finding, Verdict } from '../limits/finding.ts';
import type { Mark, Mm } from './drawing.ts';
import { counted, found, limitWords, margin, quantity } from './finding-words.ts';
import { Flow } from './flow.ts';
import { HAIR, INK, SOFT } from './ink.ts';
import { field, leading, line, rect, words } from './marks.ts';
import { measure, READ } from './measure.ts';
import type { Report } from './report-input.ts';
import { titleBlock } from './title-block.ts';
import { verdictColour, verdictDisc } from './verdict-disc.ts';
import { choiceOfWays } from './way-words.ts';

/** Rooms whose bars the first page shows, as far as there is room, and rooms that it says what to do about. */
const MOST_BARS = 12;
const FEWEST_BARS = 3;
const MOST_TO_DO = 6;
const FEWEST_TO_DO = 2;
/** Height of a bar's row. */
const ROW: Mm = leading(READ) + 2.4;

/** The first page: how many rooms are over, which is worst, what to do about them. */
export function summaryPage(flow: Flow, report: Report): void {
  const { result, scheme } = report;
  flow.turn('Summary');
  flow.say(result.title.trim() === '' ? 'Scheme without a title' : result.title, { size: 7.5, face: 'semibold' }, 0, 3);
  flow.say('Sun and summer heat in its rooms', { size: 5 });
  flow.gap(5);
  if (result.limitSet) counts(flow, report);
  else
    flow.say('No limit set was chosen: the report states what each room takes in and gives no verdict.', {
      face: 'semibold',
    });
  flow.gap(4);
  flow.say(verdictSentence(report));
  flow.gap(3);
  const facts = {
    subject: 'Findings',
    number: null,
    date: report.drawn,
    engine: result.engine,
    hash: result.schemeHash,
    scale: '',
  };
  const width = 110;
  const { height } = titleBlock(0, 0, width, scheme, facts);
  const all = result.limitSet ? worstOfRooms(result.findings) : highest(result.findings);
  const over = all.filter((f) => f.verdict === 'over').length;
  const plan = shareOut(flow, report, all, over, flow.left - height - 4);
  const worst = all.slice(0, plan.bars);
  if (worst.length > 0) {
    flow.heading(result.limitSet ? 'Rooms, worst first' : 'Rooms, highest first');
    drawBars(flow, worst);
    if (all.length > worst.length) flow.say(restSentence(all.length, worst.length, over), { colour: SOFT });
  }
  whatToDo(flow, report, plan.toDo);
  flow.need(height + 4);
  const x = flow.x + flow.width - width;
  flow.put(titleBlock(x, flow.y + flow.left - height, width, scheme, facts).marks, height);
}

/** What stands in the table only: how many rooms, and how many of them are over. */
function restSentence(all: number, shown: number, over: number): string {
  const rest = counted(all - shown, 'more room', 'more rooms');
  const overRest = over - shown;
  return overRest > 0
    ? `and ${rest} in the table that follows, ${overRest} of them over too`
    : `and ${rest} in the table that follows`;
}

/**
 * How many rooms get a bar and how many a line of what to do, so that the first page holds both: all that are over where they
 * fit, then fewer lines, then fewer bars.
 */
function shareOut(
  flow: Flow,
  report: Report,
  all: readonly Finding[],
  over: number,
  room: Mm,
): { readonly bars: number; readonly toDo: number } {
  // Heading and the two lines under the bars take 24 mm.
  const barsIn = (left: Mm): number => Math.floor((left - 24) / ROW);
  const wanted = Math.max(FEWEST_BARS, Math.min(MOST_BARS, over));
  for (const toDo of Array.from({ length: MOST_TO_DO }, (_, i) => MOST_TO_DO - i)) {
    const bars = barsIn(room - heightOf(flow, (trial) => whatToDo(trial, report, toDo)));
    const least = toDo > FEWEST_TO_DO ? wanted : FEWEST_BARS;
    if (bars >= Math.min(least, all.length)) return { bars: Math.min(bars, MOST_BARS), toDo };
  }
  return { bars: FEWEST_BARS, toDo: 1 };
}

/** How high something stands that is drawn down a page of the same width. */
function heightOf(flow: Flow, draw: (trial: Flow) => void): Mm {
  const trial = new Flow({ x: flow.x, y: 0, width: flow.width, height: 1e6 }, () => ({ marks: [], height: 0 }));
  trial.turn('');
  draw(trial);
  return trial.y;
}

/** The worst finding of each room, in the order of the findings. */
export function worstOfRooms(findings: readonly Finding[]): readonly Finding[] {
  const seen = new Set<string>();
  return findings.filter((f) => {
    if (seen.has(f.room)) return false;
    seen.add(f.room);
    return true;
  });
}

/** Where nothing is judged: the rooms by what they take in, under the first metric of the findings. */
const highest = (findings: readonly Finding[]): readonly Finding[] =>
  findings.filter((f) => f.metric === findings[0]?.metric).toSorted((a, b) => b.value - a.value);

function counts(flow: Flow, report: Report): void {
  const { counts: n } = report.result;
  const marks: Mark[] = [];
  const entries: readonly (readonly [Verdict, number, string])[] = [
    ['over', n.over, n.over === 1 ? 'room over' : 'rooms over'],
    ['close', n.close, 'close'],
    ['within', n.within, 'within'],
  ];
  let x = flow.x;
  for (const [verdict, count, text] of entries) {
    const y = flow.y + 8;
    marks.push(...verdictDisc(verdict, x + 3, y - 3, 2.6));
    const figure = String(count);
    marks.push(words(figure, x + 9, y, { size: 10, face: 'semibold', colour: verdictColour(verdict) }));
    const after = x + 11 + measure(figure, 10, 'semibold');
    marks.push(words(text, after, y, { size: 4.6 }));
    x = after + measure(text, 4.6) + 12;
  }
  flow.put(marks, 12);
}

function verdictSentence(report: Report): string {
  const { findings, limitSet } = report.result;
  if (report.result.rooms.length === 0) return 'The scheme has no rooms, so that there is nothing to check.';
  const [first] = limitSet ? findings : highest(findings);
  if (!first) return 'No room has a window whose sun could be worked out.';
  if (!limitSet) return `Highest: room ${first.room} ${first.roomName}. ${first.reason}`;
  if (first.verdict === 'over') return `Worst is room ${first.room} ${first.roomName}: ${first.reason}`;
  return `No room is over. Nearest to its limit is room ${first.room} ${first.roomName}: ${first.reason}`;
}

/** One bar a room: its value against its own limit, which stands at the same place for all. */
function drawBars(flow: Flow, findings: readonly Finding[]): void {
  const most = Math.max(1.1, ...findings.map((f) => (f.limitValue ? f.value / f.limitValue : 0)));
  const top = Math.max(...findings.map((f) => f.value), 1e-9);
  const name = 62;
  const numbers = 56;
  const width = flow.width - name - numbers - 6;
  for (const f of findings) {
    flow.need(ROW);
    const y = flow.y + 3.9;
    const share = f.limitValue ? f.value / f.limitValue / most : f.value / top;
    const x = flow.x + name;
    const colour = verdictColour(f.verdict);
    const cell = (...marks: readonly Mark[]): Mark => ({ kind: 'group', role: 'cell', marks });
    const marks: Mark[] = [
      cell(
        ...verdictDisc(f.verdict, flow.x + 2, y - READ * 0.35),
        field(`${f.room} ${f.roomName}`.trim(), flow.x + 6, y, name - 9),
      ),
      rect(x, y - 2.4, width, 2.4, { fill: HAIR }),
      rect(x, y - 2.4, width * Math.min(1, share), 2.4, { fill: colour }),
      cell(words(found(f), x + width + 26, y, { anchor: 'end', colour })),
      cell(words(f.limitValue === null ? '' : margin(f), x + width + 42, y, { anchor: 'end', colour })),
      cell(
        words(
          f.limitValue === null ? '' : (quantity(f.limitValue, f.unit).split('\u00a0')[0] ?? ''),
          x + width + numbers + 6,
          y,
          { anchor: 'end', colour: SOFT },
        ),
      ),
    ];
    if (f.limitValue)
      marks.push(line(x + width / most, y - 3.3, x + width / most, y + 0.8, { colour: INK, width: 0.35 }));
    flow.put([{ kind: 'group', role: 'row', marks }], ROW);
  }
  const said = 'Bar: value as a share of the room’s own limit, which is the tick. Columns: value, margin, limit.';
  flow.say(findings.some((f) => f.limitValue !== null) ? said : 'Bar: value as a share of the highest.', {
    colour: SOFT,
  });
}

function whatToDo(flow: Flow, report: Report, most: number): void {
  const over = worstOfRooms(report.result.findings).filter((f) => f.verdict === 'over');
  if (over.length === 0) return;
  flow.heading('What to do');
  const offered = over.flatMap((f) => {
    const way = choiceOfWays(report.ways, f);
    return way ? [{ f, way }] : [];
  });
  for (const { f, way } of offered.slice(0, most)) {
    flow.say(`Room ${f.room} ${f.roomName}: ${way}`);
    flow.gap(1);
  }
  if (offered.length > most)
    flow.say(`and for ${counted(offered.length - most, 'more room', 'more rooms')}, each on its own page`, {
      colour: SOFT,
    });
  if (offered.length === 0) {
    flow.say(
      `Each room that is over has a page of its own here with its worst day, hour by hour, and the window that brings most. Bring down what that window takes in when the limit is passed: shade outside it first, then glass with a lower g, then less of it.`,
    );
  }
  flow.say(`Limits: ${[...new Set(over.map((f) => `${f.metricName}, ${limitWords(f)}`))].join('; ')}.`, {
    colour: SOFT,
  });
}
