import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { begin, commit, type History, redo, redoLabel, undo, undoLabel } from '../../renderer/state/history.ts';

type Doc = { readonly value: number };
type Act = { readonly kind: 'edit'; readonly value: number } | { readonly kind: 'undo' } | { readonly kind: 'redo' };

const act: fc.Arbitrary<Act> = fc.oneof(
  { weight: 3, arbitrary: fc.record({ kind: fc.constant('edit' as const), value: fc.integer() }) },
  { weight: 1, arbitrary: fc.record({ kind: fc.constant('undo' as const) }) },
  { weight: 1, arbitrary: fc.record({ kind: fc.constant('redo' as const) }) },
);

const apply = (h: History<Doc>, a: Act): History<Doc> =>
  a.kind === 'edit' ? commit(h, { value: a.value }, `set ${a.value}`) : a.kind === 'undo' ? undo(h) : redo(h);

/** The same by the plainest means: a list of values and a place in it. */
class Reference {
  values: Doc[];
  at = 0;
  constructor(start: Doc) {
    this.values = [start];
  }
  apply(a: Act, made: Doc): void {
    if (a.kind === 'undo') this.at = Math.max(0, this.at - 1);
    else if (a.kind === 'redo') this.at = Math.min(this.values.length - 1, this.at + 1);
    else {
      this.values = [...this.values.slice(0, this.at + 1), made];
      this.at++;
    }
  }
}

const times = <T>(n: number, value: T, step: (v: T) => T): T => {
  let v = value;
  for (let i = 0; i < n; i++) v = step(v);
  return v;
};

describe('undo history', () => {
  it('agrees with a list and a place in it, whatever is done', () => {
    fc.assert(
      fc.property(fc.array(act, { maxLength: 60 }), (acts) => {
        const start: Doc = { value: 0 };
        let h = begin(start);
        const reference = new Reference(start);
        for (const a of acts) {
          h = apply(h, a);
          reference.apply(a, h.now.value);
          expect(h.now.value).toBe(reference.values[reference.at]);
          expect(h.past.length).toBe(reference.at);
          expect(h.future.length).toBe(reference.values.length - 1 - reference.at);
        }
      }),
    );
  });

  it('gives the same two ends when all is undone and all is redone', () => {
    fc.assert(
      fc.property(fc.array(act, { maxLength: 60 }), (acts) => {
        const start: Doc = { value: 0 };
        const h = acts.reduce(apply, begin(start));
        const end = times(acts.length, h, redo);
        const back = times(acts.length + 1, end, undo);
        expect(back.now.value).toBe(start);
        expect(times(acts.length + 1, back, redo).now.value).toBe(end.now.value);
      }),
    );
  });

  it('never changes a history that it was given', () => {
    fc.assert(
      fc.property(fc.array(act, { maxLength: 30 }), (acts) => {
        let h = begin<Doc>({ value: 0 });
        for (const a of acts) {
          const before = structuredClone(h);
          const next = apply(h, a);
          expect(h).toEqual(before);
          h = next;
        }
      }),
    );
  });

  it('names what undo takes back and redo brings again', () => {
    const one = commit(begin<Doc>({ value: 0 }), { value: 1 }, 'deepen the overhang');
    expect(undoLabel(one)).toBe('deepen the overhang');
    expect(redoLabel(one)).toBeNull();
    const back = undo(one);
    expect(undoLabel(back)).toBeNull();
    expect(redoLabel(back)).toBe('deepen the overhang');
  });

  it('takes an edit that changes nothing for no edit, and keeps what could be redone', () => {
    const back = undo(commit(begin<Doc>({ value: 0 }), { value: 1 }, 'a'));
    expect(commit(back, back.now.value, 'b')).toBe(back);
  });
});
