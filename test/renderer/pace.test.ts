import { describe, expect, it } from 'vitest';
import { Pace } from '../../renderer/massing/pace.ts';

/** Whether the view was found too slow at any of some frames, so far apart. */
function judged(pace: Pace, gaps: readonly number[], from = 1000): boolean {
  let now = from;
  let isSlow = pace.isTooSlow(now);
  for (const gap of gaps) {
    now += gap;
    isSlow = pace.isTooSlow(now) || isSlow;
  }
  return isSlow;
}

const frames = (count: number, gap: number): readonly number[] => Array.from({ length: count }, () => gap);

describe('the pace of a moving view', () => {
  it('is kept at 60 and at 40 frames a second, and not at 25', () => {
    expect(judged(new Pace(), frames(100, 16.7))).toBe(false);
    expect(judged(new Pace(), frames(100, 25))).toBe(false);
    expect(judged(new Pace(), frames(20, 40))).toBe(true);
  });

  it('is not lost by one slow frame, nor by pauses between moves', () => {
    expect(judged(new Pace(), [...frames(20, 17), 70, ...frames(20, 17)])).toBe(false);
    expect(judged(new Pace(), frames(50, 400))).toBe(false);
  });

  it('is judged anew after a rest', () => {
    const pace = new Pace();
    expect(judged(pace, frames(20, 50))).toBe(true);
    pace.reset();
    expect(judged(pace, frames(20, 17), 9000)).toBe(false);
  });
});
