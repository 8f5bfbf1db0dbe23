// Takes the pictures of the desk that README shows, from the built program: `npm run build && node test/helpers/make-pictures.mjs`.
import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { chromium } from 'playwright-core';

const root = resolve(import.meta.dirname, '../..');
const executablePath = [
  process.env.SHADEWRIGHT_BROWSER,
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
].find((path) => path !== undefined && existsSync(path));

/** What is done before each picture is taken. */
const PICTURES = [
  {
    name: 'desk',
    width: 1280,
    height: 800,
    theme: 'light',
    steps: async (page) => {
      await page.locator('.room-head').nth(1).click();
      await page.locator('.way').first().waitFor();
      await page.locator('.ways').evaluate((ways) => ways.scrollIntoView({ block: 'end' }));
    },
  },
  {
    name: 'desk-map',
    width: 1920,
    height: 1080,
    theme: 'light',
    steps: async (page) => {
      await page.getByRole('button', { name: 'Sun map' }).click();
      await page.getByText('sun hours', { exact: true }).click();
      await page.waitForTimeout(9000);
      await page.keyboard.press('Escape');
    },
  },
  {
    name: 'desk-dark',
    width: 1920,
    height: 1080,
    theme: 'dark',
    steps: async (page) => {
      await page.getByRole('tab', { name: /^Sizing/ }).click();
      await page.locator('.sizing-chart svg').waitFor();
    },
  },
  {
    name: 'desk-sheets',
    width: 1280,
    height: 800,
    theme: 'light',
    steps: async (page) => {
      await page.getByRole('button', { name: 'Sheets' }).click();
      await page.getByRole('menuitem').first().click();
      await page.locator('.sheets-scroller:not(.stale) .sheet-page svg text').first().waitFor();
    },
  },
];

/** The desk of the built program on the example, served to a browser of ours. */
async function serve(folder) {
  const child = spawn(process.execPath, [join(root, 'out/main/cli.js'), 'open', '--example', 'tannery-yard'], {
    env: {
      ...process.env,
      DISPLAY: '',
      WAYLAND_DISPLAY: '',
      SHADEWRIGHT_DATA: folder,
      ELECTRON_OVERRIDE_DIST_PATH: folder,
    },
  });
  let said = '';
  const url = await new Promise((found) => {
    child.stdout.on('data', (text) => {
      said += text;
      const address = /http:\S+/.exec(said)?.[0];
      if (address !== undefined) found(address);
    });
  });
  return { url, stop: () => child.kill() };
}

for (const { name, width, height, theme, steps } of PICTURES) {
  const folder = mkdtempSync(join(tmpdir(), 'pictures-'));
  const { url, stop } = await serve(folder);
  const browser = await chromium.launch({
    executablePath,
    args: [
      '--no-sandbox',
      '--use-angle=swiftshader',
      '--enable-unsafe-swiftshader',
      '--disable-quic',
      '--no-first-run',
    ],
  });
  const context = await browser.newContext({ viewport: { width, height }, locale: 'en-GB', colorScheme: theme });
  const page = await context.newPage();
  await page.goto(url);
  await page.getByText('6 over', { exact: true }).waitFor();
  await steps(page);
  await page.waitForTimeout(2500);
  await page.screenshot({ path: join(root, `assets/pictures/${name}.png`) });
  await browser.close();
  stop();
  rmSync(folder, { recursive: true, force: true });
}
