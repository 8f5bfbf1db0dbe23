import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test, vi } from 'vitest';
import type { Sweep } from '../../../core/sizing/sweep.ts';
import type { ReceptorExposure } from '../../../core/study/exposure.ts';
import { apart_deg, type PositionCase, positionCases } from '../../core/sun/reference.ts';
import { faultText } from '../../../app/terminal/program.ts';
import { runCommand } from '../../helpers/run-command.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const root = resolve(import.meta.dirname, '../../..');
const DEMO = join(root, 'assets/demo/tannery-yard.scheme.json');

describe('help', () => {
  test('names every subcommand and every exit status', async () => {
    const { status, out } = await runCommand(['--help'], tempFolder());
    expect(status).toBe(0);
    for (const word of [
      'check',
      'shadows',
      'exposure',
      'sun',
      'size',
      'compare',
      'verify',
      'schema',
      'open',
      'Exit status',
    ])
      expect(out).toContain(word);
  });

  test.each(['check', 'shadows', 'sheet', 'exposure', 'sun', 'size', 'compare', 'verify', 'schema', 'open'])(
    '%s has examples',
    async (name) => {
      const { status, out } = await runCommand([name, '--help'], tempFolder());
      expect(status).toBe(0);
      expect(out).toContain(`shadewright ${name}`);
      expect(out).toContain('Examples:');
    },
  );

  test('the version is that of package.json', async () => {
    const { version } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8'));
    expect((await runCommand(['--version'], tempFolder())).out.trim()).toBe(version);
  });
});

describe('check', () => {
  test('runs in an empty folder, says 1 where something is over, and writes nothing unasked', async () => {
    const folder = tempFolder();
    const ran = await runCommand(['check', DEMO], folder);
    expect(ran.status).toBe(1);
    expect(ran.out).toMatch(/over/);
    expect(ran.out).toContain('local building code');
    expect(readdirSync(folder)).toEqual([]);
  });

  test('says 0 where nothing is over', async () => {
    const folder = tempFolder();
    const scheme = JSON.parse(readFileSync(DEMO, 'utf8'));
    scheme.limits = null;
    writeFileSync(join(folder, 'a.json'), JSON.stringify(scheme));
    expect((await runCommand(['check', 'a.json'], folder)).status).toBe(0);
  });

  test('prints JSON that holds together, the same bytes each time', async () => {
    const folder = tempFolder();
    const [first, second] = await Promise.all([
      runCommand(['check', DEMO, '--json'], folder),
      runCommand(['check', DEMO, '--json'], folder),
    ]);
    expect(first.out).toBe(second.out);
    const report = JSON.parse(first.out);
    const { over, close, within } = report.counts;
    expect(over + close + within).toBe(new Set(report.findings.map((f: { room: string }) => f.room)).size);
    for (const f of report.findings) expect(f.verdict === 'over').toBe(f.margin > 0);
  });

  test('prints CSV with one line a finding', async () => {
    const folder = tempFolder();
    const [csv, json] = await Promise.all([
      runCommand(['check', DEMO, '--csv'], folder),
      runCommand(['check', DEMO, '--json'], folder),
    ]);
    expect(csv.out.trimEnd().split('\r\n')).toHaveLength(JSON.parse(json.out).findings.length + 1);
  });

  test('shows the working of a room with its sources', async () => {
    const { rooms } = JSON.parse((await runCommand(['check', DEMO, '--json'], tempFolder())).out);
    const { out } = await runCommand(['check', DEMO, '--working', rooms[0].room], tempFolder());
    expect(out).toContain('method:');
    expect(out).toContain('source:');
  });

  test('writes a PDF whole', async () => {
    const folder = tempFolder();
    await runCommand(['check', DEMO, '--pdf', 'report.pdf'], folder);
    expect(readdirSync(folder)).toEqual(['report.pdf']);
    const pdf = readFileSync(join(folder, 'report.pdf'), 'latin1');
    expect(pdf.slice(0, 5)).toBe('%PDF-');
    expect(pdf.trimEnd().slice(-5)).toBe('%%EOF');
  });
});

describe('verify', () => {
  test('confirms a report, and names the place where a number was changed', async () => {
    const folder = tempFolder();
    const { out } = await runCommand(['check', DEMO, '--json'], folder);
    writeFileSync(join(folder, 'report.json'), out);
    expect(await runCommand(['verify', 'report.json'], folder)).toMatchObject({ status: 0 });
    const changed = JSON.parse(out);
    changed.findings[2].value *= 1.0001;
    writeFileSync(join(folder, 'report.json'), JSON.stringify(changed));
    const ran = await runCommand(['verify', 'report.json'], folder);
    expect(ran.status).toBe(1);
    expect(ran.err).toBe('');
    expect(ran.out).toMatch(/findings\[2\]\.value: .* \(apart by .*, 0\.0100 %\)/);
  });

  test('takes numbers that a program on the way has shortened for the same, and nothing further off', async () => {
    const folder = tempFolder();
    const { out } = await runCommand(['check', DEMO, '--json'], folder);
    const off = async (share: number) => {
      const report = JSON.parse(out);
      for (const finding of report.findings) finding.value *= 1 + share;
      writeFileSync(join(folder, 'report.json'), JSON.stringify(report));
      return (await runCommand(['verify', 'report.json'], folder)).status;
    };
    expect(await off(1e-12)).toBe(0);
    expect(await off(1e-7)).toBe(1);
  });

  test('sees a scheme that was changed under its findings, and a finding that was left out', async () => {
    const folder = tempFolder();
    const { out } = await runCommand(['check', DEMO, '--json'], folder);
    const wider = JSON.parse(out);
    wider.scheme.windows[0].width -= 0.1;
    const fewer = JSON.parse(out);
    fewer.findings.pop();
    for (const changed of [wider, fewer]) {
      writeFileSync(join(folder, 'report.json'), JSON.stringify(changed));
      expect((await runCommand(['verify', 'report.json'], folder)).status).toBe(1);
    }
  });
});

describe('sun', () => {
  // Reda and Andreas, Solar Energy 76 (2004), appendix A.5: the worked example of the algorithm.
  test('gives the worked example of the algorithm’s paper', async () => {
    const place = ['--lat', '39.742476', '--lon', '-105.1786', '--zone', 'America/Denver', '--elevation', '1830.14'];
    const air = ['--pressure', '820', '--temperature', '11', '--delta-t', '67'];
    const { out } = await runCommand(
      ['sun', ...place, ...air, '--at', '2003-10-17T12:30:30-07:00', '--json'],
      tempFolder(),
    );
    const [row] = JSON.parse(out);
    expect(Object.keys(row)).toEqual(['instant', 'local', 'azimuth', 'altitude', 'apparentAltitude', 'equationOfTime']);
    expect(row.instant).toBe('2003-10-17T19:30:30Z');
    expect(row.local).toBe('2003-10-17T13:30:30-06:00');
    expect(row.azimuth).toBeCloseTo(194.34024, 4);
    expect(90 - row.apparentAltitude).toBeCloseTo(50.11162, 4);
    expect(row.equationOfTime).toBeCloseTo(14.641503, 4);
  });

  // Sixty positions by an independent implementation; see the head of the reference file.
  test('agrees with the reference positions, asked one by one and on the clock of their zone', async () => {
    const folder = tempFolder();
    const off: unknown[] = [];
    const check = async (known: PositionCase) => {
      const { inputs: i, expected } = known;
      const place = [
        '--lat',
        `${i.latitude}`,
        '--lon',
        `${i.longitude}`,
        '--zone',
        i.zone,
        '--elevation',
        `${i.altitude}`,
      ];
      const air = [
        '--pressure',
        `${i.pressure / 100}`,
        '--temperature',
        `${i.temperature}`,
        '--delta-t',
        `${i.delta_t}`,
      ];
      const ran = await runCommand(['sun', ...place, ...air, '--at', i.utc, '--json'], folder);
      expect(ran.status, `${known.id}: ${ran.err}`).toBe(0);
      const [row] = JSON.parse(ran.out);
      const zenith_rad = (expected.zenith * Math.PI) / 180;
      const holds =
        row.local.startsWith(i.local) &&
        apart_deg(row.azimuth, expected.azimuth) * Math.sin(zenith_rad) < 1e-4 &&
        Math.abs(row.altitude - (90 - expected.zenith)) < 1e-4 &&
        Math.abs(row.apparentAltitude - expected.apparent_elevation) < 1e-4 &&
        Math.abs(row.equationOfTime - expected.equation_of_time) < 1e-4;
      if (!holds) off.push([known.id, row, expected]);
    };
    const waiting = [...positionCases()];
    expect(waiting).toHaveLength(60);
    const lane = async () => {
      for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) await check(next);
    };
    await Promise.all([lane(), lane(), lane()]);
    expect(off).toEqual([]);
  });

  test('takes several instants, in their order', async () => {
    const at = ['2025-06-21T12:00Z', '2025-01-01T09:00', '2025-06-21T13:00:30+01:00'];
    const { out } = await runCommand(['sun', DEMO, '--at', ...at, '--json'], tempFolder());
    expect(JSON.parse(out).map((row: { instant: string }) => row.instant)).toEqual([
      '2025-06-21T12:00:00Z',
      '2025-01-01T09:00:00Z',
      '2025-06-21T12:00:30Z',
    ]);
  });

  test('says the same in text as in JSON, to the digits shown', async () => {
    const ask = ['sun', DEMO, '--on', '2025-06-21'];
    const [text, json] = await Promise.all([
      runCommand(ask, tempFolder()),
      runCommand([...ask, '--json'], tempFolder()),
    ]);
    const said = text.out.split('\n').filter((line) => line.startsWith('2025-06-21T'));
    type Row = { local: string; azimuth: number; altitude: number; apparentAltitude: number; equationOfTime: number };
    expect(said.map((line) => line.split(/\s+/))).toEqual(
      (JSON.parse(json.out) as Row[]).map((r) => [
        r.local,
        ...[r.azimuth, r.altitude, r.apparentAltitude, r.equationOfTime].map((n) => n.toFixed(3)),
      ]),
    );
  });

  test.each([
    ['90', '2025-06-21', /Polar day/, /at a pole every direction is south/],
    ['-90', '2025-06-21', /Polar night/, /at a pole every direction is north/],
    // The sun that rises on this day at 65.7° north sets after the next midnight.
    ['65.7', '2025-06-19', /sunset 0\d:\d\d on 2025-06-20/, /^$/],
  ])('says what the day is like at latitude %s', async (latitude, day, words, note) => {
    const place = ['--lat', latitude, '--lon', '25', '--zone', 'Europe/Helsinki'];
    const { status, out, err } = await runCommand(['sun', ...place, '--on', day, '--step', '360'], tempFolder());
    expect(status).toBe(0);
    expect(out).toMatch(words);
    expect(err).toMatch(note);
  });

  test.each([
    ['2025-03-30', 23],
    ['2025-10-26', 25],
    ['2025-06-21', 24],
  ])('a civil day has as many hours as it has: %s', async (day, hours) => {
    const { out } = await runCommand(['sun', DEMO, '--on', day, '--json'], tempFolder());
    const rows = JSON.parse(out) as { instant: string; local: string }[];
    expect(rows).toHaveLength(hours);
    expect(rows[0]?.local).toContain(`${day}T00:00:00`);
    const steps = rows.slice(1).map((row, i) => Date.parse(row.instant) - Date.parse(rows[i]?.instant ?? ''));
    expect(new Set(steps)).toEqual(new Set([3_600_000]));
  });

  test('a clock time that does not exist is resolved and noted', async () => {
    const { status, err, out } = await runCommand(['sun', DEMO, '--at', '2025-03-30T01:30'], tempFolder());
    expect(status).toBe(0);
    expect(err).toContain('does not occur');
    expect(out).toContain('2025-03-30T02:30:00+01:00');
  });

  test('southern and negative places need no quoting tricks', async () => {
    const { status, out } = await runCommand(
      ['sun', '--lat', '-33.87', '--lon', '-70.6', '--zone', 'America/Santiago', '--on', '2025-12-21'],
      tempFolder(),
    );
    expect(status).toBe(0);
    expect(out).toContain('Sunrise');
  });
});

describe('exposure', () => {
  test('prints each receptor in the order of the scheme', async () => {
    const { out } = await runCommand(
      ['exposure', DEMO, '--on', '2025-06-21', '2025-12-21', '--step', '15', '--json'],
      tempFolder(),
    );
    const rows = JSON.parse(out);
    const { receptors } = JSON.parse(readFileSync(DEMO, 'utf8'));
    expect(rows.map((row: { id: string }) => row.id)).toEqual(receptors.map((r: { id: string }) => r.id));
    expect(Object.keys(rows[0])).toEqual(['id', 'sunMinutes', 'beam', 'sky', 'ground']);
  });

  test('days add up: two days together are each day alone, summed', async () => {
    const ask = async (...days: string[]) =>
      JSON.parse((await runCommand(['exposure', DEMO, '--on', ...days, '--step', '10', '--json'], tempFolder())).out);
    const [both, june, december] = await Promise.all([
      ask('2025-06-21', '2025-12-21'),
      ask('2025-06-21'),
      ask('2025-12-21'),
    ]);
    for (const [i, row] of both.entries())
      for (const key of ['sunMinutes', 'beam', 'sky', 'ground'] as const)
        expect(row[key]).toBeCloseTo(june[i][key] + december[i][key], 6);
  });
});

test('size says the same in text as in JSON, with the target it was given', async () => {
  const ask = ['size', DEMO, '--window', 'W1', '--device', 'overhang'];
  const folder = tempFolder();
  const { points, enough } = JSON.parse((await runCommand([...ask, '--json'], folder)).out) as Sweep;
  const target = ((points[3]?.summer_Wh ?? 0) + (points[4]?.summer_Wh ?? 0)) / 2;
  const { out } = await runCommand([...ask, '--target', String(target)], folder);
  const rows = out
    .split('\n')
    .flatMap((line) => (/^ +\d\.\d\d /.test(line) ? [line.trim().split(/\s+/).slice(0, 4)] : []));
  expect(rows).toEqual(
    points.map((p) => [p.amount.toFixed(2), p.summer_Wh.toFixed(0), p.summerPeak_W.toFixed(0), p.winter_Wh.toFixed(0)]),
  );
  if (enough !== null) expect(out).toContain(`Beyond ${enough.toFixed(2)} m`);
  const met = Number(/^(\d\.\d+) m brings/m.exec(out)?.[1]);
  expect(met).toBeGreaterThan(points[3]?.amount ?? Number.NaN);
  expect(met).toBeLessThanOrEqual(points[4]?.amount ?? Number.NaN);
});

test('exposure says the same in text, CSV and JSON', async () => {
  const ask = ['exposure', DEMO, '--on', '2025-03-21', '--step', '15'];
  const [text, csv, json] = await Promise.all(
    [ask, [...ask, '--csv'], [...ask, '--json']].map((words) => runCommand(words, tempFolder())),
  );
  const rows = JSON.parse(json?.out ?? '') as ReceptorExposure[];
  expect(rows.length).toBeGreaterThan(0);
  for (const { id, sunMinutes, beam, sky, ground } of rows) {
    const cells = csv?.out
      .split('\r\n')
      .find((l) => l.startsWith(`${id},`))
      ?.split(',')
      .slice(1)
      .map(Number);
    // Tables are written to six figures.
    expect(cells).toEqual([sunMinutes, beam, sky, ground].map((n) => Number(n.toPrecision(6))));
    const [line = ''] = text?.out.split('\n').filter((l) => l.startsWith(`${id} `)) ?? [];
    expect(line.split(/\s{2,}/).slice(2)).toEqual([beam, sky, ground].map((n) => n.toFixed(0)));
  }
});

test('size gives a sweep whose summer gain falls with depth', async () => {
  const { status, out } = await runCommand(
    ['size', DEMO, '--window', 'W1', '--device', 'overhang', '--json'],
    tempFolder(),
  );
  expect(status).toBe(0);
  const { points } = JSON.parse(out) as { points: { amount: number; summer_Wh: number }[] };
  for (const [i, point] of points.slice(1).entries())
    expect(point.summer_Wh).toBeLessThanOrEqual((points[i]?.summer_Wh ?? 0) + 1e-9);
});

test('schema prints a JSON Schema of the scheme', async () => {
  const { status, out } = await runCommand(['schema'], tempFolder());
  expect(status).toBe(0);
  expect(JSON.parse(out)).toMatchObject({ $schema: 'https://json-schema.org/draft/2020-12/schema', type: 'object' });
});

describe('shadows', () => {
  test('writes each kind of sheet, whole', async () => {
    const folder = tempFolder();
    const moments = ['--on', '2025-03-21', '--from', '12:00', '--to', '12:00'];
    const ran = await runCommand(
      ['shadows', DEMO, ...moments, '--pdf', 'a.pdf', '--svg', 'a.svg', '--png', 'a.png', '--geojson', 'a.geojson'],
      folder,
    );
    expect(ran.status, ran.err).toBe(0);
    expect(readFileSync(join(folder, 'a.pdf'), 'latin1').slice(0, 5)).toBe('%PDF-');
    expect(readFileSync(join(folder, 'a.svg'), 'utf8')).toContain('<svg');
    expect(readFileSync(join(folder, 'a.png')).subarray(1, 4).toString()).toBe('PNG');
    expect(JSON.parse(readFileSync(join(folder, 'a.geojson'), 'utf8')).type).toBe('FeatureCollection');
  });
});

describe('the program around it', () => {
  test.skipIf(process.platform === 'win32')('ends quietly when its reader goes away', () => {
    const cli = join(root, 'out/main/cli.js');
    const ran = spawnSync('bash', ['-c', `node "${cli}" schema | head -n 1; exit "\${PIPESTATUS[0]}"`], {
      encoding: 'utf8',
    });
    expect(ran.stdout).toBe('{\n');
    expect(ran.stderr).toBe('');
    expect([0, null]).toContain(ran.status);
  });

  test.skipIf(process.platform !== 'linux')('says so when the disk is full, as a thing the user can cure', () => {
    const cli = join(root, 'out/main/cli.js');
    const ran = spawnSync('bash', ['-c', `node "${cli}" schema > /dev/full`], { encoding: 'utf8' });
    expect(ran.status).toBe(2);
    expect(ran.stderr).toBe('shadewright: the results were not written, the disk is full; send them elsewhere.\n');
  });

  test('hands no control character of a file to the terminal, and says the same in JSON', async () => {
    const folder = tempFolder();
    const scheme = JSON.parse(readFileSync(DEMO, 'utf8'));
    scheme.title = 'a\u001b[2Jb\u009bc\u202ed\re';
    writeFileSync(join(folder, 'a.json'), JSON.stringify(scheme));
    const [text, json] = await Promise.all([
      runCommand(['check', 'a.json'], folder),
      runCommand(['check', 'a.json', '--json'], folder),
    ]);
    expect(text.out).toContain('a\\u001b[2Jb\\u009bc\\u202ed\\u000de');
    expect(JSON.parse(json.out).title).toBe(scheme.title);
  });

  test('starts with what a check needs and nothing more: no sheets, no maps, no gazetteer, no window', async () => {
    const folder = tempFolder();
    // Node lists every script that ran.
    const ran = await runCommand(['check', DEMO], folder, { NODE_V8_COVERAGE: folder });
    expect(ran.status).toBe(1);
    const scripts = readdirSync(folder).flatMap((name) =>
      (JSON.parse(readFileSync(join(folder, name), 'utf8')) as { result: { url: string }[] }).result.map((r) => r.url),
    );
    expect(scripts.some((url) => url.endsWith('/out/main/cli.js'))).toBe(true);
    const chunks = readdirSync(join(root, 'out/main/chunks'));
    for (const part of [
      'sheet-document',
      'shadow-sheet',
      'findings-report',
      'write-pdf',
      'print-document',
      'boolean',
      'exposure-map',
      'exposure-slice',
      'ways-of-over',
      'open-desk',
    ]) {
      expect(
        chunks.some((name) => name.startsWith(`${part}-`)),
        `${part} is built`,
      ).toBe(true);
      expect(scripts.filter((url) => url.includes(`/chunks/${part}-`))).toEqual([]);
    }
    expect(scripts.filter((url) => url.includes('/node_modules/'))).toEqual([]);
  });

  test.skipIf(process.platform === 'win32')('can be run by its own name, and npx finds it where it looks first', () => {
    expect(spawnSync(join(root, 'out/main/cli.js'), ['--version'], { encoding: 'utf8' }).status).toBe(0);
    expect(existsSync(join(root, 'node_modules/.bin/shadewright'))).toBe(true);
    const ran = spawnSync('npx', ['--offline', 'shadewright', '--version'], { cwd: root, encoding: 'utf8' });
    expect(ran.status, ran.stderr).toBe(0);
  });

  test('a fault of ours is short, and whole only for whoever asks', () => {
    const fault = new TypeError('a cog broke\nand more');
    vi.stubEnv('SHADEWRIGHT_DEBUG', '');
    expect(faultText(fault)).toMatch(/^shadewright: a fault of the program, not of your input: a cog broke\. .*\n$/);
    vi.stubEnv('SHADEWRIGHT_DEBUG', '1');
    expect(faultText(fault)).toMatch(/\n\s+at /);
    vi.unstubAllEnvs();
  });
});
