import { createHash } from 'node:crypto';
import { expect, test } from 'vitest';
import { contentHash } from '../../../core/scheme/hash.ts';

test('equals SHA-256 as published and as Node has it', () => {
  // FIPS 180-4, example "abc".
  expect(contentHash('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
  for (const text of ['', 'Łódź 東京', 'x'.repeat(1000)])
    expect(contentHash(text)).toBe(createHash('sha256').update(text).digest('hex'));
});
