import { describe, expect, it } from 'vitest';
import {
  finDepth_m,
  overhangDepth_m,
  overhangDrop_m,
  profileAngle_rad,
  sideRun_m,
} from '../../../core/sizing/cut-off.ts';

const RAD = Math.PI / 180;
const profile = (altitude: number, across: number): number => profileAngle_rad(altitude * RAD, across * RAD);

/** Sun at a declination, hour angle and latitude [°]: altitude and azimuth from true north, by spherical trigonometry. */
function sunAt(latitude: number, declination: number, hourAngle: number): { altitude: number; azimuth: number } {
  const [p, d, w] = [latitude * RAD, declination * RAD, hourAngle * RAD];
  const up = Math.sin(p) * Math.sin(d) + Math.cos(p) * Math.cos(d) * Math.cos(w);
  const south = Math.sin(p) * Math.cos(d) * Math.cos(w) - Math.cos(p) * Math.sin(d);
  const west = Math.cos(d) * Math.sin(w);
  return { altitude: Math.asin(up) / RAD, azimuth: 180 + Math.atan2(west, south) / RAD };
}

describe('shadow angles and depths, worked by hand (closed forms)', () => {
  it('profile angles: h 45°, HSA 60° gives 63.4349°; h 30°, HSA −40° gives 37.0045°', () => {
    expect(profile(45, 60) / RAD).toBeCloseTo(63.4349, 4);
    expect(profile(30, -40) / RAD).toBeCloseTo(37.0045, 4);
    expect(profile(30, 90.1)).toBeNaN();
    expect(profile(-1, 0)).toBeNaN();
  });
  it('h 50°, HSA 35°, overhang 0.8 m, 0.2 m above: shades 0.9639 m; needs 0.5602 m to either side', () => {
    expect(profile(50, 35) / RAD).toBeCloseTo(55.4973, 4);
    expect(overhangDrop_m(0.8, 0.2, profile(50, 35))).toBeCloseTo(0.9639, 4);
    expect(sideRun_m(0.8, 35 * RAD)).toBeCloseTo(0.5602, 4);
  });
  it('fin: width 1.2 m, gap 0.1 m, HSA 55° needs 1.3 / tan 55°; half a metre shades 0.6141 m', () => {
    expect(finDepth_m(0.6141, 0.1, 55 * RAD)).toBeCloseTo(0.5, 4);
    expect(finDepth_m(1.2, 0.1, 55 * RAD)).toBeCloseTo(1.3 / Math.tan(55 * RAD), 12);
  });
  it('51.5° north, south window 1.5 m, 0.3 m below the overhang: 0.9595 m keeps out midsummer noon', () => {
    const summer = sunAt(51.5, 23.44, 0);
    expect(summer.altitude).toBeCloseTo(61.94, 10);
    const depth = overhangDepth_m(1.5, 0.3, profile(summer.altitude, 0));
    expect(depth).toBeCloseTo(0.9595, 4);
    const winter = sunAt(51.5, -23.44, 0);
    expect(winter.altitude).toBeCloseTo(15.06, 10);
    expect(overhangDrop_m(depth, 0.3, profile(winter.altitude, 0))).toBeCloseTo(-0.0418, 4);
  });
  it('the same window at the equinox: 38.5° all day, 2.2629 m', () => {
    for (const hour of [-60, -30, 0, 45]) {
      const sun = sunAt(51.5, 0, hour);
      expect(profile(sun.altitude, sun.azimuth - 180) / RAD).toBeCloseTo(38.5, 9);
    }
    expect(overhangDepth_m(1.5, 0.3, 38.5 * RAD)).toBeCloseTo(2.2629, 4);
  });
  it('40° north, 16:00 solar, declination 20.44°: a west window needs 2.0865 m, hence blinds', () => {
    const sun = sunAt(40, 20.44, 60);
    expect(sun.altitude).toBeCloseTo(35.689, 4);
    expect(sun.azimuth).toBeCloseTo(267.6265, 4);
    expect(profile(sun.altitude, sun.azimuth - 270) / RAD).toBeCloseTo(35.7123, 4);
    expect(overhangDepth_m(1.5, 0, profile(sun.altitude, sun.azimuth - 270))).toBeCloseTo(2.0865, 4);
  });
  it('turns over with the hemisphere: midsummer noon at 51.5° south stands as high', () => {
    const south = sunAt(-51.5, -23.44, 0);
    expect(south.altitude).toBeCloseTo(61.94, 10);
  });
});
