import { computed } from '@preact/signals';
import { faultLine } from '../../core/scheme/fault.ts';
import { type KeptVariant, MOST_SIDE_BY_SIDE, variantsOf } from '../../core/scheme/variants.ts';
import { host } from '../bridge/host.ts';
import { hands } from '../jobs/hands.ts';
import { committed, edit, editVariants, whole } from '../state/document.ts';
import { tell } from '../state/messages.ts';
import { words } from '../words/words.ts';

/** The variants that are kept with the scheme: saved with it, and each kept or let go of as an edit. */
export const kept = computed<readonly KeptVariant[]>(() => (whole.value === null ? [] : variantsOf(whole.value)));
export const isFull = computed(() => kept.value.length >= MOST_SIDE_BY_SIDE - 1);

/** A name that no variant has yet. */
function freeName(wanted: string): string {
  const used = new Set(kept.peek().map((variant) => variant.name));
  if (!used.has(wanted)) return wanted;
  for (let n = 2; ; n++) if (!used.has(`${wanted} ${n}`)) return `${wanted} ${n}`;
}

function add(variant: KeptVariant): void {
  editVariants(words.compare.keepEdit(variant.name), (variants) => [...variants, variant]);
}

/** Keeps the scheme as it stands on the desk. */
export function keepNow(name: string): void {
  const scheme = committed.peek();
  if (scheme === null || isFull.peek()) return;
  const wanted = name.trim() === '' ? words.compare.usual(kept.peek().length + 1) : name.trim();
  add({ name: freeName(wanted), scheme });
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
  const short = name.replace(/(\.scheme)?\.json$/i, '').slice(0, LONGEST_NAME) || name;
  add({ name: freeName(short), scheme: outcome.result.value });
}

/** A free name may need a number more; the file's own bound is 60. */
export const LONGEST_NAME = 40;

export function letGo(name: string): void {
  editVariants(words.compare.letGoEdit(name), (variants) => variants.filter((variant) => variant.name !== name));
}

/** Puts a variant on the desk as one edit, which undo takes back; the variants stay. */
export function putOnDesk({ name, scheme }: KeptVariant): void {
  edit(words.compare.edit(name), () => scheme);
}
