import { Button } from './button.tsx';
import { words } from '../words/words.ts';

type Props = { readonly text: string; readonly done: number; readonly total: number; readonly onStop?: () => void };

/** Work in hand: how far it is, and a way to stop it. */
export function Progress({ text, done, total, onStop }: Props) {
  return (
    <div class="progress">
      <span>{text}</span>
      <progress max={total > 0 ? total : 1} value={total > 0 ? done : undefined} aria-label={text} />
      {onStop === undefined ? null : (
        <Button tone="plain" onPress={onStop}>
          {words.findings.stop}
        </Button>
      )}
    </div>
  );
}
