import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, readFileSync, rmdirSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { SHORT_CAUTION } from '../../../core/limits/cautions.ts';
import { SHEET_KINDS } from '../../../core/study/sheet-kinds.ts';
import { type ReadPage, readPdf } from '../../helpers/read-pdf.ts';
import { runCommand } from '../../helpers/run-command.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const root = resolve(import.meta.dirname, '../../..');
const demo = (name: string): string => join(root, `assets/demo/${name}.scheme.json`);
const YARD = demo('tannery-yard');
const read = async (path: string) => readPdf(new Uint8Array(readFileSync(path)));
const textOf = (page: ReadPage | undefined): string =>
  (page?.texts ?? [])
    .map((t) => t.text)
    .join(' ')
    .replaceAll(/ +/gu, ' ');
/** A demo with something changed, in a folder of its own. */
function changed(change: (scheme: ReturnType<typeof JSON.parse>) => void): string {
  const folder = tempFolder();
  const scheme = JSON.parse(readFileSync(YARD, 'utf8'));
  change(scheme);
  writeFileSync(join(folder, 'scheme.json'), JSON.stringify(scheme));
  return folder;
}
const hasPoppler = spawnSync('pdftoppm', ['-v']).status === 0;

describe.each(['tannery-yard', 'jacaranda-clinic', 'two-hundred-blocks'])('sheets of %s', (name) => {
  const window = JSON.parse(readFileSync(demo(name), 'utf8')).windows[0].id as string;

  test.each([...SHEET_KINDS, 'S1'])(
    '%s is written, and another program renders it without a word',
    async (what) => {
      const folder = tempFolder();
      const more = what === 'section' || what === 'sun-path' ? ['--window', window] : [];
      const ran = await runCommand(['sheet', what, demo(name), '--pdf', 'a.pdf', ...more], folder);
      expect(ran.err).not.toContain('fault');
      expect(ran.status).toBe(0);
      expect(readdirSync(folder)).toEqual(['a.pdf']);
      const pdf = await read(join(folder, 'a.pdf'));
      for (const page of pdf.pages) expect(textOf(page)).toContain(SHORT_CAUTION);
      if (!hasPoppler) return console.warn('pdftoppm is not here: pages were not rendered by a second program');
      const last = String(Math.min(pdf.pages.length, 3));
      const drawn = spawnSync('pdftoppm', ['-r', '20', '-l', last, '-png', 'a.pdf', 'a'], {
        cwd: folder,
        encoding: 'utf8',
      });
      expect([drawn.status, drawn.stderr]).toEqual([0, '']);
    },
    90_000,
  );
});

test('solstices and equinoxes are those of the year, and one diagram each', async () => {
  const folder = tempFolder();
  const ran = await runCommand(['shadows', YARD, '--seasons', '--from', '12:00', '--to', '12:00', '--json'], folder);
  // Solstices and equinoxes of 2025 in UTC: U.S. Naval Observatory, Earth's Seasons (20 March, 21 June, 22 September, 21 December).
  const dates = (JSON.parse(ran.out) as { instant: string }[]).map((r) => r.instant.slice(0, 10));
  expect(dates).toEqual(['2025-03-20', '2025-06-21', '2025-09-22', '2025-12-21']);
  const both = await runCommand(['shadows', YARD, '--seasons', '--on', '2025-03-21'], folder);
  expect(both.status).toBe(2);
});

test('feet: scale in words, scale bar, heights and areas', async () => {
  const folder = tempFolder();
  const call = ['--scale', `1"=100'`, '--units', 'imperial', '--on', '2025-03-21', '--pdf', 'a.pdf'];
  expect((await runCommand(['shadows', YARD, ...call], folder)).status).toBe(0);
  const text = textOf((await read(join(folder, 'a.pdf'))).pages[0]);
  expect(text).toContain(`Scale 1" = 100' (1:1200) on A3`);
  expect(text).toMatch(/200 ft/u);
  expect(text).toMatch(/added [\d]+\ssq\sft/u);
  expect(text).toContain('height of the top in feet');
  // The Infill is 9.6 m high: 9.6 / 0.3048 = 31.496 ft.
  expect(text).toContain('31.5');
});

test('the report names every room that is over, on the first page or as so many more', async () => {
  const folder = tempFolder();
  await runCommand(['check', demo('two-hundred-blocks'), '--pdf', 'a.pdf'], folder);
  const pdf = await read(join(folder, 'a.pdf'));
  const text = textOf(pdf.pages[0]);
  const over = Number(/(\d+) rooms over/u.exec(text)?.[1]);
  const more = Number(/in the table that follows, (\d+) of them over too/u.exec(text)?.[1]);
  const rows = [...text.matchAll(/\+\d+\.\d+ \d+\.0/gu)].length;
  expect(rows + more).toBe(over);
  expect(text).toContain('content hash');
  expect(pdf.bookmarks.filter((b) => /^Room /u.test(b))).toHaveLength(over);
}, 90_000);

describe('what cannot be drawn', () => {
  test.each([
    ['too large a scale', ['sheet', 'shadow-study', YARD, '--scale', '20', '--pdf', 'a.pdf'], /1:\d+ fits/u],
    ['too large a plan', ['sheet', 'exposure-plan', YARD, '--scale', '20', '--pdf', 'a.pdf'], /1:\d+ fits/u],
    ['a sheet of no kind', ['sheet', 'perspective', YARD, '--pdf', 'a.pdf'], /kinds: shadow-study.*sets: S1/u],
    ['a section of nothing', ['sheet', 'section', YARD, '--pdf', 'a.pdf'], /no window is named/u],
    [
      'a section of a window that is not there',
      ['sheet', 'section', YARD, '--window', 'Z', '--pdf', 'a.pdf'],
      /no window Z/u,
    ],
    ['no file', ['sheet', 'light', YARD], /--pdf FILE/u],
    ['a scale that is none', ['sheet', 'light', YARD, '--scale', 'huge', '--pdf', 'a.pdf'], /must be a scale/u],
    ['times that are none', ['sheet', 'light', YARD, '--at', '25:00', '--pdf', 'a.pdf'], /time of the clock/u],
    [
      'a folder that is not there',
      ['sheet', 'sun-path', YARD, '--pdf', 'no/a.pdf'],
      /its folder is not there; choose another place/u,
    ],
    ['a folder in place of a file', ['sheet', 'sun-path', YARD, '--pdf', '.'], /there is a folder of that name/u],
  ])('%s: a sentence, status 2, and nothing left behind', async (_, words, said) => {
    const folder = tempFolder();
    const ran = await runCommand(words, folder);
    expect(ran.status).toBe(2);
    expect(ran.err.trim().split('\n')).toHaveLength(1);
    expect(ran.err).toMatch(said);
    expect(readdirSync(folder)).toEqual([]);
  });

  test.skipIf(!existsSync('/dev/full'))('a place that is no file is left alone', async () => {
    const ran = await runCommand(['sheet', 'light', YARD, '--pdf', '/dev/full'], tempFolder());
    expect(ran.status).toBe(2);
    expect(ran.err).toContain('no ordinary file');
  });

  test('a disk that is full: said so, and no half of a file', async (context) => {
    const full = tempFolder();
    const mounted = spawnSync('mount', ['-t', 'tmpfs', '-o', 'size=16k', 'shadewright-test', full]);
    if (mounted.status !== 0) return context.skip('no small disk can be mounted here');
    try {
      const ran = await runCommand(['sheet', 'light', YARD, '--pdf', join(full, 'a.pdf')], full);
      expect(ran.status).toBe(2);
      expect(ran.err).toContain('the disk is full');
      expect(readdirSync(full)).toEqual([]);
    } finally {
      spawnSync('umount', [full]);
    }
  });
});

test('a set of pages is written whole or not at all, and pages of a longer one before are told', async () => {
  const folder = tempFolder();
  const times = ['--from', '09:00', '--to', '12:00', '--every', '180'];
  const call = ['shadows', YARD, '--on', '2025-03-21,2025-06-21', ...times, '--per-page', '1', '--svg', 'a.svg'];
  mkdirSync(join(folder, 'a-3.svg'));
  const refused = await runCommand(call, folder);
  expect(refused.status).toBe(2);
  expect(refused.err).toMatch(
    /a-3\.svg: the file was not written, and none of the others, there is a folder of that name/,
  );
  expect(readdirSync(folder)).toEqual(['a-3.svg']);
  rmdirSync(join(folder, 'a-3.svg'));
  expect((await runCommand(call, folder)).status).toBe(0);
  expect(readdirSync(folder).sort()).toEqual(['a-2.svg', 'a-3.svg', 'a-4.svg', 'a.svg']);
  const shorter = await runCommand([...call.slice(0, 3), '2025-03-21', ...call.slice(4)], folder);
  expect(shorter.status).toBe(0);
  expect(shorter.err).toContain('note: a-3.svg is of an earlier, longer set and was left as it is.');
});

test('with no rooms at all the report says that there is nothing to check', async () => {
  const folder = changed((s) => Object.assign(s, { rooms: [], windows: [], devices: [] }));
  const ran = await runCommand(['check', 'scheme.json', '--pdf', 'a.pdf'], folder);
  expect(ran.status).toBe(0);
  expect(textOf((await read(join(folder, 'a.pdf'))).pages[0])).toContain('The scheme has no rooms');
});

test('a date without sun is drawn and says so', async () => {
  const folder = changed((s) => Object.assign(s.site, { latitude: 69.65, longitude: 18.96, zone: 'Europe/Oslo' }));
  const night = ['--on', '2025-12-21', '--pdf', 'a.pdf'];
  expect((await runCommand(['shadows', 'scheme.json', ...night], folder)).status).toBe(0);
  const text = textOf((await read(join(folder, 'a.pdf'))).pages[0]);
  expect([...text.matchAll(/sun below the horizon/gu)]).toHaveLength(9);
  expect((await runCommand(['sheet', 'exposure-plan', 'scheme.json', ...night], folder)).status).toBe(0);
  expect(textOf((await read(join(folder, 'a.pdf'))).pages[0])).toContain('none in the period');
});

test.each([
  ['300 characters', 'Very long title of a scheme '.repeat(11).slice(0, 300)],
  ['right to left', 'ساحة المدبغة القديمة — 12 طابقًا'],
])(
  'a title of %s stays inside every page',
  async (_, title) => {
    const folder = changed((s) => Object.assign(s, { title }));
    for (const kind of ['shadow-study', 'facades', 'light', 'findings']) {
      const ran = await runCommand(['sheet', kind, 'scheme.json', '--pdf', 'a.pdf'], folder);
      expect(ran.status).toBe(0);
      for (const page of (await read(join(folder, 'a.pdf'))).pages)
        for (const t of page.texts) {
          expect(t.x).toBeGreaterThan(9.9);
          expect(t.x).toBeLessThan(page.width - 9.9);
        }
    }
  },
  60_000,
);

test('two hundred rooms: tables run on with their heads, and no row is lost', async () => {
  const folder = changed((s) => {
    const [room] = s.rooms;
    const [window] = s.windows.filter((w: { room: string }) => w.room === room.id);
    s.blocks[0].height = 700;
    s.rooms = Array.from({ length: 200 }, (_, i) => ({ ...room, id: `F${i + 1}`, floor: i * 3.2, height: 2.7 }));
    s.windows = s.rooms.map((r: { id: string }, i: number) => ({
      ...window,
      id: `X${i + 1}`,
      room: r.id,
      devices: [],
    }));
    s.limits = null;
  });
  const ran = await runCommand(['check', 'scheme.json', '--pdf', 'a.pdf'], folder);
  expect(ran.err).not.toContain('fault');
  expect(ran.status).toBe(0);
  const pdf = await read(join(folder, 'a.pdf'));
  const tables = pdf.pages.filter((p) => textOf(p).includes('All rooms'));
  expect(tables.length).toBeGreaterThan(4);
  for (const page of tables) expect(textOf(page)).toMatch(/room name value limit margin/u);
  const named = new Set(tables.flatMap((p) => p.texts.flatMap((t) => (/^F\d+$/u.test(t.text) ? [t.text] : []))));
  expect(named.size).toBe(200);
}, 90_000);

test('a report that verifies, and one that was tampered with', async () => {
  const folder = tempFolder();
  const made = await runCommand(['check', YARD, '--json'], folder);
  writeFileSync(join(folder, 'good.json'), made.out);
  const report = JSON.parse(made.out) as { findings: { value: number }[] };
  const [first] = report.findings;
  if (!first) throw new Error('the demo has findings');
  first.value *= 0.9;
  writeFileSync(join(folder, 'bad.json'), JSON.stringify(report));
  const good = await runCommand(['verify', 'good.json'], folder);
  expect([good.status, good.err]).toEqual([0, '']);
  const bad = await runCommand(['verify', 'bad.json'], folder);
  expect(bad.status).toBe(1);
  expect(bad.out + bad.err).toContain('findings[0].value');
});
