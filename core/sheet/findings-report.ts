import { buildModel } from '../form/build-model.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { Document } from './drawing.ts';
import { Flow } from './flow.ts';
import { RULE, SOFT } from './ink.ts';
import { field, leading, line, paragraph, type Piece, words } from './marks.ts';
import { measure, READ } from './measure.ts';
import { contentRect, finishPages, type Rect } from './paper.ts';
import type { Report, ReportExtra, ReportResult } from './report-input.ts';
import { inputsPages } from './report-inputs.ts';
import { cautionsPage, limitsPage, methodPage } from './report-method.ts';
import { roomPage } from './report-room.ts';
import { roomsPages } from './report-rooms.ts';
import { workingPages } from './report-working.ts';
import { summaryPage } from './report-summary.ts';
import { shortHash } from './title-block.ts';

/** Said at the head of every page that stands under an example set. */
const EXAMPLE = 'Example limits, not the rules of any place: check your local code.';

/**
 * The findings on A4: summary, all rooms, one page a room that is over, site and method, limits with their
 * sources, inputs in full, workings, cautions. Every page carries the short caution and, under an example set, says that it is one.
 * @param result  of a check, such as a `CheckResult`
 * @param scheme  the scheme that was checked
 */
export function findingsReport(result: ReportResult, scheme: Scheme, extra: ReportExtra = {}): Document {
  const report: Report = {
    result,
    scheme,
    model: buildModel(scheme),
    ways: extra.ways ?? [],
    drawn: extra.drawn ?? '–',
  };
  const flow = new Flow(contentRect('A4', false), (rect, title) => pageHead(rect, title, report));
  summaryPage(flow, report);
  roomsPages(flow, report);
  const over = new Set(result.findings.filter((f) => f.verdict === 'over').map((f) => f.room));
  for (const id of over) {
    const room = result.rooms.find((r) => r.room === id);
    if (room) roomPage(flow, report, room);
  }
  methodPage(flow, report);
  limitsPage(flow, report);
  inputsPages(flow, report);
  workingPages(flow, report);
  cautionsPage(flow, report);
  return {
    title: [result.title, 'Findings'].filter((t) => t !== '').join(' – '),
    author: scheme.author,
    language: extra.language ?? 'en-GB',
    pages: finishPages(flow.pages, 'A4', false, ''),
  };
}

/** The head of a page: whose findings, which part, which engine and scheme, and whether the limits are an example. */
function pageHead(rect: Rect, title: string, report: Report): Piece {
  const { result } = report;
  const right = `scheme ${shortHash(result.schemeHash)}, Shadewright ${result.engine}`;
  const room = rect.width - measure(right, READ) - 6;
  const y = rect.y + READ * 0.75;
  const marks = [
    field([title, result.title].filter((t) => t !== '').join(' · '), rect.x, y, room, { colour: SOFT }),
    words(right, rect.x + rect.width, y, { colour: SOFT, anchor: 'end' }),
  ];
  let height = leading(READ);
  if (result.limitSet?.example) {
    const said = paragraph(EXAMPLE, rect.x, rect.y + height, rect.width, { face: 'italic', colour: SOFT });
    marks.push(...(said.marks as typeof marks));
    height += said.height;
  }
  return {
    marks: [...marks, line(rect.x, rect.y + height + 0.6, rect.x + rect.width, rect.y + height + 0.6, RULE)],
    height: height + 6,
  };
}
