import { describe, expect, it } from 'vitest';
import { windowSky } from '../../../core/shade/sky-share.ts';
import { windowShade } from '../../../core/shade/sunlit-fraction.ts';
import { box, house, solid } from './small-scheme.ts';

const sky = (parts: Parameters<typeof house>[0], solids: Parameters<typeof windowShade>[1] = [], month?: number) => {
  const { model, window } = house(parts);
  return windowSky(windowShade(window, solids, model.trees), month);
};
/** As far as the scheme file goes; beyond it these devices hide less than 1e-4 more. */
const LONG = 50;
/** A wall without end in front of the middle of a low pane, so that it stands at one angle to the whole pane. */
const obstruction = (degrees: number) => [
  solid('wall', box(-20_000, -1001, 40_000, 1), 0, 3.005 + 1000 * Math.tan((degrees * Math.PI) / 180)),
];
const strip = { height: 0.01 };

describe('sky seen from a window', () => {
  it('open: half the dome, half the ground, all of the horizon; overcast 39.618 % (3/14 + 4/7π)', () => {
    const open = sky({});
    expect(open.sky).toBe(0.5);
    expect(open.ground).toBe(0.5);
    expect(open.horizon).toBe(1);
    expect(Math.abs(open.overcast - (3 / 14 + 4 / (7 * Math.PI)))).toBeLessThan(1e-12);
  });
  it('5a: under an overhang without end, crossed strings: 0.30000, and 0.37179 with a gap of 0.3 m', () => {
    const at = (above: number) => sky({ devices: [{ kind: 'overhang', depth: 0.8, above, left: LONG, right: LONG }] });
    expect(Math.abs(at(0).sky - 0.3)).toBeLessThan(3e-4);
    expect(Math.abs(at(0.3).sky - 0.37179)).toBeLessThan(3e-4);
    // An overhang hides neither the horizon nor the ground.
    expect(at(0).horizon).toBe(1);
    expect(at(0).ground).toBe(0.5);
  });
  // Closed forms: even sky (1 − sin Θ)/2; CIE overcast (3/14)(1 − sin Θ) + (4/7π)cos²Θ; table of the vertical sky component.
  for (const [angle, overcast, even] of [
    [10, 35.348, 41.318],
    [25, 27.313, 28.869],
    [45, 15.371, 14.645],
    [60, 7.418, 6.699],
  ] as const)
    it(`behind a long obstruction of ${angle}°: even sky ${even} %, overcast ${overcast} %`, () => {
      const seen = sky({ window: strip }, obstruction(angle));
      expect(Math.abs(seen.sky - even / 100)).toBeLessThan(5e-4);
      expect(Math.abs(seen.overcast - overcast / 100)).toBeLessThan(5e-4);
      expect(seen.horizon).toBeLessThan(0.01);
    });
  it('obstruction of 25° and an overhang edge at 60°: 0.22170', () => {
    const devices = [
      { kind: 'overhang', depth: 0.5, above: 0.5 * Math.tan(Math.PI / 3) - 0.005, left: LONG, right: LONG },
    ];
    expect(Math.abs(sky({ window: strip, devices }, obstruction(25)).sky - 0.2217)).toBeLessThan(5e-4);
  });
  it('a fin without end on one side, by crossed strings along the width: as an overhang, of the whole dome', () => {
    // Between two fins at the jambs the whole half space is cut by [√(P² + W²) − P]/W.
    const seen = sky({ devices: [{ kind: 'fin', depth: 0.8, above: LONG, below: LONG }], window: { width: 1.5 } });
    const expected = (Math.hypot(0.8, 1.5) - 0.8) / 1.5;
    expect(Math.abs(seen.sky + seen.ground - expected)).toBeLessThan(1e-3);
    expect(Math.abs(seen.sky - seen.ground)).toBeLessThan(1e-12);
    // In the plane of the horizon the fins are strips of a slot: 1 − mean hidden, ∫ max(0, 1 − P·tan ψ/W) cos ψ dψ.
    const [p, w] = [0.8, 1.5];
    const edge = Math.atan(w / p);
    expect(Math.abs(seen.horizon - (Math.sin(edge) - (p / w) * (1 - Math.cos(edge))))).toBeLessThan(1e-3);
  });
  it('a reveal: the view factor between two equal parallel rectangles (Hottel; Incropera & DeWitt, table 13.2)', () => {
    // All that leaves the glass through the opening, sky and ground together, is the view factor from glass to opening.
    const [w, h, d] = [2, 1.5, 0.5];
    const [x, y] = [w / d, h / d];
    const expected =
      (2 / (Math.PI * x * y)) *
      (Math.log(Math.sqrt(((1 + x * x) * (1 + y * y)) / (1 + x * x + y * y))) +
        x * Math.sqrt(1 + y * y) * Math.atan(x / Math.sqrt(1 + y * y)) +
        y * Math.sqrt(1 + x * x) * Math.atan(y / Math.sqrt(1 + x * x)) -
        x * Math.atan(x) -
        y * Math.atan(y));
    const seen = sky({ window: { reveal: d } });
    expect(Math.abs(seen.sky + seen.ground - expected)).toBeLessThan(1e-3);
    expect(seen.sky).toBeCloseTo(seen.ground, 12);
  });
  it('a rooflight in a court: open 1; beside a long wall (1 + cos Θ)/2', () => {
    const roof = { wall: undefined, roof: { at: [5, 4], turn: 30 }, width: 0.02, height: 0.02 };
    expect(sky({ window: roof })).toEqual({ sky: 1, horizon: 0, ground: 0, overcast: expect.closeTo(1, 4) });
    const wall = [solid('wall', box(-20_000, 104, 40_000, 5), 0, 109)];
    expect(Math.abs(sky({ window: roof }, wall).sky - (1 + Math.cos(Math.PI / 4)) / 2)).toBeLessThan(1e-3);
    // CIE overcast on a level point beside a long obstruction of 45°: 88.533 %.
    expect(Math.abs(sky({ window: roof }, wall).overcast - 0.88533)).toBeLessThan(1e-3);
  });
  it('a block on the ground in front hides ground as well as sky; what it has below the ground hides nothing', () => {
    const plain = sky({}, [solid('b', box(-4, -9, 20, 3), 0, 2)]);
    expect(plain.sky).toBe(0.5);
    expect(plain.ground).toBeLessThan(0.4);
    expect(sky({}, [solid('b', box(-4, -9, 20, 3), -5, 2)])).toEqual(plain);
  });
  it('a crown in front takes more in leaf than bare, and by default its mean over the year', () => {
    const tree = {
      at: [5, -4],
      height: 9,
      trunk: 1,
      spread: 6,
      transmittance: [0.8, 0.8, 0.8, 0.5, 0.2, 0.2, 0.2, 0.2, 0.2, 0.5, 0.8, 0.8],
    };
    const [july, january, year] = [7, 1, undefined].map((m) => sky({ trees: [tree] }, [], m).sky) as [
      number,
      number,
      number,
    ];
    expect(july).toBeLessThan(year);
    expect(year).toBeLessThan(january);
    expect(january).toBeLessThan(0.5);
  });
});
