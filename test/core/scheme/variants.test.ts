import { describe, expect, test } from 'vitest';
import { schemeHash } from '../../../core/scheme/hash.ts';
import { loadScheme } from '../../../core/scheme/load.ts';
import type { Scheme } from '../../../core/scheme/schema.ts';
import { variantsOf, withoutVariants, withVariants } from '../../../core/scheme/variants.ts';
import { writeScheme } from '../../../core/scheme/write.ts';
import { demoScheme } from '../../helpers/demo-scheme.ts';

const scheme = demoScheme('tannery-yard');
const darker: Scheme = { ...scheme, glass: scheme.glass.map((glass) => ({ ...glass, g: glass.g / 2 })) };
const both = withVariants(scheme, [
  { name: 'as drawn', scheme },
  { name: 'darker glass', scheme: darker },
]);
/** What the reader says of the file of both, with a change. */
const read = (change: (file: { variants: { name: string; scheme: Record<string, unknown> }[] }) => void) => {
  const file = JSON.parse(writeScheme(both));
  change(file);
  return loadScheme(JSON.stringify(file));
};

describe('variants that are kept with a scheme', () => {
  test('are written, read again and are schemes like any other', () => {
    const again = loadScheme(writeScheme(both));
    expect(again.ok && again.value).toEqual(both);
    expect(again.ok && variantsOf(again.value).map((v) => v.name)).toEqual(['as drawn', 'darker glass']);
    expect(again.ok && variantsOf(again.value)[1]?.scheme).toEqual(darker);
    expect(writeScheme((again as { value: Scheme }).value)).toBe(writeScheme(both));
  });

  test('keep the fields that this version does not know, and say what looks misspelt, at its place', () => {
    const again = read((file) => {
      file.variants[1]!.scheme['surveyor'] = { name: 'R. Okafor' };
      Object.assign(file.variants[0]!, { kept: 'by R. Okafor' });
      const window = (file.variants[1]!.scheme['windows'] as Record<string, unknown>[])[0] as Record<string, unknown>;
      delete window['reveal'];
      window['revael'] = 0.1;
    });
    const kept = again.ok ? writeScheme(withVariants(again.value, variantsOf(again.value))) : '';
    expect(kept.split('R. Okafor')).toHaveLength(3);
    expect(again.ok && again.notes.map((note) => note.place)).toEqual(['variants[1].scheme.windows[0].revael']);
  });

  test('change neither the hash nor the scheme itself, and none has variants of its own', () => {
    expect(schemeHash(both)).toBe(schemeHash(scheme));
    expect(withoutVariants(both)).toEqual(scheme);
    expect(withoutVariants(scheme)).toBe(scheme);
    expect(variantsOf(withVariants(scheme, [{ name: 'a', scheme: both }]))[0]?.scheme).toEqual(scheme);
    expect('variants' in withVariants(both, [])).toBe(false);
  });

  test('are refused with every fault under their place', () => {
    const faults = (change: Parameters<typeof read>[0]): readonly string[] => {
      const again = read(change);
      return again.ok ? [] : again.faults.map((fault) => `${fault.place} ${fault.code}`);
    };
    expect(faults((file) => Object.assign(file.variants[1]!.scheme, { version: 9 }))).toEqual([
      'variants[1].scheme.version version',
    ]);
    expect(
      faults((file) => Object.assign((file.variants[0]!.scheme['windows'] as object[])[2]!, { width: -1 })),
    ).toEqual([expect.stringMatching(/^variants\[0\]\.scheme\.windows\[2\]\.width /)]);
    expect(faults((file) => Object.assign(file.variants[1]!, { name: 'as drawn' }))).toEqual([
      'variants[1].name same-name',
    ]);
    expect(faults((file) => Object.assign(file.variants[0]!.scheme, { variants: [] }))).toEqual([
      'variants[0].scheme.variants too-deep',
    ]);
    expect(faults((file) => Object.assign(file.variants[0]!, { scheme: 4 }))).toEqual([
      expect.stringMatching(/^variants\[0\]\.scheme /),
    ]);
  });
});
