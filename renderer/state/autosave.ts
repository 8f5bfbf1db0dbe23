import { effect } from '@preact/signals';
import { desktopBridge, host } from '../bridge/host.ts';
import { hands } from '../jobs/hands.ts';
import { words } from '../words/words.ts';
import { file, isUnsaved, whole } from './document.ts';
import { tell } from './messages.ts';

/** Typing and dragging make a row of edits: the last of them is kept once the hand has rested this long. */
const REST_ms = 800;

/** The slot of the open scheme; another scheme gets another, so that none writes over work that waits. */
let slot = crypto.randomUUID() as string;
/** Whether the slot holds something at the host. */
let isKept = false;
/** What was asked of the host last: keeping and letting go must arrive in the order in which they were meant. */
let last: Promise<unknown> = Promise.resolve();
let hasTold = false;

const bytes = new TextEncoder();

/** Gives the scheme that is about to be opened a slot of its own. @param key the slot that its work was brought back from */
export function beginSlot(key: string | null): void {
  slot = key ?? crypto.randomUUID();
  isKept = key !== null;
}

/** Lets go of what is kept of the open scheme: it has been saved, or the user wants none of it. */
export function letGoOfSlot(): void {
  const key = slot;
  if (isKept) last = last.then(() => host['scheme:discard']({ key }));
  isKept = false;
}

/** A title may hold what a file name cannot. */
const fileName = (name: string): string => name.replace(/[\\/\0]/g, '-').slice(0, 120) || 'scheme';

async function keep(): Promise<void> {
  const [scheme, where, key] = [whole.peek(), file.peek(), slot];
  if (scheme === null || where === null || !isUnsaved.peek()) return;
  const written = await hands.keeper.run('write', { scheme });
  // By now it may have been saved, or another scheme may be open.
  if (written.kind !== 'done' || key !== slot || !isUnsaved.peek()) return;
  isKept = true;
  const work = { key, name: fileName(where.name), bytes: bytes.encode(written.result) };
  const kept = last.then(() => host['scheme:autosave'](work));
  last = kept;
  const reply = await kept;
  if (reply.ok || hasTold) return;
  hasTold = true;
  tell('failure', words.status.notKept(reply.message));
}

/**
 * Keeps unsaved work with the host as it changes, and lets it go once it is saved. A browser also asks before its window closes;
 * on the desktop the host does.
 */
export function keepUnsavedWork(): void {
  let timer: ReturnType<typeof setTimeout> | undefined;
  effect(() => {
    clearTimeout(timer);
    if (whole.value === null) return;
    if (isUnsaved.value) timer = setTimeout(() => void keep(), REST_ms);
    else letGoOfSlot();
  });
  if (desktopBridge !== null) return;
  window.addEventListener('beforeunload', (event) => {
    if (isUnsaved.peek()) event.preventDefault();
  });
}
