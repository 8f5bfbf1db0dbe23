import type { ComponentChildren } from 'preact';

type Props = {
  readonly children: ComponentChildren;
  readonly onPress: () => void;
  readonly tone?: 'usual' | 'primary' | 'plain';
  /** A label for what shows no words; also the tip. */
  readonly label?: string | undefined;
  readonly tip?: string | undefined;
  /** Cannot be pressed now, but can be found and read. */
  readonly off?: boolean | undefined;
  readonly pressed?: boolean | undefined;
  readonly icon?: boolean;
};

/** A button. One that is off keeps its place in the tab order, so that its tip can say why. */
export function Button({ children, onPress, tone = 'usual', label, tip, off = false, pressed, icon = false }: Props) {
  const classes = ['button', tone === 'usual' ? '' : tone, icon ? 'icon' : ''].filter(Boolean).join(' ');
  return (
    <button
      type="button"
      class={classes}
      aria-label={label}
      title={tip ?? label}
      aria-disabled={off ? 'true' : undefined}
      aria-pressed={pressed}
      onClick={() => {
        if (!off) onPress();
      }}
    >
      {children}
    </button>
  );
}
