import { scheme } from '../state/document.ts';
import { answerPending, pendingOpen } from '../state/files.ts';
import { Button } from '../ui/button.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { words } from '../words/words.ts';

/** Before another scheme takes the place of one with changes: what becomes of them. */
export function UnsavedDialog() {
  if (pendingOpen.value === null) return null;
  return (
    <Dialog
      title={words.unsaved.title(scheme.value?.title || words.bar.untitled)}
      onClose={() => void answerPending('stay')}
      actions={
        <>
          <Button onPress={() => void answerPending('stay')}>{words.unsaved.cancel}</Button>
          <Button onPress={() => void answerPending('discard')}>{words.unsaved.discard}</Button>
          <Button tone="primary" onPress={() => void answerPending('save')}>
            {words.unsaved.save}
          </Button>
        </>
      }
    >
      <p>{words.unsaved.line}</p>
    </Dialog>
  );
}
