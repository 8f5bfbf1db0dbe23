import { appendFileSync, truncateSync, writeFileSync } from 'node:fs';
import { open } from 'node:fs/promises';
import { join } from 'node:path';
import { afterEach, describe, expect, test, vi } from 'vitest';
import { streamWeather } from '../../../app/terminal/stream-weather.ts';
import { bytesHash } from '../../../core/scheme/hash.ts';
import { readWeather } from '../../../core/sky/weather/read-weather.ts';
import { asJrc, asText, MAPPING, madeYear } from '../../core/sky/weather/made-year.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

afterEach(() => vi.restoreAllMocks());

/** Counts the bytes that are read from files from now on. */
async function countBytes(): Promise<() => number> {
  const file = await open(import.meta.filename);
  const read = vi.spyOn(Object.getPrototypeOf(file), 'read');
  await file.close();
  return () => read.mock.calls.reduce((sum, [, , length]) => sum + (length as number), 0);
}

describe('a weather file that streams in', () => {
  test('comes to what its text comes to, with the hash of all its bytes, notes below the table too', async () => {
    const path = join(tempFolder(), 'year.csv');
    const text = `${asJrc(madeYear())}${'a note\n'.repeat(30_000)}`;
    writeFileSync(path, text);
    const hash = bytesHash(new TextEncoder().encode(text));
    expect(await streamWeather(path, null)).toEqual({ ok: true, hash, year: readWeather(text) });
  });

  test('is begun again as Latin 1 where its bytes turn out to be no UTF-8, and hashed once', async () => {
    const path = join(tempFolder(), 'year.csv');
    const bytes = Buffer.from(`${asJrc(madeYear())}M\u00fcll\n`, 'latin1');
    writeFileSync(path, bytes);
    expect(await streamWeather(path, null)).toMatchObject({ ok: true, hash: bytesHash(bytes), year: { ok: true } });
  });

  test('and is one endless line is refused after a small part of it', async () => {
    const path = join(tempFolder(), 'year.csv');
    writeFileSync(path, asText([]));
    truncateSync(path, 60 * 1024 * 1024);
    const read_B = await countBytes();
    const read = await streamWeather(path, MAPPING);
    expect(read).toMatchObject({ ok: true, hash: null, year: { ok: false, faults: [{ code: 'too-long' }] } });
    expect(read_B()).toBeLessThan(300_000);
  });

  test('and has more rows than a year has minutes is refused without what follows them', async () => {
    const path = join(tempFolder(), 'year.csv');
    writeFileSync(path, `${asText([]).trimEnd()}\n`);
    const thousand = '2023-01-01 01:00;0;10;101300\n'.repeat(1000);
    appendFileSync(path, thousand.repeat(1500));
    const read_B = await countBytes();
    const read = await streamWeather(path, MAPPING);
    expect(read).toMatchObject({ ok: true, hash: null, year: { ok: false, faults: [{ code: 'too-long' }] } });
    // 527 040 rows, and the piece in which that is seen.
    expect(read_B()).toBeLessThan(528 * thousand.length + 3 * 65_536);
  });
});
