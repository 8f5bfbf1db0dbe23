import { sunPathDocument, sunPathPage } from '../../core/sheet/sun-path.ts';
import { pageToSvg } from '../../core/sheet/svg.ts';
import { host } from '../bridge/host.ts';
import { file, scheme } from '../state/document.ts';
import { tell } from '../state/messages.ts';
import { words } from '../words/words.ts';
import { drawingOf, inputFor } from './drawing-input.ts';
import { projection } from './sun-path-state.ts';

/** A4 on its side [mm]. */
const WIDE = 297;
const HIGH = 210;

const nameOf = (ending: string): string => {
  const stem = (file.peek()?.name ?? words.bar.untitled).replace(/(\.scheme)?\.json$/i, '');
  return `${stem} ${words.sunPath.fileName}.${ending}`;
};

async function write(name: string, bytes: Uint8Array): Promise<void> {
  const written = await host['export:write']({ name, bytes });
  if (!written.ok) tell('failure', words.sheets.failed(words.sunPath.label, written.message));
  else if (written.value !== null) tell('news', words.sheets.written(written.value.name));
}

/** The drawing that is shown, as an SVG file of the size of an A4 page. */
export async function saveSvg(): Promise<void> {
  const fixed = drawingOf.peek();
  if (fixed === null) return;
  const page = sunPathPage(WIDE, HIGH, inputFor(fixed, projection.peek()));
  await write(nameOf('svg'), new TextEncoder().encode(pageToSvg(page)));
}

/** Both drawings on pages of A4. */
export async function savePdf(): Promise<void> {
  const [fixed, of] = [drawingOf.peek(), scheme.peek()];
  if (fixed === null || of === null) return;
  const inputs = (['stereographic', 'altitude-azimuth'] as const).map((p) => inputFor(fixed, p));
  const facts = { title: of.title, author: of.author, language: 'en-GB', note: '' };
  const pdf = await host['sheet:pdf']({ document: sunPathDocument(inputs, 'A4', true, facts) });
  if (!pdf.ok) return tell('failure', words.sheets.failed(words.sunPath.label, pdf.message));
  await write(nameOf('pdf'), pdf.value.bytes);
}
