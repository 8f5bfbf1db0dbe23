import * as Astronomy from 'astronomy-engine';
import { describe, expect, it } from 'vitest';
import { workingOf } from '../../../core/limits/working.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { smallScheme } from '../../helpers/small-scheme.ts';

const RAD = Math.PI / 180;

/** Position of the sun from a general-purpose ephemeris, true and refracted altitude [°], and its distance [au]. */
function sunOf(at: Date, latitude: number, longitude: number) {
  const observer = new Astronomy.Observer(latitude, longitude, 0);
  const equator = Astronomy.Equator(Astronomy.Body.Sun, at, observer, true, true);
  const bare = Astronomy.Horizon(at, observer, equator.ra, equator.dec);
  const bent = Astronomy.Horizon(at, observer, equator.ra, equator.dec, 'normal');
  return { azimuth: bare.azimuth, altitude: bare.altitude, apparent: bent.altitude, distance: equator.dist };
}

/** Clear sky by the published equations of Ineichen and Perez (2002), sea level. */
function clearSky(apparent_deg: number, distance: number, turbidity: number) {
  const e0 = 1366.1 / distance ** 2;
  const up = Math.sin(apparent_deg * RAD);
  const m = 1 / (up + 0.50572 * (6.07995 + apparent_deg) ** -1.6364);
  const global = 0.868 * e0 * up * Math.exp(-0.0387 * m * turbidity);
  const a = e0 * 0.827 * Math.exp(-0.09 * m * (turbidity - 1));
  const b = (global * (1 - (0.1 - 0.2 * Math.exp(-turbidity)) / 0.982)) / up;
  const beam = Math.min(a, b);
  return { beam, diffuse: global - beam * up, global };
}

/** Karlsson and Roos (2000), two panes, category 4, and its hemispherical mean as integrated by hand. */
function relativeG(cosine: number): number {
  const z = Math.acos(cosine) / (90 * RAD);
  const b = 0.25 / 4;
  return 1 - 8 * z ** (5.2 + 2.8) - b * z * z - (1 - 8 - b) * z ** (5.26 + 0.12 + (0.73 + 0.08) * 4);
}
const HEMISPHERICAL = 0.8931;

describe('one room, by hand from outside formulas (evenly bright sky)', () => {
  const P = 0.9;
  const e = 0.2;
  const H = 1.5;
  const W = 3.2;
  const canopy = { id: 'D1', kind: 'overhang', depth: P, above: e, left: 50, right: 50 };

  it.each([
    ['21 June', 'june', '2025-06-21T11:32:30Z'],
    ['21 June, afternoon', 'june', '2025-06-21T14:02:30Z'],
    ['23 September', 'september', '2025-09-23T10:02:30Z'],
    ['21 December', 'december', '2025-12-21T12:47:30Z'],
    ['hottest day', 'hottest', '2025-07-21T09:57:30Z'],
  ])('%s at %s: beam, sky and ground through a south window under a long overhang', async (_, key, instant) => {
    const scheme = smallScheme({ devices: [canopy], windowDevices: ['D1'] });
    const result = await checkScheme(scheme, null, [], async () => 'go', { skyModel: 'isotropic' });
    const at = result?.days.findIndex((d) => d.key === key) ?? -1;
    const grid = result?.days[at];
    const step = grid?.instant_ms.indexOf(Date.parse(instant)) ?? -1;
    expect(step).toBeGreaterThan(0);
    const got = result?.rooms[0]?.days[at]?.windows[0];

    const sun = sunOf(new Date(instant), 51.5, 0);
    const sky = clearSky(sun.apparent, sun.distance, 3);
    const across = (sun.azimuth - 180) * RAD;
    const cosine = Math.cos(sun.altitude * RAD) * Math.cos(across);
    const drop = (P * Math.tan(sun.altitude * RAD)) / Math.cos(across) - e;
    const sunlit = 1 - Math.min(H, Math.max(0, drop)) / H;
    const seen = (Math.hypot(P, H + e) - Math.hypot(P, e)) / (2 * H);
    const glass = W * H * 0.8 * 0.6;
    const beam = glass * relativeG(cosine) * sunlit * sky.beam * cosine;
    const dome = glass * HEMISPHERICAL * seen * sky.diffuse;
    const ground = glass * HEMISPHERICAL * 0.5 * 0.2 * sky.global;

    expect(got?.sunlit[step]).toBeCloseTo(sunlit, 3);
    expect(Math.abs((got?.parts.beam[step] ?? 0) - beam)).toBeLessThan(0.003 * Math.max(50, beam));
    expect(Math.abs((got?.parts.sky[step] ?? 0) - dome)).toBeLessThan(0.005 * dome);
    expect(Math.abs((got?.parts.ground[step] ?? 0) - ground)).toBeLessThan(0.003 * ground);
    expect(got?.parts.circumsolar[step]).toBe(0);
  });

  it('takes more in under the brighter clear sky of Perez than under an even one on the sunny side', async () => {
    const total = async (skyModel: 'isotropic' | 'perez'): Promise<number> => {
      const result = await checkScheme(smallScheme(), null, [], async () => 'go', { skyModel });
      return result?.findings.find((f) => f.metric === 'peak-gain')?.value ?? 0;
    };
    const [even, bright] = [await total('isotropic'), await total('perez')];
    expect(bright).toBeGreaterThan(even);
    expect(bright).toBeLessThan(even * 1.3);
  });

  it('opens to a working that names the model it was reached with', async () => {
    const scheme = smallScheme();
    const result = await checkScheme(scheme, null, [], async () => 'go', { skyModel: 'isotropic' });
    const finding = result?.findings[0];
    if (!result || !finding) throw new Error('a result');
    const working = workingOf(result, scheme, { ...finding, metric: 'peak-gain', day: 'hottest' });
    expect(working.steps.find((s) => s.label === 'sky model')?.value).toBe('evenly bright sky');
    expect(working.method).toContain('walls of other buildings');
  });
});
