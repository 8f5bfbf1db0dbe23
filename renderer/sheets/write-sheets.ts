import type { SheetSet } from '../../core/scheme/schema.ts';
import { faultLine } from '../../core/scheme/fault.ts';
import { pageToSvg } from '../../core/sheet/svg.ts';
import { host } from '../bridge/host.ts';
import { hands } from '../jobs/hands.ts';
import { committed, file, notes } from '../state/document.ts';
import { tell } from '../state/messages.ts';
import { weatherAtHand } from '../state/weather-at-hand.ts';
import { words } from '../words/words.ts';
import { drawn, job, setName, sets } from './sheet-state.ts';
import { today } from './today.ts';

const PNG_dpi = 150;

/** Name of the scheme's file without its endings. */
export const stem = (): string => (file.peek()?.name ?? words.bar.untitled).replace(/(\.scheme)?\.json$/i, '');

const fileName = (set: SheetSet, ending: string): string =>
  `${stem()} ${setName(set)}.${ending}`.replaceAll(/[\\/:*?"<>|]/g, '-').slice(0, 118);

/** @returns whether it was written: false also when the user thought better of it */
async function write(what: string, name: string, bytes: Uint8Array): Promise<boolean> {
  const written = await host['export:write']({ name, bytes });
  if (!written.ok) tell('failure', words.sheets.failed(what, written.message));
  else if (written.value !== null) tell('news', words.sheets.written(written.value.name));
  return written.ok && written.value !== null;
}

/** All pages that are shown, as PDF. */
export async function writePdf(): Promise<void> {
  const now = drawn.peek();
  if (now === null) return;
  tell('news', words.sheets.setting(words.sheets.pdf));
  const pdf = await host['sheet:pdf']({ document: now.document });
  if (!pdf.ok) return tell('failure', words.sheets.failed(words.sheets.pdf, pdf.message));
  await write(words.sheets.pdf, fileName(now.set, 'pdf'), pdf.value.bytes);
}

/** One page, as SVG or PNG. */
export async function writePage(index: number, form: 'svg' | 'png'): Promise<void> {
  const now = drawn.peek();
  const page = now?.document.pages[index];
  if (now === null || page === undefined) return;
  if (form === 'svg') {
    await write(words.sheets.svg, fileName(now.set, 'svg'), new TextEncoder().encode(pageToSvg(page)));
    return;
  }
  tell('news', words.sheets.setting(words.sheets.png));
  const png = await host['sheet:png']({ document: { ...now.document, pages: [page] }, dpi: PNG_dpi });
  if (!png.ok) return tell('failure', words.sheets.failed(words.sheets.png, png.message));
  await write(words.sheets.png, fileName(now.set, 'png'), png.value.bytes);
}

/** The shadows of the study, as shapes on the map or as a table. */
export async function writeShadows(form: 'geojson' | 'csv'): Promise<void> {
  const now = drawn.peek();
  if (now === null) return;
  const what = words.sheets[form];
  const outcome = await hands.clerk.run('shadowFile', { set: now.set, form }, now.scheme);
  if (outcome.kind === 'failed') return tell('failure', words.sheets.failed(what, outcome.message));
  if (outcome.kind === 'done') await write(what, fileName(now.set, form), new TextEncoder().encode(outcome.result));
}

/** Every kept set drawn anew and written, a PDF each. One that cannot be drawn is told, and ends it. */
export async function writeAll(): Promise<void> {
  const of = committed.peek();
  if (of === null) return;
  let count = 0;
  for (const set of sets.peek()) {
    const what = setName(set);
    const outcome = await hands.sheets.run(
      'sheet',
      { set, drawn: today(), notes: notes.peek(), weather: weatherAtHand.peek() },
      of,
      (done, total) => {
        job.value = { kind: 'working', done, total };
      },
    );
    job.value = { kind: 'idle' };
    if (outcome.kind === 'stopped') return tell('news', words.sheets.allStopped);
    if (outcome.kind === 'failed') return tell('failure', words.sheets.failed(what, outcome.message));
    const made = outcome.result;
    if (!made.ok) return tell('failure', words.sheets.failed(what, made.faults.map(faultLine).join(' · ')));
    const pdf = await host['sheet:pdf']({ document: made.value });
    if (!pdf.ok) return tell('failure', words.sheets.failed(what, pdf.message));
    if (!(await write(what, fileName(set, 'pdf'), pdf.value.bytes))) return;
    count++;
  }
  tell('news', words.sheets.allDone(count));
}
