import { spawnSync } from 'node:child_process';
import { truncateSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { readBounded, streamBounded } from '../../../app/files/read-bounded.ts';
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

test('streams a file in pieces that make it up, stops when told, and refuses what reading refuses', async () => {
  const folder = tempFolder();
  const path = join(folder, 'a');
  const bytes = Buffer.from(Array.from({ length: 200_000 }, (_, i) => (i * 7) % 251));
  writeFileSync(path, bytes);
  const pieces: Buffer[] = [];
  expect(await streamBounded(path, 1e6, (piece) => pieces.push(Buffer.from(piece)) > 0)).toBeNull();
  expect(pieces.length).toBeGreaterThan(3);
  expect(Buffer.concat(pieces).equals(bytes)).toBe(true);
  let taken = 0;
  expect(await streamBounded(path, 1e6, () => ++taken < 2)).toBeNull();
  expect(taken).toBe(2);
  expect(await streamBounded(path, 1000, () => true)).toMatchObject({ code: 'too-large' });
  expect(await streamBounded(join(folder, 'none'), 10, () => true)).toMatchObject({ code: 'missing' });
  expect(await streamBounded(folder, 10, () => true)).toMatchObject({ code: 'not-a-file' });
  // A fault of whoever takes the pieces is theirs, also where it looks like one of the system.
  for (const mine of [new TypeError('mine'), Object.assign(new TypeError('mine'), { code: 'ENOENT' })])
    await expect(
      streamBounded(path, 1e6, () => {
        throw mine;
      }),
    ).rejects.toBe(mine);
});
