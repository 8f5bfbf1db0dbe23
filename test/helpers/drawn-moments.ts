import { Scheme } from '../../core/scheme/schema.ts';
import type { Region } from '../../core/plane/region.ts';
import type { GroundShadow } from '../../core/shade/shadow.ts';
import type { ShadowMoment } from '../../core/sheet/shadow-moment.ts';

/** A small scheme with every kind of thing that a plan draws, for golden drawings. */
export const smallYard = (): Scheme =>
  Scheme.parse({
    format: 'shadewright',
    version: 1,
    title: 'Small yard',
    author: 'Nobody & Co.',
    address: '1 Short Row',
    revision: 'A',
    site: {
      latitude: 51.5,
      longitude: 0,
      zone: 'Europe/London',
      north: 20,
      boundary: [
        [-12, -12],
        [22, -12],
        [22, 14],
        [-12, 14],
      ],
    },
    blocks: [
      { id: 'P', name: 'New', standing: 'proposed', box: { at: [-10, -8], width: 12, depth: 8 }, height: 9 },
      { id: 'E', name: 'Shed', standing: 'existing', box: { at: [10, -9], width: 5, depth: 6 }, height: 3 },
      { id: 'R', name: 'Old', standing: 'removed', box: { at: [-8, -6], width: 6, depth: 9 }, height: 5 },
      {
        id: 'N',
        name: 'No. 2',
        standing: 'context',
        outline: [
          [-10, 16],
          [0, 16],
          [0, 22],
          [4, 22],
          [4, 28],
          [-10, 28],
        ],
        height: 7,
      },
    ],
    trees: [{ id: 'T', at: [14, 8], height: 7, spread: 5, transmittance: Array(12).fill(0.5) }],
    receptors: [
      {
        id: 'A',
        kind: 'area',
        name: 'Lawn',
        outline: [
          [4, 0],
          [14, 0],
          [14, 10],
          [4, 10],
        ],
      },
    ],
  });

const shadow = (area_m2: number, ...regions: Region[]): GroundShadow => ({ regions, area_m2 });
const outline = (...outer: (readonly [number, number])[]): Region => ({ outer, holes: [] });

/** Nine moments whose shadows were made by hand: what a drawing shows does not change when the shadows' corners come in another order. */
export function drawnMoments(): readonly ShadowMoment[] {
  return ['2025-03-21', '2025-06-21', '2025-12-21'].flatMap((date, d) =>
    ['09:00', '12:00', '15:00'].map((time, t): ShadowMoment => {
      const [dx, dy] = [(1 - t) * -6, 4 + 3 * Math.abs(d - 1)];
      const isDown = d === 2 && t === 2;
      const before = outline([-8, 3], [-2, 3], [-2 + dx, 3 + dy], [-8 + dx, 3 + dy]);
      const ring: Region = {
        outer: [
          [0, 28],
          [4, 28],
          [4 + dx, 28 + dy],
          [dx, 28 + dy],
        ],
        holes: [
          [
            [1.5 + dx / 2, 29.5],
            [2 + dx / 2, 30.5],
            [2.5 + dx / 2, 29.5],
          ],
        ],
      };
      const added = outline([-10, 0], [2, 0], [2 + 1.5 * dx, 1.5 * dy], [-10 + 1.5 * dx, 1.5 * dy]);
      const gained = outline([-8, 3], [-6, 3], [-6, 4], [-8, 4]);
      const open = (share: number) => ({ open_m2: 100, sunlit_m2: 100 * share, share });
      return {
        instant_ms: Date.parse(`${date}T${time}:00Z`),
        date,
        text: `${['21 March', '21 June', '21 December'][d]} 2025, ${time} (UTC+00:00)`,
        azimuth_deg: 130 + 45 * t,
        altitude_deg: isDown ? -2.5 : 20 + 10 * d,
        change: isDown
          ? null
          : {
              before: shadow(60, before, ring),
              after: shadow(90, ring),
              added: shadow(45.25, added),
              gained: shadow(2, gained),
            },
        areas: [{ id: 'A', name: 'Lawn', before: open(0.9), after: open(0.5) }],
        notes: d === 1 && t === 0 ? ['the clock was put on this night'] : [],
      };
    }),
  );
}
