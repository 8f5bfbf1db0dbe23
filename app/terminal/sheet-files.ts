import type { Document } from '../../core/sheet/drawing.ts';
import type { NamedFile } from './outputs-apart.ts';
import { Refusal } from './refusal.ts';
import { writeOutput } from './write-output.ts';

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

/**
 * Writes a document in the forms asked for. Every file is made before the first is written, so that a refusal leaves nothing
 * half done.
 * @param command  for the words of a refusal, such as `shadows`
 * @returns the paths, in the order written
 */
export async function writeSheetFiles(document: Document, to: SheetFiles, command: string): Promise<readonly string[]> {
  const files: [string, Uint8Array | string][] = [];
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
  for (const [path, bytes] of files) await writeOutput(path, bytes);
  return files.map(([path]) => path);
}

async function imageOf(made: Promise<Uint8Array>, command: string): Promise<Uint8Array> {
  try {
    return await made;
  } catch (error) {
    if (error instanceof RangeError) throw new Refusal(`shadewright ${command}: ${error.message}.`);
    throw error;
  }
}
