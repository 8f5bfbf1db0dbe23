import { describe, expect, it } from 'vitest';
import { workingOf } from '../../../core/limits/working.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { smallScheme } from '../../helpers/small-scheme.ts';

const go = async () => 'go' as const;

/** A crown right before the window, which lets all of the light through in winter and none in summer. */
const crown = {
  id: 'T1',
  at: [2, -4],
  base: 0,
  trunk: 0.1,
  height: 8,
  spread: 7,
  transmittance: [1, 1, 1, 1, 0, 0, 0, 0, 1, 1, 1, 1],
};

describe('the sky that a day has', () => {
  it('sees through crowns as the day’s own month says: bare in December, dense in June', async () => {
    const open = await checkScheme(smallScheme({}), null, [], go);
    const bare = Scheme.parse({ ...smallScheme({}), trees: [crown] });
    const treed = await checkScheme(bare, null, [], go);
    const seen = (of: typeof open, key: string) => {
      const at = of?.days.findIndex((d) => d.key === key) ?? -1;
      return of?.rooms[0]?.days[at]?.windows[0]?.seen.sky ?? Number.NaN;
    };
    // A crown of which every ray comes through is no crown.
    expect(seen(treed, 'december')).toBeCloseTo(seen(open, 'december'), 12);
    expect(seen(treed, 'june')).toBeLessThan(0.8 * seen(open, 'june'));
  });

  it('is spread over the dome as the scheme asks, and the working says how', async () => {
    const plain = smallScheme({});
    const even = Scheme.parse({ ...plain, site: { ...plain.site, skyModel: 'isotropic' } });
    const asked = await checkScheme(even, null, [], go);
    const told = await checkScheme(plain, null, [], go, { skyModel: 'isotropic' });
    const usual = await checkScheme(plain, null, [], go);
    expect(asked?.skyModel).toBe('isotropic');
    expect(asked?.findings.map((f) => f.value)).toEqual(told?.findings.map((f) => f.value));
    expect(usual?.skyModel).toBe('perez');
    expect(usual?.findings.map((f) => f.value)).not.toEqual(asked?.findings.map((f) => f.value));
    const finding = asked?.findings[0];
    if (asked === null || finding === undefined) throw new Error('the small scheme has one room with findings');
    expect(JSON.stringify(workingOf(asked, even, finding))).toMatch(/isotropic|evenly/i);
  });
});
