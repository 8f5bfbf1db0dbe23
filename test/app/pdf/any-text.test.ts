import fc from 'fast-check';
import { expect, test } from 'vitest';
import { writePdf } from '../../../app/pdf/write-pdf.ts';
import { writePng } from '../../../app/pdf/write-png.ts';
import type { Page } from '../../../core/sheet/drawing.ts';
import { words } from '../../../core/sheet/marks.ts';
import { measure, shorten, wrap } from '../../../core/sheet/measure.ts';
import { readPdf } from '../../helpers/read-pdf.ts';

/** Whatever a scheme may hold: control characters, halves of pairs, marks without letters, all scripts. */
const anything = fc.oneof(
  fc.string({ unit: 'binary', maxLength: 60 }),
  fc.string({ unit: fc.integer({ min: 0, max: 0xffff }).map((c) => String.fromCharCode(c)), maxLength: 60 }),
  fc.string({
    unit: fc.constantFrom('ح', 'צ', '1', ' ', '(', 'a', '東', '\u0301', '\u202e', '\u200f', '\n', '&', '<', '"'),
    maxLength: 40,
  }),
);
const page = (texts: readonly string[]): Page => ({
  width: 210,
  height: 297,
  title: texts[0] ?? '',
  marks: texts.map((t, i) => words(t, 20, 20 + i * 5)),
});

test('any text prints: as PDF that another reader opens, and as SVG that another parser takes', {
  timeout: 120_000,
}, async () => {
  await fc.assert(
    fc.asyncProperty(fc.array(anything, { minLength: 1, maxLength: 6 }), async (texts) => {
      const document = { title: texts[0] ?? '', author: texts[1] ?? '', language: 'en-GB', pages: [page(texts)] };
      const pdf = await readPdf(await writePdf(document, { created: new Date(0) }));
      expect(pdf.pages.length).toBe(1);
      expect((await writePng(page(texts), 36)).length).toBeGreaterThan(100);
    }),
    { numRuns: 60 },
  );
});

test('no line that was broken or cut is wider than its column, and nothing but space is lost in breaking', () => {
  fc.assert(
    fc.property(anything, fc.double({ min: 12, max: 120, noNaN: true }), (text, width) => {
      const lines = wrap(text, width, 3.6);
      for (const l of lines) expect(measure(l, 3.6)).toBeLessThanOrEqual(width + 1e-9);
      const letters = (s: string): string => s.replace(/[ \t\r\n\u00a0]+/gu, '');
      expect(letters(lines.join(''))).toBe(letters(text));
      expect(measure(shorten(text, width, 3.6), 3.6)).toBeLessThanOrEqual(width + 1e-9);
      const few = wrap(text, width, 3.6, 'regular', 2);
      expect(few.length).toBeLessThanOrEqual(2);
      for (const l of few) expect(measure(l, 3.6)).toBeLessThanOrEqual(width + 1e-9);
    }),
  );
});
