import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { loadScheme } from '../../../core/scheme/load.ts';
import { editsBetween } from '../../../core/scheme/misspelt.ts';
import { writeScheme } from '../../../core/scheme/write.ts';
import { demoScheme } from '../../helpers/demo-scheme.ts';

// biome-ignore lint/suspicious/noExplicitAny: a file that is about to be misspelt has no type
const file = (): any => JSON.parse(writeScheme(demoScheme('tannery-yard')));
const notesOf = (of: unknown) => {
  const read = loadScheme(JSON.stringify(of));
  if (!read.ok) throw new Error(JSON.stringify(read.faults));
  return read.notes.filter((note) => note.code === 'misspelt').map((note) => [note.place, note.cure]);
};

describe('fields that look misspelt', () => {
  it('are told with their place and the field that may be meant, in every kind of entry', () => {
    const scheme = file();
    scheme.site.linkTurbidity = 4;
    delete scheme.site.linkeTurbidity;
    scheme.windows[2].revael = scheme.windows[2].reveal;
    delete scheme.windows[2].reveal;
    const overhang = scheme.devices.findIndex((d: { kind: string }) => d.kind === 'overhang');
    scheme.devices[overhang].rigth = scheme.devices[overhang].right;
    delete scheme.devices[overhang].right;
    expect(notesOf(scheme)).toEqual([
      ['site.linkTurbidity', 'write "linkeTurbidity" if that was meant'],
      ['windows[2].revael', 'write "reveal" if that was meant'],
      [`devices[${overhang}].rigth`, 'write "right" if that was meant'],
    ]);
  });

  it('are not seen in what others add under names of their own, nor in a scheme as we write it', () => {
    const scheme = file();
    scheme.windows[0].supplier = 'x';
    scheme.x_tags = [];
    scheme.rooms[0].comment = '';
    expect(notesOf(scheme)).toEqual([]);
  });

  it('are kept in the file all the same', () => {
    const scheme = file();
    scheme.windows[0].revael = 0.3;
    const read = loadScheme(JSON.stringify(scheme));
    if (!read.ok) throw new Error('it reads');
    expect(JSON.parse(writeScheme(read.value)).windows[0].revael).toBe(0.3);
  });
});

describe('edits between words', () => {
  it('counts letters added, dropped, changed and swapped', () => {
    expect(editsBetween('width', 'widht', 2)).toBe(1);
    expect(editsBetween('sill', 'sil', 2)).toBe(1);
    expect(editsBetween('kitten', 'sitting', 5)).toBe(3);
  });

  it('is nothing only between equal words, and the same both ways', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 8 }), fc.string({ maxLength: 8 }), (a, b) => {
        expect(editsBetween(a, b, 20)).toBe(editsBetween(b, a, 20));
        expect(editsBetween(a, b, 20) === 0).toBe(a === b);
      }),
      { seed: 7, numRuns: 300 },
    );
  });
});
