import { useState } from 'preact/hooks';
import { type Fault, faultLine } from '../../core/scheme/fault.ts';
import { scheme } from '../state/document.ts';
import { refusal } from '../state/files.ts';
import { Button } from '../ui/button.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { words } from '../words/words.ts';

/** More faults than anybody reads at once; the copied text holds them all. */
const MOST_SHOWN = 200;

/** Why a file cannot be opened: every fault with its place and its cure. */
export function FaultsDialog() {
  const [isCopied, setCopied] = useState(false);
  const refused = refusal.value;
  if (refused === null) return null;
  const { name, faults } = refused;
  const open = scheme.value;
  const close = (): void => {
    setCopied(false);
    refusal.value = null;
  };
  const copy = async (): Promise<void> => {
    await navigator.clipboard.writeText([name, ...faults.map(faultLine)].join('\n'));
    setCopied(true);
  };
  return (
    <Dialog
      title={words.faults.title(name)}
      onClose={close}
      actions={
        <>
          <Button onPress={() => void copy()}>{isCopied ? words.faults.copied : words.faults.copy}</Button>
          <Button tone="primary" onPress={close}>
            {words.faults.close}
          </Button>
        </>
      }
    >
      <p>
        {words.faults.line(faults.length)} {open === null ? '' : words.faults.kept(open.title || words.bar.untitled)}
      </p>
      <ul aria-label={words.faults.message}>
        {faults.slice(0, MOST_SHOWN).map((fault) => (
          <FaultItem key={`${fault.place} ${fault.code} ${fault.message}`} fault={fault} />
        ))}
      </ul>
    </Dialog>
  );
}

const FaultItem = ({ fault }: { fault: Fault }) => (
  <li class="fault">
    <code>{fault.place || words.faults.whole}</code>
    <p>{fault.message}</p>
    {fault.cure === '' ? null : <p class="soft">{fault.cure}</p>}
  </li>
);
