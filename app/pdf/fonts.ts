import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import type { Face } from '../../core/sheet/drawing.ts';

/** What a stretch of text is set in: a face of the house, or the font called in for a script that it lacks. */
export type FontName = Face | 'cjk' | 'arabic' | 'hebrew';

/** Where each font lies: a package of the installation and the file in it. All of them are under the SIL Open Font Licence. */
const PLACES: { readonly [N in FontName]: readonly [pack: string, file: string] } = {
  regular: ['@expo-google-fonts/ibm-plex-sans', '400Regular/IBMPlexSans_400Regular.ttf'],
  semibold: ['@expo-google-fonts/ibm-plex-sans', '600SemiBold/IBMPlexSans_600SemiBold.ttf'],
  italic: ['@expo-google-fonts/ibm-plex-sans', '400Regular_Italic/IBMPlexSans_400Regular_Italic.ttf'],
  cjk: ['@expo-google-fonts/noto-sans-jp', '400Regular/NotoSansJP_400Regular.ttf'],
  arabic: ['@expo-google-fonts/noto-sans-arabic', '400Regular/NotoSansArabic_400Regular.ttf'],
  hebrew: ['@expo-google-fonts/noto-sans-hebrew', '400Regular/NotoSansHebrew_400Regular.ttf'],
};

const read = new Map<FontName, Uint8Array>();

/**
 * The bytes of a font, read once. Found from wherever this module runs, source or bundle, by asking Node for the package.
 * @throws when the installation lacks the font
 */
export function fontBytes(name: FontName): Uint8Array {
  const known = read.get(name);
  if (known) return known;
  const [pack, file] = PLACES[name];
  const folder = dirname(createRequire(import.meta.url).resolve(`${pack}/package.json`));
  const bytes = new Uint8Array(readFileSync(join(folder, file)));
  read.set(name, bytes);
  return bytes;
}
