import { copyFile, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { chromium, type Page } from 'playwright-core';
import { startBrowserHost } from '../../app/browser/loopback-host.ts';

const root = resolve(import.meta.dirname, '../..');

export type LoopbackDesk = {
  readonly page: Page;
  /** The scheme's file on disk. */
  readonly scheme: string;
  /** What the page complained of: errors, warnings, refusals by the content policy. */
  readonly complaints: readonly string[];
  readonly close: () => Promise<void>;
};

/**
 * The built desk in Chromium, served by the loopback host on a copy of a shipped scheme.
 * @param executable path of the browser; @param demo key of the scheme; @param dark the system's theme
 * @param as         `file`: a copy on disk is opened; `example`: the shipped one, which has no file
 */
export async function openLoopbackDesk(
  executable: string,
  demo: string,
  dark = false,
  as: 'file' | 'example' = 'file',
): Promise<LoopbackDesk> {
  const folder = await mkdtemp(join(tmpdir(), 'desk-'));
  const scheme = join(folder, `${demo}.scheme.json`);
  await copyFile(resolve(root, `assets/demo/${demo}.scheme.json`), scheme);
  const failures: unknown[] = [];
  const host = await startBrowserHost({
    port: 0,
    ...(as === 'file' ? { scheme } : { example: demo }),
    dataDir: folder,
    version: '0.0.0',
    report: (error) => failures.push(error),
  });
  const browser = await chromium.launch({ executablePath: executable, args: ['--no-sandbox'] });
  const context = await browser.newContext({
    viewport: { width: 1280, height: 800 },
    locale: 'en-GB',
    colorScheme: dark ? 'dark' : 'light',
    acceptDownloads: true,
  });
  const page = await context.newPage();
  // Files go out as downloads, which a test can catch; the pickers of the browser need a person.
  await page.addInitScript(() => {
    Reflect.deleteProperty(window, 'showSaveFilePicker');
    Reflect.deleteProperty(window, 'showOpenFilePicker');
  });
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(error.message));
  page.on('console', (message) => {
    // Software drawing tells of its own slowness.
    if (/GPU stall|GL Driver|WebGL/.test(message.text())) return;
    if (message.type() === 'error' || message.type() === 'warning') complaints.push(message.text());
  });
  await page.goto(host.url);
  await page.locator('.open-desk').waitFor();
  return {
    page,
    scheme,
    complaints,
    close: async () => {
      await browser.close();
      await host.close();
      await rm(folder, { recursive: true, force: true });
      if (failures.length > 0) throw new AggregateError(failures, 'the host failed');
    },
  };
}
