import { useId } from 'preact/hooks';

type TextProps = {
  readonly label: string;
  readonly value: string;
  readonly isBad?: boolean;
  readonly wide?: boolean;
  readonly onInput: (value: string) => void;
};

/** A labelled field for one line of text. */
export function TextField({ label, value, isBad = false, wide = false, onInput }: TextProps) {
  const id = useId();
  return (
    <div class={wide ? 'mapping-field wide' : 'mapping-field'}>
      <label for={id}>{label}</label>
      <input
        id={id}
        class="field"
        type="text"
        spellcheck={false}
        autoComplete="off"
        aria-invalid={isBad}
        value={value}
        onInput={(event) => onInput(event.currentTarget.value)}
      />
    </div>
  );
}

type PickProps<T extends string> = {
  readonly label: string;
  readonly isLabelUnseen?: boolean;
  readonly value: T;
  readonly options: readonly (readonly [value: T, text: string])[];
  readonly onChoose: (value: T) => void;
};

/** A labelled choice of one of several. */
export function Pick<T extends string>({ label, isLabelUnseen = false, value, options, onChoose }: PickProps<T>) {
  const id = useId();
  return (
    <div class="mapping-field">
      <label for={id} class={isLabelUnseen ? 'unseen' : ''}>
        {label}
      </label>
      <select id={id} class="field" value={value} onChange={(event) => onChoose(event.currentTarget.value as T)}>
        {options.map(([key, text]) => (
          <option key={key} value={key}>
            {text}
          </option>
        ))}
      </select>
    </div>
  );
}
