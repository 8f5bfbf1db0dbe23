import type { ComponentChildren } from 'preact';
import { useId, useLayoutEffect, useRef } from 'preact/hooks';

type Props = {
  readonly title: string;
  readonly children: ComponentChildren;
  readonly actions: ComponentChildren;
  readonly onClose: () => void;
};

/** A dialog that holds the keyboard until it is closed; Escape closes it, and the focus goes back to where it was. */
export function Dialog({ title, children, actions, onClose }: Props) {
  const ref = useRef<HTMLDialogElement>(null);
  const id = useId();
  useLayoutEffect(() => {
    const dialog = ref.current as HTMLDialogElement;
    const before = document.activeElement as HTMLElement | null;
    dialog.showModal();
    return () => {
      dialog.close();
      before?.focus();
    };
  }, []);
  return (
    <dialog
      ref={ref}
      class="dialog"
      aria-labelledby={id}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
    >
      <h2 id={id}>{title}</h2>
      <div class="dialog-body">{children}</div>
      <div class="dialog-actions">{actions}</div>
    </dialog>
  );
}
