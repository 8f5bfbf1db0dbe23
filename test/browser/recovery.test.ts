import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { chromium, type Page } from 'playwright-core';
import { describe, expect, inject, test } from 'vitest';
import { startBrowserHost } from '../../app/browser/loopback-host.ts';
import { Scheme } from '../../core/scheme/schema.ts';
import { openLoopbackDesk } from '../helpers/loopback-desk.ts';

const executable = inject('chromium');
const PATIENT = { timeout: 10_000 };

/** Sets the site to the town of Tromsø by the place dialog: one edit. */
async function moveNorth(page: Page): Promise<void> {
  const bar = page.locator('.top-bar');
  await bar.getByRole('button', { name: /Europe\/London/ }).click();
  await page.getByRole('combobox', { name: 'Town or city' }).fill('tromso');
  await page.getByRole('option', { name: /Tromsø/ }).waitFor();
  await page.keyboard.press('Enter');
  await page.getByRole('button', { name: 'Set place', exact: true }).click();
  await bar.getByText(/69\.65° N/).waitFor();
}

describe.skipIf(executable === null)('unsaved work', () => {
  test('waits after a window that was killed, is brought back whole, and goes once it is saved', async () => {
    const desk = await openLoopbackDesk(executable as string, 'tannery-yard');
    const before = readFileSync(desk.scheme, 'utf8');
    const dataDir = dirname(desk.scheme);
    const slots = (): number => {
      try {
        return readdirSync(join(dataDir, 'recovery')).length;
      } catch {
        return 0;
      }
    };
    try {
      expect(slots(), 'a scheme that was only looked at is not kept').toBe(0);
      await moveNorth(desk.page);
      await expect.poll(slots, PATIENT).toBe(1);
      await desk.page.getByRole('button', { name: 'Undo place' }).click();
      await expect.poll(slots, { ...PATIENT, message: 'what is as it was on disk is not kept' }).toBe(0);
      await moveNorth(desk.page);
      await expect.poll(slots, PATIENT).toBe(1);
      await desk.page.context().browser()?.close();
      expect(readFileSync(desk.scheme, 'utf8'), 'keeping work does not touch the scheme’s file').toBe(before);

      const host = await startBrowserHost({ port: 0, dataDir, version: '0.0.0' });
      const browser = await chromium.launch({ executablePath: executable as string, args: ['--no-sandbox'] });
      try {
        const page = await browser.newPage({ locale: 'en-GB' });
        await page.addInitScript(() => Reflect.deleteProperty(window, 'showSaveFilePicker'));
        await page.goto(host.url);
        await page.getByRole('button', { name: 'Bring back' }).click();
        await page
          .locator('.top-bar')
          .getByText(/69\.65° N/)
          .waitFor(PATIENT);
        await page.locator('.top-bar .unsaved').waitFor();
        expect(slots()).toBe(1);
        const [saved] = await Promise.all([page.waitForEvent('download'), page.keyboard.press('Control+s')]);
        const scheme = JSON.parse(readFileSync(await saved.path(), 'utf8'));
        expect(scheme.site.zone).toBe('Europe/Oslo');
        expect(scheme.rooms, 'all else is as it was read').toEqual(Scheme.parse(JSON.parse(before)).rooms);
        await expect.poll(slots, PATIENT).toBe(0);
      } finally {
        await browser.close();
        await host.close();
      }
    } finally {
      await desk.close();
    }
  });
});
