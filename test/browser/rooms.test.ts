import { readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Download, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, test } from 'vitest';
import { readCsv } from '../helpers/read-csv.ts';
import { type LoopbackDesk, openLoopbackDesk } from '../helpers/loopback-desk.ts';
import { runCommand } from '../helpers/run-command.ts';
import { tempFolder } from '../helpers/temp-folder.ts';

const executable = inject('chromium');
const PATIENT = { timeout: 15_000 };

/** What pressing makes the page download. */
async function downloaded(page: Page, press: () => Promise<void>): Promise<Buffer> {
  const [download] = await Promise.all([page.waitForEvent('download'), press()]);
  return readFile(await (download as Download).path());
}

type Report = { findings: { room: string; limit: string; value: number; verdict: string }[] };

describe.skipIf(executable === null)('from what is over to what cures it, without a manual', () => {
  let desk: LoopbackDesk;
  let page: Page;
  let office: Locator;
  beforeAll(async () => {
    desk = await openLoopbackDesk(executable as string, 'tannery-yard', false, 'example');
    page = desk.page;
    page.setDefaultTimeout(PATIENT.timeout);
    office = page.locator('li.room', { hasText: '1.3 Office' });
  });
  afterAll(async () => {
    await desk?.close();
  });

  const sheets = async (entry: string): Promise<Buffer> =>
    downloaded(page, async () => {
      await page.getByRole('button', { name: 'Sheets' }).click();
      await page.getByRole('menuitem', { name: entry }).click();
    });

  test('the rooms that are over stand first, and one opens on why', async () => {
    await page.getByText('6 over', { exact: true }).waitFor();
    expect(await office.locator('.room-head').textContent()).toContain('over');
    await office.locator('.room-head').click();
    await office
      .getByText(/above the limit of 60\.0/)
      .first()
      .waitFor();
  });

  test('a way to pass is applied, passes, and is undone where it was applied', async () => {
    await office.getByRole('button', { name: /^Apply: overhang/ }).click();
    await page.getByText('5 over', { exact: true }).waitFor();
    expect(await office.locator('.room-head').textContent()).toContain('close');
    await office.getByText(/^Applied: overhang/).waitFor();
    // Who goes by keyboard is not thrown back to the top of the window.
    const focused = (): Promise<string> => page.evaluate(() => document.activeElement?.textContent ?? '');
    await expect.poll(focused, PATIENT).toBe('Undo');
    await office.getByRole('button', { name: 'Undo', exact: true }).click();
    await page.getByText('6 over', { exact: true }).waitFor();
    expect(await office.locator('.room-head').textContent()).toContain('over');
  });

  test('every way that is offered brings the room to close or within, by itself', async () => {
    await office
      .getByRole('button', { name: /^Apply: / })
      .first()
      .waitFor();
    const names = await office
      .getByRole('button', { name: /^Apply: / })
      .evaluateAll((all) => all.map((b) => b.getAttribute('aria-label') ?? ''));
    expect(names.length).toBeGreaterThanOrEqual(3);
    for (const name of names) {
      await office.getByRole('button', { name, exact: true }).click();
      await page.getByText('5 over', { exact: true }).waitFor();
      await office.getByRole('button', { name: 'Undo', exact: true }).click();
      await page.getByText('6 over', { exact: true }).waitFor();
    }
  });

  test('rooms are narrowed to a storey and a side, and the share that is not over goes with them', async () => {
    const narrow = page.getByRole('group', { name: 'Narrow the rooms down' });
    const storey = narrow.getByLabel('Storey');
    await storey.selectOption({ label: 'floor at 6.50 m' });
    await expect.poll(() => page.locator('li.room').count(), PATIENT).toBe(5);
    await page.getByText('3 of 5 rooms not over, 60 %').waitFor();
    await narrow.getByLabel('Facing').selectOption({ label: 'facing west' });
    await expect.poll(() => page.locator('li.room').count(), PATIENT).toBe(2);
    await narrow.getByRole('button', { name: 'all rooms' }).click();
    await expect.poll(() => page.locator('li.room').count(), PATIENT).toBe(16);
  });

  test('a variant is kept, and stands beside the scheme after a way was applied', async () => {
    await page.getByRole('tab', { name: 'Variants' }).click();
    await page.getByLabel('Name of what is kept').fill('as drawn');
    await page.getByRole('button', { name: 'Keep as it is now' }).click();
    await page.getByRole('button', { name: 'Undo keeping as drawn' }).waitFor();
    const file = JSON.parse((await downloaded(page, () => page.keyboard.press('Control+s'))).toString());
    expect(file.variants).toHaveLength(1);
    expect(file.variants[0]).toMatchObject({ name: 'as drawn', scheme: { format: 'shadewright', title: file.title } });
    await office.getByRole('button', { name: /^Apply: glass/ }).click();
    const heads = page.locator('.compare thead th.variant');
    await expect
      .poll(() => heads.allTextContents(), PATIENT)
      .toEqual([
        expect.stringContaining('as drawn6 over, 2 close, 8 within'),
        expect.stringContaining('on the desk5 over, 3 close, 8 within'),
      ]);
    const row = page.locator('.compare tbody tr', { hasText: '1.3 Office' }).first();
    expect(await row.textContent()).toMatch(/over 111.*close 60\.0−51\.\d/);
    await page.getByRole('button', { name: 'Put as drawn on the desk' }).click();
    await page.getByText('6 over', { exact: true }).waitFor();
    await page.getByRole('button', { name: 'Let go of as drawn' }).click();
    await page.locator('.compare').getByText('Keep the scheme as it is now').waitFor();
  });

  test('what moves the result most is shown with its figures, longest first', async () => {
    await office.getByText('What moves it most').click();
    const first = office.locator('.tornado li').first();
    await first.waitFor();
    expect(await first.textContent()).toMatch(/width of the windows|g of the glass/);
  });

  test('an overhang for the west front is sized to a target and set', async () => {
    await page.getByRole('tab', { name: 'Windows' }).click();
    await page.getByRole('row', { name: /^W4 / }).click();
    await page.getByRole('tab', { name: 'Sizing' }).click();
    await page.getByRole('heading', { name: 'Window W4' }).waitFor();
    await page.getByLabel('Summer gain to come down to').fill('12');
    await page.keyboard.press('Enter');
    await page.getByText(/m deep meets the target/).waitFor();
    const setting = page.getByLabel('Setting', { exact: true });
    await setting.focus();
    for (let i = 0; i < 18; i++) await page.keyboard.press('ArrowRight');
    const reading = page.locator('.sizing-reading');
    expect(await reading.textContent()).toContain('1.80 m deep');
    await page.getByRole('button', { name: 'Set 1.80 m deep' }).click();
    await page.getByRole('button', { name: /^Undo overhang of W4/ }).waitFor();
    await expect.poll(() => office.locator('.room-head').textContent(), PATIENT).not.toContain('111.2');
  });

  test('the findings go out as PDF, CSV and JSON, and the command finds the same to the last digit', async () => {
    await expect.poll(() => page.locator('.findings.stale').count(), PATIENT).toBe(0);
    const pdf = await sheets('Findings report (PDF)');
    expect(pdf.subarray(0, 5).toString()).toBe('%PDF-');
    const csv = readCsv((await sheets('Findings table (CSV)')).toString());
    const json = await sheets('Findings to recompute (JSON)');
    const report = JSON.parse(json.toString()) as Report;
    expect(csv.length - 1).toBe(report.findings.length);
    const folder = tempFolder();
    await writeFile(join(folder, 'report.json'), json);
    const verified = await runCommand(['verify', 'report.json'], folder);
    expect(verified.status, verified.err).toBe(0);

    const scheme = await downloaded(page, () => page.keyboard.press('Control+s'));
    await writeFile(join(folder, 'yard.scheme.json'), scheme);
    const ran = await runCommand(['check', 'yard.scheme.json', '--json'], folder);
    const found = JSON.parse(ran.out) as Report;
    // Every double of every finding, in two engines of JavaScript: see core/maths.
    expect(found.findings.length).toBeGreaterThan(10);
    expect(found.findings).toEqual(report.findings);
    expect(desk.complaints).toEqual([]);
  });
});
