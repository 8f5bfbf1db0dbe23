import { moveFocus } from './move-focus.ts';

export type Option<T extends string> = { readonly value: T; readonly text: string; readonly tip?: string };

type Props<T extends string> = {
  readonly label: string;
  readonly options: readonly Option<T>[];
  readonly value: T | null;
  readonly onChoose: (value: T) => void;
};

/** One of a few, side by side: arrow keys move between them, as in any set of radio buttons. */
export function Choice<T extends string>({ label, options, value, onChoose }: Props<T>) {
  const current = options.some((o) => o.value === value) ? value : options[0]?.value;
  return (
    <div class="group" role="radiogroup" aria-label={label} onKeyDown={(event) => moveFocus(event, '[role="radio"]')}>
      {options.map((option) => (
        <button
          key={option.value}
          type="button"
          role="radio"
          class={option.value === value ? 'button chosen' : 'button'}
          aria-checked={option.value === value}
          tabIndex={option.value === current ? 0 : -1}
          title={option.tip}
          aria-label={option.tip}
          onClick={() => onChoose(option.value)}
        >
          {option.text}
        </button>
      ))}
    </div>
  );
}
