import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { PARTS } from '../../../core/gain/series.ts';
import { checkScheme } from '../../../core/study/check.ts';
import type { CheckResult } from '../../../core/study/check-result.ts';
import { smallScheme, type SmallScheme } from '../../helpers/small-scheme.ts';
import { seedOf } from '../../helpers/property-seed.ts';

const check = async (over: SmallScheme, skyModel: 'isotropic' | 'perez'): Promise<CheckResult> =>
  (await checkScheme(smallScheme(over), null, [], async () => 'go', { skyModel })) as CheckResult;

const overhang = (depth: number) => ({ id: 'D1', kind: 'overhang', depth, above: 0.1, left: 0.2, right: 0.2 });

describe('whatever the room, anywhere on Earth', () => {
  const place = fc.record({
    latitude: fc.double({ min: -89, max: 89, noNaN: true }),
    wall: fc.constantFrom(0, 1, 2, 3) as fc.Arbitrary<0 | 1 | 2 | 3>,
    depth: fc.double({ min: 0.05, max: 2, noNaN: true }),
    model: fc.constantFrom('isotropic', 'perez') as fc.Arbitrary<'isotropic' | 'perez'>,
    zone: fc.constantFrom('Etc/UTC', 'Europe/London', 'Australia/Sydney', 'America/New_York'),
  });
  it('no part of the light is less than nothing but the dark of a horizon, no total at all, and no glass is more than sunlit', async () => {
    await fc.assert(
      fc.asyncProperty(place, async ({ depth, model, ...over }) => {
        const result = await check({ ...over, devices: [overhang(depth)], windowDevices: ['D1'] }, model);
        for (const day of result.rooms[0]?.days ?? [])
          for (const w of day.windows)
            for (let i = 0; i < w.total_W.length; i++) {
              expect(w.total_W[i]).toBeGreaterThanOrEqual(-1e-9);
              for (const part of PARTS) if (part !== 'horizon') expect(w.parts[part][i]).toBeGreaterThanOrEqual(0);
              expect(w.sunlit[i]).toBeGreaterThanOrEqual(0);
              expect(w.sunlit[i]).toBeLessThanOrEqual(1);
            }
      }),
      { seed: seedOf(101), numRuns: 25 },
    );
  });
  it('a deeper overhang lets no more in at any step', async () => {
    await fc.assert(
      fc.asyncProperty(
        place,
        fc.double({ min: 1.01, max: 3, noNaN: true }),
        async ({ depth, model, ...over }, more) => {
          const shallow = await check({ ...over, devices: [overhang(depth)], windowDevices: ['D1'] }, model);
          const deep = await check({ ...over, devices: [overhang(depth * more)], windowDevices: ['D1'] }, model);
          for (const [d, day] of (shallow.rooms[0]?.days ?? []).entries())
            for (const part of PARTS) {
              if (part === 'horizon') continue;
              const before = day.windows[0]?.parts[part] ?? new Float64Array();
              const after = deep.rooms[0]?.days[d]?.windows[0]?.parts[part];
              for (let i = 0; i < before.length; i++) expect(after?.[i]).toBeLessThanOrEqual(before[i]! + 1e-6);
            }
        },
      ),
      { seed: seedOf(102), numRuns: 20 },
    );
  });
  it('turning the drawing with its north changes nothing', async () => {
    const turned = smallScheme({ latitude: 48, devices: [overhang(0.7)], windowDevices: ['D1'] });
    const plain = (await checkScheme(turned, null, [], async () => 'go')) as CheckResult;
    const turn = 37;
    // Clockwise by `turn` about the origin, north with it.
    const box = { ...turned.blocks[0]!.box!, turn };
    const scheme = {
      ...turned,
      site: { ...turned.site, north: turn },
      blocks: [{ ...turned.blocks[0]!, box }],
      rooms: [{ ...turned.rooms[0]!, box }],
    };
    const after = (await checkScheme(scheme, null, [], async () => 'go')) as CheckResult;
    for (const [i, f] of plain.findings.entries()) expect(after.findings[i]?.value).toBeCloseTo(f.value, 6);
  });
});
