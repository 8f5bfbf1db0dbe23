import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Mark, Page } from '../../../core/sheet/drawing.ts';
import { CAP_HEIGHT, measure } from '../../../core/sheet/measure.ts';
import { sunPathDocument, sunPathPage } from '../../../core/sheet/sun-path.ts';
import { clockWords } from '../../../core/sheet/sun-path-caption.ts';
import type { SunPathInput } from '../../../core/sheet/sun-path-input.ts';
import { maskMarks } from '../../../core/sheet/sun-path-mask.ts';
import {
  pageToSky,
  type SkyView,
  skyOnPage,
  type SunPathProjection,
  thinned,
} from '../../../core/sheet/sun-path-view.ts';
import { pageToSvg } from '../../../core/sheet/svg.ts';
import { civilOf } from '../../../core/sun/civil.ts';
import { type SunPath, sunPath } from '../../../core/sun/sun-path.ts';
import { DEG } from '../../../core/units/angle.ts';

const PLACES: readonly (readonly [name: string, latitude: number, longitude: number, zone: string])[] = [
  ['on the equator', 0, -78.5, 'America/Guayaquil'],
  ['at 51° N', 51.45, -2.59, 'Europe/London'],
  ['at 34° S', -33.9, 151.2, 'Australia/Sydney'],
  ['at 69° N', 69.65, 18.96, 'Europe/Oslo'],
  ['at 78° S', -77.85, 166.67, 'Antarctica/McMurdo'],
  ['at the pole', 90, 0, 'UTC'],
];
const PROJECTIONS: readonly SunPathProjection[] = ['stereographic', 'altitude-azimuth'];
const SIZES: readonly (readonly [number, number])[] = [
  [297, 210],
  [237, 54],
  [120, 210],
];

const paths = new Map<string, SunPath>();

function input(
  [name, latitude_deg, longitude_deg, zone]: (typeof PLACES)[number],
  projection: SunPathProjection,
): SunPathInput {
  const site = { name, latitude_deg, longitude_deg, elevation_m: 0, zone };
  const path = paths.get(name) ?? sunPath(site, zone, 2025);
  paths.set(name, path);
  return { path, projection, place: site, moment: null };
}

const flat = (marks: readonly Mark[]): readonly Exclude<Mark, { kind: 'group' }>[] =>
  marks.flatMap((m) => (m.kind === 'group' ? flat(m.marks) : [m]));
const group = (page: Page, label: string): readonly Exclude<Mark, { kind: 'group' }>[] =>
  flat(page.marks.flatMap((m) => (m.kind === 'group' && m.label === label ? m.marks : [])));
type Text = Extract<Mark, { kind: 'text' }>;
const texts = (marks: readonly Mark[]): readonly Text[] => flat(marks).filter((m) => m.kind === 'text');

/** The corners of the capitals of a text, by its own anchor and turn. */
function corners(t: Text): readonly (readonly [number, number])[] {
  const width = measure(t.text, t.size, t.face);
  const left = t.anchor === 'middle' ? -width / 2 : t.anchor === 'end' ? -width : 0;
  const turn = (t.turn_deg ?? 0) * DEG;
  const at = (u: number, v: number) =>
    [t.at[0] + u * Math.cos(turn) - v * Math.sin(turn), t.at[1] - u * Math.sin(turn) - v * Math.cos(turn)] as const;
  const cap = t.size * CAP_HEIGHT;
  return [at(left, 0), at(left + width, 0), at(left + width, cap), at(left, cap)];
}

/** Whether two convex outlines overlap, by trying the sides of both as parting lines. */
function overlap(a: ReturnType<typeof corners>, b: ReturnType<typeof corners>): boolean {
  for (const shape of [a, b]) {
    for (let i = 0; i < shape.length; i++) {
      const [p, q] = [
        shape[i] as readonly [number, number],
        shape[(i + 1) % shape.length] as readonly [number, number],
      ];
      const along = (c: readonly [number, number]) => (c[0] - p[0]) * (p[1] - q[1]) + (c[1] - p[1]) * (q[0] - p[0]);
      const [pa, pb] = [a.map(along), b.map(along)];
      if (Math.max(...pa) <= Math.min(...pb) || Math.max(...pb) <= Math.min(...pa)) return false;
    }
  }
  return true;
}

describe.each(PLACES)('%s', (...place) => {
  test.each(PROJECTIONS)('no name of the %s drawing touches another or leaves the page', (projection) => {
    for (const [width, height] of SIZES) {
      const page = sunPathPage(width, height, input(place, projection));
      const names = texts(page.marks.filter((m) => m.kind === 'group' && m.label === 'names'));
      expect(names.length).toBeGreaterThan(4);
      const boxes = names.map(corners);
      for (const [i, box] of boxes.entries()) {
        for (const [x, y] of box) {
          expect(x).toBeGreaterThanOrEqual(0);
          expect(x).toBeLessThanOrEqual(width);
          expect(y).toBeGreaterThanOrEqual(0);
          expect(y).toBeLessThanOrEqual(height);
        }
        for (const [k, other] of boxes.slice(0, i).entries())
          if (overlap(box, other))
            expect.fail(`${names[i]?.text} touches ${names[k]?.text} at ${width} × ${height} mm`);
      }
    }
  });

  test.each(PROJECTIONS)('the %s drawing has no number that is none, and says what it must', (projection) => {
    const svg = pageToSvg(sunPathPage(297, 210, input(place, projection)));
    expect(svg).not.toMatch(/NaN|Infinity/u);
    const said = texts(sunPathPage(297, 210, input(place, projection)).marks)
      .map((t) => t.text)
      .join(' ');
    expect(said).toContain('True altitude, no refraction');
    expect(said).toContain(place[3]);
  });
});

test('an hour’s name stands by a sun that the clock on the wall has at that hour', () => {
  const given = input(PLACES[1] as (typeof PLACES)[number], 'stereographic');
  const page = sunPathPage(297, 210, given);
  const rim = group(page, 'altitudes and bearings').findLast((m) => m.kind === 'circle');
  if (rim?.kind !== 'circle') throw new Error('the drawing has no rim');
  const view: SkyView = { kind: 'stereographic', centre: rim.at, radius: rim.radius };
  const hours = texts(page.marks).filter((t) => /^\d+$/u.test(t.text) && t.face === 'semibold');
  expect(hours.length).toBeGreaterThan(20);
  for (const name of hours) {
    const near = given.path.hours.flatMap((line) =>
      line.runs.flatMap((run) =>
        Array.from(run.instant_ms, (instant, i) => {
          const [x, y] = skyOnPage(view, run.azimuth_rad[i] ?? 0, run.altitude_rad[i] ?? 0);
          return { instant, away: Math.hypot(x - name.at[0], y - name.at[1]) };
        }),
      ),
    );
    const nearest = near.reduce((a, b) => (b.away < a.away ? b : a));
    expect(nearest.away).toBeLessThan(6);
    expect(civilOf(nearest.instant, 'Europe/London').time).toBe(`${name.text.padStart(2, '0')}:00`);
  }
});

test('dates run from horizon to horizon', () => {
  const page = sunPathPage(297, 210, input(PLACES[1] as (typeof PLACES)[number], 'stereographic'));
  const rim = group(page, 'altitudes and bearings').findLast((m) => m.kind === 'circle');
  if (rim?.kind !== 'circle') throw new Error('the drawing has no rim');
  const dates = group(page, 'dates').flatMap((m) => (m.kind === 'path' ? m.runs : []));
  expect(dates.length).toBe(12);
  for (const run of dates)
    for (const end of [run[0], run.at(-1)])
      expect(Math.hypot((end?.[0] ?? 0) - rim.at[0], (end?.[1] ?? 0) - rim.at[1])).toBeCloseTo(rim.radius, 1);
});

test('a place on the page and a direction in the sky are each other’s inverse', () => {
  const views: readonly SkyView[] = [
    { kind: 'stereographic', centre: [80, 90], radius: 70 },
    { kind: 'altitude-azimuth', frame: { x: 10, y: 5, width: 180, height: 100 }, middle_deg: 180, top_deg: 70 },
    { kind: 'altitude-azimuth', frame: { x: 10, y: 5, width: 180, height: 100 }, middle_deg: 0, top_deg: 90 },
  ];
  const azimuth = fc.double({ min: 0.001, max: 359.99, noNaN: true });
  const altitude = fc.double({ min: 0.001, max: 69.9, noNaN: true });
  fc.assert(
    fc.property(fc.constantFrom(...views), azimuth, altitude, (view, az, alt) => {
      const back = pageToSky(view, skyOnPage(view, az * DEG, alt * DEG));
      expect((back?.azimuth_rad ?? 0) / DEG).toBeCloseTo(az, 6);
      expect((back?.altitude_rad ?? 0) / DEG).toBeCloseTo(alt, 6);
    }),
  );
  expect(pageToSky(views[0] as SkyView, [0, 0])).toBeNull();
  expect(pageToSky(views[1] as SkyView, [9, 50])).toBeNull();
});

/** Area inside closed runs of points, each counted once. */
const area = (marks: readonly Mark[]): number =>
  flat(marks)
    .flatMap((m) => (m.kind === 'path' ? m.runs : []))
    .reduce((sum, run) => {
      const twice = run.reduce((s, p, i) => {
        const q = run[(i + 1) % run.length] ?? p;
        return s + p[0] * q[1] - q[0] * p[1];
      }, 0);
      return sum + Math.abs(twice) / 2;
    }, 0);

test('a mask covers what it hides: closed forms of a band of sky', () => {
  const band = (from: number, to: number) => ({
    azimuths: Array.from({ length: 720 }, (_, i) => ({ azimuth_deg: i / 2, hidden: [[from, to] as const] })),
  });
  const disc: SkyView = { kind: 'stereographic', centre: [0, 0], radius: 60 };
  const ring = (altitude: number) => Math.tan(((90 - altitude) * DEG) / 2) ** 2;
  for (const [from, to] of [
    [0, 30],
    [20, 55],
  ] as const) {
    expect(area(maskMarks(disc, band(from, to))) / (Math.PI * 3600 * (ring(from) - ring(to)))).toBeCloseTo(1, 3);
    const frame: SkyView = {
      kind: 'altitude-azimuth',
      frame: { x: 0, y: 0, width: 200, height: 100 },
      middle_deg: 180,
      top_deg: 50,
    };
    expect(area(maskMarks(frame, band(from, to)))).toBeCloseTo(200 * 2 * (Math.min(50, to) - from), 6);
  }
  expect(maskMarks(disc, { azimuths: [] })).toEqual([]);
});

test('a line that is thinned keeps its ends and strays no farther than it may', () => {
  const line = Array.from({ length: 200 }, (_, i) => [i, 20 * Math.sin(i / 20)] as const);
  const thin = thinned(line, 0.05);
  expect(thin.length).toBeLessThan(80);
  expect([thin[0], thin.at(-1)]).toEqual([line[0], line.at(-1)]);
  for (const [x, y] of line) {
    const k = Math.max(
      1,
      thin.findIndex((p) => p[0] >= x),
    );
    const [a, b] = [thin[k - 1], thin[k]] as [readonly [number, number], readonly [number, number]];
    const square = (b[0] - a[0]) * (y - a[1]) - (b[1] - a[1]) * (x - a[0]);
    expect(Math.abs(square) / Math.hypot(b[0] - a[0], b[1] - a[1])).toBeLessThanOrEqual(0.05);
  }
});

test('the clock of a zone in words: dates of 2025 from the directive 2000/84/EC and the New South Wales Standard Time Act', () => {
  expect(clockWords('Europe/London', 2025)).toBe('Europe/London: UTC+00:00, 30 March to 26 October UTC+01:00');
  expect(clockWords('Australia/Sydney', 2025)).toBe('Australia/Sydney: UTC+11:00, 6 April to 5 October UTC+10:00');
  expect(clockWords('Asia/Kathmandu', 2025)).toBe('Asia/Kathmandu: UTC+05:45');
});

test('printed pages carry the foot with its caution', () => {
  const both = PROJECTIONS.map((projection) => input(PLACES[1] as (typeof PLACES)[number], projection));
  const document = sunPathDocument(both, 'A4', true, { title: 'T', author: '', language: 'en-GB', note: '' });
  expect(document.pages.length).toBe(2);
  for (const page of document.pages)
    expect(texts(page.marks).some((t) => t.text.includes('Local building code'))).toBe(true);
});
