import { effect, signal } from '@preact/signals';
import type { FileId, Opened } from '../../app/contract/host.ts';
import type { Fault } from '../../core/scheme/fault.ts';
import { blankScheme } from '../../core/scheme/blank.ts';
import { DEFAULT_YEAR, type Scheme } from '../../core/scheme/schema.ts';
import { civilOf } from '../../core/sun/civil.ts';
import { seasons } from '../../core/sun/seasons.ts';
import { desktopBridge, host } from '../bridge/host.ts';
import { canSaveOver } from '../bridge/page-files.ts';
import { hands } from '../jobs/hands.ts';
import { words } from '../words/words.ts';
import { beginSlot, letGoOfSlot } from './autosave.ts';
import { file, isUnsaved, leave, markSaved, place, whole } from './document.ts';
import { tell } from './messages.ts';
import { civil } from './moment.ts';
import { selectNothing } from './selection.ts';
import { runCheck } from './studies.ts';

/** A file that could not be opened, and why: shown as a list until it is closed. */
export type Refusal = { readonly name: string; readonly faults: readonly Fault[] };

export const refusal = signal<Refusal | null>(null);
export const isReading = signal(false);
/** What waits for the user to say what becomes of unsaved changes. */
export const pendingOpen = signal<(() => void) | null>(null);

const text = new TextDecoder();
const bytes = new TextEncoder();

/** Goes on at once, or after the user has said what becomes of unsaved changes. */
function afterLeaving(go: () => void): void {
  if (isUnsaved.peek()) pendingOpen.value = go;
  else go();
}

export async function answerPending(answer: 'save' | 'discard' | 'stay'): Promise<void> {
  const go = pendingOpen.peek();
  if (answer === 'save' && !(await save())) return;
  pendingOpen.value = null;
  if (answer === 'discard') letGoOfSlot();
  if (answer !== 'stay') go?.();
}

/**
 * Reads a file and puts it on the desk whole, or shows its faults and leaves the desk as it was.
 * @param id    null when there is no file to save over: an example, or work brought back
 * @param slot  where unsaved work was brought back from; null: what is opened lies somewhere else as well
 */
async function take(name: string, data: Uint8Array, id: FileId | null, slot: string | null = null): Promise<void> {
  isReading.value = true;
  const outcome = await hands.clerk.run('read', { text: text.decode(data) });
  isReading.value = false;
  if (outcome.kind === 'failed') return tell('failure', words.status.notOpened(outcome.message));
  if (outcome.kind === 'stopped') return;
  const checked = outcome.result;
  if (!checked.ok) {
    refusal.value = { name, faults: checked.faults };
    return;
  }
  beginSlot(slot);
  show(checked.value, { id, name }, checked.notes, slot === null);
}

function show(
  scheme: Scheme,
  where: { id: FileId | null; name: string },
  warnings: readonly Fault[],
  isSaved: boolean,
): void {
  selectNothing();
  civil.value = { date: firstDate(scheme), time: civil.peek().time };
  place(scheme, where, warnings, isSaved);
  void runCheck();
}

/** The solstice of the site's summer, where gains and shadows are looked at first. */
function firstDate(scheme: Scheme): string {
  const { juneSolstice_ms, decemberSolstice_ms } = seasons(scheme.year ?? DEFAULT_YEAR);
  return civilOf(scheme.site.latitude < 0 ? decemberSolstice_ms : juneSolstice_ms, scheme.site.zone).date;
}

export const takeOpened = (opened: Opened): void => afterLeaving(() => void take(opened.name, opened.bytes, opened.id));

/** Where nobody knows yet where a scheme will stand: the place is asked for at once. */
const SOMEWHERE = { latitude: 51.5, longitude: 0, zone: 'Europe/London' } as const;

/**
 * A scheme with nothing drawn, in place of the one that is open.
 * @param then called once it is there, so that its place can be asked for
 */
export function beginScheme(then: () => void): void {
  afterLeaving(() => {
    const scheme = blankScheme({ title: words.bar.newTitle, ...SOMEWHERE, limits: 'example-gain' });
    beginSlot(null);
    show(scheme, { id: null, name: `${words.bar.newTitle}.scheme.json` }, [], true);
    then();
  });
}

/** Back to the start, where recent schemes and examples are. */
export const leaveScheme = (): void =>
  afterLeaving(() => {
    selectNothing();
    leave();
  });

export async function openByDialog(): Promise<void> {
  const reply = await host['scheme:open'](null);
  if (!reply.ok) return tell('failure', words.status.notOpened(reply.message));
  if (reply.value !== null) takeOpened(reply.value);
}

export async function openRecent(id: FileId): Promise<void> {
  const reply = await host['scheme:reopen']({ id });
  if (!reply.ok) return tell('failure', words.status.notOpened(reply.message));
  takeOpened(reply.value);
}

export async function openDemo(key: string): Promise<void> {
  const reply = await host['scheme:demo']({ key });
  if (!reply.ok) return tell('failure', words.status.notOpened(reply.message));
  const { name, bytes: data } = reply.value;
  afterLeaving(() => void take(name, data, null));
}

/** A file that was dropped on the window. On the desktop it can be saved over; in a browser it comes as a copy. */
export async function openDropped(dropped: File): Promise<void> {
  if (desktopBridge !== null) {
    const reply = await desktopBridge.dropped(dropped);
    if (!reply.ok) return tell('failure', words.status.notOpened(reply.message));
    return takeOpened(reply.value);
  }
  const data = new Uint8Array(await dropped.arrayBuffer());
  afterLeaving(() => void take(dropped.name, data, null));
}

export function openRecovered(kept: { key: string; name: string; bytes: Uint8Array }): void {
  afterLeaving(() => void take(kept.name, kept.bytes, null, kept.key));
}

async function textOf(scheme: Scheme): Promise<string | null> {
  const outcome = await hands.writer.run('write', { scheme });
  if (outcome.kind === 'done') return outcome.result;
  if (outcome.kind === 'failed') tell('failure', words.status.notSaved(outcome.message));
  return null;
}

/** @returns whether the scheme is on disk now */
export async function save(): Promise<boolean> {
  const scheme = whole.peek();
  const where = file.peek();
  if (scheme === null || where === null) return false;
  if (where.id === null || !canSaveOver(where.id)) return saveAs();
  const written = await textOf(scheme);
  if (written === null) return false;
  const reply = await host['scheme:save']({ id: where.id, bytes: bytes.encode(written) });
  if (!reply.ok) {
    tell('failure', words.status.notSaved(reply.message));
    return false;
  }
  markSaved(scheme, where);
  tell('news', words.status.saved(where.name));
  return true;
}

export async function saveAs(): Promise<boolean> {
  const scheme = whole.peek();
  const where = file.peek();
  if (scheme === null || where === null) return false;
  const written = await textOf(scheme);
  if (written === null) return false;
  const name = where.name.endsWith('.json') ? where.name : `${where.name}.scheme.json`;
  const reply = await host['scheme:save-as']({ name, bytes: bytes.encode(written) });
  if (!reply.ok) {
    tell('failure', words.status.notSaved(reply.message));
    return false;
  }
  if (reply.value === null) return false;
  markSaved(scheme, reply.value);
  tell('news', words.status.saved(reply.value.name));
  return true;
}

/** Tells the host, which asks before it closes a window with unsaved work. */
export function reportUnsaved(): void {
  effect(() => {
    desktopBridge?.setUnsaved(isUnsaved.value);
  });
}
