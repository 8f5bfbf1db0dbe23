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
