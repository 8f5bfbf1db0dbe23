import { spawnSync } from 'node:child_process';
import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { saveSet, SetFault } from '../../../app/files/save-set.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

/** What a folder holds: names and contents. */
const held = (folder: string): object =>
  Object.fromEntries(
    readdirSync(folder)
      .sort()
      .map((name) => [name, readFileSync(join(folder, name), 'utf8')]),
  );

describe('files that belong together', () => {
  test('are written, old ones replaced, and nothing is left beside them', async () => {
    const folder = tempFolder();
    writeFileSync(join(folder, 'b'), 'old');
    await saveSet([
      [join(folder, 'a'), 'one'],
      [join(folder, 'b'), 'two'],
    ]);
    expect(held(folder)).toEqual({ a: 'one', b: 'two' });
    await saveSet([]);
  });

  test('are all as they were when one of them cannot be there', async () => {
    const folder = tempFolder();
    writeFileSync(join(folder, 'a'), 'old');
    const files = (third: string): [string, string][] => [
      [join(folder, 'a'), 'one'],
      [join(folder, 'b'), 'two'],
      [third, 'three'],
    ];
    mkdirSync(join(folder, 'sub'));
    for (const [third, code] of [
      [join(folder, 'sub'), 'EISDIR'],
      [join(folder, 'none', 'c'), 'ENOENT'],
    ] as const) {
      const fault = await saveSet(files(third)).catch((error: unknown) => error);
      expect(fault).toBeInstanceOf(SetFault);
      expect(fault).toMatchObject({ path: third, cause: { code } });
      expect(readdirSync(folder).sort()).toEqual(['a', 'sub']);
      expect(readFileSync(join(folder, 'a'), 'utf8')).toBe('old');
    }
  });

  test('are taken back when the last of them cannot be moved into place', async () => {
    const folder = tempFolder();
    writeFileSync(join(folder, 'a'), 'old');
    // A folder comes to stand where the last file goes, between its writing and its moving: the first file's bytes see to it.
    const last = join(folder, 'c');
    const late = {
      *[Symbol.iterator]() {
        yield [join(folder, 'a'), 'one'] as const;
        yield [join(folder, 'b'), 'two'] as const;
        yield [last, 'three'] as const;
        mkdirSync(join(last, 'in the way'), { recursive: true });
      },
    };
    const files = Object.assign([[], [], [last]] as unknown as [string, string][], late);
    const fault = await saveSet(files).catch((error: unknown) => error);
    expect(fault).toBeInstanceOf(SetFault);
    expect(fault).toMatchObject({ path: last });
    expect(readdirSync(folder).sort()).toEqual(['a', 'c']);
    expect(readFileSync(join(folder, 'a'), 'utf8')).toBe('old');
  });

  test('leave no kept name behind when the one that cannot be moved was to replace an old file', async (context) => {
    const folder = tempFolder();
    const [other, last] = [join(tempFolder(), 'other'), join(folder, 'b')];
    for (const path of [join(folder, 'a'), last, other]) writeFileSync(path, 'old');
    // A file that something is mounted on can be read and copied, but not replaced.
    if (spawnSync('mount', ['--bind', other, last]).status !== 0) return context.skip('nothing can be mounted here');
    try {
      const fault = await saveSet([
        [join(folder, 'a'), 'one'],
        [last, 'two'],
      ]).catch((error: unknown) => error);
      expect(fault).toMatchObject({ path: last, cause: { code: 'EBUSY' } });
      expect(held(folder)).toEqual({ a: 'old', b: 'old' });
    } finally {
      spawnSync('umount', [last]);
    }
  });

  test('leave a disk that is full as it was', async (context) => {
    const full = tempFolder();
    const mounted = spawnSync('mount', ['-t', 'tmpfs', '-o', 'size=64k', 'shadewright-test', full]);
    if (mounted.status !== 0) return context.skip('no small disk can be mounted here');
    try {
      writeFileSync(join(full, 'a'), 'old');
      const large = 'x'.repeat(25_000);
      const fault = await saveSet(['a', 'b', 'c'].map((name) => [join(full, name), large])).catch(
        (error: unknown) => error,
      );
      expect(fault).toMatchObject({ path: join(full, 'c'), cause: { code: 'ENOSPC' } });
      expect(held(full)).toEqual({ a: 'old' });
    } finally {
      spawnSync('umount', [full]);
    }
  });
});
