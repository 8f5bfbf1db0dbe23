import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { fontFaceCss } from '../../../app/pdf/font-css.ts';
import { writePdf } from '../../../app/pdf/write-pdf.ts';
import { writePng } from '../../../app/pdf/write-png.ts';
import type { Page } from '../../../core/sheet/drawing.ts';
import { readPng } from '../../helpers/read-png.ts';

/** A square of 10 mm, ink on white, its corner at 20 mm and 30 mm, and a word beside it. */
const page: Page = {
  width: 100,
  height: 60,
  title: 'square',
  marks: [
    {
      kind: 'path',
      closed: true,
      runs: [
        [
          [20, 30],
          [30, 30],
          [30, 40],
          [20, 40],
        ],
      ],
      fill: '#000000',
    },
    { kind: 'text', text: 'Łódź 東京', at: [50, 40], size: 6, face: 'regular', colour: '#000000', anchor: 'start' },
  ],
};

/** Dark pixels in a rectangle given in millimetres. */
function dark(
  png: ReturnType<typeof readPng>,
  dpi: number,
  [x, y, w, h]: readonly [number, number, number, number],
): number {
  const px = (mm: number): number => Math.round((mm / 25.4) * dpi);
  let n = 0;
  for (let j = px(y); j < px(y + h); j++)
    for (let i = px(x); i < px(x + w); i++) if ((png.pixels[(j * png.width + i) * 4] as number) < 128) n++;
  return n;
}

describe('PNG', () => {
  test.each([96, 150, 300])('at %i dots per inch it has the page’s size and states its resolution', async (dpi) => {
    const png = readPng(await writePng(page, dpi));
    expect(png.width).toBe(Math.round((100 / 25.4) * dpi));
    expect(Math.abs(png.height - (60 / 25.4) * dpi)).toBeLessThanOrEqual(1);
    // PNG states pixels a metre: 0.0254 m an inch.
    expect(png.perMetre).toBe(Math.round(dpi / 0.0254));
    const side = (10 / 25.4) * dpi;
    expect(dark(png, dpi, [15, 25, 20, 20]) / side ** 2).toBeCloseTo(1, 1);
    // The word is set in letters, house face and fallback alike: there is ink where each of them stands.
    expect(dark(png, dpi, [50, 34, 13, 8])).toBeGreaterThan(side);
    expect(dark(png, dpi, [64, 34, 12, 8])).toBeGreaterThan(side);
  });

  test('right-to-left text ends where its right anchor is', async () => {
    const line = {
      ...page,
      marks: [
        {
          kind: 'text',
          text: 'ساحة 12',
          at: [60, 30],
          size: 6,
          face: 'regular',
          colour: '#000000',
          anchor: 'end',
          rtl: true,
        },
      ],
    } as const;
    const png = readPng(await writePng(line, 150));
    expect(dark(png, 150, [40, 20, 20.5, 15])).toBeGreaterThan(100);
    expect(dark(png, 150, [60.5, 20, 30, 15])).toBe(0);
  });

  test('the same page gives the same bytes', async () => {
    expect(Buffer.compare(await writePng(page, 96), await writePng(page, 96))).toBe(0);
  });

  test('a resolution that makes no sense, or an image that would fill the memory, is refused', async () => {
    await expect(writePng(page, 0)).rejects.toThrow(RangeError);
    await expect(writePng({ ...page, width: 841, height: 594 }, 1200)).rejects.toThrow(/million pixels/u);
  });
});

test('an SVG can carry the fonts it needs, and only those', () => {
  const css = fontFaceCss(page);
  expect(css.match(/@font-face/gu)?.length).toBe(2);
  expect(css).toContain("'Noto Sans JP'");
  expect(css).not.toContain('font-weight:600');
});

const poppler = spawnSync('pdftoppm', ['-v']).error === undefined;

test.skipIf(!poppler)('a general PDF renderer draws it without a word of warning', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'sheet-'));
  try {
    const bytes = await writePdf(
      { title: 't', author: '', language: 'en-GB', pages: [page] },
      { created: new Date(0) },
    );
    writeFileSync(join(folder, 'a.pdf'), bytes);
    const run = spawnSync('pdftoppm', ['-r', '50', '-png', join(folder, 'a.pdf'), join(folder, 'a')], {
      encoding: 'utf8',
    });
    expect([run.status, run.stderr]).toEqual([0, '']);
    expect(execFileSync('pdftotext', [join(folder, 'a.pdf'), '-'], { encoding: 'utf8' })).toContain('Łódź 東京');
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
});
