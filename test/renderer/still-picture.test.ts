import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { StillPicture } from '../../renderer/massing/still-picture.ts';

/** Frames that are asked for, drawn by hand. */
let frames: Map<number, () => void>;
let asked = 0;

beforeEach(() => {
  frames = new Map();
  vi.stubGlobal('requestAnimationFrame', (draw: () => void) => {
    frames.set(++asked, draw);
    return asked;
  });
  vi.stubGlobal('cancelAnimationFrame', (frame: number) => frames.delete(frame));
});
afterEach(() => vi.unstubAllGlobals());

function drawFrame(): boolean {
  const [first] = frames;
  if (first === undefined) return false;
  frames.delete(first[0]);
  first[1]();
  return true;
}

/** A canvas of one pixel that averages what is laid on it as a real one would. */
function still(shades: (dx: number, dy: number) => number) {
  const moves: (readonly [number, number])[] = [];
  let [shade, alpha] = [0, 1];
  const context = {
    set globalAlpha(a: number) {
      alpha = a;
    },
    drawImage: (picture: { shade: number }) => {
      shade = shade * (1 - alpha) + picture.shade * alpha;
    },
  };
  const canvas = { hidden: false, width: 0, height: 0, getContext: () => context };
  const picture = new StillPicture(canvas as unknown as HTMLCanvasElement, (dx, dy) => {
    moves.push([dx, dy]);
    return { width: 640, height: 400, shade: shades(dx, dy) } as unknown as HTMLCanvasElement;
  });
  return { canvas, picture, moves, shade: () => shade };
}

describe('the picture at rest', () => {
  it('is the mean of pictures that lie evenly round the plain one, and fits it', () => {
    // An edge through the middle of the pixel: half of the pictures see it lit.
    const { canvas, picture, moves, shade } = still((dx) => (dx < 0 ? 1 : 0));
    expect(canvas.hidden).toBe(true);
    picture.rest();
    while (drawFrame());
    expect(moves).toHaveLength(8);
    for (const [dx, dy] of moves) expect(Math.max(Math.abs(dx), Math.abs(dy))).toBeLessThanOrEqual(0.5);
    expect(shade()).toBeCloseTo(moves.filter(([dx]) => dx < 0).length / moves.length, 12);
    expect(Math.abs(shade() - 0.5)).toBeLessThanOrEqual(1 / 8);
    expect(canvas).toMatchObject({ hidden: false, width: 640, height: 400 });
  });

  it('gives way at once when something changes, even halfway', () => {
    const { canvas, picture, moves } = still(() => 1);
    picture.rest();
    drawFrame();
    drawFrame();
    expect(canvas.hidden).toBe(false);
    picture.disturb();
    expect(canvas.hidden).toBe(true);
    expect(drawFrame()).toBe(false);
    expect(moves).toHaveLength(2);
  });

  it('begins anew at the next rest, with nothing of the old picture left', () => {
    let shadeNow = 1;
    const { picture, shade } = still(() => shadeNow);
    picture.rest();
    while (drawFrame());
    picture.disturb();
    shadeNow = 0;
    picture.rest();
    while (drawFrame());
    expect(shade()).toBe(0);
  });

  it('draws no more once it is done with', () => {
    const { picture } = still(() => 1);
    picture.rest();
    picture.dispose();
    expect(drawFrame()).toBe(false);
  });
});
