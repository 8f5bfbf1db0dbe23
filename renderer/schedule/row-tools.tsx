import { committed } from '../state/document.ts';
import { type Kind, selection } from '../state/selection.ts';
import { Button } from '../ui/button.tsx';
import { words } from '../words/words.ts';
import type { ListName } from './cell-edit.ts';
import { addNeeds, addRow, duplicateRow, removeRows } from './row-actions.ts';

const text = words.schedule;

/** What can be done with whole rows. */
export function RowTools({ kind, list }: { readonly kind: Kind; readonly list: ListName }) {
  const scheme = committed.value;
  if (scheme === null) return null;
  const chosen = selection.value?.kind === kind ? selection.value.ids : [];
  const lead = chosen.at(-1);
  const needs = addNeeds(scheme, kind);
  const none = lead === undefined;
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
      <span class="soft row-hint">{text.hint}</span>
    </div>
  );
}
