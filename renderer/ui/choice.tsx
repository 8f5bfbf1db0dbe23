import { useId } from 'preact/hooks';

export type Option<T extends string> = { readonly value: T; readonly text: string; readonly tip?: string };

type Props<T extends string> = {
  readonly label: string;
  readonly options: readonly Option<T>[];
  readonly value: T | null;
  readonly onChoose: (value: T) => void;
};

/** One of a few, side by side: radio buttons in the shape of buttons. */
export function Choice<T extends string>({ label, options, value, onChoose }: Props<T>) {
  const name = useId();
  return (
    <fieldset class="group choice">
      <legend class="unseen">{label}</legend>
      {options.map((option) => (
        <label key={option.value} class="button" title={option.tip}>
          <input
            type="radio"
            class="unseen"
            name={name}
            value={option.value}
            checked={option.value === value}
            aria-label={option.tip}
            onChange={() => onChoose(option.value)}
          />
          {option.text}
        </label>
      ))}
    </fieldset>
  );
}
