import axe from 'axe-core';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, test } from 'vitest';
import { type LoopbackDesk, openLoopbackDesk } from '../helpers/loopback-desk.ts';

const executable = inject('chromium');

/** Rules of WCAG 2.0 to 2.2, levels A and AA, as far as a program can test them (axe-core). */
const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/** What axe finds wrong on the page as it stands, a line each. */
async function barriers(page: Page): Promise<readonly string[]> {
  // Motion would be tested half way.
  await page.waitForTimeout(300);
  await page.evaluate(axe.source);
  const found = await page.evaluate(
    (tags) =>
      (window as unknown as { axe: typeof axe }).axe.run(document, {
        runOnly: { type: 'tag', values: tags },
        resultTypes: ['violations'],
      }),
    RULES,
  );
  return found.violations.flatMap((rule) =>
    rule.nodes.map((node) => `${rule.id}: ${node.target.join(' ')} ${node.failureSummary ?? ''}`),
  );
}

describe.skipIf(executable === null).each([
  { theme: 'light', isDark: false },
  { theme: 'dark', isDark: true },
])('the desk in the $theme theme puts up no barrier that axe-core knows', ({ isDark }) => {
  let desk: LoopbackDesk;
  let page: Page;
  beforeAll(async () => {
    desk = await openLoopbackDesk(executable as string, 'tannery-yard', isDark);
    page = desk.page;
    page.setDefaultTimeout(15_000);
    await page.getByText(/^\d+ over$/).waitFor();
  });
  afterAll(async () => {
    await desk?.close();
  });

  test('massing, clock, year strip and findings', async () => {
    expect(await barriers(page)).toEqual([]);
  });

  test('an open finding with its working', async () => {
    await page.locator('.room-head').first().click();
    await page.locator('details.working summary').first().click();
    expect(await barriers(page)).toEqual([]);
  });

  test('every tab of the drawer', async () => {
    const tabs = page.getByRole('tab');
    for (let i = 0; i < (await tabs.count()); i++) {
      await tabs.nth(i).click();
      expect(await barriers(page), (await tabs.nth(i).textContent()) ?? '').toEqual([]);
    }
  });

  test('a sun map with its settings and its key', async () => {
    await page.getByRole('button', { name: 'Sun map' }).click();
    await page.getByText('sun hours', { exact: true }).click();
    await page.locator('.map-spread').waitFor();
    expect(await barriers(page)).toEqual([]);
    await page.getByText('nothing', { exact: true }).click();
    await page.getByRole('button', { name: 'Sun map' }).click();
  });

  test('the sheets', async () => {
    await page.getByRole('button', { name: 'Sheets' }).click();
    await page.getByRole('menuitem', { name: 'Draw and print sheets…' }).click();
    await page.locator('.sheets-scroller:not(.stale) .sheet-page svg text').first().waitFor();
    expect(await barriers(page)).toEqual([]);
    await page.getByRole('button', { name: 'Back to the scheme' }).click();
  });

  test('the dialogs', async () => {
    await page.locator('.facts-button').click();
    await page.getByRole('dialog').waitFor();
    expect(await barriers(page), 'place').toEqual([]);
    await page.keyboard.press('Escape');
    for (const name of ['All cautions', 'About']) {
      await page.getByRole('button', { name, exact: true }).click();
      await page.getByRole('dialog').waitFor();
      expect(await barriers(page), name).toEqual([]);
      await page.keyboard.press('Escape');
    }
  });
});
