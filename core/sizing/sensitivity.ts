import { buildModel } from '../form/build-model.ts';
import type { CheckMemo } from '../gain/gain-memo.ts';
import { skyModelOf } from '../gain/open-light.ts';
import type { Finding } from '../limits/finding.ts';
import { judgeRoom } from '../limits/judge.ts';
import type { Limit, LimitSet } from '../limits/limit-set.ts';
import { needsWeather } from '../limits/metric.ts';
import type { Scheme } from '../scheme/schema.ts';
import { roomReader, type Under } from './room-facts-of.ts';
import { daysForLimit } from './room-probe.ts';

/** One input moved a little either way, and where the result goes. */
export type Bar = {
  readonly input: string;
  /** Place in the scheme, where it is one. */
  readonly place: string;
  readonly low: { readonly setting: string; readonly value: number };
  readonly high: { readonly setting: string; readonly value: number };
  /** How far apart the two results are, in the unit of the finding. */
  readonly swing: number;
};

/** An input and the scheme with it moved down and up. Null: the scheme has no such input, or it cannot move that way. */
type Move = {
  readonly input: string;
  readonly place: string;
  readonly low: string;
  readonly high: string;
  readonly change: (scheme: Scheme, room: string, way: -1 | 1) => Scheme;
};

const clampShare = (x: number, least: number, most: number): number => Math.min(most, Math.max(least, x));

/** Every window of a room changed. */
const eachWindow = (
  scheme: Scheme,
  room: string,
  change: (w: Scheme['windows'][number]) => Scheme['windows'][number],
): Scheme => ({ ...scheme, windows: scheme.windows.map((w) => (w.room === room ? change(w) : w)) });

/** Every glass that a room uses changed, for the whole scheme: only the room is looked at. */
function eachGlass(
  scheme: Scheme,
  room: string,
  change: (g: Scheme['glass'][number]) => Scheme['glass'][number],
): Scheme {
  const used = new Set(scheme.windows.filter((w) => w.room === room).map((w) => w.glass));
  return { ...scheme, glass: scheme.glass.map((g) => (used.has(g.id) ? change(g) : g)) };
}

/** Devices of one kind on a room's windows changed. */
function eachDevice(scheme: Scheme, room: string, kind: 'overhang' | 'fin', by_m: number): Scheme {
  const used = new Set(scheme.windows.filter((w) => w.room === room).flatMap((w) => w.devices));
  const devices = scheme.devices.map((d) =>
    used.has(d.id) && d.kind === kind ? { ...d, depth: Math.max(0, d.depth + by_m) } : d,
  );
  return { ...scheme, devices };
}

type Monthly = Scheme['site']['groundReflectance'];
const everyMonth = (value: Monthly, change: (x: number) => number): Monthly =>
  typeof value === 'number' ? change(value) : (value.map(change) as Monthly);

const MOVES: readonly Move[] = [
  {
    input: 'g of the glass',
    place: 'glass[].g',
    low: 'a tenth less',
    high: 'a tenth more',
    change: (s, room, way) => eachGlass(s, room, (g) => ({ ...g, g: clampShare(g.g * (1 + 0.1 * way), 0.01, 1) })),
  },
  {
    input: 'width of the windows',
    place: 'windows[].width',
    low: 'a tenth less',
    high: 'a tenth more',
    change: (s, room, way) =>
      eachWindow(s, room, (w) => {
        const width = w.width * (1 + 0.1 * way);
        return { ...w, width, from: w.wall === undefined ? w.from : w.from + (w.width - width) / 2 };
      }),
  },
  {
    input: 'frame share',
    place: 'glass[].frame',
    low: '0.05 less',
    high: '0.05 more',
    change: (s, room, way) => eachGlass(s, room, (g) => ({ ...g, frame: clampShare(g.frame + 0.05 * way, 0, 0.95) })),
  },
  {
    input: 'depth of the overhangs',
    place: 'devices[].depth',
    low: '0.1 m less',
    high: '0.1 m more',
    change: (s, room, way) => eachDevice(s, room, 'overhang', 0.1 * way),
  },
  {
    input: 'depth of the fins',
    place: 'devices[].depth',
    low: '0.1 m less',
    high: '0.1 m more',
    change: (s, room, way) => eachDevice(s, room, 'fin', 0.1 * way),
  },
  {
    input: 'depth of the reveals',
    place: 'windows[].reveal',
    low: '0.05 m less',
    high: '0.05 m more',
    change: (s, room, way) => eachWindow(s, room, (w) => ({ ...w, reveal: Math.max(0, w.reveal + 0.05 * way) })),
  },
  {
    input: 'ground reflectance',
    place: 'site.groundReflectance',
    low: '0.1 less',
    high: '0.1 more',
    change: (s, _, way) => {
      const groundReflectance = everyMonth(s.site.groundReflectance, (x) => clampShare(x + 0.1 * way, 0, 1));
      return { ...s, site: { ...s.site, groundReflectance } };
    },
  },
  {
    input: 'turbidity of the air',
    place: 'site.linkeTurbidity',
    low: '1 less',
    high: '1 more',
    change: (s, _, way) => {
      const linkeTurbidity = everyMonth(s.site.linkeTurbidity, (x) => clampShare(x + way, 1, 15));
      return { ...s, site: { ...s.site, linkeTurbidity } };
    },
  },
  {
    input: 'true north',
    place: 'site.north',
    low: '5° anticlockwise',
    high: '5° clockwise',
    change: (s, _, way) => ({ ...s, site: { ...s.site, north: s.site.north + 5 * way } }),
  },
  {
    input: 'height of the neighbours',
    place: 'blocks[].height',
    low: '1 m less',
    high: '1 m more',
    change: (s, room, way) => {
      const own = s.rooms.find((r) => r.id === room)?.block;
      const blocks = s.blocks.map((b) =>
        b.id !== own && b.standing !== 'proposed' ? { ...b, height: Math.max(0.01, b.height + way) } : b,
      );
      return { ...s, blocks };
    },
  },
  {
    input: 'what comes through the trees',
    place: 'trees[].transmittance',
    low: 'nothing',
    high: 'no trees',
    change: (s, _, way) => ({
      ...s,
      trees: way > 0 ? [] : s.trees.map((t) => ({ ...t, transmittance: t.transmittance.map(() => 0) })),
    }),
  },
];

/** The room's finding in a changed scheme, with only that room built. */
function resultAt(
  scheme: Scheme,
  limit: Limit,
  close: number,
  room: string,
  read: ReturnType<typeof roomReader>,
): number {
  const small: Scheme = {
    ...scheme,
    rooms: scheme.rooms.filter((r) => r.id === room),
    windows: scheme.windows.filter((w) => w.room === room),
    receptors: [],
    sheets: [],
  };
  if (small.rooms.length === 0) throw new RangeError(`the scheme holds no room ${JSON.stringify(room)}`);
  const { facts, days } = read(small, buildModel(small));
  return judgeRoom(limit, close, facts, days)?.value ?? Number.NaN;
}

/**
 * Which input moves a result most: each is moved a little either way by itself, everything else as it stands.
 * @returns  the bars, longest first; inputs that move nothing (no overhang, no trees) are left out
 */
export function sensitivity(
  scheme: Scheme,
  limitSet: LimitSet,
  room: string,
  finding: Finding,
  memo: CheckMemo,
  under: Under = {},
): readonly Bar[] {
  const limit = limitSet.limits.find((l) => l.id === finding.limit);
  if (!limit) throw new RangeError(`the limit set holds no limit ${JSON.stringify(finding.limit)}`);
  if (needsWeather(limit.metric) && (under.weather ?? null) === null) return [];
  const own = scheme.windows.filter((w) => w.room === room).length;
  const settled = { ...under, skyModel: under.skyModel ?? skyModelOf(scheme) };
  const read = roomReader(scheme, limit, daysForLimit(scheme, limit), own, memo, settled);
  const at = (s: Scheme): number => resultAt(s, limit, limitSet.close, room, read);
  const bars = MOVES.map((move): Bar => {
    const low = at(move.change(scheme, room, -1));
    const high = at(move.change(scheme, room, 1));
    return {
      input: move.input,
      place: move.place,
      low: { setting: move.low, value: low },
      high: { setting: move.high, value: high },
      swing: Math.max(low, high, finding.value) - Math.min(low, high, finding.value),
    };
  });
  const least = 1e-9 * Math.max(1, Math.abs(finding.value));
  return bars.filter((b) => b.swing > least).sort((a, b) => b.swing - a.swing || (a.input < b.input ? -1 : 1));
}
