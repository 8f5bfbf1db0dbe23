import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { CHANNELS } from '../../../app/contract/channels.ts';
import { contract } from '../../../app/contract/host.ts';
import { browserClient, desktopClient } from '../../helpers/host-client.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);
const text = (value: unknown): string => new TextDecoder().decode(value as Uint8Array);

type Opened = { id: string; name: string; bytes: Uint8Array };

/** What every host owes the page, whatever carries the messages. */
describe.each([
  { kind: 'desktop', client: desktopClient },
  { kind: 'browser', client: browserClient },
])('the contract over the $kind host', ({ kind, client }) => {
  function folderWithScheme() {
    const folder = tempFolder();
    const scheme = join(folder, 'yard.scheme.json');
    writeFileSync(scheme, '{"a":1}');
    return { folder, scheme, dataDir: join(folder, 'data') };
  }

  test('says what it is and hands over the scheme it was started with', async () => {
    const { scheme, dataDir } = folderWithScheme();
    const ask = await client({ dataDir, scheme });
    const hello = await ask('host:hello', null);
    expect(hello).toMatchObject({ ok: true, value: { kind, opened: { name: 'yard.scheme.json' } } });
    const value = hello.value as { opened: Opened; demos: { key: string; name: string }[] };
    expect(text(value.opened.bytes)).toBe('{"a":1}');
    expect(value.demos.map((demo) => demo.key)).toContain('tannery-yard');
    expect(JSON.stringify({ ...value.opened, bytes: null })).not.toContain('/');
  });

  test('starts without a scheme, and with one that has gone', async () => {
    const { folder, dataDir } = folderWithScheme();
    expect(await (await client({ dataDir }))('host:hello', null)).toMatchObject({ ok: true, value: { opened: null } });
    const ask = await client({ dataDir, scheme: join(folder, 'gone.json') });
    expect(await ask('host:hello', null)).toMatchObject({ ok: true, value: { opened: null } });
  });

  test('starts with an example by its key, as a scheme that has no file', async () => {
    const { dataDir } = folderWithScheme();
    const ask = await client({ dataDir, example: 'tannery-yard' });
    expect(await ask('host:hello', null)).toMatchObject({ ok: true, value: { opened: null, example: 'tannery-yard' } });
    const { value } = await ask('scheme:demo', { key: 'tannery-yard' });
    expect(Object.keys(value as object).sort()).toEqual(['bytes', 'name']);
  });

  test('saves over the real file, and reads back what it saved', async () => {
    const { scheme, dataDir } = folderWithScheme();
    const ask = await client({ dataDir, scheme });
    const { opened } = (await ask('host:hello', null)).value as { opened: Opened };
    expect(await ask('scheme:save', { id: opened.id, bytes: bytes('{"a":2}') })).toEqual({ ok: true, value: null });
    expect(readFileSync(scheme, 'utf8')).toBe('{"a":2}');
    expect(text(((await ask('scheme:reopen', { id: opened.id })).value as Opened).bytes)).toBe('{"a":2}');
  });

  test('refuses ids that it never gave out, paths among them', async () => {
    const { scheme, dataDir } = folderWithScheme();
    const ask = await client({ dataDir, scheme });
    for (const id of ['no-such-id-here', scheme, '../../etc/passwd', '__proto__-and-more']) {
      expect(await ask('scheme:save', { id, bytes: bytes('x') })).toMatchObject({ ok: false, code: 'forbidden' });
      expect(await ask('scheme:reopen', { id })).toMatchObject({ ok: false, code: 'forbidden' });
    }
    expect(readFileSync(scheme, 'utf8')).toBe('{"a":1}');
  });

  test('lists what was opened, newest first, under ids that open', async () => {
    const { scheme, dataDir } = folderWithScheme();
    const ask = await client({ dataDir, scheme });
    await ask('host:hello', null);
    const [recent] = (await ask('scheme:recent', null)).value as { id: string; name: string; opened: string }[];
    expect(recent).toMatchObject({ name: 'yard.scheme.json' });
    expect(await ask('scheme:reopen', { id: recent?.id })).toMatchObject({ ok: true });
  });

  test('keeps unsaved work beside the settings until it is discarded, over a restart', async () => {
    const { folder, dataDir } = folderWithScheme();
    const ask = await client({ dataDir });
    await ask('scheme:autosave', { key: 'doc-1', name: 'yard', bytes: bytes('one') });
    await ask('scheme:autosave', { key: 'doc-1', name: 'yard', bytes: bytes('two') });
    const again = await client({ dataDir });
    const slots = (await again('scheme:recover', null)).value as { key: string; name: string; bytes: Uint8Array }[];
    expect(slots.map((slot) => [slot.key, slot.name, text(slot.bytes)])).toEqual([['doc-1', 'yard', 'two']]);
    await again('scheme:discard', { key: 'doc-1' });
    expect((await again('scheme:recover', null)).value).toEqual([]);
    expect(existsSync(join(folder, 'doc-1'))).toBe(false);
  });

  test('serves shipped examples by key and nothing else', async () => {
    const ask = await client({ dataDir: tempFolder() });
    const demo = (await ask('scheme:demo', { key: 'tannery-yard' })).value as { name: string; bytes: Uint8Array };
    expect(JSON.parse(text(demo.bytes)).format).toBe('shadewright');
    for (const key of ['no-such', '../limits/example-gain', '../../package'])
      expect(await ask('scheme:demo', { key })).toMatchObject({ ok: false, code: 'bad-request' });
  });

  test('prints a drawing as PDF, and refuses what is none', async () => {
    const ask = await client({ dataDir: tempFolder() });
    const page = {
      width: 100,
      height: 100,
      title: 'p',
      marks: [{ kind: 'circle', at: [50, 50], radius: 10, fill: '#22262b' }],
    };
    const document = { title: 't', author: '', language: 'en-GB', pages: [page] };
    const { bytes: pdf } = (await ask('sheet:pdf', { document })).value as { bytes: Uint8Array };
    expect(text(pdf.subarray(0, 5))).toBe('%PDF-');
    let deep: object = { kind: 'group', marks: [] };
    for (let i = 0; i < 200; i++) deep = { kind: 'group', marks: [deep] };
    const wrong = [
      null,
      {},
      { ...document, pages: [] },
      { ...document, pages: [{ ...page, marks: [{ kind: 'image' }] }] },
      { ...document, pages: [{ ...page, marks: [deep] }] },
    ];
    for (const not of wrong)
      expect(await ask('sheet:pdf', { document: not })).toMatchObject({ ok: false, code: 'bad-request' });
  });

  test('refuses every channel that does not exist and every ask of the wrong form', async () => {
    const ask = await client({ dataDir: tempFolder() });
    for (const channel of ['nope', '__proto__', 'constructor', 'toString'])
      expect(await ask(channel, null)).toMatchObject({ ok: false, code: 'bad-request' });
    for (const channel of Object.keys(contract))
      for (const wrong of [42, 'text', [], { surplus: { deep: true } }])
        expect(await ask(channel, wrong)).toMatchObject({ ok: false, code: 'bad-request' });
    for (const key of ['', '../up', 'a/b', 'x'.repeat(81)])
      expect(await ask('scheme:autosave', { key, name: 'n', bytes: bytes('x') })).toMatchObject({ ok: false });
  });

  test('makes an image of a page at the resolution asked for, and refuses what is no drawing or too large', async () => {
    const { dataDir } = folderWithScheme();
    const ask = await client({ dataDir });
    const page = { width: 50.8, height: 25.4, title: 'a page', marks: [] };
    const document = { title: '', author: '', language: 'en-GB', pages: [page] };
    const { bytes: png } = (await ask('sheet:png', { document, dpi: 100 })).value as { bytes: Uint8Array };
    const view = new DataView(png.buffer, png.byteOffset);
    expect([view.getUint32(16), view.getUint32(20)]).toEqual([200, 100]);
    const huge = { ...document, pages: [{ ...page, width: 4000, height: 4000 }] };
    for (const [not, dpi] of [
      [{}, 100],
      [{ ...document, pages: [] }, 100],
      [huge, 600],
    ] as const)
      expect(await ask('sheet:png', { document: not, dpi })).toMatchObject({ ok: false, code: 'bad-request' });
    expect(await ask('sheet:png', { document, dpi: 10 })).toMatchObject({ ok: false, code: 'bad-request' });
  });
});

test('the page and the preload know every channel there is', () => {
  expect([...CHANNELS].toSorted()).toEqual(Object.keys(contract).toSorted());
});
