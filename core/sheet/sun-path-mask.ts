import type { ShadingMask } from '../shade/sky-view-mask.ts';
import { DEG } from '../units/angle.ts';
import type { Hatch, Mark } from './drawing.ts';
import { SOFT } from './ink.ts';
import { type PagePoint, type SkyView, skyOnPage, thinned } from './sun-path-view.ts';

export const MASK_HATCH: Hatch = { angle_deg: 45, spacing: 1.4, stroke: { colour: SOFT, width: 0.15 } };

type Strip = {
  readonly from_deg: number;
  readonly to_deg: number;
  readonly low_deg: number;
  readonly high_deg: number;
};
type Chain = Strip[];

/** What is hidden of the sky, as areas with a hatch. */
export function maskMarks(view: SkyView, mask: ShadingMask): readonly Mark[] {
  const runs = chains(strips(view, mask)).map((chain) => thinned(outlineOf(view, chain), 0.02));
  if (runs.length === 0) return [];
  return [{ kind: 'path', runs, closed: true, hatch: MASK_HATCH, stroke: { colour: SOFT, width: 0.15 } }];
}

/** Each hidden stretch with the span of bearings that it stands for, cut where the page begins and ends. */
function strips(view: SkyView, mask: ShadingMask): readonly (readonly Strip[])[] {
  const { azimuths } = mask;
  const seam = view.kind === 'altitude-azimuth' ? view.middle_deg - 180 : 0;
  const top = view.kind === 'altitude-azimuth' ? view.top_deg : 90;
  const turned = azimuths
    .map(({ azimuth_deg, hidden }) => ({ bearing: (((azimuth_deg - seam) % 360) + 360) % 360, hidden }))
    .sort((a, b) => a.bearing - b.bearing);
  return turned.map(({ bearing, hidden }, i) => {
    const before = turned[i - 1]?.bearing ?? 0;
    const after = turned[i + 1]?.bearing ?? 360;
    const from_deg = seam + (i === 0 ? 0 : (before + bearing) / 2);
    const to_deg = seam + (i === turned.length - 1 ? 360 : (bearing + after) / 2);
    return hidden
      .filter(([low]) => low < top)
      .map(([low_deg, high]) => ({ from_deg, to_deg, low_deg, high_deg: Math.min(high, top) }));
  });
}

/** Stretches of neighbouring bearings that overlap, joined one to one into areas without branches. */
function chains(columns: readonly (readonly Strip[])[]): readonly Chain[] {
  const done: Chain[] = [];
  let open: Chain[] = [];
  for (const column of columns) {
    const next: Chain[] = [];
    for (const strip of column) {
      const joins = open.filter((chain) => meets(chain.at(-1) as Strip, strip));
      const only = joins[0];
      const branches = column.filter((other) => only !== undefined && meets(only.at(-1) as Strip, other)).length;
      if (joins.length === 1 && only !== undefined && branches === 1) {
        only.push(strip);
        next.push(only);
      } else next.push([strip]);
    }
    done.push(...open.filter((chain) => !next.includes(chain)));
    open = next;
  }
  return [...done, ...open];
}

const meets = (a: Strip, b: Strip): boolean => a.low_deg < b.high_deg && b.low_deg < a.high_deg;

/** Round an area: along its lower edge and back along its upper one, through the middle of each span. */
function outlineOf(view: SkyView, chain: Chain): PagePoint[] {
  const [first, last] = [chain[0] as Strip, chain.at(-1) as Strip];
  const place = (bearing: number, altitude: number): PagePoint => {
    if (view.kind === 'stereographic') return skyOnPage(view, bearing * DEG, altitude * DEG);
    // Not by skyOnPage: the seam belongs to both edges of the frame.
    const { x, width } = view.frame;
    return [x + (width * (bearing - view.middle_deg + 180)) / 360, skyOnPage(view, 0, altitude * DEG)[1]];
  };
  const edge = (which: 'low_deg' | 'high_deg'): PagePoint[] => [
    place(first.from_deg, first[which]),
    ...chain.map((s) => place((s.from_deg + s.to_deg) / 2, s[which])),
    place(last.to_deg, last[which]),
  ];
  return [...edge('low_deg'), ...edge('high_deg').reverse()];
}
