import { chmodSync, readdirSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { type Browser, chromium } from 'playwright-core';
import { describe, expect, inject, test } from 'vitest';
import { runCommand } from '../helpers/run-command.ts';
import { tempFolder } from '../helpers/temp-folder.ts';

const executable = inject('chromium');
const DEMO = resolve(import.meta.dirname, '../../assets/demo/tannery-yard.scheme.json');

const freePort = (): Promise<number> =>
  new Promise((settle) => {
    const server = createServer().listen(0, '127.0.0.1', () => {
      const address = server.address();
      server.close(() => settle(typeof address === 'object' && address ? address.port : 0));
    });
  });

async function connected(port: number): Promise<Browser> {
  for (let attempt = 0; ; attempt++) {
    try {
      return await chromium.connectOverCDP(`http://127.0.0.1:${port}`, { timeout: 3000 });
    } catch (error) {
      if (attempt === 60) throw error;
      await new Promise((go) => setTimeout(go, 250));
    }
  }
}

const profiles = (): number => readdirSync(tmpdir()).filter((name) => name.startsWith('shadewright-window-')).length;

describe.skipIf(executable === null || process.platform === 'win32')(
  'shadewright open, where there is no Electron',
  () => {
    test('says what it does, shows the scheme in a window of its own, and ends when that is closed', async () => {
      const folder = tempFolder();
      const port = await freePort();
      const browser = join(folder, 'browser');
      // The installed browser without a screen, and with a way for this test to look in.
      writeFileSync(
        browser,
        `#!/bin/sh\nunset DISPLAY\nexec "${executable}" --headless=new --remote-debugging-port=${port} "$@"\n`,
      );
      chmodSync(browser, 0o755);
      const before = profiles();
      const env = {
        SHADEWRIGHT_BROWSER: browser,
        SHADEWRIGHT_DATA: join(folder, 'data'),
        DISPLAY: ':1',
        ELECTRON_OVERRIDE_DIST_PATH: folder,
      };
      const running = runCommand(['open', DEMO], folder, env);
      const inside = await connected(port);
      const page = inside.contexts()[0]?.pages()[0];
      await page?.getByText('Tannery Yard infill').first().waitFor({ timeout: 20_000 });
      expect(page?.url(), 'the token is not left in the address').toMatch(/^http:\/\/127\.0\.0\.1:\d+\/$/);
      await page?.reload();
      await page?.getByText('Tannery Yard infill').first().waitFor({ timeout: 20_000 });
      await page?.close();
      const ran = await running;
      expect(ran.status, ran.err).toBe(0);
      expect(ran.out).toContain('The Electron runtime is not here.\nOpening the desk in a window of');
      expect(ran.out).not.toContain('#t=');
      expect(profiles(), 'the window’s profile is thrown away').toBe(before);
    });

    test('prints an address that was not used yet, and keeps serving, where the runtime and the browser fail', async () => {
      const folder = tempFolder();
      for (const name of ['electron', 'browser']) {
        writeFileSync(join(folder, name), '#!/bin/sh\nexit 3\n');
        chmodSync(join(folder, name), 0o755);
      }
      const env = {
        SHADEWRIGHT_BROWSER: join(folder, 'browser'),
        SHADEWRIGHT_DATA: join(folder, 'data'),
        DISPLAY: ':1',
        ELECTRON_OVERRIDE_DIST_PATH: folder,
      };
      const ran = await runCommand(['open', DEMO], folder, env, 4000);
      expect(ran.out).toContain('Electron ended with an error');
      expect(ran.out).toContain(`${join(folder, 'browser')} ended with an error.`);
      expect(ran.out).toMatch(/http:\/\/127\.0\.0\.1:\d+\/#t=[\w-]{43}\n/);
      expect(ran.status, 'it was still serving when this test stopped it').toBeNull();
    });

    test('prints an address and keeps serving where no window can be shown', async () => {
      const folder = tempFolder();
      const env = {
        SHADEWRIGHT_DATA: join(folder, 'data'),
        DISPLAY: '',
        WAYLAND_DISPLAY: '',
        ELECTRON_OVERRIDE_DIST_PATH: folder,
      };
      const ran = await runCommand(['open', DEMO], folder, env, 2500);
      expect(ran.out).toMatch(/http:\/\/127\.0\.0\.1:\d+\/#t=[\w-]{43}\n/);
      expect(ran.out).toContain('Serving until Ctrl+C');
      expect(ran.status, 'it was still serving when this test stopped it').toBeNull();
    });
  },
);
