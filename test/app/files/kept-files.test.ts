import { mkdirSync, readdirSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { bundleFile } from '../../../app/files/bundle-file.ts';
import { GrantedFiles } from '../../../app/files/granted-files.ts';
import { RecentFiles } from '../../../app/files/recent-files.ts';
import { Recovery } from '../../../app/files/recovery.ts';
import { settingsFolder } from '../../../app/files/settings-folder.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);

describe('granted files', () => {
  test('have opaque ids, one a file however it is reached, and resolve links once', async () => {
    const folder = tempFolder();
    const real = join(folder, 'real.json');
    writeFileSync(real, '1');
    symlinkSync(real, join(folder, 'link.json'));
    const granted = new GrantedFiles();
    const first = await granted.grant(real);
    const through = await granted.grant(join(folder, 'link.json'));
    expect(through.id).toBe(first.id);
    expect(first.id).not.toContain('real');
    expect(granted.find(through.id)?.path).toBe(real);
    expect(granted.find('made-up-id' as typeof first.id)).toBeNull();
  });

  test('may not exist yet, but their folder must', async () => {
    const folder = tempFolder();
    const granted = new GrantedFiles();
    expect((await granted.grant(join(folder, 'new.json'))).name).toBe('new.json');
    await expect(granted.grant(join(folder, 'none', 'new.json'))).rejects.toMatchObject({ code: 'ENOENT' });
  });
});

describe('recent files', () => {
  test('are the newest twelve, each once, and calls at the same time lose none', async () => {
    const folder = tempFolder();
    let now = 0;
    const recent = new RecentFiles(folder, () => new Date(now++));
    await Promise.all(Array.from({ length: 15 }, (_, i) => recent.remember(join('/a', `${i}.json`))));
    await recent.remember(join('/a', '7.json'));
    const names = (await recent.list()).map((entry) => entry.name);
    expect(names).toHaveLength(12);
    expect(names.slice(0, 3)).toEqual(['7.json', '14.json', '13.json']);
    expect(new Set(names).size).toBe(12);
  });

  test.each(['', 'not json', '{"a":1}', '[{"path":1}]', 'x'.repeat(300_000)])(
    'a list that is broken counts as empty: %#',
    async (text) => {
      const folder = tempFolder();
      writeFileSync(join(folder, 'recent.json'), text);
      expect(await new RecentFiles(folder).list()).toEqual([]);
    },
  );
});

describe('recovery', () => {
  test('keeps the newest of each document, newest first', async () => {
    let now = 0;
    const recovery = new Recovery(tempFolder(), () => new Date(now++ * 1000));
    await recovery.keep('a', 'A', bytes('1'));
    await recovery.keep('b', 'B', bytes('2'));
    await recovery.keep('a', 'A', bytes('3'));
    const slots = await recovery.list();
    expect(slots.map((slot) => [slot.key, new TextDecoder().decode(slot.bytes)])).toEqual([
      ['a', '3'],
      ['b', '2'],
    ]);
  });

  test('passes over a slot that is broken, and leaves it where it is', async () => {
    const folder = tempFolder();
    const recovery = new Recovery(folder);
    await recovery.keep('good', 'G', bytes('1'));
    writeFileSync(join(folder, 'recovery', 'half.autosave.json'), '{"name":"h"');
    expect((await recovery.list()).map((slot) => slot.key)).toEqual(['good']);
    expect(readdirSync(join(folder, 'recovery'))).toContain('half.autosave.json');
  });

  test.each(['../up', 'a/b', '', 'ü', 'x'.repeat(81)])('takes no key that could be a path: %s', async (key) => {
    const recovery = new Recovery(tempFolder());
    await expect(recovery.keep(key, 'n', bytes('1'))).rejects.toThrow();
    await expect(recovery.discard(key)).rejects.toThrow();
  });

  test('throws no work away to make room', async () => {
    const folder = tempFolder();
    const recovery = new Recovery(folder);
    mkdirSync(join(folder, 'recovery'));
    for (let i = 0; i < 200; i++) writeFileSync(join(folder, 'recovery', `k${i}.autosave.json`), '{}');
    await expect(recovery.keep('one-more', 'n', bytes('1'))).rejects.toThrow('200 documents already wait');
    await recovery.keep('k5', 'n', bytes('1'));
    expect(readdirSync(join(folder, 'recovery'))).toHaveLength(200);
  });
});

describe('files of the built screens', () => {
  const folder = join('/opt', 'renderer');
  test.each([
    ['/', 'index.html', 'text/html; charset=utf-8'],
    ['/index.html', 'index.html', 'text/html; charset=utf-8'],
    ['/assets/index-1a.js', 'assets/index-1a.js', 'text/javascript; charset=utf-8'],
    ['/assets/a%20b.css', 'assets/a b.css', 'text/css; charset=utf-8'],
  ])('%s', (pathname, path, type) => {
    expect(bundleFile(folder, pathname)).toEqual({ path: join(folder, path), type });
  });
  test.each([
    '/../renderer2/a.js',
    '/%2e%2e/renderer2/a.js',
    '/..',
    '/a/../../b.js',
    '/.hidden.js',
    '/a\\..\\b.js',
    '/C:/x.js',
    '/a//b.js',
    '/a%00.js',
    '/%',
    '/a.exe',
    '/a',
    '/a.js/',
  ])('not %s', (pathname) => {
    expect(bundleFile(folder, pathname)).toBeNull();
  });
});

test('settings stand where each system keeps them, or where the user says', () => {
  expect(settingsFolder({ platform: 'linux', env: {} }, '/home/u')).toBe('/home/u/.local/share/shadewright');
  expect(settingsFolder({ platform: 'linux', env: { XDG_DATA_HOME: '/d' } }, '/home/u')).toBe('/d/shadewright');
  expect(settingsFolder({ platform: 'darwin', env: {} }, '/Users/u')).toBe(
    '/Users/u/Library/Application Support/Shadewright',
  );
  expect(settingsFolder({ platform: 'win32', env: { APPDATA: '/r' } }, '/u')).toBe(join('/r', 'Shadewright'));
  expect(settingsFolder({ platform: 'linux', env: { SHADEWRIGHT_DATA: '/elsewhere' } }, '/home/u')).toBe('/elsewhere');
});
