import { signal } from '@preact/signals';
import { CAUTIONS } from '../../core/limits/cautions.ts';
import { version } from '../state/program.ts';
import { Button } from '../ui/button.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { words } from '../words/words.ts';

const isOpen = signal(false);

/** Opens what the program is, what it is made with, and its cautions. */
export function openAbout(): void {
  isOpen.value = true;
}

export const AboutButton = () => (
  <button type="button" onClick={openAbout}>
    {words.about.open}
  </button>
);

export function AboutDialog() {
  if (!isOpen.value) return null;
  const close = (): void => {
    isOpen.value = false;
  };
  return (
    <Dialog title={words.about.title} onClose={close} actions={<Button onPress={close}>{words.about.close}</Button>}>
      <p>{version.value === '' ? '' : words.about.version(version.value)}</p>
      <p>{words.about.what}</p>
      <p>{words.about.licence}</p>
      <h3>{words.about.parts}</h3>
      <ul class="plain">
        {words.about.list.map((part) => (
          <li key={part}>{part}</li>
        ))}
      </ul>
      <h3>{words.about.cautions}</h3>
      <ul class="plain">
        {CAUTIONS.map((caution) => (
          <li key={caution}>{caution}</li>
        ))}
      </ul>
    </Dialog>
  );
}
