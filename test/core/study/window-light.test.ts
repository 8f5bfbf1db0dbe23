import { describe, expect, it } from 'vitest';
import { buildModel } from '../../../core/form/build-model.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { neighbourLight, type PointLight } from '../../../core/study/exposure-neighbours.ts';
import { askingWindow } from '../../../core/study/window-light.ts';

const SILL_m = 1;
const HIGH_m = 1;

/** A window in the south wall of a block, with a block as long as the horizon in front of it, or none. */
function scheme(front_m: number | null): Scheme {
  const box = { at: [0, 0], width: 6, depth: 6 };
  const front = { at: [-20_000, -15], width: 40_000, depth: 5 };
  return Scheme.parse({
    format: 'shadewright',
    version: 1,
    site: { latitude: 51.45, longitude: -2.59, zone: 'Europe/London' },
    blocks: [
      { id: 'B', standing: 'proposed', box, height: 3 },
      ...(front_m === null ? [] : [{ id: 'F', standing: 'context', box: front, height: front_m }]),
    ],
    rooms: [{ id: 'R', use: 'living', block: 'B', box, floor: 0, height: 3 }],
    glass: [{ id: 'G', g: 0.5, u: 1.2, light: 0.7 }],
    windows: [{ id: 'W', room: 'R', wall: 0, from: 2, sill: SILL_m, width: 2, height: HIGH_m, glass: 'G' }],
  });
}

async function lightOf(s: Scheme): Promise<PointLight> {
  const asked = askingWindow(buildModel(s), 'W');
  if (asked === null) throw new Error('no window');
  const found = await neighbourLight(s, asked, {}, async () => 'go');
  if (!found?.ok) throw new Error('refused');
  return found.value.receptors[0] as PointLight;
}

describe('the light of a window of the proposal', () => {
  it('in the open has half the dome, and 39.6 % of an overcast sky', async () => {
    const { skyView, skyComponent } = await lightOf(scheme(null));
    // Cosine-weighted halves of an even dome; of the CIE overcast sky (1 + 8/(3π))·3/14: integration by hand.
    expect(skyView.after).toBeCloseTo(0.5, 3);
    expect(skyComponent.after).toBeCloseTo((3 / 14) * (1 + 8 / (3 * Math.PI)), 3);
  });

  it('behind a long obstruction keeps the dome above its top edge', async () => {
    // An endless edge at the angle θ leaves (1 − sin θ)/2 of an even dome on an upright plane.
    const theta = Math.atan((9 - SILL_m - HIGH_m / 2) / 10);
    const { skyView, annual, winter } = await lightOf(scheme(9));
    expect(skyView.after).toBeCloseTo((1 - Math.sin(theta)) / 2, 2);
    expect(winter.after).toBeLessThan(annual.after);
  });

  it('is not asked of a window that is not there', () => {
    expect(askingWindow(buildModel(scheme(null)), 'none')).toBeNull();
  });
});
