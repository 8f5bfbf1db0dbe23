import { check } from '@placemarkio/check-geojson';
import { Geodesic } from 'geographiclib-geodesic';
import { describe, expect, test } from 'vitest';
import { Site } from '../../../core/scheme/schema.ts';
import { shadowGeoJson, toLonlat } from '../../../core/sheet/geojson.ts';
import { shadowMoments } from '../../../core/study/shadow-moments.ts';
import { demoScheme, modelOf } from '../../helpers/demo-scheme.ts';

const DEG = Math.PI / 180;
/** WGS84: a = 6 378 137 m, 1/f = 298.257223563 (NIMA TR8350.2). */
const A = 6378137;
const E2 = 0.00669437999014;
/** Radii of curvature in the meridian and in the prime vertical, e.g. J. P. Snyder, USGS Professional Paper 1395 (1987), 4-18, 4-20. */
const meridian = (phi: number): number => (A * (1 - E2)) / (1 - E2 * Math.sin(phi) ** 2) ** 1.5;
const vertical = (phi: number): number => A / Math.sqrt(1 - E2 * Math.sin(phi) ** 2);

/** Signed area of a ring on the ellipsoid by Karney's method (geographiclib), anticlockwise positive [m²]. */
function areaOnEllipsoid(ring: readonly (readonly [number, number])[]): number {
  const polygon = Geodesic.WGS84.Polygon(false);
  for (const [lon, lat] of ring.slice(0, -1)) polygon.AddPoint(lat, lon);
  return polygon.Compute(false, true).area ?? Number.NaN;
}

describe('longitude and latitude', () => {
  const site = (more: object) => Site.parse({ latitude: 51.45, longitude: -2.59, zone: 'Europe/London', ...more });

  test('the origin of the drawing is the site', () => {
    expect(toLonlat(site({ elevation: 300 }))([0, 0])).toEqual([-2.59, 51.45]);
  });

  test('100 m north and 100 m east are arcs of the radii of curvature', () => {
    const to = toLonlat(site({}));
    const phi = 51.45 * DEG;
    expect(to([0, 100])[1] - 51.45).toBeCloseTo(100 / meridian(phi) / DEG, 8);
    expect(to([100, 0])[0] + 2.59).toBeCloseTo(100 / (vertical(phi) * Math.cos(phi)) / DEG, 8);
  });

  test('with true north 90° clockwise from the top, the top of the drawing faces west', () => {
    const [lon, lat] = toLonlat(site({ north: 90 }))([0, 100]);
    expect(lon).toBeLessThan(-2.59);
    expect(lat).toBeCloseTo(51.45, 6);
  });

  test('by the date line a shape stays whole', () => {
    const to = toLonlat(site({ longitude: 179.9999, latitude: -17 }));
    expect(to([100, 0])[0]).toBeGreaterThan(180);
  });
});

describe('at the date line', () => {
  const yard = demoScheme('tannery-yard');
  // Sites whose middle lies some metres on this side of 180° or on the other, north and south, with the drawing turned.
  test.each([
    [179.99995, -17, 0],
    [-179.99995, -17, 0],
    [179.9999, 66, 40],
    [-179.9999, 51.6, -120],
    [180, 0, 12],
  ])('what crosses 180° at %d°, %d° is cut there and loses nothing (RFC 7946, 3.1.9)', (longitude, latitude, north) => {
    const scheme = { ...yard, site: { ...yard.site, longitude, latitude, north, zone: 'UTC' } };
    const times = longitude > 0 ? ['00:00', '22:00'] : ['23:00', '01:00'];
    const json = shadowGeoJson(scheme, modelOf(scheme), shadowMoments(scheme, modelOf(scheme), ['2025-03-21'], times));
    expect(check(JSON.stringify(json)).type).toBe('FeatureCollection');
    let sides = 0;
    for (const f of json.features) {
      const rings = f.geometry.coordinates.flat();
      const longitudes = rings.flat().map((p) => p[0]);
      for (const lon of longitudes) expect(Math.abs(lon)).toBeLessThanOrEqual(180);
      for (const polygon of f.geometry.coordinates) {
        const signs = new Set(polygon.flat().flatMap((p) => (Math.abs(p[0]) === 180 ? [] : [Math.sign(p[0])])));
        expect(signs.size).toBeLessThanOrEqual(1);
        for (const p of polygon.flat()) if (signs.size > 0) expect(signs).toContain(Math.sign(p[0]));
        for (const ring of polygon) expect(ring.at(-1)).toEqual(ring[0]);
      }
      if (new Set(longitudes.map(Math.sign)).size > 1) sides++;
      const stated = f.properties['area_m2'];
      if (typeof stated !== 'number' || stated < 1) continue;
      const area = rings.reduce((s, r) => s + areaOnEllipsoid(r), 0);
      expect(Math.abs(area / stated - 1)).toBeLessThan(0.001);
    }
    expect(sides).toBeGreaterThan(0);
  });
});

describe('shadows as GeoJSON', () => {
  const scheme = demoScheme('tannery-yard');
  const moments = shadowMoments(scheme, modelOf(scheme), ['2025-03-21', '2025-12-21'], ['10:00', '12:00', '20:00']);
  const json = shadowGeoJson(scheme, modelOf(scheme), moments);

  test('areas on the ellipsoid are those that were stated, to 0.1 %', () => {
    const shadows = json.features.filter((f) => 'area_m2' in f.properties && (f.properties['area_m2'] as number) > 1);
    expect(shadows.length).toBeGreaterThan(8);
    for (const f of shadows) {
      const rings = f.geometry.coordinates.flat();
      const area = rings.reduce((s, r) => s + areaOnEllipsoid(r), 0);
      expect(Math.abs(area / (f.properties['area_m2'] as number) - 1)).toBeLessThan(0.001);
    }
  });

  test('an independent reader takes it as GeoJSON', () => {
    const read = check(JSON.stringify(json));
    expect(read.type).toBe('FeatureCollection');
    expect(() => check(JSON.stringify({ ...json, features: [{ type: 'Feature' }] }))).toThrow();
  });

  test('rings are closed; outer ones run anticlockwise and holes clockwise (RFC 7946, 3.1.6)', () => {
    for (const f of json.features) {
      for (const polygon of f.geometry.coordinates) {
        polygon.forEach((ring, i) => {
          expect(ring.length).toBeGreaterThanOrEqual(4);
          expect(ring.at(-1)).toEqual(ring[0]);
          expect(Math.sign(areaOnEllipsoid(ring))).toBe(i === 0 ? 1 : -1);
        });
      }
    }
  });

  test('every block is there, and four shadows for every moment with sun', () => {
    const kinds = json.features.map((f) => f.properties['kind']);
    expect(kinds.filter((k) => k === 'block').length).toBe(scheme.blocks.length);
    expect(kinds.filter((k) => k === 'shadow added').length).toBe(4);
  });
});
