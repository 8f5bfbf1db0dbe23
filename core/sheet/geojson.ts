import type { Model } from '../form/model.ts';
import * as maths from '../maths/maths.ts';
import type { Region } from '../plane/region.ts';
import type { Point } from '../plane/vec.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { GroundShadow } from '../shade/shadow.ts';
import { DEG } from '../units/angle.ts';
import { utc } from './data-tables.ts';
import { cutAtDateLine, type DateLine, type Lonlat } from './date-line.ts';
import type { ShadowMoment } from './shadow-moment.ts';

/** World Geodetic System 1984: half the equator's diameter [m] and the flattening. NGA.STND.0036, 2014, table 3.1. */
const A = 6378137;
const F = 1 / 298.257223563;
const E2 = F * (2 - F);

/**
 * From the drawing to longitude and latitude: the plane that touches the WGS84 ellipsoid at the site, where the drawing's
 * origin lies, at the site's height. True north runs `north` degrees clockwise from +y.
 * @see NIMA TR8350.2 (2000) for the frames; B. R. Bowring, Survey Review 23, 323–327 (1976), for the way back to latitude
 */
export function toLonlat(site: Scheme['site']): (p: Point) => Lonlat {
  const phi = site.latitude * DEG;
  const lambda = site.longitude * DEG;
  const turn = site.north * DEG;
  const [sp, cp, sl, cl] = [maths.sin(phi), maths.cos(phi), maths.sin(lambda), maths.cos(lambda)];
  const n = A / Math.sqrt(1 - E2 * sp * sp);
  const origin = [
    (n + site.elevation) * cp * cl,
    (n + site.elevation) * cp * sl,
    (n * (1 - E2) + site.elevation) * sp,
  ] as const;
  return (p) => {
    const east = p[0] * maths.cos(turn) - p[1] * maths.sin(turn);
    const north = p[0] * maths.sin(turn) + p[1] * maths.cos(turn);
    const x = origin[0] - sl * east - sp * cl * north;
    const y = origin[1] + cl * east - sp * sl * north;
    const z = origin[2] + cp * north;
    const b = A * (1 - F);
    const r = Math.hypot(x, y);
    const beta = maths.atan2(z * A, r * b);
    const latitude = maths.atan2(
      z + (E2 / (1 - E2)) * b * maths.cube(maths.sin(beta)),
      r - E2 * A * maths.cube(maths.cos(beta)),
    );
    // Longitude runs on past 180° rather than jump; `cutAtDateLine` parts what crosses it.
    const dLambda = maths.atan2(y * cl - x * sl, x * cl + y * sl);
    return [round(site.longitude + dLambda / DEG), round(latitude / DEG)];
  };
}

/** Nine decimals of a degree are a tenth of a millimetre: the grid on which shadows are computed. */
const round = (deg: number): number => Math.round(deg * 1e9) / 1e9;

type Geometry = { readonly type: 'MultiPolygon'; readonly coordinates: readonly (readonly (readonly Lonlat[])[])[] };
type Feature = {
  readonly type: 'Feature';
  readonly properties: { readonly [key: string]: string | number };
  readonly geometry: Geometry;
};
export type FeatureCollection = { readonly type: 'FeatureCollection'; readonly features: readonly Feature[] };

/** Sites further from ±180° than this [°] cannot reach it: coordinates of a drawing end at 100 km. */
const FAR_deg = 30;

/**
 * Where the meridian of 180° runs through the drawing; null where it is far away. In the plane that touches the globe at the site
 * a point e east and n north has tan Δλ = e / (R − n sin φ), R being the site's distance from the axis: a straight line for one Δλ.
 */
function dateLineOf(site: Scheme['site']): DateLine | null {
  const at = site.longitude >= 0 ? 180 : -180;
  const away = at - site.longitude;
  if (Math.abs(away) > FAR_deg) return null;
  const phi = site.latitude * DEG;
  const turn = site.north * DEG;
  const radius = (A / Math.sqrt(1 - E2 * maths.square(maths.sin(phi))) + site.elevation) * maths.cos(phi);
  const point = (north: number): Point => {
    const east = maths.tan(away * DEG) * (radius - north * maths.sin(phi));
    return [east * maths.cos(turn) + north * maths.sin(turn), north * maths.cos(turn) - east * maths.sin(turn)];
  };
  // Run so that what lies past the line is on its right.
  return { at, along: at === 180 ? [point(-1000), point(1000)] : [point(1000), point(-1000)] };
}

/** Outer rings run anticlockwise and holes clockwise, as RFC 7946 wants them, already in the drawing. */
const multi = (regions: readonly Region[], lonlat: (p: Point) => Lonlat, line: DateLine | null): Geometry => ({
  type: 'MultiPolygon',
  coordinates: cutAtDateLine(regions, lonlat, line),
});

/**
 * Shadows on the ground at each moment, before, after, added and gained, and the footprints of the blocks, as GeoJSON
 * (RFC 7946: longitude and latitude on WGS84).
 */
export function shadowGeoJson(scheme: Scheme, model: Model, moments: readonly ShadowMoment[]): FeatureCollection {
  const lonlat = toLonlat(scheme.site);
  const line = dateLineOf(scheme.site);
  const features: Feature[] = model.solids.map((s) => ({
    type: 'Feature',
    properties: { kind: 'block', id: s.id, name: s.name, standing: s.standing, base_m: s.base_m, top_m: s.top_m },
    geometry: multi([{ outer: s.outline, holes: [] }], lonlat, line),
  }));
  for (const m of moments) {
    if (!m.change) continue;
    for (const kind of ['before', 'after', 'added', 'gained'] as const) {
      const shadow: GroundShadow = m.change[kind];
      features.push({
        type: 'Feature',
        properties: {
          kind: kind === 'gained' ? 'sun gained' : kind === 'added' ? 'shadow added' : `shadow ${kind}`,
          instant: utc(m.instant_ms),
          civil: m.text,
          sunAzimuth_deg: Number(m.azimuth_deg.toFixed(4)),
          sunAltitude_deg: Number(m.altitude_deg.toFixed(4)),
          area_m2: Number(shadow.area_m2.toFixed(3)),
        },
        geometry: multi(shadow.regions, lonlat, line),
      });
    }
  }
  return { type: 'FeatureCollection', features };
}
