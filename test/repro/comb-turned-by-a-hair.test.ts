import { expect, it } from 'vitest';
import { convexPieces } from '../../core/plane/convex-pieces.ts';
import { signedArea } from '../../core/plane/ring.ts';
import type { Point } from '../../core/plane/vec.ts';

// Found by a property test with a fresh seed: the roots of the teeth lie in one line but for rounding, an ear was cut along
// that line past corners that lay on it, and the pieces that came of it overlapped by twice a tooth.
it('a comb whose roots lie in a line but for rounding has pieces that make it up', () => {
  const drawn: Point[] = [
    [0, -1],
    [8, -1],
    [8, 0.35424868893540956],
    [7, 0.35424868893540956],
    [7, 0],
    [6, 0],
    [6, 0.2],
    [5, 0.2],
    [5, 0],
    [4, 0],
    [4, 0.2],
    [3, 0.2],
    [3, 0],
    [2, 0],
    [2, 7.872983346207418],
    [1, 7.872983346207418],
    [1, 0],
    [0, 0],
  ];
  for (let k = 0; k < 2000; k++) {
    const turn = k === 0 ? 6.3 : (k * 2 * Math.PI) / 2000;
    const [c, s] = [Math.cos(turn), Math.sin(turn)];
    const ring = drawn.map(([x, y]): Point => [c * x - s * y, s * x + c * y]);
    const area = convexPieces(ring).reduce((sum, piece) => sum + signedArea(piece), 0);
    expect(area).toBeCloseTo(signedArea(ring), 9);
  }
});
