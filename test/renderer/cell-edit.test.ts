import { describe, expect, it } from 'vitest';
import {
  type CellEdit,
  changesOf,
  clipboardCell,
  parseCell,
  readClipboard,
  readNumber,
} from '../../renderer/schedule/cell-edit.ts';

type R = { readonly id: string; readonly width: number };
const width: CellEdit<R> = { field: 'width', kind: 'number', typed: (row) => String(row.width) };

describe('what is typed into a cell', () => {
  it.each([
    ['1.2', 1.2],
    ['1,2', 1.2],
    ['1,20 m', 1.2],
    ['−0.5', -0.5],
    ['.75', 0.75],
    ['1e1', 10],
  ])('%s is a number', (text, value) => expect(readNumber(text)).toBe(value));

  it.each(['', 'wide', '1.2.3', '1 2', 'm', '1.2 ft'])('%s is none', (text) => expect(readNumber(text)).toBeNaN());

  it('a share may be typed as a share or in percent', () => {
    for (const text of ['0.2', '20 %', '20', '20%'])
      expect(parseCell({ kind: 'share' }, text)).toEqual({ ok: true, value: 0.2 });
  });

  it('a choice is known by its value or by its name, and what is none is told with what there is', () => {
    const options = [['living', 'living room']] as const;
    expect(parseCell({ kind: 'choice', options }, 'Living room')).toEqual({ ok: true, value: 'living' });
    expect(parseCell({ kind: 'choice', options }, 'cellar')).toMatchObject({
      ok: false,
      why: expect.stringContaining('living room'),
    });
  });
});

describe('many cells at once', () => {
  const row = (id: string, value: number): R => ({ id, width: value });
  const fixed = (of: R, text: string) => ({ id: of.id, row: of, head: 'width', edit: undefined, text });
  const cell = (of: R, text: string, edit = width) => ({
    id: of.id,
    row: of,
    head: 'width',
    edit,
    text,
  });

  it('name rows last, and by way of free names where one takes the name of another', () => {
    const id: CellEdit<R> = { field: 'id', kind: 'text', typed: (of) => of.id };
    const named = (of: R, text: string) => ({ ...cell(of, text, id), head: 'id' });
    const fieldsOf = (cells: Parameters<typeof changesOf<R>>[1]) => {
      const changes = changesOf('windows', cells, 'n');
      if (!changes.ok || changes.edit?.kind !== 'together') throw new Error('refused');
      return changes.edit.edits.map((e) => (e.kind === 'set' ? [e.id, e.field, e.value] : []));
    };
    expect(fieldsOf([named(row('W1', 1), 'A'), cell(row('W1', 1), '2')])).toEqual([
      ['W1', 'width', 2],
      ['W1', 'id', 'A'],
    ]);
    // W1 → W2 and W2 → W3: neither may be taken for the other on the way.
    const moved = fieldsOf([named(row('W1', 1), 'W2'), named(row('W2', 1), 'W3')]);
    const names = ['W1', 'W2'];
    for (const [from, , to] of moved) {
      expect(names.filter((name) => name === from)).toHaveLength(1);
      names[names.indexOf(from as string)] = to as string;
    }
    expect(names).toEqual(['W2', 'W3']);
  });

  it('of a new row stand even where they are as in the row it copies, and empty ones leave the copy', () => {
    const changes = changesOf(
      'windows',
      [
        { ...cell(row('W1', 1), '1'), id: 'W9', isNew: true },
        { ...cell(row('W1', 1), ''), id: 'W9', isNew: true },
      ],
      'n',
    );
    expect(changes).toMatchObject({ ok: true, edit: { edits: [{ id: 'W9', field: 'width', value: 1 }] } });
  });

  it('are one edit, which leaves alone what stays as it was', () => {
    const changes = changesOf('windows', [cell(row('W1', 1), '2'), cell(row('W2', 3), '3')], 'width of 2 rows');
    expect(changes).toEqual({
      ok: true,
      edit: {
        kind: 'together',
        name: 'width of 2 rows',
        edits: [{ kind: 'set', list: 'windows', id: 'W1', field: 'width', value: 2 }],
      },
    });
    expect(changesOf('windows', [cell(row('W2', 3), '3')], '')).toEqual({ ok: true, edit: null });
  });

  it('are refused together, each bad one with its place', () => {
    const changes = changesOf(
      'windows',
      [cell(row('W1', 1), '2'), cell(row('W2', 3), 'wide'), fixed(row('W3', 3), '1')],
      '',
    );
    if (changes.ok) throw new Error('two of them cannot be');
    expect(changes.faults.map((f) => f.place)).toEqual(['W2, width', 'W3, width']);
  });
});

describe('the clipboard', () => {
  it('reads what spreadsheets write', () => {
    expect(readClipboard('1\t2\r\n3\t4\r\n')).toEqual([
      ['1', '2'],
      ['3', '4'],
    ]);
    expect(readClipboard('"a ""b"""\tc')).toEqual([['a "b"', 'c']]);
    expect(readClipboard(`${clipboardCell('a\tb')}`.replace('\t', ' '))).toEqual([['a b']]);
  });
});
