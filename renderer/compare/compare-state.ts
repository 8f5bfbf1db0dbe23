import { computed, signal } from '@preact/signals';
import { faultLine } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { host } from '../bridge/host.ts';
import { hands } from '../jobs/hands.ts';
import { committed, edit, file } from '../state/document.ts';
import { tell } from '../state/messages.ts';
import { words } from '../words/words.ts';

/** A scheme that is kept to be compared with. Kept for this session: a variant that matters is saved as a file of its own. */
export type Kept = { readonly name: string; readonly scheme: Scheme };

/** As many as can be read side by side, that on the desk counted. */
const MOST = 8;

export const kept = signal<readonly Kept[]>([]);
export const isFull = computed(() => kept.value.length >= MOST - 1);

// Variants belong to the file that they were made from.
let owner = file.peek();
file.subscribe((now) => {
  if (now === null || (owner !== null && now.name !== owner.name)) kept.value = [];
  owner = now;
});

/** A name that no variant has yet. */
function freeName(wanted: string): string {
  const used = new Set(kept.peek().map((variant) => variant.name));
  if (!used.has(wanted)) return wanted;
  for (let n = 2; ; n++) if (!used.has(`${wanted} ${n}`)) return `${wanted} ${n}`;
}

/** Keeps the scheme as it stands on the desk. */
export function keepNow(name: string): void {
  const scheme = committed.peek();
  if (scheme === null || isFull.peek()) return;
  const wanted = name.trim() === '' ? words.compare.usual(kept.peek().length + 1) : name.trim();
  kept.value = [...kept.peek(), { name: freeName(wanted), scheme }];
}

/** Adds a scheme file that the user chooses. */
export async function addFile(): Promise<void> {
  const reply = await host['scheme:open'](null);
  if (!reply.ok) return tell('failure', words.status.notOpened(reply.message));
  if (reply.value === null) return;
  const { name, bytes } = reply.value;
  const outcome = await hands.clerk.run('read', { text: new TextDecoder().decode(bytes) });
  if (outcome.kind === 'failed') return tell('failure', words.compare.notAdded(name, outcome.message));
  if (outcome.kind !== 'done') return;
  if (!outcome.result.ok)
    return tell('failure', words.compare.notAdded(name, outcome.result.faults.map(faultLine).join(' · ')));
  kept.value = [
    ...kept.peek(),
    { name: freeName(name.replace(/(\.scheme)?\.json$/i, '')), scheme: outcome.result.value },
  ];
}

export function letGo(name: string): void {
  kept.value = kept.peek().filter((variant) => variant.name !== name);
}

/** Puts a variant on the desk as one edit, which undo takes back. */
export function putOnDesk({ name, scheme }: Kept): void {
  edit(words.compare.edit(name), () => scheme);
}
