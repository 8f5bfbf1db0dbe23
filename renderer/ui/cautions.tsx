import type { ComponentChildren } from 'preact';
import { useState } from 'preact/hooks';
import { CAUTIONS, SHORT_CAUTION } from '../../core/limits/cautions.ts';
import { Button } from './button.tsx';
import { Dialog } from './dialog.tsx';
import { words } from '../words/words.ts';

/** The cautions that go with every result: one line always in sight, the whole of them one press away. */
export function Cautions({ children }: { readonly children?: ComponentChildren }) {
  const [isOpen, setOpen] = useState(false);
  const close = (): void => setOpen(false);
  return (
    <footer class="cautions">
      <span>{SHORT_CAUTION}</span>
      <span class="footer-links">
        <button type="button" onClick={() => setOpen(true)}>
          {words.cautions.more}
        </button>
        {children}
      </span>
      {isOpen ? (
        <Dialog
          title={words.cautions.title}
          onClose={close}
          actions={<Button onPress={close}>{words.cautions.close}</Button>}
        >
          <ul class="plain">
            {CAUTIONS.map((caution) => (
              <li key={caution}>{caution}</li>
            ))}
          </ul>
        </Dialog>
      ) : null}
    </footer>
  );
}
