import { differenceOf, intersectionOf } from '../plane/boolean.ts';
import type { Region } from '../plane/region.ts';
import type { Point, Ring } from '../plane/vec.ts';

/** A place on the globe, longitude first; longitude may run on past ±180°. */
export type Lonlat = readonly [longitude: number, latitude: number];

/** A place in the plane that touches the globe at the site [m], east and north. */
export type DateLine = {
  /** Which way past ±180° lies, as the longitude that is left behind: 180 or −180. */
  readonly at: 180 | -180;
  /** Two points of the line in the drawing, far apart. */
  readonly along: readonly [Point, Point];
};

/** Points of a cut lie this near to the line at most [°]: the grid of the cut is a tenth of a millimetre. */
const NEAR_deg = 3e-9;

/**
 * Regions cut where they cross ±180°, as RFC 7946, 3.1.9, wants it: each piece lies on one side, with longitudes between −180°
 * and 180°. In the plane that touches the globe a meridian is a straight line, so that the cut is exact.
 * @param lonlat  from the drawing, with longitudes that run on past ±180°
 * @param line    where the meridian of 180° runs through the drawing; null: it is nowhere near
 */
export function cutAtDateLine(
  regions: readonly Region[],
  lonlat: (p: Point) => Lonlat,
  line: DateLine | null,
): readonly (readonly (readonly Lonlat[])[])[] {
  const rings = (region: Region, turn: number, keep: (lon: number) => number) =>
    [region.outer, ...region.holes].map((ring) =>
      closed(ring.map(lonlat).map(([lon, lat]): Lonlat => [keep(lon + turn), lat])),
    );
  const crosses = (ring: Ring): boolean => ring.some((p) => Math.abs(lonlat(p)[0]) > 180);
  const whole = (region: Region) => rings(region, 0, (lon) => lon);
  if (line === null || !regions.some((r) => crosses(r.outer))) return regions.map(whole);
  const sign = Math.sign(line.at);
  return regions.flatMap((region) => {
    if (!crosses(region.outer)) return [whole(region)];
    const beyond = farSide(line, region.outer);
    const near = differenceOf([region], [beyond]);
    const far = intersectionOf([region], [beyond]);
    const hold = (low: number, high: number) => (lon: number) => {
      if (Math.abs(lon - low) < NEAR_deg) return low;
      return Math.abs(lon - high) < NEAR_deg ? high : Math.max(low, Math.min(high, lon));
    };
    return [
      ...near.map((r) => rings(r, 0, hold(-180, 180))),
      ...far.map((r) => rings(r, -360 * sign, hold(-180, 180))),
    ];
  });
}

/** A ring closed by its first corner. */
const closed = (ring: readonly Lonlat[]): readonly Lonlat[] => {
  const [first] = ring;
  return first ? [...ring, first] : ring;
};

/** What lies past the line, as far as a ring reaches: a square laid against it. */
function farSide({ along: [a, b] }: DateLine, ring: Ring): Ring {
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const [ux, uy] = [(b[0] - a[0]) / length, (b[1] - a[1]) / length];
  const places = ring.map(([x, y]) => (x - a[0]) * ux + (y - a[1]) * uy);
  const depths = ring.map(([x, y]) => (x - a[0]) * uy - (y - a[1]) * ux);
  const [from, to] = [Math.min(...places) - 1, Math.max(...places) + 1];
  const deep = Math.max(1, ...depths) + 1;
  const at = (s: number, d: number): Point => [a[0] + ux * s + uy * d, a[1] + uy * s - ux * d];
  return [at(from, 0), at(from, deep), at(to, deep), at(to, 0)];
}
