import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { writePdf } from '../../../app/pdf/write-pdf.ts';
import { writePng } from '../../../app/pdf/write-png.ts';
import { SHORT_CAUTION } from '../../../core/limits/cautions.ts';
import type { Page } from '../../../core/sheet/drawing.ts';
import { readPdf } from '../../helpers/read-pdf.ts';
import { drawSample, SAMPLES } from '../../helpers/samples.ts';

const folder = join(import.meta.dirname, '../../../assets/samples');
/** The samples are rewritten only when asked for by name: node test/helpers/make-samples.mjs. */
const isWriting = process.env['SHADEWRIGHT_SAMPLES'] === '1';
const DPI = 72;
/** All of them together: they are cloned by everyone. */
const MOST_BYTES = 2_000_000;

const pictureName = (name: string, called: string): string => `${name}${called}.png`;

for (const sample of SAMPLES) {
  test(`${sample.name} draws, says on every page that it is an estimate, and is what is shipped`, async () => {
    const document = await drawSample(sample);
    const bytes = await writePdf(document, { created: new Date(0) });
    const drawn = await readPdf(bytes);
    for (const page of drawn.pages) expect(page.texts.map((t) => t.text).join(' ')).toContain(SHORT_CAUTION);
    if (isWriting) {
      mkdirSync(folder, { recursive: true });
      if (sample.pdf) writeFileSync(join(folder, `${sample.name}.pdf`), bytes);
      for (const [n, called] of sample.pictures)
        writeFileSync(
          join(folder, pictureName(sample.name, called)),
          await writePng(document.pages[n - 1] as Page, DPI),
        );
    }
    for (const [n, called] of sample.pictures) {
      const png = readFileSync(join(folder, pictureName(sample.name, called)));
      const { width, height } = document.pages[n - 1] as Page;
      // PNG, second edition (W3C 2003), 11.2.2: width and height stand at bytes 16 and 20.
      expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual([
        Math.round((width / 25.4) * DPI),
        expect.closeTo((height / 25.4) * DPI, -0.5),
      ]);
    }
    if (!sample.pdf) return;
    const shipped = await readPdf(new Uint8Array(readFileSync(join(folder, `${sample.name}.pdf`))));
    expect(shipped.bookmarks).toEqual(drawn.bookmarks);
    expect(shipped.pages[0]?.texts.map((t) => t.text)).toEqual(drawn.pages[0]?.texts.map((t) => t.text));
  });
}

test('nothing else lies among the samples, and together they are small', () => {
  const wanted = SAMPLES.flatMap((s) => [
    ...(s.pdf ? [`${s.name}.pdf`] : []),
    ...s.pictures.map(([, called]) => pictureName(s.name, called)),
  ]);
  expect(existsSync(folder)).toBe(true);
  const there = readdirSync(folder);
  expect(there.toSorted()).toEqual(wanted.toSorted());
  expect(there.reduce((sum, f) => sum + statSync(join(folder, f)).size, 0)).toBeLessThan(MOST_BYTES);
});
