import { spawnSync } from 'node:child_process';
import { mkdirSync, readdirSync, readFileSync, truncateSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { type Ran, runCommand } from '../../helpers/run-command.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const DEMO = resolve(import.meta.dirname, '../../../assets/demo/tannery-yard.scheme.json');

// biome-ignore lint/suspicious/noExplicitAny: a scheme that is about to be broken has no type
type Loose = any;
const demo = (): Loose => JSON.parse(readFileSync(DEMO, 'utf8'));

/** A user's mistake: status 2, a sentence on the notes' stream, nothing on the other, no word of our insides. */
function expectRefused(ran: Ran, ...words: readonly (string | RegExp)[]): void {
  expect(ran.status, ran.err).toBe(2);
  expect(ran.out).toBe('');
  expect(ran.err).not.toMatch(/\n\s+at |node:internal|Error:|\.ts:\d|undefined/);
  expect(ran.err.trim()).toMatch(/\.$/);
  for (const word of words) expect(ran.err).toMatch(word);
}

const BROKEN: { readonly [what: string]: { readonly break: (scheme: Loose) => void; readonly place: RegExp } } = {
  'a window outside its wall': { break: (s) => (s.windows[0].from = 500), place: /windows\[0\]/ },
  'an outline that crosses itself': {
    break: (s) => {
      delete s.blocks[0].box;
      s.blocks[0].outline = [
        [0, 0],
        [10, 10],
        [10, 0],
        [0, 10],
      ];
    },
    place: /blocks\[0\]/,
  },
  'a zone that does not exist': { break: (s) => (s.site.zone = 'Europe/Atlantis'), place: /site\.zone/ },
  'a latitude of 91': { break: (s) => (s.site.latitude = 91), place: /site\.latitude/ },
  'a text where a number belongs': { break: (s) => (s.windows[0].width = 'wide'), place: /windows\[0\]\.width/ },
  'a negative width': { break: (s) => (s.windows[0].width = -1), place: /windows\[0\]\.width: .*-1/ },
  'a null where a number belongs': { break: (s) => (s.site.longitude = null), place: /site\.longitude/ },
  'a number far outside what JSON can say': { break: (s) => (s.site.elevation = '1e999'), place: /site\.elevation/ },
  'a list where an object belongs': { break: (s) => (s.site = []), place: /site/ },
  'a window of no room': { break: (s) => (s.windows[0].room = 'none'), place: /windows\[0\]\.room/ },
  'a window of no glass': { break: (s) => (s.windows[0].glass = 'none'), place: /windows\[0\]\.glass/ },
  'two rooms of one name': { break: (s) => (s.rooms[1].id = s.rooms[0].id), place: /rooms\[1\]/ },
  'a newer version': { break: (s) => (s.version = 99), place: /version/ },
  'a turbidity below nothing': { break: (s) => (s.site.linkeTurbidity = -1), place: /site\.linkeTurbidity: .*-1/ },
  'weather that is a number': { break: (s) => (s.weather = -1), place: /weather: .*-1/ },
  'limits that nobody knows': { break: (s) => (s.limits = 'no-such-set'), place: /limits/ },
};

describe('a scheme with', () => {
  test.each(Object.keys(BROKEN))('%s is refused with its place', async (what) => {
    const folder = tempFolder();
    const scheme = demo();
    const { break: spoil, place } = BROKEN[what] as (typeof BROKEN)[string];
    spoil(scheme);
    writeFileSync(join(folder, 'scheme.json'), JSON.stringify(scheme));
    expectRefused(await runCommand(['check', 'scheme.json'], folder), /scheme\.json: /, place);
    expect(readdirSync(folder), 'nothing is written').toEqual(['scheme.json']);
  });

  test('a NaN, which JSON does not know, is refused with the line', async () => {
    const folder = tempFolder();
    writeFileSync(
      join(folder, 'scheme.json'),
      readFileSync(DEMO, 'utf8').replace(/"latitude":\s*[-\d.]+/, '"latitude": NaN'),
    );
    expectRefused(await runCommand(['check', 'scheme.json'], folder), /scheme\.json: line \d+/, /NaN/);
  });

  test('several faults is refused with all of them', async () => {
    const folder = tempFolder();
    const scheme = demo();
    scheme.site.latitude = 91;
    scheme.windows[0].width = -1;
    writeFileSync(join(folder, 'scheme.json'), JSON.stringify(scheme));
    const ran = await runCommand(['check', 'scheme.json'], folder);
    expectRefused(ran, /site\.latitude/, /windows\[0\]\.width/);
    expect(ran.err.trim().split('\n').length).toBeGreaterThan(1);
  });
});

describe('a report that', () => {
  const nested = '['.repeat(100_000) + ']'.repeat(100_000);
  test.each([
    ['is missing', null, /no such file/],
    ['is no JSON', 'Dear all,', /not valid JSON/],
    ['is a list', '[]', /not a report/],
    ['is of a newer version', '{"format":"shadewright-report","version":2}', /version: 2/],
    ['has no scheme', '{"format":"shadewright-report","version":1}', /scheme/],
    ['has no scheme but a number', '{"format":"shadewright-report","version":1,"scheme":7}', /scheme/],
    ['nests without end', `{"format":"shadewright-report","version":1,"scheme":${nested}}`, /nests deeper/],
  ])('%s is refused', async (_what, text, words) => {
    const folder = tempFolder();
    if (text !== null) writeFileSync(join(folder, 'report.json'), text);
    expectRefused(await runCommand(['verify', 'report.json'], folder), /report\.json: /, words);
  });
});

describe('a file that', () => {
  test.each([
    ['is missing', () => undefined, /no such file/],
    ['is a folder', (path: string) => mkdirSync(path), /folder/],
    ['is empty', (path: string) => writeFileSync(path, ''), /not valid JSON/],
    ['is no JSON', (path: string) => writeFileSync(path, 'Dear all,'), /not valid JSON/],
    ['is cut off', (path: string) => writeFileSync(path, readFileSync(DEMO, 'utf8').slice(0, 900)), /not valid JSON/],
    ['is no scheme', (path: string) => writeFileSync(path, '{"a":1}'), /format/],
    ['is a list', (path: string) => writeFileSync(path, '[1,2]'), /scheme/],
    ['is no text', (path: string) => writeFileSync(path, Buffer.from([0xff, 0xfe, 0x00, 0x80])), /UTF-8/],
    [
      'nests without end',
      (path: string) => writeFileSync(path, `${'['.repeat(200_000)}${']'.repeat(200_000)}`),
      /scheme/,
    ],
  ] as const)('%s is refused, by every subcommand that reads one', async (_what, make, words) => {
    const folder = tempFolder();
    make(join(folder, 'scheme.json'));
    const calls = [
      ['check', 'scheme.json'],
      ['shadows', 'scheme.json'],
      ['exposure', 'scheme.json'],
      ['sun', 'scheme.json', '--on', '2025-06-21'],
      ['size', 'scheme.json', '--window', 'W1', '--device', 'fins'],
      ['open', 'scheme.json'],
    ];
    for (const ran of await Promise.all(calls.map((words) => runCommand(words, folder))))
      expectRefused(ran, words, /scheme\.json/);
  });

  test('is 200 MB large is refused before it is read', async () => {
    const folder = tempFolder();
    writeFileSync(join(folder, 'scheme.json'), '{');
    truncateSync(join(folder, 'scheme.json'), 200 * 1024 * 1024);
    const ran = await runCommand(['check', 'scheme.json'], folder);
    expectRefused(ran, /200 MiB/, /64 MiB/);
  });

  test.skipIf(process.platform === 'win32')('never ends is refused and not waited for', async () => {
    const folder = tempFolder();
    spawnSync('mkfifo', [join(folder, 'scheme.json')]);
    expectRefused(await runCommand(['check', 'scheme.json'], folder, {}, 10_000), /not an ordinary file/);
    expectRefused(await runCommand(['check', '/dev/zero'], folder, {}, 10_000), /not an ordinary file/);
  });

  test('reaches for prototypes is refused, or changes nothing', async () => {
    const folder = tempFolder();
    const text = readFileSync(DEMO, 'utf8').replace(
      '{',
      '{"__proto__":{"limits":null},"constructor":{"prototype":{"x":1}},',
    );
    writeFileSync(join(folder, 'scheme.json'), text);
    expectRefused(await runCommand(['check', 'scheme.json'], folder), /__proto__/);
  });
});

test('ten thousand blocks are checked or refused, without a hang', async () => {
  const folder = tempFolder();
  const scheme = demo();
  for (let i = 0; i < 10_000; i++)
    scheme.blocks.push({
      id: `X${i}`,
      standing: 'context',
      box: { at: [200 + 12 * (i % 100), 200 + 12 * Math.floor(i / 100)], width: 10, depth: 10 },
      height: 6 + (i % 7),
    });
  writeFileSync(join(folder, 'scheme.json'), JSON.stringify(scheme));
  const ran = await runCommand(['check', 'scheme.json'], folder, {}, 90_000);
  expect(ran.status, ran.err).toBe(1);
  expect(ran.out).toContain('6 over');
});

describe('a call with', () => {
  test.each([
    [[]],
    [['chekc', 'x']],
    [['check']],
    [['check', DEMO, '--frob']],
    [['check', DEMO, 'surplus']],
    [['check', DEMO, '--json', '--csv']],
    [['check', DEMO, '--working', 'no-such-room']],
    [['check', DEMO, '--limits', 'none.json']],
    [['check', DEMO, '--pdf', 'no-folder/report.pdf']],
    [['shadows', DEMO, '--on', '2025-02-30']],
    [['shadows', DEMO, '--on', 'tomorrow']],
    [['shadows', DEMO, '--from', '25:00']],
    [['shadows', DEMO, '--from', '15:00', '--to', '09:00']],
    [['shadows', DEMO, '--every', '0']],
    [['shadows', DEMO, '--paper', 'A7']],
    [['shadows', DEMO, '--scale', '-5']],
    [['shadows', DEMO, '--scale', '500']],
    [['shadows', DEMO, '--portrait']],
    [['shadows', DEMO, '--paper', 'A3', '--csv']],
    [['exposure', DEMO, '--step', '1.5']],
    [['exposure', DEMO, '--step', '0']],
    [['exposure', DEMO, '--between', '2025-01-01']],
    [['exposure', DEMO, '--between', '2025-02-01', '2025-01-01']],
    [['exposure', DEMO, '--year', '1899']],
    [['exposure', DEMO, '--year', '2025', '--on', '2025-01-01']],
    [['exposure', DEMO, '--spacing', '0']],
    [['sun']],
    [['sun', DEMO]],
    [['sun', DEMO, '--at', '2025-06-21T12:00Z', '--on', '2025-06-21']],
    [['sun', DEMO, '--at', 'noon']],
    [['sun', DEMO, '--at', '2025-13-01T12:00Z']],
    [['sun', DEMO, '--at', '2025-06-21T24:30Z']],
    [['sun', '--lat', '91', '--lon', '0', '--zone', 'UTC', '--on', '2025-06-21']],
    [['sun', '--lat', '51', '--lon', '540', '--zone', 'UTC', '--on', '2025-06-21']],
    [['sun', '--lat', '51', '--lon', '0', '--zone', 'UTC', '--on', '2025-06-21', '--pressure', '0']],
    [['sun', '--lat', '51', '--lon', '0', '--zone', 'UTC', '--on', '2025-06-21', '--pressure', '101325']],
    [['sun', '--lat', '51', '--lon', '0', '--zone', 'UTC', '--on', '2025-06-21', '--temperature', '1e999']],
    [['sun', '--lat', '51', '--lon', '0', '--zone', 'UTC', '--on', '1600-06-21']],
    [['sun', '--lat', '51', '--lon', '0', '--zone', 'UTC', '--at', '1600-06-21T12:00Z']],
    [['sun', '--lat', '51', '--lon', '0', '--zone', 'UTC', '--at', '2025-06-21T12:00+99:99']],
    [['sun', '--lat', 'NaN', '--lon', '0', '--zone', 'UTC', '--on', '2025-06-21']],
    [['sun', '--lat', '51', '--lon', '0', '--zone', 'Mars/Olympus', '--on', '2025-06-21']],
    [['sun', '--lat', '51', '--lon', '0', '--on', '2025-06-21']],
    [['sun', DEMO, '--lat', '51', '--lon', '0', '--on', '2025-06-21']],
    [['size', DEMO, '--window', 'none', '--device', 'fins']],
    [['size', DEMO, '--window', 'W1', '--device', 'awning']],
    [['size', DEMO, '--device', 'fins']],
    [['verify', DEMO]],
    [['verify', 'none.json']],
  ])('%j is refused', async (words) => {
    const folder = tempFolder();
    const ran = await runCommand(words, folder);
    if (words.length === 0) expect(ran).toMatchObject({ status: 2, out: '' });
    else expectRefused(ran);
    expect(readdirSync(folder), 'nothing is written').toEqual([]);
  });
});

describe('open', () => {
  test('names the examples there are when asked for one that is none', async () => {
    const ran = await runCommand(['open', '--example', 'nosuch'], tempFolder());
    expectRefused(ran, /nosuch/, /tannery-yard/, /jacaranda-clinic/);
  });

  test('takes a scheme or an example, not both', async () => {
    const ran = await runCommand(['open', 'scheme.json', '--example', 'tannery-yard'], tempFolder());
    expectRefused(ran, /not both/);
  });
});
