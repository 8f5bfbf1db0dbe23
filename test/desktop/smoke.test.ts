import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { _electron, type ElectronApplication, type Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { hasDisplay } from '../../app/browser/browser-window.ts';
import { electronRuntime } from '../../app/desktop/electron-runtime.ts';
import { SAFE_PREFERENCES } from '../../app/desktop/window-options.ts';

const root = resolve(import.meta.dirname, '../..');
const runtime = electronRuntime(root);
const why =
  runtime === null
    ? 'the Electron runtime is not here; fetch it with npx install-electron'
    : hasDisplay(process)
      ? null
      : 'there is no display; run under xvfb-run';
if (why !== null) console.warn(`\n*** DESKTOP TESTS SKIPPED: ${why}. ***\n`);

describe.skipIf(why !== null)('the desktop', () => {
  let electron: ElectronApplication;
  let page: Page;
  let folder: string;

  beforeAll(async () => {
    folder = mkdtempSync(join(tmpdir(), 'shadewright-desktop-'));
    electron = await _electron.launch({
      executablePath: runtime ?? '',
      args: [root, join(root, 'assets/demo/tannery-yard.scheme.json')],
      // Only root cannot have the sandbox; a test as anyone else runs with it, as users do.
      chromiumSandbox: process.getuid?.() !== 0,
      env: { ...process.env, SHADEWRIGHT_DATA: folder } as Record<string, string>,
    });
    page = await electron.firstWindow();
  }, 60_000);

  afterAll(async () => {
    await electron?.close();
    rmSync(folder, { recursive: true, force: true });
  });

  test('opens the scheme it was started with, from its own protocol', async () => {
    expect(page.url()).toBe('shadewright://desk/index.html');
    await page.getByText('Tannery Yard infill').first().waitFor({ timeout: 20_000 });
  });

  test('runs its window with the settings that it asks for', async () => {
    const set = await electron.evaluate(({ BrowserWindow }) => {
      const contents = BrowserWindow.getAllWindows()[0]?.webContents as unknown as {
        getLastWebPreferences(): Record<string, unknown>;
      };
      return contents.getLastWebPreferences();
    });
    const { spellcheck: _, ...safety } = SAFE_PREFERENCES;
    expect(set).toMatchObject(safety);
  });

  test('gives the page one frozen object, and nothing of Node or Electron', async () => {
    const seen = await page.evaluate(() => ({
      keys: Object.keys((window as unknown as { shadewright: object }).shadewright).sort(),
      isFrozen: Object.isFrozen((window as unknown as { shadewright: object }).shadewright),
      strays: ['require', 'process', 'module', 'ipcRenderer', 'electron'].filter((name) => name in window),
    }));
    expect(seen).toEqual({ keys: ['dropped', 'host', 'listen', 'setUnsaved'], isFrozen: true, strays: [] });
  });

  test('stays on its page, opens no window and reaches no network', async () => {
    await page.evaluate(() => {
      location.href = 'https://example.com/';
    });
    await page.evaluate(() => window.open('https://example.com/'));
    expect(page.url()).toBe('shadewright://desk/index.html');
    expect(electron.windows()).toHaveLength(1);
    expect(
      await page.evaluate(() =>
        fetch('http://127.0.0.1:9/').then(
          () => 'reached',
          () => 'refused',
        ),
      ),
    ).toBe('refused');
  });

  test('is answered on a channel, and refused a permission', async () => {
    const hello = await page.evaluate(() =>
      (
        window as unknown as { shadewright: { host: Record<string, (ask: null) => Promise<unknown>> } }
      ).shadewright.host['host:hello']?.(null),
    );
    expect(hello).toMatchObject({ ok: true, value: { kind: 'desktop' } });
    expect(await page.evaluate(() => Notification.requestPermission())).toBe('denied');
  });
});
