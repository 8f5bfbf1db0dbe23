import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { RoomDay } from '../../core/gain/series.ts';
import type { DayGrid } from '../../core/sky/day-grid.ts';
import { axisTop, roomCurve } from '../../renderer/findings/room-curve.ts';

const column = (...values: number[]) => new Float64Array(values);

describe('the curve of a room', () => {
  it('spreads the watts of all windows over the floor, part by part', () => {
    const none = column(0, 0, 0);
    const window = (beam: Float64Array, sky: Float64Array) => ({
      window: 'W',
      day: 'june',
      sunlit: none,
      cosIncidence: none,
      seen: { sky: 0.5, horizon: 1, ground: 0.5 },
      blind: column(1, 1, 1),
      parts: { beam, circumsolar: column(0, 10, 0), sky, horizon: column(0, 20, 0), ground: column(0, 40, 0) },
      total_W: none,
    });
    const day: RoomDay = {
      room: '1',
      day: 'june',
      total_W: none,
      windows: [window(column(0, 300, 0), column(0, 50, 0)), window(column(0, 100, 0), column(0, 30, 0))],
    };
    const grid = { name: '21 June', clock_min: column(10, 20, 30) } as DayGrid;
    const curve = roomCurve(grid, day, 10);
    expect([...curve.beam]).toEqual([0, 42, 0]);
    expect([...curve.sky]).toEqual([0, 12, 0]);
    expect([...curve.ground]).toEqual([0, 8, 0]);
    expect(curve.most).toBe(62);
    expect([curve.from_min, curve.to_min]).toEqual([20, 20]);
  });

  it('tops its axis with a round number in two to five steps', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.5, max: 5000, noNaN: true }), (value) => {
        const { top, step } = axisTop(value);
        expect(top).toBeGreaterThanOrEqual(value * (1 - 1e-9));
        expect(top).toBeLessThanOrEqual(value * 2 + 1e-9);
        expect(top / step).toBeLessThanOrEqual(5);
        expect(['1', '2', '5']).toContain(step.toExponential(6)[0]);
      }),
    );
  });
});
