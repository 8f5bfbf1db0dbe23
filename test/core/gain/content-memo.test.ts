import { describe, expect, it } from 'vitest';
import { ContentMemo } from '../../../core/gain/content-memo.ts';

describe('a memory by content', () => {
  it('works each content out once and counts what it worked out', () => {
    const memo = new ContentMemo<number>(10);
    for (let round = 0; round < 3; round++)
      for (let i = 0; i < 5; i++) expect(memo.get(`k${i}`, () => i * i)).toBe(i * i);
    expect(memo.made).toBe(5);
  });
  it('keeps what is asked for often and drops what is not, within twice its size', () => {
    const memo = new ContentMemo<number>(10);
    memo.get('often', () => 1);
    for (let i = 0; i < 1000; i++) {
      memo.get(`once${i}`, () => i);
      if (i % 5 === 0) memo.get('often', () => Number.NaN);
    }
    expect(memo.get('often', () => Number.NaN)).toBe(1);
    const made = memo.made;
    memo.get('once0', () => 0);
    expect(memo.made).toBe(made + 1);
  });
});
