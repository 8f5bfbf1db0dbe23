import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';
import { CAUTIONS, SHORT_CAUTION } from '../../../core/limits/cautions.ts';
import type { Finding } from '../../../core/limits/finding.ts';
import type { LimitSet } from '../../../core/limits/limit-set.ts';
import type { Document, Mark, Page } from '../../../core/sheet/drawing.ts';
import { findingsReport } from '../../../core/sheet/findings-report.ts';
import type { ReportResult } from '../../../core/sheet/report-input.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { demoScheme } from '../../helpers/demo-scheme.ts';

const EXAMPLE = JSON.parse(
  readFileSync(join(import.meta.dirname, '../../../assets/limits/example-gain.json'), 'utf8'),
) as LimitSet;

const texts = (marks: readonly Mark[]): Extract<Mark, { kind: 'text' }>[] =>
  marks.flatMap((m) => (m.kind === 'text' ? [m] : m.kind === 'group' ? texts(m.marks) : []));
const said = (page: Page): string =>
  texts(page.marks)
    .map((t) => t.text.replaceAll('\u00a0', ' '))
    .join(' ');

const scheme = demoScheme('tannery-yard');
let result: ReportResult;
let report: Document;

beforeAll(async () => {
  const checked = await checkScheme(scheme, EXAMPLE, [], async () => 'go');
  if (!checked) throw new Error('stopped');
  result = checked;
  report = findingsReport(result, scheme, { drawn: '2026-03-02' });
});

describe('every page', () => {
  test('is A4 upright and carries the short caution, its number, the engine and the scheme’s hash', () => {
    report.pages.forEach((page, i) => {
      expect([page.width, page.height]).toEqual([210, 297]);
      expect(said(page)).toContain(SHORT_CAUTION);
      expect(said(page)).toContain(`page ${i + 1} of ${report.pages.length}`);
      expect(said(page)).toContain(result.schemeHash.slice(0, 12));
      expect(said(page)).toContain(`Shadewright ${result.engine}`);
    });
  });

  test('says that an example set is one, and does not where the set is the user’s own', () => {
    const statement = 'Example limits, not the rules of any place: check your local code.';
    for (const page of report.pages) expect(said(page)).toContain(statement);
    const own = findingsReport({ ...result, limitSet: { ...EXAMPLE, example: false } }, scheme);
    for (const page of own.pages) expect(said(page)).not.toContain(statement);
  });

  test('keeps its text between the margins and above its foot', () => {
    for (const page of report.pages) {
      for (const t of texts(page.marks)) {
        expect(t.at[0]).toBeGreaterThanOrEqual(20);
        expect(t.at[0]).toBeLessThanOrEqual(200.01);
        expect(t.at[1]).toBeLessThanOrEqual(287);
      }
    }
  });

  test('holds no number that is none', () => {
    for (const page of report.pages) expect(said(page)).not.toMatch(/NaN|undefined|Infinity|null|\[object/u);
  });
});

test('low sun is said to be left out of sun hours and of nothing else: gains count it', async () => {
  const high = { ...scheme, site: { ...scheme.site, lowSun: 10 } };
  const checked = await checkScheme(high, EXAMPLE, [], async () => 'go');
  expect(checked?.findings.map((f) => f.value)).toEqual(result.findings.map((f) => f.value));
  const text = findingsReport(checked as ReportResult, high, { drawn: '2026-03-02' })
    .pages.map(said)
    .join(' ');
  expect(text).toContain('at or below 10° it counts in gains, and in no sun hours');
  expect(text).not.toContain('left out at or below');
});

test('the summary states the counts of the check and names the worst room', () => {
  const text = said(report.pages[0] as Page);
  expect(text).toContain(`${result.counts.over} rooms over`);
  expect(text).toContain(`${result.counts.close} close`);
  expect(text).toContain(`${result.counts.within} within`);
  expect(text).toContain(`Worst is room ${result.findings[0]?.room}`);
});

test('every finding stands in the tables with its value and margin', () => {
  const tables = report.pages
    .filter((p) => p.title === 'All rooms')
    .map(said)
    .join(' ');
  for (const f of result.findings) {
    expect(tables).toContain(`${f.room} ${f.roomName}`);
    // To the digits of its limit, and its margin as well, so that the row adds up as it is read.
    const size = Math.abs(f.limitValue ?? f.value);
    const digits = size >= 99.95 ? 0 : size >= 9.995 ? 1 : 2;
    const [value, limit] = [f.value.toFixed(digits), f.limitValue?.toFixed(digits) ?? '–'];
    expect(tables).toContain(`${f.room} ${f.roomName} ${value} ${f.unit} ${limit}`);
  }
});

test('one page a room that is over, in the order of the findings, and a working for each', () => {
  const over = [...new Set(result.findings.filter((f) => f.verdict === 'over').map((f) => f.room))];
  const pages = report.pages.map((p) => p.title).filter((t) => t.startsWith('Room '));
  expect(pages.map((t) => t.split(' ')[1])).toEqual(over);
  for (const room of over) expect(report.pages.some((p) => p.title.startsWith(`Working: room ${room} `))).toBe(true);
});

test('the limit is dashed and named on the curve', () => {
  const page = report.pages.find((p) => p.title.startsWith('Room ')) as Page;
  const marks = (list: readonly Mark[]): Mark[] => list.flatMap((m) => (m.kind === 'group' ? marks(m.marks) : [m]));
  expect(marks(page.marks).some((m) => m.kind === 'path' && m.stroke?.dash && m.stroke.colour === '#a8321a')).toBe(
    true,
  );
  expect(said(page)).toMatch(/limit 60\.0 W\/m² \(peak-day\)/u);
});

test('cautions stand in full, limits with their sources, and the inputs complete', () => {
  const all = report.pages.map(said).join(' ');
  for (const caution of CAUTIONS) expect(all).toContain(caution);
  for (const limit of EXAMPLE.limits) expect(all).toContain(limit.source.slice(0, 60));
  const inputs = report.pages
    .filter((p) => p.title === 'Inputs')
    .map(said)
    .join(' ');
  for (const list of [scheme.blocks, scheme.rooms, scheme.windows, scheme.glass, scheme.devices, scheme.trees]) {
    for (const one of list) expect(inputs).toContain(one.id);
  }
});

test('200 rooms run over as many pages as they need, the head of the table on each', () => {
  const [first] = result.findings;
  const findings = Array.from(
    { length: 200 },
    (_, i): Finding => ({ ...(first as Finding), room: `R${i}`, roomName: `Room ${i}`, verdict: 'within' }),
  );
  const long = findingsReport({ ...result, findings, counts: { over: 0, close: 0, within: 200 } }, scheme);
  const pages = long.pages.filter((p) => p.title === 'All rooms');
  expect(pages.length).toBeGreaterThan(3);
  for (const page of pages) expect(said(page)).toMatch(/room name value limit margin/u);
  const tables = pages.map(said).join(' ');
  for (let i = 0; i < 200; i++) expect(tables).toContain(`R${i} Room ${i} `);
});

test('without a limit set there are values and no verdicts', async () => {
  const checked = await checkScheme(scheme, null, [], async () => 'go');
  const bare = findingsReport(checked as ReportResult, scheme);
  const text = bare.pages.map(said).join(' ');
  expect(text).toContain('No limit set was chosen');
  expect(text).not.toMatch(/rooms over|over \(\+/u);
});

test('an outline of two thousand corners is printed whole, and a title of two thousand letters is cut to its place', () => {
  const outline = Array.from({ length: 2000 }, (_, i): [number, number] => {
    const a = (2 * Math.PI * i) / 2000;
    return [Number((50 + 9 * Math.cos(a)).toFixed(3)), Number((70 + 9 * Math.sin(a)).toFixed(3))];
  });
  const round = {
    ...scheme,
    blocks: [
      ...scheme.blocks,
      { id: 'ROUND', name: 'x'.repeat(2000), standing: 'context' as const, outline, base: 0, height: 5 },
    ],
  };
  const long = findingsReport({ ...result, title: 'Wide '.repeat(400) }, round);
  const inputs = long.pages
    .filter((p) => p.title === 'Inputs')
    .map(said)
    .join(' ');
  for (const p of outline) expect(inputs).toContain(`${p[0]}, ${p[1]}`);
  for (const page of long.pages) for (const t of texts(page.marks)) expect(t.at[1]).toBeLessThanOrEqual(287);
  expect(long.pages[1]?.title).toBe('All rooms');
});
