import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Speller, textPieces } from '../../../app/contract/file-text.ts';
import { seedOf } from '../../helpers/property-seed.ts';

describe('the text of a file in pieces', () => {
  test('is that of the whole, in UTF-8, its head mark kept', () => {
    const text = `\ufeff${'Łódź, São Paulo, 東京 🌤\n'.repeat(9000)}`;
    const bytes = new TextEncoder().encode(text);
    expect(bytes.length).toBeGreaterThan(2 * 65536);
    const pieces = [...textPieces(bytes)];
    expect(pieces.length).toBeGreaterThan(3);
    expect(pieces.join('')).toBe(text);
  });

  test('is Latin 1 where the bytes are no UTF-8, also where that shows only at the end', () => {
    const bytes = new Uint8Array([...new TextEncoder().encode('x'.repeat(70_000)), 0x4d, 0xfc, 0x6c, 0x6c]);
    expect([...textPieces(bytes)].join('').slice(-4)).toBe('Müll');
  });

  test('is the same wherever the bytes are cut', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 40 }), fc.nat(60), (text, at) => {
        const bytes = new TextEncoder().encode(text);
        const speller = new Speller('utf-8');
        const spelt = speller.push(bytes.subarray(0, at)) + speller.push(bytes.subarray(at)) + speller.finish();
        expect(spelt).toBe(new TextDecoder('utf-8', { ignoreBOM: true }).decode(bytes));
      }),
      { seed: seedOf(20261208) },
    );
  });
});
