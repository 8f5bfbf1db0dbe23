import type { Message } from '../state/messages.ts';
import { Button } from './button.tsx';
import { CloseIcon } from './icons.tsx';
import { words } from '../words/words.ts';

type Props = { readonly shown: Message | null; readonly onDismiss: () => void };

/** What has just happened, in one line. */
export function MessageLine({ shown, onDismiss }: Props) {
  return (
    <div role={shown?.tone === 'failure' ? 'alert' : 'status'}>
      {shown === null ? null : (
        <div class={`message-line ${shown.tone}`}>
          <span>{shown.text}</span>
          <Button icon tone="plain" label={words.status.dismiss} onPress={onDismiss}>
            <CloseIcon />
          </Button>
        </div>
      )}
    </div>
  );
}
