import { useEffect, useRef, useState } from 'preact/hooks';
import { DownIcon } from './icons.tsx';

export type MenuItem = {
  readonly text: string;
  readonly onPress: () => void;
  readonly off?: boolean;
  readonly tip?: string | undefined;
};

type Props = { readonly text: string; readonly items: readonly MenuItem[]; readonly off?: boolean };

/** A button that opens a short list of things to do; Escape and a press elsewhere close it. */
export function Menu({ text, items, off = false }: Props) {
  const [isOpen, setOpen] = useState(false);
  const root = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (!isOpen) return;
    root.current?.querySelector<HTMLElement>('[role="menuitem"]')?.focus();
    const away = (event: Event): void => {
      if (!root.current?.contains(event.target as Node)) setOpen(false);
    };
    document.addEventListener('pointerdown', away);
    return () => document.removeEventListener('pointerdown', away);
  }, [isOpen]);
  const onKeyDown = (event: KeyboardEvent): void => {
    if (!isOpen) return;
    const all = [...(root.current?.querySelectorAll<HTMLElement>('[role="menuitem"]') ?? [])];
    const at = all.indexOf(document.activeElement as HTMLElement);
    if (event.key === 'Escape' || event.key === 'Tab') {
      setOpen(false);
      if (event.key === 'Escape') root.current?.querySelector('button')?.focus();
      return;
    }
    const step = { ArrowDown: 1, ArrowUp: -1 }[event.key];
    if (step === undefined) return;
    event.preventDefault();
    all[(at + step + all.length) % all.length]?.focus();
  };
  return (
    <div class="menu" ref={root} role="none" onKeyDown={onKeyDown}>
      <button
        type="button"
        class="button"
        aria-haspopup="menu"
        aria-expanded={isOpen}
        aria-disabled={off ? 'true' : undefined}
        onClick={() => {
          if (!off) setOpen(!isOpen);
        }}
      >
        {text}
        <DownIcon />
      </button>
      {isOpen ? (
        <div class="menu-list" role="menu" aria-label={text}>
          {items.map((item) => (
            <button
              key={item.text}
              type="button"
              role="menuitem"
              title={item.tip}
              aria-disabled={item.off ? 'true' : undefined}
              onClick={() => {
                if (item.off) return;
                setOpen(false);
                item.onPress();
              }}
            >
              {item.text}
            </button>
          ))}
        </div>
      ) : null}
    </div>
  );
}
