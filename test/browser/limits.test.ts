import { readFile } from 'node:fs/promises';
import type { Download, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, test } from 'vitest';
import { type LoopbackDesk, openLoopbackDesk } from '../helpers/loopback-desk.ts';

const executable = inject('chromium');
const PATIENT = { timeout: 15_000 };

describe.skipIf(executable === null)('the limits in the desk', () => {
  let desk: LoopbackDesk;
  let page: Page;
  beforeAll(async () => {
    desk = await openLoopbackDesk(executable as string, 'tannery-yard', false, 'example');
    page = desk.page;
    page.setDefaultTimeout(PATIENT.timeout);
    await page.getByText('6 over', { exact: true }).waitFor();
    await page.getByRole('tab', { name: 'Limits' }).click();
  });
  afterAll(async () => {
    await desk?.close();
  });
  const set = () => page.getByLabel('Limit set', { exact: true });

  test('an example says that it is one, and cannot be changed where it stands', async () => {
    await page.getByText('An example, not the rules of any place').waitFor();
    await page.locator('.limit summary').first().click();
    const value = page.locator('.limit').first().getByLabel('Value', { exact: true });
    expect(await value.getAttribute('readonly')).not.toBeNull();
  });

  test('without limits there are metrics and no verdict; undo brings the limits back', async () => {
    await set().selectOption({ label: 'none: metrics without a verdict' });
    await page.getByText('This scheme has chosen no limits').waitFor();
    expect(await page.getByText(/^\d+ over$/).count()).toBe(0);
    await page.getByRole('button', { name: 'Undo choice of limits' }).click();
    await page.getByText('6 over', { exact: true }).waitFor();
  });

  test('a copy can be changed, keeps its sources, and rooms are judged by it at once', async () => {
    await page.getByRole('button', { name: 'Make a set of our own from it' }).click();
    const peak = page.locator('.limit', { has: page.locator('summary', { hasText: /^peak solar gain/ }) });
    if ((await peak.locator('details').getAttribute('open')) === null) await peak.locator('summary').click();
    expect(await peak.getByLabel('Where the value comes from').inputValue()).toContain('Common practice');
    await peak.getByLabel('Value', { exact: true }).fill('65');
    await page.keyboard.press('Enter');
    await page.locator('.room-head', { hasText: '2.4 Bedroom west' }).locator('.margin', { hasText: '+2.6' }).waitFor();
    await peak.getByLabel('Value', { exact: true }).fill('-3');
    await page.keyboard.press('Enter');
    const refusal = page.getByRole('alert').filter({ hasText: 'Not changed, because' });
    expect(await refusal.textContent()).toMatch(/limits\.limits\[\d\]\.value/);
    await peak.getByLabel('Value', { exact: true }).fill('200');
    await page.keyboard.press('Enter');
    await refusal.waitFor({ state: 'detached' });
    // The mean and the day’s sum still hold some of them.
    await expect
      .poll(
        () =>
          page
            .getByText(/^\d over$/)
            .first()
            .textContent(),
        PATIENT,
      )
      .not.toBe('6 over');
  });

  test('a limit by side, by use and by another metric goes into the file as the schema has it', async () => {
    await page.getByRole('button', { name: 'Add a limit' }).click();
    const added = page.locator('.limit').last();
    await added.locator('summary').click();
    await added.getByLabel('What is measured').selectOption({ label: 'window openings as a share of the floor' });
    await added.getByLabel('Another value for each side').check();
    await added.getByLabel('west', { exact: true }).fill('20');
    await page.keyboard.press('Enter');
    await added.getByLabel('bedroom', { exact: true }).check();
    await added.getByLabel('Where the value comes from').fill('our own brief, page 3');
    await page.keyboard.press('Enter');
    const [download] = await Promise.all([page.waitForEvent('download'), page.keyboard.press('Control+s')]);
    const saved = JSON.parse(await readFile(await (download as Download).path(), 'utf8'));
    const limit = saved.limits.limits.at(-1);
    // The name that the limit began with was its metric’s, and went with it.
    expect(limit).toMatchObject({
      name: 'window openings as a share of the floor',
      metric: 'glazing-to-floor',
      unit: '%',
      byBearing: { N: 60, E: 60, S: 60, W: 20 },
      uses: ['bedroom'],
      source: 'our own brief, page 3',
    });
    expect(saved.limits.example).toBe(false);
    await page.locator('.room', { hasText: 'Bedroom west' }).first().waitFor();
    expect(desk.complaints).toEqual([]);
  });

  test('values by how much of the floor the openings are: added, kept in order, judged by, and taken out', async () => {
    const peak = page.locator('.limit', { has: page.locator('summary', { hasText: /^peak solar gain/ }) });
    const steps = async () => {
      const [download] = await Promise.all([page.waitForEvent('download'), page.keyboard.press('Control+s')]);
      const saved = JSON.parse(await readFile(await (download as Download).path(), 'utf8'));
      return saved.limits.limits.find((limit: { metric: string }) => limit.metric === 'peak-gain').byGlazing;
    };
    await peak.getByRole('button', { name: 'Add a step of openings' }).click();
    const first = peak.getByRole('group', { name: 'Step 1' });
    await first.getByLabel('Openings up to').fill('900');
    await page.keyboard.press('Enter');
    await first.getByLabel('Value', { exact: true }).fill('64');
    await page.keyboard.press('Enter');
    // 111.3 W/m² stands above the step’s 64, where the limit’s own value of 200 left it room.
    await page.locator('.room-head', { hasText: '3.3 Studio' }).locator('.margin', { hasText: '+47.3' }).waitFor();
    expect(await steps()).toEqual([{ upTo: 900, value: 64 }]);

    await peak.getByRole('button', { name: 'Add a step of openings' }).click();
    const second = peak.getByRole('group', { name: 'Step 2' });
    await second.getByLabel('Openings up to').fill('20');
    await page.keyboard.press('Enter');
    const refusal = page.getByRole('alert').filter({ hasText: 'Not changed, because' });
    expect(await refusal.textContent()).toContain('from the smallest share of openings to the largest');
    await second.getByLabel('Another value for each side').check();
    await second.getByLabel('west', { exact: true }).fill('45');
    await page.keyboard.press('Enter');
    expect((await steps())[1]).toEqual({ upTo: 910, value: 200, byBearing: { N: 200, E: 200, S: 200, W: 45 } });

    await peak.getByRole('button', { name: 'Take out step 2' }).click();
    await peak.getByRole('button', { name: 'Take out step 1' }).click();
    expect(await steps()).toBeUndefined();
    expect(desk.complaints).toEqual([]);
  });
});
