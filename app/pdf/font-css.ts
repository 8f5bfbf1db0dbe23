import type { Page } from '../../core/sheet/drawing.ts';
import { type FontName, fontBytes } from './fonts.ts';
import { fontsUsed } from './fonts-used.ts';

const FAMILY: { readonly [F in FontName]: string } = {
  regular: "'IBM Plex Sans'",
  semibold: "'IBM Plex Sans';font-weight:600",
  italic: "'IBM Plex Sans';font-style:italic",
  cjk: "'Noto Sans JP'",
  arabic: "'Noto Sans Arabic'",
  hebrew: "'Noto Sans Hebrew'",
};

/** `@font-face` rules that carry the fonts of a page inside an SVG, so that it looks alike where they are not installed. */
export const fontFaceCss = (page: Page): string =>
  fontsUsed(page)
    .map((font) => {
      const data = Buffer.from(fontBytes(font)).toString('base64');
      return `@font-face{font-family:${FAMILY[font]};src:url(data:font/ttf;base64,${data}) format('truetype')}`;
    })
    .join('\n');
