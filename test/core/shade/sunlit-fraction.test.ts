import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sunlitFraction, windowShade } from '../../../core/shade/sunlit-fraction.ts';
import { sampledFraction } from './ray-oracle.ts';
import { box, house, solid, sunAt } from './small-scheme.ts';

/** Sunlit fraction of the house's south window, HSA and altitude in degrees (HSA = azimuth − wall azimuth). */
function fraction(hsa: number, altitude: number, parts: Parameters<typeof house>[0], month?: number): number {
  const { model, window } = house(parts);
  return sunlitFraction(windowShade(window, model.solids, model.trees), sunAt(180 + hsa, altitude), month);
}
/** Long enough to count as without end for the sun positions used here. */
const LONG = 40;

describe('sunlit fraction: closed forms of devices (worked numbers 1e to 1k; derivations stand beside each)', () => {
  it('1e: overhang without end, 1 − (P·tan VSA − e)/H', () => {
    const devices = [{ kind: 'overhang', depth: 0.8, above: 0.2, left: LONG, right: LONG }];
    expect(fraction(35, 50, { devices })).toBeCloseTo(0.35741, 5);
    const vsa = Math.atan(Math.tan((50 * Math.PI) / 180) / Math.cos((35 * Math.PI) / 180));
    expect(fraction(35, 50, { devices })).toBeCloseTo(1 - (0.8 * Math.tan(vsa) - 0.2) / 1.5, 12);
  });
  for (const [side, expected] of [
    [0, 0.44528],
    [0.3, 0.37694],
    [0.6, 0.35741],
    [0.5602, 0.35741],
  ] as const)
    it(`1f: overhang that runs on ${side} m past each side of a window 2.4 m wide`, () => {
      const devices = [{ kind: 'overhang', depth: 0.8, above: 0.2, left: side, right: side }];
      expect(fraction(35, 50, { devices, window: { width: 2.4 } })).toBeCloseTo(expected, 5);
      // The mirror image of the sun gives the mirror image of the shadow.
      expect(fraction(-35, 50, { devices, window: { width: 2.4 } })).toBeCloseTo(expected, 5);
    });
  it('1g: a fin on the sun’s side, 1 − (P·tan HSA − e)/W', () => {
    const fin = { kind: 'fin', depth: 0.5, gap: 0.1, above: LONG, below: LONG };
    // HSA +55: south wall, sun in the west, which is on the left for whoever faces the wall.
    expect(fraction(55, 30, { devices: [{ ...fin, side: 'left' }], window: { width: 1.2 } })).toBeCloseTo(0.48827, 5);
    expect(fraction(55, 30, { devices: [{ ...fin, side: 'right' }], window: { width: 1.2 } })).toBe(1);
    expect(fraction(-55, 30, { devices: [{ ...fin, side: 'right' }], window: { width: 1.2 } })).toBeCloseTo(0.48827, 5);
    expect(fraction(55, 30, { devices: [fin], window: { width: 1.2 } })).toBeCloseTo(0.48827, 5);
  });
  it('1h: a reveal, (1 − r·tan|HSA|/W)·(1 − r·tan VSA/H)', () => {
    expect(fraction(-50, 40, { window: { width: 1.2, reveal: 0.15 } })).toBeCloseTo(0.73994, 5);
    expect(fraction(50, 40, { window: { width: 1.2, reveal: 0.15 } })).toBeCloseTo(0.73994, 5);
    expect(fraction(-50, 40, { window: { width: 1.2, reveal: 3 } })).toBe(0);
  });
  it('1i: depth for full shade at midsummer noon, clear by 0.0418 m at midwinter noon', () => {
    const at = (depth: number, altitude: number, above = 0.3) =>
      fraction(0, altitude, { devices: [{ kind: 'overhang', depth, above, left: LONG, right: LONG }] });
    expect(at(0.9595, 61.94)).toBeLessThan(2e-4);
    expect(at(0.95, 61.94)).toBeGreaterThan(0.01);
    expect(at(0.9595, 15.06)).toBe(1);
    // The shadow's edge stands 0.0418 m above the head: lowered by a little more, the overhang starts to bite.
    expect(at(0.9595, 15.06, 0.3 - 0.0417)).toBe(1);
    expect(at(0.9595, 15.06, 0.3 - 0.0419)).toBeLessThan(1);
  });
  it('1j and 1k: full shade needs 2.2629 m at the equinox and 2.0865 m on the west', () => {
    const at = (hsa: number, altitude: number, above: number, depth: number) =>
      fraction(hsa, altitude, { devices: [{ kind: 'overhang', depth, above, left: LONG, right: LONG }] });
    expect(at(0, 38.5, 0.3, 2.26295)).toBeLessThan(1e-4);
    expect(at(0, 38.5, 0.3, 2.2528)).toBeCloseTo((0.0101 * Math.tan((38.5 * Math.PI) / 180)) / 1.5, 4);
    expect(at(267.6265 - 270, 35.689, 0, 2.08655)).toBeLessThan(1e-4);
    expect(at(267.6265 - 270, 35.689, 0, 2.0765)).toBeGreaterThan(1e-3);
  });
  it('overhang and fin, both effectively without end: the product of the two', () => {
    const devices = [
      { kind: 'overhang', depth: 0.8, above: 0.2, left: LONG, right: LONG },
      { kind: 'fin', side: 'left', depth: 0.5, gap: 0.1, above: LONG, below: LONG },
    ];
    const [over, fin] = devices.map((d) => fraction(35, 50, { devices: [d] })) as [number, number];
    expect(fraction(35, 50, { devices })).toBeCloseTo(over * fin, 12);
  });
  it('louvres of full cut-off at the profile angle, half of it at half', () => {
    // Blades 0.2 deep every 0.2 from the head down, level: shaded share of each bay = depth·tan VSA / spacing.
    const devices = [{ kind: 'louvres', count: 12, spacing: 0.2, depth: 0.2, left: LONG, right: LONG }];
    expect(fraction(0, 45, { devices, window: { height: 1.4 } })).toBeCloseTo(0, 9);
    const altitude = (Math.atan(0.5) * 180) / Math.PI;
    expect(fraction(0, altitude, { devices, window: { height: 1.4 } })).toBeCloseTo(0.5, 9);
  });
  it('a blade tilted along the ray lets it pass', () => {
    const devices = [{ kind: 'louvres', count: 12, spacing: 0.2, depth: 0.2, tilt: -40, left: LONG, right: LONG }];
    expect(fraction(0, 40, { devices, window: { height: 1.4 } })).toBeCloseTo(1, 9);
  });
});

describe('sunlit fraction: buildings', () => {
  const { window } = house();
  const lit = (solids: Parameters<typeof windowShade>[1], hsa: number, altitude: number) =>
    sunlitFraction(windowShade(window, solids, []), sunAt(180 + hsa, altitude));

  it('is 1 in the open, 0 with the sun down, behind the wall or along it', () => {
    const solids = house().model.solids;
    expect(lit(solids, 20, 30)).toBe(1);
    expect(lit(solids, 0, 0)).toBe(0);
    expect(lit(solids, 0, -5)).toBe(0);
    expect(lit(solids, 180, 30)).toBe(0);
    expect(lit(solids, 90, 30)).toBe(0);
    expect(lit(solids, 89.999, 30)).toBe(1);
    expect(lit(solids, 0, 90)).toBe(0);
  });
  it('a long wall in front, top T at distance D: shaded up to T − D·tan VSA above the sill', () => {
    // Closed form: the shadow's edge on the window's plane. Sill at 3 m, window 1.5 m high.
    const wall = solid('wall', box(-200, -12, 400, 2), 0, 8);
    expect(lit([wall], 0, 15)).toBe(0);
    const edge = 8 - 10 * Math.tan((22 * Math.PI) / 180) - 3;
    expect(edge > 0 && edge < 1.5).toBe(true);
    expect(lit([wall], 0, 22)).toBeCloseTo(1 - edge / 1.5, 12);
    expect(lit([wall], 0, 30)).toBe(1);
  });
  it('its own block, neighbours on the same wall and whatever lies behind never shade it', () => {
    const row = [
      house().model.solids[0] as ReturnType<typeof solid>,
      solid('left', box(-12, 0, 12, 8), 0, 40),
      solid('right', box(12, 0, 12, 8), 0, 40),
      solid('behind', box(-50, 0.5, 100, 30), 0, 90),
    ];
    for (const hsa of [-89, -45, 0, 45, 89]) expect(lit(row, hsa, 25)).toBe(1);
  });
  it('another wing of its own block does, at an L and at a step in the wall', () => {
    const L = solid(
      'L',
      [
        [0, 0],
        [12, 0],
        [12, -10],
        [16, -10],
        [16, 8],
        [0, 8],
      ],
      0,
      9,
    );
    // Sun in the east, low: the wing at x ≥ 12 stands between. Window from x = 4 to 6.
    expect(lit([L], -60, 10)).toBe(0);
    expect(lit([L], 60, 10)).toBe(1);
    expect(lit([L], -60, 60)).toBe(1);
  });
  it('a block that touches the wall and covers the window leaves no sun', () => {
    expect(lit([solid('annex', box(0, -4, 12, 4), 0, 6)], 0, 30)).toBe(0);
  });
  it('a floating block shades like an overhang and lets low sun pass beneath', () => {
    // A slab 1.2 m deep with its underside 0.2 m above the head (4.5 m): the closed form of 1e.
    const slab = solid('balcony', box(-100, -1.2, 300, 1.2), 4.7, 4.95);
    const t = Math.tan((50 * Math.PI) / 180);
    expect(lit([slab], 0, 50)).toBeCloseTo(1 - (1.2 * t - 0.2) / 1.5, 12);
    expect(lit([slab], 0, 5)).toBe(1);
  });
  it('blocks under the ground, without height, without area or coincident bring no NaN and no shade', () => {
    const odd = [
      solid('under', box(0, -5, 12, 4), -6, -1),
      solid('flat', box(0, -5, 12, 4), 3, 3),
      solid(
        'needle',
        [
          [0, -5],
          [5, -5],
          [9, -5],
        ],
        0,
        50,
      ),
    ];
    expect(lit(odd, 10, 30)).toBe(1);
    const twice = [solid('a', box(0, -9, 12, 4), 0, 7), solid('b', box(0, -9, 12, 4), 0, 7)];
    expect(lit(twice, 10, 25)).toBeCloseTo(lit(twice.slice(1), 10, 25), 12);
  });
});

describe('sunlit fraction: trees', () => {
  const tree = {
    at: [5, -10],
    height: 12,
    trunk: 2,
    spread: 8,
    transmittance: [0.6, 0.6, 0.6, 0.5, 0.3, 0.2, 0.2, 0.2, 0.3, 0.4, 0.5, 0.6],
  };
  it('a window wholly behind a crown keeps the month’s share, and all of it when no month is asked for', () => {
    expect(fraction(0, 20, { trees: [tree] }, 7)).toBeCloseTo(0.2, 12);
    expect(fraction(0, 20, { trees: [tree] }, 1)).toBeCloseTo(0.6, 12);
    expect(fraction(0, 20, { trees: [tree] })).toBe(1);
    expect(fraction(0, 70, { trees: [tree] }, 7)).toBe(1);
  });
  it('two crowns in a row multiply', () => {
    const far = { ...tree, at: [5, -12] };
    expect(fraction(0, 20, { trees: [tree, far] }, 7)).toBeCloseTo(0.04, 12);
  });
  it('an opaque crown in front of a wide pane takes the area of its ellipse', () => {
    // Sphere of radius 1 at right angles to the ray: shadow on a plane whose normal makes θ with the ray is an ellipse of area π/cos θ.
    const ball = { at: [6, -4], base: 4, trunk: 0, height: 2, spread: 2, transmittance: Array(12).fill(0) };
    const pane = { from: 0, sill: 0, width: 12, height: 6 };
    for (const [hsa, altitude] of [
      [0, 20],
      [30, 15],
      [-25, 15],
    ] as const) {
      const cos = Math.cos((altitude * Math.PI) / 180) * Math.cos((hsa * Math.PI) / 180);
      expect(fraction(hsa, altitude, { window: pane, trees: [ball] }, 6)).toBeCloseTo(1 - Math.PI / cos / 72, 9);
    }
  });
  it('of a crown that grows through the wall only the front part shades', () => {
    // Sphere of radius 1 centred in the wall's plane, sun square to the wall: what is in shade is its section, a disc.
    const ball = { at: [6, 0], base: 4, trunk: 0, height: 2, spread: 2, transmittance: Array(12).fill(0) };
    const pane = { from: 0, sill: 0, width: 12, height: 6 };
    expect(fraction(0, 1e-6, { window: pane, trees: [ball] }, 6)).toBeCloseTo(1 - Math.PI / 72, 3);
    // At altitude h the front half throws half an ellipse below, and the section is half a disc above: π/2·(1 + 1/cos h).
    const cos = Math.cos((40 * Math.PI) / 180);
    expect(fraction(0, 40, { window: pane, trees: [ball] }, 6)).toBeCloseTo(
      1 - ((Math.PI / 2) * (1 + 1 / cos)) / 72,
      3,
    );
  });
});

describe('sunlit fraction against followed rays, and laws', () => {
  /** To the millimetre: blocks that stand less than `IN_FRONT_m` in front of a wall are let be, which rays do not know. */
  const metre = (min: number, max: number) => fc.integer({ min: min * 1000, max: max * 1000 }).map((n) => n / 1000);
  const block = fc
    .record({
      x: metre(-25, 30),
      y: metre(-40, 6),
      w: metre(1, 14),
      d: metre(1, 14),
      turn: metre(0, 90),
      base: metre(0, 8),
      rise: metre(0.5, 25),
    })
    .map((r) => ({
      outline: box(r.x, r.y, r.w, r.d, r.turn),
      base: r.base > 4 ? r.base : 0,
      top: (r.base > 4 ? r.base : 0) + r.rise,
    }));
  const wing = fc
    .record({ x: metre(-15, 20), y: metre(-30, -6), arm: metre(1, 5), span: metre(6, 14), rise: metre(1, 20) })
    .map(({ x, y, arm, span, rise }) => ({
      outline: [
        [x, y],
        [x + span, y],
        [x + span, y + arm],
        [x + arm, y + arm],
        [x + arm, y + span],
        [x, y + span],
      ] as [number, number][],
      base: 0,
      top: rise,
    }));
  const blocks = fc
    .array(fc.oneof(block, wing), { minLength: 0, maxLength: 8 })
    .map((list) => list.map((b, i) => solid(`${i}`, b.outline, b.base, b.top)));
  const device = fc.oneof(
    fc.record({
      kind: fc.constant('overhang'),
      depth: metre(0.1, 2),
      above: metre(0, 0.5),
      left: metre(0, 1),
      right: metre(0, 1),
      tilt: metre(-30, 45),
    }),
    fc.record({
      kind: fc.constant('fin'),
      side: fc.constantFrom('left', 'right', 'both'),
      depth: metre(0.1, 1.5),
      gap: metre(0, 0.3),
      above: metre(0, 0.5),
      below: metre(-0.3, 0.5),
    }),
    fc.record({
      kind: fc.constant('louvres'),
      count: fc.integer({ min: 1, max: 8 }),
      spacing: metre(0.1, 0.4),
      depth: metre(0.05, 0.4),
      tilt: metre(-60, 80),
      gap: metre(0, 0.3),
      left: metre(0, 0.3),
      right: metre(0, 0.3),
    }),
  );
  const devices = fc.array(device, { maxLength: 3 });
  const sun = fc.record({ hsa: metre(-88, 88), altitude: metre(1, 85) });

  it('agrees with 10⁵ rays to 0.5 % of the glass', () => {
    fc.assert(
      fc.property(blocks, devices, sun, metre(0, 0.4), (solids, fixed, { hsa, altitude }, reveal) => {
        const { window } = house({ devices: fixed, window: { reveal } });
        const direction = sunAt(180 + hsa, altitude);
        const exact = sunlitFraction(windowShade(window, solids, []), direction);
        const sampled = sampledFraction(window, window.reveal_m, window.shaders, solids, direction);
        expect(Math.abs(exact - sampled)).toBeLessThan(0.005);
      }),
      { numRuns: 60 },
    );
  }, 120_000);

  it('agrees with rays on a rooflight too', () => {
    fc.assert(
      fc.property(blocks, sun, metre(0, 0.4), metre(0, 360), (solids, { hsa, altitude }, reveal, turn) => {
        const { window } = house({ window: { wall: undefined, roof: { at: [5, 3], turn }, reveal } });
        const direction = sunAt(180 + hsa, altitude);
        const exact = sunlitFraction(windowShade(window, solids, []), direction);
        expect(Math.abs(exact - sampledFraction(window, reveal, [], solids, direction))).toBeLessThan(0.005);
      }),
      { numRuns: 40 },
    );
  }, 120_000);

  it('stays within 0..1, never grows when a block is added, and does not mind the order of blocks', () => {
    fc.assert(
      fc.property(blocks, block, devices, sun, (solids, extra, fixed, { hsa, altitude }) => {
        const { window } = house({ devices: fixed });
        const direction = sunAt(180 + hsa, altitude);
        const lit = (list: typeof solids) => sunlitFraction(windowShade(window, list, []), direction);
        const before = lit(solids);
        expect(before >= 0 && before <= 1).toBe(true);
        expect(lit([...solids, solid('extra', extra.outline, extra.base, extra.top)])).toBeLessThanOrEqual(
          before + 1e-12,
        );
        expect(lit([...solids].reverse())).toBeCloseTo(before, 10);
      }),
      { numRuns: 300 },
    );
  });

  it('does not change when the drawing and its north are turned together', () => {
    fc.assert(
      fc.property(metre(-180, 180), sun, metre(5, 20), (turn, { hsa, altitude }, far) => {
        const lit = (t: number) => {
          const [c, s] = [Math.cos((t * Math.PI) / 180), Math.sin((t * Math.PI) / 180)];
          const at = [3 * c - far * s, -3 * s - far * c];
          const parts = {
            turn: t,
            north: t,
            devices: [{ kind: 'overhang', depth: 0.6 }],
            blocks: [{ id: 'N', standing: 'context', box: { at, width: 6, depth: 4, turn: t }, height: 9 }],
          };
          const { model, window } = house(parts);
          return sunlitFraction(windowShade(window, model.solids, []), sunAt(180 + hsa, altitude, t));
        };
        expect(lit(turn)).toBeCloseTo(lit(0), 9);
      }),
      { numRuns: 100 },
    );
  });
});
