import { spawnSync } from 'node:child_process';
import { truncateSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { readBounded } from '../../../app/files/read-bounded.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

test('reads a file up to the bound, and refuses one byte more before reading it', async () => {
  const path = join(tempFolder(), 'a');
  writeFileSync(path, 'x'.repeat(100));
  expect(await readBounded(path, 100)).toMatchObject({ ok: true });
  expect(await readBounded(path, 99)).toMatchObject({ ok: false, fault: { code: 'too-large' } });
  truncateSync(path, 200 * 1024 * 1024 * 1024);
  // 200 GB: more than any machine could have read before this test is given up.
  expect(await readBounded(path, 100)).toMatchObject({ ok: false, fault: { code: 'too-large' } });
});

test('reads an empty file', async () => {
  const path = join(tempFolder(), 'a');
  writeFileSync(path, '');
  const read = await readBounded(path, 10);
  expect(read.ok && read.bytes.length).toBe(0);
});

test('says what is no file at all', async () => {
  const folder = tempFolder();
  expect(await readBounded(join(folder, 'none'), 10)).toMatchObject({ ok: false, fault: { code: 'missing' } });
  expect(await readBounded(folder, 10)).toMatchObject({ ok: false, fault: { code: 'not-a-file' } });
  expect(await readBounded(join(folder, 'x'.repeat(5000)), 10)).toMatchObject({
    ok: false,
    fault: { code: 'missing' },
  });
  expect(await readBounded('a\0b', 10)).toMatchObject({ ok: false, fault: { code: 'missing' } });
});

test.skipIf(process.platform === 'win32')(
  'does not wait on a named pipe, nor read a device that never ends',
  async () => {
    const pipe = join(tempFolder(), 'pipe');
    expect(spawnSync('mkfifo', [pipe]).status).toBe(0);
    for (const path of [pipe, '/dev/zero', '/dev/null'])
      expect(await readBounded(path, 10)).toMatchObject({ ok: false, fault: { code: 'not-a-file' } });
  },
);
