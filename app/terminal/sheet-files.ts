import { existsSync } from 'node:fs';
import type { Document } from '../../core/sheet/drawing.ts';
import type { SetFile } from '../files/save-set.ts';
import type { NamedFile } from './outputs-apart.ts';
import { Refusal } from './refusal.ts';
import type { Screen } from './screen.ts';
import { writeOutputs } from './write-output.ts';

/** The files that a document is to be written to. */
export type SheetFiles = {
  readonly pdf?: string;
  readonly svg?: string;
  readonly png?: string;
  /** Dots per inch of PNG. */
  readonly dpi: number;
};

/** The files of a call with the options that name them. */
export const namedSheets = ({ pdf, svg, png }: SheetFiles): readonly NamedFile[] => [
  { as: '--pdf', path: pdf },
  { as: '--svg', path: svg },
  { as: '--png', path: png },
];

/** Where page k of several goes: `study.svg`, or `study-2.svg` from the second on. */
const pagePath = (path: string, k: number): string => (k === 0 ? path : path.replace(/(\.[^./\\]*)?$/, `-${k + 1}$1`));

/** A page of an earlier set that this one does not write: it would be taken for one of this. */
function stalePage(path: string | undefined, pages: number): readonly string[] {
  const next = path === undefined ? null : pagePath(path, Math.max(1, pages));
  return next !== null && existsSync(next) ? [next] : [];
}

/**
 * A document in the forms asked for, as files to be written together.
 * @param command  for the words of a refusal, such as `shadows`
 */
export async function sheetFiles(document: Document, to: SheetFiles, command: string): Promise<readonly SetFile[]> {
  const files: SetFile[] = [];
  if (to.pdf !== undefined) {
    const { pdfOf } = await import('../files/print-document.ts');
    files.push([to.pdf, await pdfOf(document)]);
  }
  if (to.svg !== undefined) {
    const [{ pageToSvg }, { fontFaceCss }] = await Promise.all([
      import('../../core/sheet/svg.ts'),
      import('../pdf/font-css.ts'),
    ]);
    for (const [k, page] of document.pages.entries())
      files.push([pagePath(to.svg, k), pageToSvg(page, fontFaceCss(page))]);
  }
  if (to.png !== undefined) {
    const { writePng } = await import('../pdf/write-png.ts');
    for (const [k, page] of document.pages.entries())
      files.push([pagePath(to.png, k), await imageOf(writePng(page, to.dpi), command)]);
  }
  return files;
}

/** Writes them, all or none, and tells of pages of an earlier, longer set. */
export async function writeSheetFiles(
  files: readonly SetFile[],
  to: SheetFiles,
  pages: number,
  screen: Screen,
): Promise<void> {
  await writeOutputs(files);
  for (const path of [...stalePage(to.svg, pages), ...stalePage(to.png, pages)])
    screen.note(`note: ${path} is of an earlier, longer set and was left as it is.\n`);
}

async function imageOf(made: Promise<Uint8Array>, command: string): Promise<Uint8Array> {
  try {
    return await made;
  } catch (error) {
    if (error instanceof RangeError) throw new Refusal(`shadewright ${command}: ${error.message}.`);
    throw error;
  }
}
