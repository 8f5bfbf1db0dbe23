import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { initWasm, Resvg } from '@resvg/resvg-wasm';
import type { Page } from '../../core/sheet/drawing.ts';
import { pageToSvg } from '../../core/sheet/svg.ts';
import { fontBytes } from './fonts.ts';
import { fontsUsed } from './fonts-used.ts';
import { withResolution } from './png-resolution.ts';

/** The most pixels that an image may have: an A1 sheet at 300 dots per inch has 70 million. */
export const MOST_PIXELS = 100_000_000;

let ready: Promise<void> | null = null;

/** The renderer is one WebAssembly file, the same on every machine, so that the same page gives the same pixels. */
function prepare(): Promise<void> {
  ready ??= (async () => {
    const place = createRequire(import.meta.url).resolve('@resvg/resvg-wasm/index_bg.wasm');
    await initWasm(new Uint8Array(await readFile(place)));
  })();
  return ready;
}

/**
 * One page as a PNG with the same fonts as the PDF. The file states its resolution, so that it prints at the size of the page.
 * @param dpi  dots per inch, 36 to 1200
 * @throws {RangeError} for a resolution outside its span, or an image of more than `MOST_PIXELS`
 */
export async function writePng(page: Page, dpi: number): Promise<Uint8Array> {
  if (!(dpi >= 36 && dpi <= 1200))
    throw new RangeError(`the resolution must be from 36 to 1200 dots per inch, got ${dpi}`);
  const width = Math.round((page.width / 25.4) * dpi);
  const pixels = width * Math.round((page.height / 25.4) * dpi);
  if (pixels > MOST_PIXELS) {
    throw new RangeError(
      `an image of ${Math.round(pixels / 1e6)} million pixels is too large; take a lower resolution`,
    );
  }
  await prepare();
  const renderer = new Resvg(pageToSvg(page), {
    fitTo: { mode: 'width', value: width },
    font: { fontBuffers: fontsUsed(page).map(fontBytes), defaultFontFamily: 'IBM Plex Sans' },
  });
  const image = renderer.render();
  const bytes = image.asPng();
  image.free();
  renderer.free();
  return withResolution(bytes, dpi);
}
