import { committed } from '../state/document.ts';
import { type Kind, selection } from '../state/selection.ts';
import { Button } from '../ui/button.tsx';
import { words } from '../words/words.ts';
import type { ListName } from './cell-edit.ts';
import type { Glass } from '../../core/scheme/schema.ts';
import { addCopy, addNeeds, addRow, duplicateRow, removeRows } from './row-actions.ts';

const text = words.schedule;

const shipped: Record<string, { readonly glass: readonly Glass[] }> = import.meta.glob('../../assets/glass/*.json', {
  eager: true,
  import: 'default',
});
const TYPICAL = Object.values(shipped).flatMap((library) => library.glass);

/** Kinds of glazing with typical published values, to begin from: they are not products. */
function TypicalGlass() {
  return (
    <select
      class="field"
      aria-label={text.typicalGlass}
      value=""
      onChange={(event) => {
        const glass = TYPICAL.find((entry) => entry.id === event.currentTarget.value);
        event.currentTarget.value = '';
        if (glass !== undefined) addCopy('glass', 'glass', glass);
      }}
    >
      <option value="">{text.typicalGlass}…</option>
      {TYPICAL.map((glass) => (
        <option key={glass.id} value={glass.id}>
          {glass.name}
        </option>
      ))}
    </select>
  );
}

/** What can be done with whole rows. */
export function RowTools({ kind, list }: { readonly kind: Kind; readonly list: ListName }) {
  const scheme = committed.value;
  if (scheme === null) return null;
  const chosen = selection.value?.kind === kind ? selection.value.ids : [];
  const lead = chosen.at(-1);
  const needs = addNeeds(scheme, kind);
  const none = lead === undefined;
  const hint = kind === 'window' ? `${text.shareHint} ${text.hint}` : text.hint;
  return (
    <div class="row-tools">
      <Button off={needs !== null} tip={needs ?? undefined} onPress={() => addRow(kind, list)}>
        {text.add}
      </Button>
      <Button
        off={none}
        tip={none ? text.nothingChosen : undefined}
        onPress={() => {
          if (lead !== undefined) duplicateRow(kind, list, lead);
        }}
      >
        {text.duplicate}
      </Button>
      <Button off={none} tip={none ? text.nothingChosen : undefined} onPress={() => removeRows(kind, list, chosen)}>
        {text.remove}
      </Button>
      {kind === 'glass' ? <TypicalGlass /> : null}
      <span class="soft row-hint" title={hint}>
        {hint}
      </span>
    </div>
  );
}
