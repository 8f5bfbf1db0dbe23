import { Scheme } from '../../core/scheme/schema.ts';

/** What a test may change of the small scheme. */
export type SmallScheme = {
  readonly latitude?: number;
  readonly wall?: 0 | 1 | 2 | 3;
  readonly devices?: readonly Record<string, unknown>[];
  readonly windowDevices?: readonly string[];
  readonly windows?: readonly Record<string, unknown>[];
  readonly blocks?: readonly Record<string, unknown>[];
  readonly trees?: readonly Record<string, unknown>[];
  readonly zone?: string;
  readonly longitude?: number;
};

/**
 * One room of 4 × 5 m in a block by itself, with one window 3.2 m wide and 1.5 m high in the middle of a wall: 0 faces south, 1
 * east, 2 north, 3 west (no turn, true north up).
 */
export function smallScheme(over: SmallScheme = {}): Scheme {
  const wall = over.wall ?? 0;
  const from = wall % 2 === 0 ? 0.4 : 0.9;
  const window = {
    id: 'W1',
    room: 'R1',
    wall,
    from,
    sill: 0.9,
    width: 3.2,
    height: 1.5,
    reveal: 0,
    glass: 'G1',
    devices: over.windowDevices ?? [],
  };
  return Scheme.parse({
    format: 'shadewright',
    version: 1,
    title: 'one room',
    site: {
      latitude: over.latitude ?? 51.5,
      longitude: over.longitude ?? 0,
      zone: over.zone ?? 'Etc/UTC',
      linkeTurbidity: 3,
      hottest: { maximum: 30, range: 10 },
    },
    blocks: [
      { id: 'B1', standing: 'proposed', box: { at: [0, 0], width: 4, depth: 5 }, height: 3 },
      ...(over.blocks ?? []),
    ],
    rooms: [
      {
        id: 'R1',
        name: 'Room',
        use: 'living',
        block: 'B1',
        box: { at: [0, 0], width: 4, depth: 5 },
        floor: 0,
        height: 2.7,
      },
    ],
    windows: [window, ...(over.windows ?? [])],
    glass: [{ id: 'G1', g: 0.6, u: 1.2, light: 0.75, panes: 2, frame: 0.2 }],
    devices: over.devices ?? [],
    trees: over.trees ?? [],
  });
}
