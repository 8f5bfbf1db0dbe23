import { signal } from '@preact/signals';
import { useState } from 'preact/hooks';
import type { SchemeEdit } from '../../core/scheme/edit.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { committed } from '../state/document.ts';
import { performEdit } from '../state/perform-edit.ts';
import { Button } from '../ui/button.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { words } from '../words/words.ts';

const text = words.facts;
const isOpen = signal(false);

export const openFacts = (): void => {
  isOpen.value = true;
};

/** What the title blocks of sheets and reports say of the scheme. */
export function FactsDialog() {
  const scheme = committed.value;
  return isOpen.value && scheme !== null ? <OpenFacts scheme={scheme} /> : null;
}

const FIELDS = ['title', 'address', 'author', 'revision'] as const;

function OpenFacts({ scheme }: { scheme: Scheme }) {
  const [form, setForm] = useState(() => ({
    title: scheme.title,
    address: scheme.address,
    author: scheme.author,
    revision: scheme.revision,
    year: scheme.year === undefined ? '' : String(scheme.year),
  }));
  const close = (): void => {
    isOpen.value = false;
  };
  const isGoodYear = form.year === '' || /^(19\d\d|20\d\d|2100)$/.test(form.year);
  const apply = (): void => {
    if (!isGoodYear) return;
    const year = form.year === '' ? undefined : Number(form.year);
    const edits: SchemeEdit[] = FIELDS.filter((field) => form[field].trim() !== scheme[field]).map((field) => ({
      kind: 'set-head',
      field,
      value: form[field].trim(),
    }));
    if (year !== scheme.year) edits.push({ kind: 'set-head', field: 'year', value: year });
    if (edits.length > 0) performEdit({ kind: 'together', edits, name: text.edit });
    close();
  };
  const field = (key: keyof typeof form, label: string, isBad = false) => (
    <label class="facts-field">
      <span>{label}</span>
      <input
        class="field"
        type="text"
        maxLength={300}
        aria-invalid={isBad}
        value={form[key]}
        onInput={(event) => setForm({ ...form, [key]: event.currentTarget.value })}
      />
    </label>
  );
  return (
    <Dialog
      title={text.title}
      onClose={close}
      actions={
        <>
          <Button onPress={close}>{text.cancel}</Button>
          <Button tone="primary" off={!isGoodYear} tip={isGoodYear ? undefined : text.badYear} onPress={apply}>
            {text.apply}
          </Button>
        </>
      }
    >
      <form
        class="facts-form"
        onSubmit={(event) => {
          event.preventDefault();
          apply();
        }}
      >
        {FIELDS.map((key) => (
          <div key={key}>{field(key, text.fields[key])}</div>
        ))}
        {field('year', text.fields.year, !isGoodYear)}
        <button type="submit" class="unseen" tabIndex={-1}>
          {text.apply}
        </button>
      </form>
    </Dialog>
  );
}
