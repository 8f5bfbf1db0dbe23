import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { writePdf } from '../../../app/pdf/write-pdf.ts';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import { SHORT_CAUTION } from '../../../core/limits/cautions.ts';
import type { LimitSet } from '../../../core/limits/limit-set.ts';
import type { Checked } from '../../../core/scheme/fault.ts';
import type { Document } from '../../../core/sheet/drawing.ts';
import { findingsReport } from '../../../core/sheet/findings-report.ts';
import { sectionSheet } from '../../../core/sheet/section-sheet.ts';
import { shadowSheet } from '../../../core/sheet/shadow-sheet.ts';
import { contentHash } from '../../../core/scheme/hash.ts';
import { writeScheme } from '../../../core/scheme/write.ts';
import { waysToPass } from '../../../core/sizing/ways-to-pass.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { ENGINE_VERSION } from '../../../core/study/engine.ts';
import { shadowMoments } from '../../../core/study/shadow-moments.ts';
import { demoScheme, modelOf } from '../../helpers/demo-scheme.ts';
import { readPdf } from '../../helpers/read-pdf.ts';

const root = join(import.meta.dirname, '../../..');
const folder = join(root, 'assets/samples');
/** The samples are rewritten only when asked for by name: SHADEWRIGHT_SAMPLES=1. */
const isWriting = process.env['SHADEWRIGHT_SAMPLES'] === '1';

const scheme = demoScheme('tannery-yard');
const facts = { drawn: '2026-12-01', engine: ENGINE_VERSION, hash: contentHash(writeScheme(scheme)) };
const value = (made: Checked<Document>): Document => {
  if (!made.ok) throw new Error(JSON.stringify(made.faults));
  return made.value;
};

async function report(): Promise<Document> {
  const set = JSON.parse(readFileSync(join(root, 'assets/limits/example-gain.json'), 'utf8')) as LimitSet;
  const result = await checkScheme(scheme, set, [], async () => 'go');
  if (!result) throw new Error('stopped');
  const memo = createCheckMemo();
  const over = result.findings.filter((f) => f.verdict === 'over');
  return findingsReport(result, scheme, {
    drawn: facts.drawn,
    ways: over.map((f) => waysToPass(scheme, set, f.room, f, memo)),
  });
}

function shadows(): Document {
  const model = modelOf(scheme);
  const moments = shadowMoments(scheme, model, ['2025-03-21', '2025-06-21', '2025-12-21'], ['09:00', '12:00', '15:00']);
  return value(
    shadowSheet({ scheme, model, moments, scale: 1000, paper: 'A3', landscape: true, number: 'SH-01', ...facts }),
  );
}

const samples: { readonly [file: string]: () => Promise<Document> } = {
  'tannery-yard-shadows.pdf': async () => shadows(),
  'tannery-yard-findings.pdf': report,
  'tannery-yard-section-w10.pdf': async () =>
    value(
      sectionSheet({ scheme, model: modelOf(scheme), window: 'W10', scale: 50, paper: 'A3', number: 'S-01', ...facts }),
    ),
};

for (const [file, draw] of Object.entries(samples)) {
  test(`${file} draws, says on every page that it is an estimate, and is what is shipped as far as its pages go`, async () => {
    const bytes = await writePdf(await draw(), { created: new Date(0) });
    const drawn = await readPdf(bytes);
    for (const page of drawn.pages) expect(page.texts.map((t) => t.text).join(' ')).toContain(SHORT_CAUTION);
    if (isWriting) {
      mkdirSync(folder, { recursive: true });
      writeFileSync(join(folder, file), bytes);
    }
    if (!existsSync(join(folder, file)))
      throw new Error(`assets/samples lacks ${file}: run with SHADEWRIGHT_SAMPLES=1`);
    const shipped = await readPdf(new Uint8Array(readFileSync(join(folder, file))));
    expect(shipped.bookmarks.slice(0, 2)).toEqual(drawn.bookmarks.slice(0, 2));
    expect([shipped.pages[0]?.width, shipped.pages[0]?.height]).toEqual([
      drawn.pages[0]?.width,
      drawn.pages[0]?.height,
    ]);
  });
}
