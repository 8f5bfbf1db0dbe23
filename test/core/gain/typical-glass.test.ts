import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { Glass } from '../../../core/scheme/schema.ts';

type Library = { readonly note: string; readonly glass: readonly unknown[] };
const file = new URL('../../../assets/glass/typical.json', import.meta.url);
const library = JSON.parse(readFileSync(file, 'utf8')) as Library;

describe('the typical glazing that ships', () => {
  const glass = library.glass.map((g) => Glass.parse(g));
  const by = (id: string) => glass.find((g) => g.id === id);
  it('is glass that a scheme can hold, each with where its values come from', () => {
    expect(new Set(glass.map((g) => g.id)).size).toBe(glass.length);
    for (const g of glass) expect(g.source).toMatch(/memory|guide|EN /);
    expect(library.note).toContain('not products');
  });
  it('lies in the published ranges: U 5.7; 2.7 to 2.9 and g 0.75 to 0.80; 1.0 to 1.2 and 0.55 to 0.63; 0.5 to 0.7 and 0.50 to 0.57', () => {
    expect(by('single-clear')?.u).toBe(5.7);
    const ranges = {
      'double-clear': [2.7, 2.9, 0.75, 0.8],
      'double-low-e': [1, 1.2, 0.55, 0.63],
      'triple-low-e': [0.5, 0.7, 0.5, 0.57],
    };
    for (const [id, [u0, u1, g0, g1]] of Object.entries(ranges)) {
      expect(by(id)?.u).toBeGreaterThanOrEqual(u0 as number);
      expect(by(id)?.u).toBeLessThanOrEqual(u1 as number);
      expect(by(id)?.g).toBeGreaterThanOrEqual(g0 as number);
      expect(by(id)?.g).toBeLessThanOrEqual(g1 as number);
    }
  });
  it('lets no more light through than the spectrum allows for its g', () => {
    for (const g of glass) expect(g.light / g.g).toBeLessThan(2.2);
  });
});
