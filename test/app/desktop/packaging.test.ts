import { spawnSync } from 'node:child_process';
import { readFileSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join, resolve } from 'node:path';
import { initWasm, Resvg } from '@resvg/resvg-wasm';
import { expect, test } from 'vitest';
import { readPng } from '../../helpers/read-png.ts';

const root = resolve(import.meta.dirname, '../../..');
const settings = JSON.parse(readFileSync(join(root, 'app/desktop/electron-builder.json'), 'utf8'));
/** The icon is drawn again only when asked for by name: SHADEWRIGHT_SAMPLES=1. */
const isWriting = process.env['SHADEWRIGHT_SAMPLES'] === '1';

test('the packaging settings agree with the packager’s own schema', () => {
  const check = () =>
    spawnSync(process.execPath, ['app/desktop/package-release.mjs', '--check'], { cwd: root, encoding: 'utf8' });
  expect(check()).toMatchObject({ status: 0, stdout: expect.stringContaining('agree with the schema') });
});

test('a release cannot be turned into a plain Node, inspected, or given other code to run', () => {
  expect(settings.asar).toBe(true);
  expect(settings.electronFuses).toMatchObject({
    runAsNode: false,
    enableNodeOptionsEnvironmentVariable: false,
    enableNodeCliInspectArguments: false,
    enableEmbeddedAsarIntegrityValidation: true,
    onlyLoadAppFromAsar: true,
    grantFileProtocolExtraPrivileges: false,
  });
  expect(settings.publish, 'no updater').toBeNull();
});

test('the system opens .shadewright files; an ending of two parts, which no system knows, is not claimed', () => {
  const endings = settings.fileAssociations.map((kind: { ext: string }) => kind.ext);
  expect(endings).toEqual(['shadewright']);
});

test('the icon is the mark, drawn at the size that every system’s kinds are made from', async () => {
  const wasm = createRequire(import.meta.url).resolve('@resvg/resvg-wasm/index_bg.wasm');
  await initWasm(new Uint8Array(readFileSync(wasm)));
  const mark = readFileSync(join(root, 'assets/icons/mark.svg'), 'utf8');
  const drawn = new Resvg(mark, { fitTo: { mode: 'width', value: 1024 } }).render().asPng();
  const file = join(root, settings.icon);
  if (isWriting) writeFileSync(file, drawn);
  const kept = readPng(readFileSync(file));
  expect([kept.width, kept.height]).toEqual([1024, 1024]);
  expect(Buffer.compare(kept.pixels, readPng(drawn).pixels), 'draw it again with SHADEWRIGHT_SAMPLES=1').toBe(0);
});
