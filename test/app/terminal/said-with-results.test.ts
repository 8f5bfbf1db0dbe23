import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { CAUTIONS } from '../../../core/limits/cautions.ts';
import { runCommand } from '../../helpers/run-command.ts';
import { smallScheme } from '../../helpers/small-scheme.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

type Loose = ReturnType<typeof JSON.parse>;

/** The small scheme with an area, half of which the proposal is built on, and what a test changes. */
function folderWith(change: (scheme: Loose) => void = () => {}): string {
  const folder = tempFolder();
  const scheme: Loose = JSON.parse(JSON.stringify(smallScheme()));
  const outline = [
    [-4, 0],
    [4, 0],
    [4, 5],
    [-4, 5],
  ];
  scheme.receptors = [{ id: 'A1', kind: 'area', name: '', outline, level: 0 }];
  change(scheme);
  writeFileSync(join(folder, 'scheme.json'), JSON.stringify(scheme));
  return folder;
}

describe('the cautions of design go with the words of', () => {
  test.each([
    [['check', 'scheme.json']],
    [['check', 'scheme.json', '--working', 'R1']],
    [['shadows', 'scheme.json', '--on', '2025-06-21']],
    [['exposure', 'scheme.json']],
    [['exposure', 'scheme.json', '--light', '--step', '60']],
    [['exposure', 'scheme.json', '--map', 'walls', '--spacing', '3']],
    [['size', 'scheme.json', '--window', 'W1', '--device', 'overhang']],
    [['compare', 'scheme.json', 'scheme.json']],
  ])('%j', async (words) => {
    const { out, status } = await runCommand(words, folderWith());
    expect(status).toBe(0);
    for (const caution of CAUTIONS) expect(out).toContain(caution);
  });

  test('sun: the one about looking at it', async () => {
    const { out } = await runCommand(['sun', 'scheme.json', '--on', '2025-06-21'], folderWith());
    expect(out).toContain(CAUTIONS[3]);
  });
});

test('several dates are not taken for the span between them', async () => {
  const two = await runCommand(['exposure', 'scheme.json', '--on', '2025-03-21', '2025-06-21'], folderWith());
  expect(two.out).toContain('2025-03-21 and 2025-06-21,');
  const dates = ['2025-03-20', '2025-03-21', '2025-06-21'];
  const three = await runCommand(['exposure', 'scheme.json', '--on', ...dates], folderWith());
  expect(three.out).toContain('3 days, 2025-03-20, 2025-03-21 and 2025-06-21,');
  const five = await runCommand(
    ['exposure', 'scheme.json', '--on', ...dates, '2025-08-01', '2025-12-21'],
    folderWith(),
  );
  expect(five.out).toContain('5 days from 2025-03-20 to 2025-12-21, not all that lie between,');
  const span = await runCommand(['exposure', 'scheme.json', '--between', '2025-03-20', '2025-03-22'], folderWith());
  expect(span.out).toContain('3 days, 2025-03-20 to 2025-03-22,');
});

test('--between takes a comma between its dates, as --on does', async () => {
  const ran = await runCommand(['exposure', 'scheme.json', '--between', '2025-12-30,2026-01-02'], folderWith());
  expect(ran.out).toContain('4 days, 2025-12-30 to 2026-01-02,');
});

describe('ground that is built over and is in no mean is spoken of', () => {
  test.each([[['exposure', 'scheme.json']], [['exposure', 'scheme.json', '--light', '--step', '60']]])(
    '%j',
    async (words) => {
      const { err, status } = await runCommand(words, folderWith());
      expect(status).toBe(0);
      expect(err).toMatch(/receptors\[0\]: 50 % of area A1 is built over/);
    },
  );

  test('and not where the area is clear of blocks', async () => {
    const folder = folderWith((s) => {
      s.receptors[0].outline = s.receptors[0].outline.map(([x, y]: [number, number]) => [x - 10, y]);
    });
    expect((await runCommand(['exposure', 'scheme.json'], folder)).err).toBe('');
  });

  test('a point inside a block, and one under the ground', async () => {
    const folder = folderWith((s) => {
      s.receptors = [
        { id: 'P1', kind: 'point', at: [2, 2, 1] },
        { id: 'P2', kind: 'point', at: [2, -4, -1] },
        { id: 'P3', kind: 'point', at: [2, 0, 1.5], normal: [0, -1, 0] },
      ];
    });
    const { err } = await runCommand(['exposure', 'scheme.json'], folder);
    expect(err).toMatch(/receptors\[0\].*P1 stands inside block B1/);
    expect(err).toMatch(/receptors\[1\].*P2 lies 1 m under the ground/);
    expect(err).not.toContain('P3');
  });
});

describe('sun that is low', () => {
  const low = (): string => folderWith((s) => (s.site.lowSun = 10));

  test.each([
    [['exposure', 'scheme.json']],
    [['exposure', 'scheme.json', '--light', '--step', '60']],
    [['exposure', 'scheme.json', '--map', 'walls', '--spacing', '3']],
  ])('and is left out is said: %j', async (words) => {
    expect((await runCommand(words, low())).out).toContain('sun above 10° only');
    expect((await runCommand(words, folderWith())).out).not.toContain('only');
  });

  test('below two degrees the areas of shadows are marked as rough', async () => {
    const words = ['shadows', 'scheme.json', '--on', '2025-12-21', '--from', '08:20', '--to', '08:50', '--every', '30'];
    const { out } = await runCommand(words, folderWith());
    expect(out.match(/note: .*sun below 2°/gu)).toEqual(['note: 21 December 2025, 08:20 (UTC+00:00): sun below 2°']);
  });
});

test('a level of exposure on a day that EN 17037 does not look at is spoken of', async () => {
  const words = ['exposure', 'scheme.json', '--light', '--step', '60', '--on'];
  const folder = folderWith((s) => (s.receptors = [{ id: 'P1', kind: 'point', at: [2, -4, 1] }]));
  expect((await runCommand([...words, '2025-12-21'], folder)).err).toMatch(
    /date: EN 17037 looks at one day from 1 February to 21 March, not at 2025-12-21/,
  );
  expect((await runCommand([...words, '2025-03-21'], folder)).err).toBe('');
  expect((await runCommand([...words, '2025-12-21'], folderWith())).err).not.toContain('17037');
});

test('the help of exposure says how its sky differs from that of check', async () => {
  const { out } = await runCommand(['exposure', '--help'], tempFolder());
  expect(out).toContain('sky light comes from an even dome, where check spreads it as the scheme says');
});

test('one of a thing is counted as one', async () => {
  expect((await runCommand(['exposure', 'scheme.json'], folderWith())).out).toContain('Sun on 1 receptor,');
  const light = await runCommand(['exposure', 'scheme.json', '--light', '--step', '60'], folderWith());
  expect(light.out).toContain('Light of 1 receptor before');
});

describe('check', () => {
  test('with no rooms: says that nothing was looked at', async () => {
    const folder = folderWith((s) => {
      s.rooms = [];
      s.windows = [];
    });
    const { out } = await runCommand(['check', 'scheme.json'], folder);
    expect(out).toMatch(/rooms: the scheme has no rooms, so nothing was checked/);
  });

  test('counts one room as one', async () => {
    expect((await runCommand(['check', 'scheme.json'], folderWith())).out).toContain('one room: 1 room,');
  });

  test('an id that runs over two lines stays in its row', async () => {
    const folder = folderWith((s) => {
      s.rooms[0].id = 'a\nb';
      s.windows[0].room = 'a\nb';
    });
    const { out } = await runCommand(['check', 'scheme.json'], folder);
    expect(out).toMatch(/^ +a b +Room /mu);
  });

  test('the step in full has one colon', async () => {
    const { out } = await runCommand(['check', 'scheme.json', '--working', 'R1'], folderWith());
    expect(out).toMatch(/one step in full, the highest of the day:\n/u);
  });
});

describe('sun', () => {
  const place = ['--lat', '51.5', '--lon', '0', '--zone', 'Europe/London'];

  test('parts of a second are written as ISO 8601 has them', async () => {
    const { out } = await runCommand(['sun', ...place, '--at', '2025-06-21T12:00:00.5Z', '--json'], tempFolder());
    const [row] = JSON.parse(out) as { instant: string; local: string }[];
    expect(row?.local).toBe('2025-06-21T13:00:00.500+01:00');
    expect(Date.parse(row?.local ?? '')).toBe(Date.parse(row?.instant ?? ''));
  });

  test('a clock that the sun of the longitude does not keep is spoken of', async () => {
    const words = ['sun', '--lat', '51.5', '--lon', '179', '--zone', 'Europe/London', '--on', '2025-06-21'];
    const { err, status } = await runCommand(words, tempFolder());
    expect(status).toBe(0);
    expect(err).toMatch(/Europe\/London stands more than three hours from the sun at longitude 179°/);
    expect((await runCommand(['sun', ...place, '--on', '2025-06-21'], tempFolder())).err).toBe('');
  });

  test('a date that a zone left out is no day', async () => {
    const words = ['--lat', '-13.8', '--lon', '-171.8', '--zone', 'Pacific/Apia', '--on', '2011-12-30'];
    const { err, out, status } = await runCommand(['sun', ...words], tempFolder());
    expect({ status, out }).toEqual({ status: 2, out: '' });
    expect(err).toMatch(/2011-12-30 does not occur in Pacific\/Apia/);
  });
});

test('a window whose id has a comma can be sized', async () => {
  const folder = folderWith((s) => {
    s.windows[0].id = 'W,3';
  });
  const { status, out } = await runCommand(['size', 'scheme.json', '--window', 'W,3', '--device', 'overhang'], folder);
  expect(status).toBe(0);
  expect(out).toContain('Window W,3:');
});

describe('verify', () => {
  const reportOf = async (folder: string): Promise<Loose> =>
    JSON.parse((await runCommand(['check', 'scheme.json', '--limits', 'l.json', '--json'], folder)).out);
  const withLimits = (): string => {
    const folder = folderWith();
    const limits = {
      format: 'shadewright-limits',
      version: 1,
      id: 'ours',
      name: 'Ours',
      example: true,
      limits: [
        { id: 'a', name: 'a', metric: 'day-gain', comparison: 'at-most', value: 9000, unit: 'Wh/m²', source: 'a test' },
      ],
    };
    writeFileSync(join(folder, 'l.json'), JSON.stringify(limits));
    return folder;
  };
  const verified = async (folder: string, report: Loose) => {
    writeFileSync(join(folder, 'report.json'), JSON.stringify(report));
    return runCommand(['verify', 'report.json'], folder);
  };

  test.each(['cautions', 'notes'])('a report whose %s were taken out does not hold', async (what) => {
    const folder = withLimits();
    const report = await reportOf(folder);
    expect((await verified(folder, report)).status).toBe(0);
    expect(report[what].length).toBeGreaterThan(0);
    const { status, out } = await verified(folder, { ...report, [what]: [] });
    expect(status).toBe(1);
    expect(out).toContain(`${what}[0]`);
  });

  test('but may be worded anew by another version', async () => {
    const folder = withLimits();
    const report = await reportOf(folder);
    report.cautions[0] = 'in other words';
    expect((await verified(folder, report)).status).toBe(1);
    expect((await verified(folder, { ...report, engine: '0.0.9' })).status).toBe(0);
  });

  test('what the reader of a file noted besides may be there or not', async () => {
    const folder = withLimits();
    const report = await reportOf(folder);
    const more = { level: 'warning', code: 'misspelt', place: 'site.nort', message: 'm', cure: 'c' };
    expect((await verified(folder, { ...report, notes: [more, ...report.notes] })).status).toBe(0);
  });

  test('what is too long to show ends in dots', async () => {
    const folder = withLimits();
    const report = await reportOf(folder);
    const { out } = await verified(folder, { ...report, findings: [] });
    expect(out).toMatch(/worked out again it is \{"room":.*…\./u);
  });
});

describe('whether trees are in the light of neighbours is said', () => {
  const crown = { id: 'T1', at: [2, -10], trunk: 2, height: 8, spread: 6, transmittance: Array(12).fill(0.3) };
  const light = ['exposure', 'scheme.json', '--light', '--step', '60'];
  const one = (trees: Loose[]): string =>
    folderWith((s) => {
      s.trees = trees;
      s.receptors = [{ id: 'P1', kind: 'point', at: [2, -4, 1], normal: [0, -1, 0] }];
    });

  test.each([
    [[], [], 'The scheme has no trees.', 'none', 'none in the scheme'],
    [[], [crown], 'Trees are left out', 'left-out', 'left out'],
    [['--trees'], [crown], 'Trees are counted', 'counted', 'counted'],
    [['--trees'], [], 'The scheme has no trees.', 'none', 'none in the scheme'],
  ])('%j', async (more, trees, said, code, cell) => {
    const folder = one(trees);
    const run = async (...words: string[]) => (await runCommand([...light, ...more, ...words], folder)).out;
    expect(await run()).toContain(said);
    const json = JSON.parse(await run('--json'));
    expect(json.trees).toBe(code);
    expect(json.treesNote).toContain(said);
    const rows = (await run('--csv')).trim().split('\r\n').slice(1);
    expect(rows).toHaveLength(6);
    for (const row of rows) expect(row.split(',').at(-1)).toBe(cell);
  });

  test('on the sheet, which a set or the call may have them counted', async () => {
    const folder = one([crown]);
    const kept = JSON.parse(readFileSync(join(folder, 'scheme.json'), 'utf8'));
    kept.sheets = [{ id: 'S1', kind: 'light', trees: true }];
    writeFileSync(join(folder, 'scheme.json'), JSON.stringify(kept));
    const svg = async (...words: string[]): Promise<string> => {
      const { status, err } = await runCommand(['sheet', ...words, '--svg', 'a.svg'], folder);
      expect([status, err.includes('fault')]).toEqual([0, false]);
      return readFileSync(join(folder, 'a.svg'), 'utf8').replaceAll('\u00a0', ' ');
    };
    expect(await svg('light', 'scheme.json')).toContain('Trees are left out.');
    expect(await svg('light', 'scheme.json', '--trees')).toContain('Trees are counted.');
    expect(await svg('S1', 'scheme.json')).toContain('Trees are counted.');
    expect(await svg('S1', 'scheme.json', '--no-trees')).toContain('Trees are left out.');
    const refused = await runCommand(['sheet', 'facades', 'scheme.json', '--trees', '--pdf', 'a.pdf'], folder);
    expect(refused.status).toBe(2);
    expect(refused.err).toContain('--trees goes with light, not with facades');
  });
});
