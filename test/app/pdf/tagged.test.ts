import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { expect, test } from 'vitest';
import { pageParts, type Part } from '../../../app/pdf/tag-page.ts';
import { writePdf } from '../../../app/pdf/write-pdf.ts';
import type { Document, Mark } from '../../../core/sheet/drawing.ts';
import { SheetSet } from '../../../core/scheme/schema.ts';
import { sheetDocument } from '../../../core/study/sheet-document.ts';
import { SHEET_KINDS } from '../../../core/study/sheet-kinds.ts';
import { demoScheme, modelOf } from '../../helpers/demo-scheme.ts';

type Node = { readonly role?: string; readonly alt?: string; readonly type?: string; readonly children?: Node[] };
const all = (node: Node | null): Node[] => (node ? [node, ...(node.children ?? []).flatMap(all)] : []);

/** The structure as a reader that knows nothing of the writer finds it, page by page; and what it says of the whole file. */
async function structure(document: Document) {
  const bytes = await writePdf(document, { created: new Date(0) });
  const pdf = await getDocument({ data: bytes, useSystemFonts: false, verbosity: 0 }).promise;
  const pages: Node[][] = [];
  for (let n = 1; n <= pdf.numPages; n++)
    pages.push(all((await (await pdf.getPage(n)).getStructTree()) as Node | null));
  const marked = await pdf.getMarkInfo();
  const { info } = await pdf.getMetadata();
  const outline = (await pdf.getOutline()) ?? [];
  await pdf.loadingTask.destroy();
  return { pages, marked, info: info as { Title?: string; Language?: string }, outline };
}

const scheme = demoScheme('tannery-yard');
const model = modelOf(scheme);
const draw = async (kind: string): Promise<Document> => {
  const set = SheetSet.parse({ id: 'S', kind, dates: ['2025-03-21'], times: ['09:00', '12:00'], window: 'W10' });
  const made = await sheetDocument(scheme, model, set, { drawn: '2026-12-01', limitSet: null }, async () => 'go');
  if (!made?.ok) throw new Error(JSON.stringify(made));
  return made.value;
};

for (const kind of SHEET_KINDS) {
  test(`${kind} is tagged: title, language, bookmarks, a section a page, and words for every figure`, async () => {
    const document = await draw(kind);
    const { pages, marked, info, outline } = await structure(document);
    expect(marked?.Marked).toBe(true);
    expect(info.Title).toBe(document.title);
    expect(info.Language).toBe('en-GB');
    expect(outline.map((o) => o.title)).toEqual(document.pages.map((p) => p.title));
    expect(pages).toHaveLength(document.pages.length);
    for (const nodes of pages) {
      expect(nodes.filter((n) => n.role === 'Sect')).toHaveLength(1);
      expect(nodes.some((n) => n.role === 'P')).toBe(true);
      for (const figure of nodes.filter((n) => n.role === 'Figure')) expect(figure.alt ?? '').not.toBe('');
    }
  });
}

test('each diagram of a shadow study is a figure that says which moment it shows', async () => {
  const { pages } = await structure(await draw('shadow-study'));
  const alts = (pages[0] ?? []).filter((n) => n.role === 'Figure').map((n) => n.alt);
  expect(alts).toContain('21 March 2025, 09:00 (UTC+00:00): plan');
  expect(alts).toContain('21 March 2025, 12:00 (UTC+00:00): plan');
  expect(alts.some((a) => a?.endsWith('true north'))).toBe(true);
});

test('the tables of a report are tables: rows of cells, with a head on each page that they run on to', async () => {
  const { pages } = await structure(await draw('findings'));
  const tables = pages.flat().filter((n) => n.role === 'Table');
  expect(tables.length).toBeGreaterThan(3);
  for (const table of tables) {
    const rows = all(table).filter((n) => n.role === 'TR');
    const width = (n: Node): number => (n.children ?? []).filter((c) => c.role === 'TD' || c.role === 'TH').length;
    expect(rows.length).toBeGreaterThan(0);
    expect(new Set(rows.map(width)).size).toBe(1);
  }
  const headed = tables.filter((t) => all(t).some((n) => n.role === 'TH'));
  expect(headed.length).toBeGreaterThan(3);
});

const text = (
  t: string,
  at: readonly [number, number],
  size = 3.6,
  face: 'regular' | 'semibold' = 'regular',
): Mark => ({
  kind: 'text',
  text: t,
  at,
  size,
  face,
  colour: '#000000',
  anchor: 'start',
});
const rule: Mark = {
  kind: 'path',
  closed: false,
  runs: [
    [
      [0, 0],
      [9, 0],
    ],
  ],
  stroke: { colour: '#000000', width: 0.1 },
};

test('lines that run on are one paragraph, large ones are headings, rules say nothing, and no mark is lost or moved', () => {
  const marks: Mark[] = [
    text('Title', [10, 10], 7.5, 'semibold'),
    text('One', [10, 20]),
    text('paragraph', [10, 24.68]),
    rule,
    text('Another', [10, 40]),
    { kind: 'group', role: 'head', marks: [{ kind: 'group', role: 'cell', marks: [text('head', [0, 0])] }, rule] },
    { kind: 'group', role: 'row', marks: [{ kind: 'group', role: 'cell', marks: [text('cell', [0, 5])] }, rule] },
    { kind: 'group', label: 'curve', marks: [rule] },
  ];
  const whole = pageParts({ width: 100, height: 100, title: 'Page', marks });
  expect((whole.parts ?? []).map((p) => p.tag)).toEqual(['H1', 'P', 'Artifact', 'P', 'Table', 'Figure']);
  expect(whole.parts?.at(-1)?.alt).toBe('Page: curve');
  const leaves = (p: Part): readonly Mark[] => p.marks ?? (p.parts ?? []).flatMap(leaves);
  const flat = (m: Mark): readonly Mark[] => (m.kind === 'group' ? m.marks.flatMap(flat) : [m]);
  expect(leaves(whole).flatMap(flat)).toEqual(marks.flatMap(flat));
});
