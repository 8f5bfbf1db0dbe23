import { signal } from '@preact/signals';
import type { Page } from '../../core/sheet/drawing.ts';

/** The pages that are being printed: they stand in the document only then. */
export const printing = signal<readonly Page[]>([]);

/** The size of the paper, as a style of the page: rules made by script are not text in the document, so the policy allows them. */
const paper = new CSSStyleSheet();

/** @param size width and height of every page [mm] */
export const paperRule = ([width, height]: readonly [number, number]): string =>
  `@page { size: ${width}mm ${height}mm; margin: 0; }`;

/** Puts the pages where the printer finds them, at true size. Gives the way to take them away again. */
export async function setForPrint(pages: readonly Page[]): Promise<() => void> {
  const [first] = pages;
  if (first === undefined) return () => undefined;
  paper.replaceSync(paperRule([first.width, first.height]));
  if (!document.adoptedStyleSheets.includes(paper))
    document.adoptedStyleSheets = [...document.adoptedStyleSheets, paper];
  printing.value = pages;
  // Drawn on the next frame; the one after has it laid out.
  await new Promise((go) => requestAnimationFrame(() => requestAnimationFrame(go)));
  await document.fonts.ready;
  return () => {
    printing.value = [];
    document.adoptedStyleSheets = document.adoptedStyleSheets.filter((sheet) => sheet !== paper);
  };
}

/** The system's print dialog over the pages at actual size. */
export async function printPages(pages: readonly Page[]): Promise<void> {
  const takeAway = await setForPrint(pages);
  window.addEventListener('afterprint', takeAway, { once: true });
  window.print();
}
