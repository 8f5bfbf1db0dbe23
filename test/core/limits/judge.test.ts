import { describe, expect, it } from 'vitest';
import type { RoomForm, WindowForm } from '../../../core/form/model.ts';
import type { RoomGain } from '../../../core/gain/gain-run.ts';
import { roomDay } from '../../../core/gain/room-day.ts';
import { PARTS, type Part, type WindowDay } from '../../../core/gain/series.ts';
import { countRooms, findingsOf, judgeRoom, limitValueFor, verdictOf } from '../../../core/limits/judge.ts';
import type { Limit, LimitSet } from '../../../core/limits/limit-set.ts';
import { readMetric } from '../../../core/limits/reading.ts';
import { type DayFacts, mostGlazed, quarterOf } from '../../../core/limits/room-facts.ts';
import { Glass } from '../../../core/scheme/schema.ts';
import type { DayGrid } from '../../../core/sky/day-grid.ts';

/** Six steps of four hours: enough to add up by head. */
const STEPS = 6;
const grid: DayGrid = {
  key: 'hottest',
  name: 'hottest design day, 21 July',
  date: '2025-07-21',
  step_min: 240,
  instant_ms: Float64Array.from({ length: STEPS }, (_, i) => Date.UTC(2025, 6, 21, 1 + 4 * i)),
  clock_min: Float64Array.from({ length: STEPS }, (_, i) => 120 + 240 * i),
  azimuth_rad: new Float64Array(STEPS),
  altitude_rad: new Float64Array(STEPS).fill(0.6),
  beamNormal_Wm2: new Float64Array(STEPS),
  diffuse_Wm2: new Float64Array(STEPS),
  global_Wm2: new Float64Array(STEPS),
  extraterrestrial_Wm2: new Float64Array(STEPS),
  airMass: new Float64Array(STEPS),
  tAir_C: new Float64Array(STEPS),
};
const days: DayFacts = { grids: [grid], zone: 'Europe/London', latitude_deg: 51.5 };

function windowOf(id: string, bearing_deg: number, opening_m2 = 3): WindowForm {
  const glass = Glass.parse({ id: 'G', g: 0.6, u: 1.2, light: 0.7 });
  return {
    id,
    room: 'R',
    block: 'B',
    origin: [0, 0, 0],
    right: [1, 0, 0],
    up: [0, 0, 1],
    normal: [0, -1, 0],
    width_m: opening_m2,
    height_m: 1,
    reveal_m: 0,
    opening_m2,
    glass_m2: opening_m2 * 0.8,
    glass,
    shaders: [],
    blinds: [],
    bearing_deg,
    tilt_deg: 90,
    place: '',
  };
}

/** A window whose beam is `beam` and whose dome light is `sky` [W], step by step. */
function dayOf(window: string, beam: readonly number[], sky: readonly number[]): WindowDay {
  const zeros = (): Float64Array => new Float64Array(STEPS);
  const parts: { [P in Part]: Float64Array } = {
    beam: Float64Array.from(beam),
    circumsolar: zeros(),
    sky: Float64Array.from(sky),
    horizon: zeros(),
    ground: zeros(),
  };
  const total_W = Float64Array.from({ length: STEPS }, (_, i) => PARTS.reduce((t, p) => t + parts[p][i]!, 0));
  return {
    window,
    day: 'hottest',
    sunlit: zeros().fill(0.5),
    cosIncidence: zeros(),
    seen: { sky: 0.5, horizon: 1, ground: 0.5 },
    blind: zeros().fill(1),
    parts,
    total_W,
  };
}

function roomOf(
  id: string,
  floor_m2: number,
  windows: readonly (readonly [WindowForm, WindowDay])[],
  use: RoomForm['use'] = 'living',
): RoomGain {
  const room: RoomForm = {
    id,
    name: `Room ${id}`,
    use,
    block: 'B',
    outline: [],
    floor_m: 0,
    height_m: 2.5,
    floor_m2,
    volume_m3: 2.5 * floor_m2,
    walls: [],
    windows: windows.map(([w]) => w.id),
    place: 'rooms[0]',
  };
  return {
    room,
    windows: windows.map(([w]) => w),
    days: [
      roomDay(
        id,
        'hottest',
        windows.map(([, d]) => d),
        STEPS,
      ),
    ],
  };
}

/** 10 m² of floor; W1 faces west, W2 east. Peak in the fourth step (12:00 to 16:00): 500 + 100 W. */
const facts = roomOf('R', 10, [
  [windowOf('W1', 270), dayOf('W1', [0, 0, 100, 400, 200, 0], [0, 50, 100, 100, 50, 0])],
  [windowOf('W2', 90, 2), dayOf('W2', [0, 300, 50, 0, 0, 0], [0, 50, 100, 100, 50, 0])],
]);
const limit = (over: Partial<Limit> = {}): Limit => ({
  id: 'L',
  name: '',
  metric: 'peak-gain',
  comparison: 'at-most',
  value: 50,
  unit: 'W/m²',
  source: 'test',
  checked: null,
  ...over,
});
const setOf = (...limits: Limit[]): LimitSet => ({
  format: 'shadewright-limits',
  version: 1,
  id: 'S',
  name: 'S',
  example: false,
  note: '',
  close: 0.1,
  limits,
});

describe('readings, added up by head', () => {
  it('peak: 600 W on 10 m² at the fourth step, five sixths through W1, two thirds beam', () => {
    const r = readMetric({ metric: 'peak-gain' }, facts, days);
    expect(r).toMatchObject({ value: 60, day: 'hottest', step: 3 });
    expect(r?.through?.window).toBe('W1');
    expect(r?.through?.share).toBeCloseTo(5 / 6, 12);
    expect(r?.parts.beam).toBeCloseTo(2 / 3, 12);
    expect(r?.parts.sky).toBeCloseTo(1 / 3, 12);
  });
  it('mean of 05:00 to 15:00: the steps at 06:00, 10:00 and 14:00, (400 + 350 + 600) / 3 W', () => {
    const r = readMetric({ metric: 'mean-gain', clock: ['05:00', '15:00'] }, facts, days);
    expect(r?.value).toBeCloseTo(45, 12);
    expect(r?.through?.share).toBeCloseTo(750 / 1350, 12);
  });
  it('day: 1650 W over steps of four hours, 660 Wh/m²', () => {
    const r = readMetric({ metric: 'day-gain' }, facts, days);
    expect(r?.value).toBeCloseTo(660, 9);
    expect(r?.step).toBeNull();
  });
  it('glazing: 5 m² on 10 m², 50 %, most of it W1', () => {
    const r = readMetric({ metric: 'glazing-to-floor' }, facts, days);
    expect(r).toMatchObject({ value: 50, day: null });
    expect(r?.through).toEqual({ window: 'W1', share: 0.6 });
  });
  it('season: every warm month’s clear day times its days (April to September: 183)', () => {
    const grids = [4, 5, 6, 7, 8, 9].map((m) => ({ ...grid, key: `month-${m}`, date: `2025-0${m}-21` }));
    const season = { ...facts, days: grids.map((g) => ({ ...facts.days[0]!, day: g.key })) };
    const r = readMetric({ metric: 'season-gain' }, season, { ...days, grids });
    expect(r?.value).toBeCloseTo((183 * 660) / 1000, 9);
    expect(readMetric({ metric: 'season-gain' }, facts, days)).toBeNull();
  });
  it('the worst of several days counts, the highest or the lowest', () => {
    const grids = [grid, { ...grid, key: 'june' }];
    const low = roomDay('R', 'june', [dayOf('W1', [0, 0, 0, 100, 0, 0], [0, 0, 0, 0, 0, 0])], STEPS);
    const two = { ...facts, days: [facts.days[0]!, low] };
    const question = { metric: 'peak-gain' as const, days: ['hottest', 'june'] };
    expect(readMetric(question, two, { ...days, grids })?.value).toBe(60);
    expect(readMetric(question, two, { ...days, grids }, 'lowest')).toMatchObject({ value: 10, day: 'june' });
  });
  it('of a room without floor there is none', () => {
    expect(readMetric({ metric: 'peak-gain' }, roomOf('R0', 0, []), days)).toBeNull();
  });
});

describe('verdicts', () => {
  it.each([
    [50.001, 'at-most', 'over'],
    [50, 'at-most', 'close'],
    [45.1, 'at-most', 'close'],
    [45, 'at-most', 'within'],
    [49.9, 'at-least', 'over'],
    [50, 'at-least', 'close'],
    [54.9, 'at-least', 'close'],
    [55.1, 'at-least', 'within'],
  ] as const)('%f against 50 %s is %s, with a band of a tenth', (value, comparison, verdict) => {
    expect(verdictOf(value, 50, comparison, 0.1)).toBe(verdict);
  });
  it('come with margin, moment, window and a sentence that says why', () => {
    const finding = judgeRoom(limit(), 0.1, facts, days);
    expect(finding).toMatchObject({ value: 60, limitValue: 50, margin: 10, verdict: 'over', day: 'hottest' });
    expect(finding?.when?.instant_ms).toBe(Date.UTC(2025, 6, 21, 13));
    expect(finding?.reason).toBe(
      '60.0 W/m², 10.0 above the limit of 50.0 at 14:00 on the hottest design day, 21 July: 83 % of it through window W1, facing west, 67 % from direct sun and 33 % from the sky; the sun is then on 50 % of its glass.',
    );
  });
  it('tell value, gap and limit to the same digits, so that they add up as they are read', () => {
    const against = (value: number) => judgeRoom({ ...limit(), value }, 0.1, facts, days)?.reason;
    expect(against(7.77)).toMatch(/^60\.00 W\/m², 52\.23 above the limit of 7\.77 at/);
    expect(against(120)).toMatch(/^60 W\/m², 60 below the limit of 120 at/);
    expect(against(59.999)).toMatch(/^60\.0 W\/m², just above the limit of 60\.0 at/);
    expect(against(60)).toMatch(/^60\.0 W\/m², just at the limit at/);
  });
  it('apply to the uses named and to rooms with a window alone', () => {
    expect(judgeRoom(limit({ uses: ['office'] }), 0.1, facts, days)).toBeNull();
    expect(judgeRoom(limit(), 0.1, roomOf('R0', 10, []), days)).toBeNull();
  });
  it('take the value of the most glazed wall, the strictest of equals', () => {
    const by = limit({ metric: 'glazing-to-floor', unit: '%', byBearing: { N: 37, E: 36, S: 30, W: 22 }, value: 99 });
    expect(limitValueFor(by, facts)).toBe(22);
    const equal = { ...facts, windows: [windowOf('A', 0), windowOf('B', 180)] };
    expect(mostGlazed(equal.windows)).toEqual(['N', 'S']);
    expect(limitValueFor(by, equal)).toBe(30);
    expect(limitValueFor(by, { ...facts, windows: [{ ...windowOf('C', 0), tilt_deg: 0 }] })).toBe(99);
  });
  it('know the quarters of the compass', () => {
    expect([0, 44.9, 45, 134.9, 135, 224.9, 225, 314.9, 315, 359].map(quarterOf).join('')).toBe('NNEESSWWNN');
  });
});

describe('findings', () => {
  const cool = roomOf('A', 40, [[windowOf('W9', 180), dayOf('W9', [0, 0, 100, 0, 0, 0], [0, 0, 0, 0, 0, 0])]]);
  const hot = roomOf('B', 5, [[windowOf('W8', 180), dayOf('W8', [0, 0, 500, 0, 0, 0], [0, 0, 0, 0, 0, 0])]]);
  it('stand worst first by margin as a share of the limit, then by room', () => {
    const findings = findingsOf(
      [cool, facts, hot],
      days,
      setOf(limit(), limit({ id: 'M', metric: 'day-gain', unit: 'Wh/m²', value: 600 })),
    );
    expect(findings.map((f) => [f.room, f.limit])).toEqual([
      ['B', 'L'],
      ['R', 'L'],
      ['R', 'M'],
      ['B', 'M'],
      ['A', 'L'],
      ['A', 'M'],
    ]);
    expect(countRooms(findings)).toEqual({ over: 2, close: 0, within: 1 });
  });
  it('without a set are values without verdict', () => {
    const findings = findingsOf([facts], days, null);
    expect(findings.map((f) => f.metric).sort()).toEqual(['day-gain', 'glazing-to-floor', 'mean-gain', 'peak-gain']);
    for (const f of findings) expect([f.verdict, f.limitValue, f.margin]).toEqual([null, null, null]);
    expect(countRooms(findings)).toEqual({ over: 0, close: 0, within: 0 });
  });
});

describe('a limit that goes by how much of the floor the openings are', () => {
  // Openings of W1 and W2 over 10 m² of floor.
  const openings = facts.windows.reduce((sum, w) => sum + w.opening_m2, 0);
  const share = (100 * openings) / 10;
  const steps = [
    { upTo: share / 2, value: 90 },
    { upTo: share, value: 70, byBearing: { N: 1, E: 2, S: 3, W: 4 } },
    { upTo: share * 2, value: 30 },
  ];

  it('takes the first step that the room does not pass, by its bearing where the step says so', () => {
    // W1 has the larger opening and faces west.
    expect(limitValueFor(limit({ byGlazing: steps }), facts)).toBe(4);
    expect(limitValueFor(limit({ byGlazing: steps.slice(2) }), facts)).toBe(30);
  });

  it('takes the plain value above all steps', () => {
    expect(limitValueFor(limit({ value: 12, byGlazing: steps.slice(0, 1) }), facts)).toBe(12);
  });
});
