import { useId, useState } from 'preact/hooks';

type TextProps = {
  readonly label: string;
  readonly value: string;
  readonly wide?: boolean;
  readonly off?: boolean;
  readonly onText: (text: string) => void;
};

/** A line of text, taken when the field is left or Enter pressed. */
export function TextField({ label, value, wide = false, off = false, onText }: TextProps) {
  return (
    <label class={wide ? 'wide' : ''}>
      <span>{label}</span>
      <input
        class="field"
        type="text"
        readOnly={off}
        value={value}
        onChange={(event) => onText(event.currentTarget.value.trim())}
      />
    </label>
  );
}

type NumberProps = {
  readonly label: string;
  readonly unit: string;
  readonly value: number | null;
  readonly off?: boolean;
  readonly onNumber: (value: number) => void;
};

/** A number with its unit; what is none is marked and not taken. */
export function NumberField({ label, unit, value, off = false, onNumber }: NumberProps) {
  const id = useId();
  const [isBad, setBad] = useState(false);
  const take = (typed: string): void => {
    const number = Number(typed.trim().replace(',', '.'));
    const isGood = typed.trim() !== '' && Number.isFinite(number);
    setBad(!isGood);
    if (isGood && number !== value) onNumber(number);
  };
  return (
    <div class="labelled">
      <label for={id}>{label}</label>
      <span class="with-unit">
        <input
          id={id}
          class="field number"
          type="text"
          inputMode="decimal"
          readOnly={off}
          aria-invalid={isBad}
          value={value ?? ''}
          onChange={(event) => take(event.currentTarget.value)}
        />
        <span class="soft">{unit}</span>
      </span>
    </div>
  );
}

type SelectProps<T extends string> = {
  readonly label: string;
  readonly value: T;
  readonly options: readonly (readonly [T, string])[];
  readonly off?: boolean;
  readonly onChoose: (value: T) => void;
};

export function SelectField<T extends string>({ label, value, options, off = false, onChoose }: SelectProps<T>) {
  const id = useId();
  return (
    <div class="labelled">
      <label for={id}>{label}</label>
      <select
        id={id}
        class="field"
        disabled={off}
        value={value}
        onChange={(event) => onChoose(event.currentTarget.value as T)}
      >
        {options.map(([option, name]) => (
          <option key={option} value={option}>
            {name}
          </option>
        ))}
      </select>
    </div>
  );
}

type DateProps = {
  readonly label: string;
  readonly value: string | null;
  readonly onDate: (date: string | null) => void;
};

/** A date, or none. */
export const DateField = ({ label, value, onDate }: DateProps) => (
  <label>
    <span>{label}</span>
    <input
      class="field"
      type="date"
      value={value ?? ''}
      onChange={(event) => onDate(event.currentTarget.value || null)}
    />
  </label>
);
