import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { setFlagsFromString } from 'node:v8';
import { runInNewContext } from 'node:vm';
import { writePdf } from '../../app/pdf/write-pdf.ts';
import { buildModel } from '../../core/form/build-model.ts';
import { parseLimitSet } from '../../core/limits/load-limits.ts';
import { loadScheme } from '../../core/scheme/load.ts';
import { SheetSet } from '../../core/scheme/schema.ts';
import type { Document } from '../../core/sheet/drawing.ts';
import { sheetDocument } from '../../core/study/sheet-document.ts';
import type { Row } from './row.ts';

const read = (path: string): string => readFileSync(resolve(process.cwd(), path), 'utf8');
const go = async (): Promise<'go'> => 'go';
const CREATED = new Date(0);

/** Sheets of the demo of two hundred blocks, from scheme to the bytes of the PDF. No public library does this work; the bars are in seconds. */
export async function benchSheets(): Promise<Row[]> {
  const loaded = loadScheme(read('assets/demo/two-hundred-blocks.scheme.json'));
  const limits = parseLimitSet(read('assets/limits/example-gain.json'));
  if (!loaded.ok || !limits.ok) throw new Error('the demo does not read');
  const scheme = loaded.value;
  const context = { drawn: '2026-12-01', limitSet: limits.value };
  const hours = Array.from({ length: 9 }, (_, i) => `${String(9 + i).padStart(2, '0')}:00`);
  const draw = async (kind: string): Promise<Document> => {
    const set = SheetSet.parse({ id: 'S', kind, times: hours });
    const made = await sheetDocument(scheme, buildModel(scheme), set, context, go);
    if (!made?.ok) throw new Error(`${kind} does not draw`);
    return made.value;
  };
  const rows: Row[] = [];
  for (const [kind, what, bar] of [
    ['shadow-study', '27 shadow diagrams of 200 blocks as PDF', 'bar 3000 ms and 5 MB'],
    ['findings', 'report of 50 rooms with ways to pass as PDF', 'bar 3000 ms'],
    ['exposure-plan', 'sun on roofs and ground of 200 blocks, before and after, as PDF', 'no bar'],
  ] as const) {
    const runs: {
      readonly drawn_ms: number;
      readonly whole_ms: number;
      readonly pages: number;
      readonly MB: number;
    }[] = [];
    for (let k = 0; k < 3; k++) {
      const start = performance.now();
      const document = await draw(kind);
      const drawn_ms = performance.now() - start;
      const bytes = await writePdf(document, { created: CREATED });
      const whole_ms = performance.now() - start;
      runs.push({ drawn_ms, whole_ms, pages: document.pages.length, MB: bytes.length / 1e6 });
    }
    const [first, ...rest] = runs.sort((a, b) => a.whole_ms - b.whole_ms);
    if (!first) throw new Error('nothing ran');
    const slowest = rest.at(-1)?.whole_ms ?? first.whole_ms;
    const note = `${first.whole_ms.toFixed(0)} to ${slowest.toFixed(0)} ms, ${first.drawn_ms.toFixed(0)} of them before the PDF; ${first.pages} pages, ${first.MB.toFixed(2)} MB; ${bar}`;
    rows.push({ what, ours_perSecond: 1000 / first.whole_ms, other: '', other_perSecond: null, ratio: null, note });
  }
  rows.push(await memory(await draw('shadow-study')));
  return rows;
}

/** What is held after PDFs of 50, 100 and 200 pages: only the bytes written may grow. */
async function memory(study: Document): Promise<Row> {
  setFlagsFromString('--expose-gc');
  const collect = runInNewContext('gc') as () => void;
  // Compressors and buffers are let go a turn after what held them.
  const gc = async (): Promise<void> => {
    for (let turn = 0; turn < 4; turn++) {
      collect();
      await new Promise((go) => setTimeout(go, 20));
    }
  };
  const [page] = study.pages;
  if (!page) throw new Error('the study has no page');
  const held: string[] = [];
  const start = performance.now();
  for (const count of [50, 50, 100, 200]) {
    await gc();
    const before = process.memoryUsage();
    const bytes = await writePdf({ ...study, pages: Array.from({ length: count }, () => page) }, { created: CREATED });
    await gc();
    const after = process.memoryUsage();
    const MB = (after.heapUsed + after.external - before.heapUsed - before.external - bytes.length) / 1e6;
    held.push(`${count} pages ${MB.toFixed(1)} MB`);
  }
  const took = performance.now() - start;
  const note = `held after writing, beside the bytes themselves: ${held.join(', ')}; ${(took / 400).toFixed(0)} ms a page`;
  return {
    what: 'memory over 200 pages',
    ours_perSecond: 400_000 / took,
    other: '',
    other_perSecond: null,
    ratio: null,
    note,
  };
}
