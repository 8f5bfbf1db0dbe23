import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { create } from 'fontkit';

const folder = dirname(createRequire(import.meta.url).resolve('@expo-google-fonts/ibm-plex-sans/package.json'));

/** The three faces of the house, as files of the font package. */
export const FACE_FILES = {
  regular: join(folder, '400Regular/IBMPlexSans_400Regular.ttf'),
  semibold: join(folder, '600SemiBold/IBMPlexSans_600SemiBold.ttf'),
  italic: join(folder, '400Regular_Italic/IBMPlexSans_400Regular_Italic.ttf'),
} as const;

/** Opens one face with fontkit, which pdfkit embeds with. */
export const openFace = (face: keyof typeof FACE_FILES) => create(readFileSync(FACE_FILES[face]));

/** The text of core/sheet/font-widths.ts, read out of the fonts: runs of neighbouring code points with their advances in base 36. */
export function fontWidthsSource(): string {
  const regular = openFace('regular');
  const points = regular.characterSet
    .filter((c) => c >= 0x20 && c < 0xe000 && !(c >= 0x7f && c < 0xa0))
    .sort((a, b) => a - b);
  const runs: number[][] = [];
  for (const c of points) {
    const last = runs.at(-1);
    if (last && last.at(-1) === c - 1) last.push(c);
    else runs.push([c]);
  }
  const table = (face: keyof typeof FACE_FILES): string => {
    const font = openFace(face);
    return runs
      .map(
        (run) =>
          `  '${run[0]?.toString(16)}:${run.map((c) => font.glyphForCodePoint(c).advanceWidth.toString(36)).join(' ')}',`,
      )
      .join('\n');
  };
  return `/**
 * Advance widths of the house face, IBM Plex Sans, in thousandths of the em: what paper and screen measure text with, so that
 * both break lines at the same place. Each entry is a run of neighbouring code points: the first in base 16, then the
 * widths in base 36. Read out of the fonts and held equal to them by test/core/sheet/font-widths.test.ts.
 */
// biome-ignore format: a table
export const REGULAR: readonly string[] = [
${table('regular')}
];

// biome-ignore format: a table
export const SEMIBOLD: readonly string[] = [
${table('semibold')}
];

// biome-ignore format: a table
export const ITALIC: readonly string[] = [
${table('italic')}
];
`;
}
