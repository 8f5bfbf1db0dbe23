import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { WindowForm } from '../../../core/form/model.ts';
import { blindFactor, blindRules } from '../../../core/gain/blind-rule.ts';
import { glazingWithBlind } from '../../../core/gain/blind.ts';
import { karlssonRoosCurve } from '../../../core/gain/glass-angle.ts';
import { openLight, viewOf } from '../../../core/gain/open-light.ts';
import { energy_Wh, roomDay } from '../../../core/gain/room-day.ts';
import { PARTS, type Part } from '../../../core/gain/series.ts';
import { type OpenLight, windowDay } from '../../../core/gain/window-day.ts';
import { Glass, type Blind } from '../../../core/scheme/schema.ts';
import type { DayGrid } from '../../../core/sky/day-grid.ts';
import { seedOf } from '../../helpers/property-seed.ts';

const RAD = Math.PI / 180;

/** A day of given steps: only what the kernel reads is set. */
function gridOf(n: number, over: Partial<DayGrid> = {}): DayGrid {
  const zeros = (): Float64Array => new Float64Array(n);
  return {
    key: 'hottest',
    name: 'a day',
    date: '2025-07-21',
    step_min: 5,
    instant_ms: Float64Array.from({ length: n }, (_, i) => i * 300_000),
    clock_min: Float64Array.from({ length: n }, (_, i) => 5 * i + 2.5),
    azimuth_rad: zeros(),
    altitude_rad: zeros(),
    beamNormal_Wm2: zeros(),
    diffuse_Wm2: zeros(),
    global_Wm2: zeros(),
    extraterrestrial_Wm2: zeros(),
    airMass: zeros(),
    tAir_C: zeros(),
    ...over,
  };
}

function windowOf(over: Partial<WindowForm> = {}, glass: Record<string, unknown> = {}): WindowForm {
  return {
    id: 'W1',
    room: 'R1',
    block: 'B1',
    origin: [0, 0, 0],
    right: [1, 0, 0],
    up: [0, 0, 1],
    normal: [0, -1, 0],
    width_m: 2.4,
    height_m: 1.5,
    reveal_m: 0,
    opening_m2: 3.6,
    glass_m2: 2.7,
    shaders: [],
    blinds: [],
    bearing_deg: 180,
    tilt_deg: 90,
    place: 'windows[0]',
    glass: Glass.parse({ id: 'G1', g: 0.62, u: 1.2, light: 0.74, panes: 2, coating: 4, ...glass }),
    ...over,
  };
}

const openOf = (values: Partial<Record<Part, number[]>>, n: number): OpenLight => {
  const column = (part: Part): Float64Array => Float64Array.from(values[part] ?? new Array<number>(n).fill(0));
  return {
    beam: column('beam'),
    circumsolar: column('circumsolar'),
    sky: column('sky'),
    horizon: column('horizon'),
    ground: column('ground'),
  };
};
const OPEN_VIEW = { sky: 1, horizon: 1, ground: 1 };
const light = (sunlit: number[], cos: number[]) => ({
  sunlit: Float64Array.from(sunlit),
  cosIncidence: Float64Array.from(cos),
});

describe('heat through one window', () => {
  it('is 585.491 W for 3.6 m², a quarter of frame, g 0.62 at 60° (0.54212) and 400 W/m² of beam', () => {
    const day = windowDay(windowOf(), gridOf(1), openOf({ beam: [400] }, 1), light([1], [0.5]), OPEN_VIEW);
    expect(day.total_W[0]).toBeCloseTo(585.491, 3);
    expect(day.parts.beam[0]).toBe(day.total_W[0]);
  });
  it('gives a 20 m² room 13.500 W/m² for 3.6 m² of g 0.40, frame 0.25 and 250 W/m² (worked by hand, hemispherical g apart)', () => {
    const window = windowOf({}, { g: 0.4 });
    const day = windowDay(window, gridOf(1), openOf({ sky: [250] }, 1), light([0], [0]), OPEN_VIEW);
    expect(day.total_W[0]! / 20 / karlssonRoosCurve(2, 4).hemispherical).toBeCloseTo(13.5, 10);
  });

  /** South window, sun 50° high, azimuth 200°, DNI 700, DHI 120, day 172, ground 0.2: Perez bin 7, worked by hand. */
  const z = 40 * RAD;
  const grid = gridOf(1, {
    altitude_rad: Float64Array.of(Math.PI / 2 - z),
    azimuth_rad: Float64Array.of(200 * RAD),
    beamNormal_Wm2: Float64Array.of(700),
    diffuse_Wm2: Float64Array.of(120),
    global_Wm2: Float64Array.of(700 * Math.cos(z) + 120),
    extraterrestrial_Wm2: Float64Array.of(1323.102),
    airMass: Float64Array.of(1.30422),
  });
  const facing = { bearing_deg: 180, tilt_deg: 90 };
  it('meets beam 422.816, circumsolar 58.675, sky 22.793, horizon 26.657, ground 65.623 W/m² on the open plane', () => {
    const { open, cosIncidence } = openLight(grid, facing, 'perez', 0.2);
    expect(Math.acos(cosIncidence[0]!) / RAD).toBeCloseTo(52.8414, 4);
    const expected = { beam: 422.816, circumsolar: 58.675, sky: 22.793, horizon: 26.657, ground: 65.623 };
    for (const part of PARTS) expect(Math.abs(open[part][0]! - expected[part])).toBeLessThan(1e-3);
    expect(openLight(grid, facing, 'isotropic', 0.2).open.sky[0]).toBeCloseTo(60, 10);
  });
  it('shades each part in its own way: 136.826, 18.987, 13.676, 26.657, 65.623 under an overhang of 0.8 m on 1.5 m', () => {
    const { open, cosIncidence } = openLight(grid, facing, 'perez', 0.2);
    const view = viewOf({ sky: 0.3, horizon: 1, ground: 0.5 }, 90);
    const day = windowDay(windowOf(), grid, open, { sunlit: Float64Array.of(0.32361), cosIncidence }, view);
    const curve = karlssonRoosCurve(2, 4);
    const direct = 2.7 * 0.62 * curve.at(cosIncidence[0]!);
    const diffuse = 2.7 * 0.62 * curve.hemispherical;
    const reaching = { beam: 136.826, circumsolar: 18.987, sky: 13.676, horizon: 26.657, ground: 65.623 };
    for (const part of PARTS) {
      const through = part === 'beam' || part === 'circumsolar' ? direct : diffuse;
      expect(Math.abs(day.parts[part][0]! / through - reaching[part])).toBeLessThan(2e-3);
    }
  });

  it('loses nothing between parts, windows and room, whatever the sky (to 1e-9)', () => {
    const value = fc.double({ min: 0, max: 900, noNaN: true });
    const share = fc.double({ min: 0, max: 1, noNaN: true });
    const step = fc.record({
      beam: value,
      circumsolar: value,
      sky: value,
      horizon: value,
      ground: value,
      lit: share,
      cos: share,
    });
    fc.assert(
      fc.property(fc.array(step, { minLength: 1, maxLength: 30 }), share, (steps, seen) => {
        const columns = Object.fromEntries(PARTS.map((p) => [p, steps.map((s) => s[p])]));
        const open = openOf(columns, steps.length);
        const lit = light(
          steps.map((s) => s.lit),
          steps.map((s) => s.cos),
        );
        const blind: Blind = {
          id: 'L',
          kind: 'blind',
          place: 'external',
          transmittance: 0.1,
          reflectance: 0.5,
          closedAbove: 300,
        };
        const a = windowDay(windowOf(), gridOf(steps.length), open, lit, { sky: seen, horizon: 1, ground: seen });
        const b = windowDay(windowOf({ id: 'W2', blinds: [blind] }), gridOf(steps.length), open, lit, OPEN_VIEW);
        const seenOpen = { sky: 0.5, horizon: 1, ground: 0.5 };
        const both = [a, b].map((day) => ({ ...day, seen: seenOpen }));
        const room = roomDay('R1', 'hottest', both, steps.length);
        for (const day of [a, b])
          for (let i = 0; i < steps.length; i++) {
            const sum = PARTS.reduce((t, p) => t + day.parts[p][i]!, 0);
            expect(Math.abs(sum - day.total_W[i]!)).toBeLessThanOrEqual(1e-9 * Math.max(1, sum));
          }
        const byPart = [a, b].reduce((t, d) => t + PARTS.reduce((u, p) => u + energy_Wh(d.parts[p], 5), 0), 0);
        expect(Math.abs(byPart - energy_Wh(room.total_W, 5))).toBeLessThanOrEqual(1e-9 * Math.max(1, byPart));
      }),
      { seed: seedOf(65), numRuns: 60 },
    );
  });
});

describe('a blind', () => {
  const glass = Glass.parse({ id: 'G1', g: 0.59, u: 1.2, light: 0.7 });
  const blind: Blind = { id: 'L', kind: 'blind', place: 'external', transmittance: 0.05, reflectance: 0.5 };
  it('leaves its closed g over the bare g, above its threshold and in its hours alone', () => {
    const closed = glazingWithBlind(0.59, 1.2, blind) / 0.59;
    const [above] = [blindRules([{ ...blind, closedAbove: 200 }], glass)];
    expect(blindFactor(above, 720, 201)).toBeCloseTo(closed, 12);
    expect(blindFactor(above, 720, 200)).toBe(1);
    const hours = blindRules([{ ...blind, closedFrom: '22:00', closedTo: '06:00' }], glass);
    expect(blindFactor(hours, 23 * 60, 0)).toBeCloseTo(closed, 12);
    expect(blindFactor(hours, 5 * 60, 0)).toBeCloseTo(closed, 12);
    expect(blindFactor(hours, 12 * 60, 900)).toBe(1);
    expect(blindFactor(blindRules([blind], glass), 720, 900)).toBe(1);
  });
  it('is judged by the light that reaches the glass, not by the open sky', () => {
    const window = windowOf({ blinds: [{ ...blind, closedAbove: 300 }] });
    const open = openOf({ beam: [500, 500], sky: [50, 50] }, 2);
    const day = windowDay(window, gridOf(2), open, light([1, 0.4], [0.8, 0.8]), OPEN_VIEW);
    expect(day.blind[0]).toBeLessThan(0.2);
    expect(day.blind[1]).toBe(1);
  });
});
