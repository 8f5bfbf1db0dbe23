import { metres } from '../ui/format.ts';
import { words } from '../words/words.ts';
import { ANY, choicesOf, FIELDS, type Field, type RoomFilter, type RoomTraits } from './room-filter.ts';

type Props = {
  readonly traits: ReadonlyMap<string, RoomTraits>;
  readonly filter: RoomFilter;
  readonly onFilter: (filter: RoomFilter) => void;
};

const text = words.findings.narrow;

/** Narrows the rooms to a block, a storey, a use or a side. Fields in which all rooms are alike are left out. */
export function FilterBar({ traits, filter, onFilter }: Props) {
  const shown = FIELDS.map((field) => ({ field, choices: choicesOf(traits, field) })).filter(
    ({ field, choices }) => choices.length > 1 || filter[field] !== null,
  );
  if (shown.length === 0) return null;
  const isNarrowed = FIELDS.some((field) => filter[field] !== null);
  return (
    <fieldset class="filter-bar">
      <legend class="unseen">{text.label}</legend>
      {shown.map(({ field, choices }) => (
        <select
          key={field}
          class={filter[field] === null ? 'field' : 'field narrowed'}
          aria-label={text.fields[field]}
          value={filter[field] ?? ''}
          onChange={(event) => {
            const value = event.currentTarget.value;
            onFilter({ ...filter, [field]: value === '' ? null : value });
          }}
        >
          <option value="">{text.any[field]}</option>
          {choices.map((value) => (
            <option key={value} value={value}>
              {nameOf(field, value)}
            </option>
          ))}
        </select>
      ))}
      {isNarrowed ? (
        <button type="button" class="link" onClick={() => onFilter(ANY)}>
          {text.clear}
        </button>
      ) : null}
    </fieldset>
  );
}

function nameOf(field: Field, value: string): string {
  if (field === 'storey') return text.storey(metres(Number(value)));
  if (field === 'bearing') return text.bearings[value as keyof typeof text.bearings] ?? value;
  if (field === 'use') return words.schedule.uses[value as keyof typeof words.schedule.uses] ?? value;
  return text.block(value);
}
