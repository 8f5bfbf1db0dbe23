import { spawn } from 'node:child_process';
import { chmodSync, mkdirSync, readdirSync, readFileSync, statSync, symlinkSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { expect, test } from 'vitest';
import { build } from 'vite';
import { saveAtomic } from '../../../app/files/save-atomic.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const isRoot = process.getuid?.() === 0;

test('writes a new file and replaces an old one, leaving nothing beside it', async () => {
  const folder = tempFolder();
  const path = join(folder, 'a.json');
  await saveAtomic(path, 'one');
  await saveAtomic(path, new TextEncoder().encode('two'));
  expect(readFileSync(path, 'utf8')).toBe('two');
  expect(readdirSync(folder)).toEqual(['a.json']);
});

test.skipIf(process.platform === 'win32')('keeps the permissions of the file it replaces', async () => {
  const path = join(tempFolder(), 'a.json');
  writeFileSync(path, 'one');
  chmodSync(path, 0o640);
  await saveAtomic(path, 'two');
  expect(statSync(path).mode & 0o777).toBe(0o640);
});

test.skipIf(process.platform === 'win32')('writes through a link and leaves the link a link', async () => {
  const folder = tempFolder();
  mkdirSync(join(folder, 'real'));
  const real = join(folder, 'real', 'a.json');
  const link = join(folder, 'link.json');
  writeFileSync(real, 'one');
  symlinkSync(real, link);
  await saveAtomic(link, 'two');
  expect(readFileSync(real, 'utf8')).toBe('two');
  expect(readdirSync(folder).sort()).toEqual(['link.json', 'real']);
});

test('refuses a folder and a folder that is missing, and leaves nothing behind', async () => {
  const folder = tempFolder();
  mkdirSync(join(folder, 'sub'));
  await expect(saveAtomic(join(folder, 'sub'), 'x')).rejects.toMatchObject({ code: 'EISDIR' });
  await expect(saveAtomic(join(folder, 'none', 'a.json'), 'x')).rejects.toMatchObject({ code: 'ENOENT' });
  expect(readdirSync(folder)).toEqual(['sub']);
});

test.skipIf(isRoot || process.platform === 'win32')(
  'a folder that may not be written leaves the old file as it was',
  async () => {
    const folder = tempFolder();
    const path = join(folder, 'a.json');
    writeFileSync(path, 'one');
    chmodSync(folder, 0o555);
    await expect(saveAtomic(path, 'two')).rejects.toMatchObject({ code: 'EACCES' });
    chmodSync(folder, 0o755);
    expect(readFileSync(path, 'utf8')).toBe('one');
  },
);

test('killed at any point, the file is the whole old one or the whole new one', async () => {
  const folder = tempFolder();
  const bundled = join(folder, 'built');
  const entry = resolve(import.meta.dirname, '../../helpers/save-forever.ts');
  await build({
    configFile: false,
    logLevel: 'error',
    build: { ssr: entry, outDir: bundled, rolldownOptions: { output: { entryFileNames: 'save.mjs' } } },
  });
  const path = join(folder, 'a.json');
  writeFileSync(path, 'start');
  for (let round = 0; round < 12; round++) {
    const child = spawn(process.execPath, [join(bundled, 'save.mjs'), path], { stdio: 'ignore' });
    await new Promise((go) => setTimeout(go, 120 + 23 * round));
    const ended = new Promise((settle) => child.once('exit', settle));
    child.kill('SIGKILL');
    await ended;
    const text = readFileSync(path, 'utf8');
    expect(text === 'start' || /^([a-z])\1{399999}$/.test(text), `${text.length} characters`).toBe(true);
  }
  expect(readFileSync(path, 'utf8'), 'something was saved before the kill').not.toBe('start');
});
