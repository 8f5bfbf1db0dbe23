import { beforeEach, describe, expect, test } from 'vitest';
import { variantsOf } from '../../core/scheme/variants.ts';
import {
  committed,
  edit,
  editVariants,
  isUnsaved,
  place,
  redoEdit,
  undoEdit,
  whole,
} from '../../renderer/state/document.ts';
import { demoScheme } from '../helpers/demo-scheme.ts';

const scheme = demoScheme('tannery-yard');

describe('the scheme and what is kept with it', () => {
  beforeEach(() => place(scheme, { id: null, name: 'yard.scheme.json' }, [], true));
  const keep = (): void => editVariants('keeping a', (all) => [...all, { name: 'a', scheme }]);

  test('keeping a variant leaves the scheme the same object, so that nothing is worked out again', () => {
    expect(committed.value).toBe(scheme);
    keep();
    expect(committed.value).toBe(scheme);
    expect(variantsOf(whole.value!)).toEqual([{ name: 'a', scheme }]);
    expect(isUnsaved.value).toBe(true);
    undoEdit();
    expect(whole.value).toBe(scheme);
    expect(isUnsaved.value).toBe(false);
  });

  test('an edit of the scheme, its undoing and redoing keep the variants', () => {
    keep();
    edit('title', (now) => ({ ...now, title: 'Another' }));
    expect(committed.value?.title).toBe('Another');
    expect('variants' in committed.value!).toBe(false);
    expect(variantsOf(whole.value!)).toHaveLength(1);
    undoEdit();
    expect(committed.value?.title).toBe(scheme.title);
    expect(variantsOf(whole.value!)).toHaveLength(1);
    redoEdit();
    expect(variantsOf(whole.value!)).toHaveLength(1);
  });
});
