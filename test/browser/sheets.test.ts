import { readFile } from 'node:fs/promises';
import type { Download, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, test } from 'vitest';
import { type LoopbackDesk, openLoopbackDesk } from '../helpers/loopback-desk.ts';
import { readCsv } from '../helpers/read-csv.ts';
import { readPdf } from '../helpers/read-pdf.ts';

const executable = inject('chromium');
const PATIENT = { timeout: 20_000 };

async function downloaded(page: Page, press: () => Promise<void>): Promise<{ name: string; bytes: Buffer }> {
  const [download] = await Promise.all([page.waitForEvent('download'), press()]);
  return { name: download.suggestedFilename(), bytes: await readFile(await (download as Download).path()) };
}

/** Widths of the black cells of the check bar [mm]: five of ten millimetres each, every other one black. */
function barLength(paths: Awaited<ReturnType<typeof readPdf>>['pages'][number]['paths']): number {
  const cells = paths.flatMap(({ runs }) =>
    runs.flatMap((run) => {
      const xs = run.map(([x]) => x);
      const ys = run.map(([, y]) => y);
      const [wide, high] = [Math.max(...xs) - Math.min(...xs), Math.max(...ys) - Math.min(...ys)];
      return Math.abs(wide - 10) < 0.2 && Math.abs(high - 1.2) < 0.1
        ? [[Math.min(...xs), Math.max(...xs)] as const]
        : [];
    }),
  );
  const from = Math.min(...cells.map(([x]) => x));
  // The last black cell ends at 90 mm; the bar's outline at 100.
  return Math.max(...cells.map(([, x]) => x)) - from;
}

describe.skipIf(executable === null)('sheets in the desk', () => {
  let desk: LoopbackDesk;
  let page: Page;
  beforeAll(async () => {
    desk = await openLoopbackDesk(executable as string, 'tannery-yard', false, 'example');
    page = desk.page;
    page.setDefaultTimeout(PATIENT.timeout);
    await page.getByText('6 over', { exact: true }).waitFor();
    await page.getByRole('button', { name: 'Sheets' }).click();
    await page.getByRole('menuitem', { name: 'Draw and print sheets…' }).click();
  });
  afterAll(async () => {
    await desk?.close();
  });

  const fresh = async (): Promise<void> => {
    await page.locator('.sheets-scroller:not(.stale) .sheet-page svg text').first().waitFor();
  };
  const saveAs = (entry: string | RegExp) =>
    downloaded(page, async () => {
      await page.getByRole('button', { name: 'Save as' }).click();
      await page.getByRole('menuitem', { name: entry }).click();
    });

  test('the scheme’s own study is shown as it will lie on paper: nine diagrams, scale, north, caution', async () => {
    await fresh();
    const sheet = page.locator('.sheet-page').first();
    const said = (await sheet.locator('text').allTextContents()).join('\n');
    expect(said.match(/2025, \d\d:\d\d \(UTC/g)).toHaveLength(9);
    for (const word of ['Scale 1:', 'Estimates for design', 'page 1 of 1', 'Europe/London'])
      expect(said).toContain(word);
    expect(said.split('\n')).toContain('N');
  });

  test('a scale that does not fit is said with one that does, and the cure can be pressed', async () => {
    await page.getByLabel('Scale', { exact: true }).selectOption({ label: '1:100' });
    const notice = page.getByRole('alert').filter({ hasText: 'This sheet cannot be drawn so' });
    await notice.waitFor();
    expect(await notice.textContent()).toMatch(/at 1:100 is larger than .*; 1:\d+ fits/);
    await notice.getByRole('button', { name: 'Take the best fit' }).click();
    await fresh();
    expect(await page.getByLabel('Scale', { exact: true }).inputValue()).toBe('');
  });

  test('another kind of sheet leaves the scale and the name of the old one behind, and a section begins with a window', async () => {
    await page.getByLabel('Scale', { exact: true }).selectOption({ label: '1:1000' });
    await page.getByLabel('Sheet', { exact: true }).selectOption({ label: 'Section of a window' });
    await page
      .locator('.sheet-page text', { hasText: /^Section/ })
      .first()
      .waitFor();
    expect(await page.getByLabel('Scale', { exact: true }).inputValue()).toBe('');
    expect(await page.getByLabel('Name of the set').inputValue()).not.toBe('Shadow study');
    await page.getByLabel('Sheet', { exact: true }).selectOption({ label: 'Shadow study' });
    await fresh();
  });

  test('dates and times are typed or taken from a preset; what is none is named', async () => {
    await page.getByLabel('Clock times').fill('25:00');
    await page.keyboard.press('Enter');
    await page.getByText('Times such as 09:00 with commas').waitFor();
    await page.getByLabel('Clock times').fill('10:00, 14:00');
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Solstices and equinoxes' }).click();
    await expect
      .poll(async () => (await page.locator('.sheet-page text').allTextContents()).join('\n'), PATIENT)
      .toMatch(/20 March 2025, 10:00/);
    await fresh();
    const said = (await page.locator('.sheet-page text').allTextContents()).join('\n');
    expect(said.match(/2025, \d\d:\d\d \(UTC/g)).toHaveLength(8);
  });

  test('a set is kept with the scheme as one step, and drawn anew after the scheme changed', async () => {
    await page.getByLabel('Name of the set').fill('Seasons');
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Keep as another set' }).click();
    await page.getByRole('button', { name: 'Undo sheet set Seasons' }).waitFor();
    await page.getByRole('button', { name: 'Seasons', exact: true }).waitFor();
    await fresh();
    const before = await page
      .locator('.sheet-page text', { hasText: /^added / })
      .first()
      .textContent();
    // The scheme changes under the sheets: a neighbour’s ground is another once north turns.
    await page.locator('.facts-button').click();
    await page.getByLabel('Latitude').fill('60');
    await page.getByRole('button', { name: 'Set place', exact: true }).click();
    await expect
      .poll(
        () =>
          page
            .locator('.sheet-page text', { hasText: /^added / })
            .first()
            .textContent(),
        PATIENT,
      )
      .not.toBe(before);
    const names: string[] = [];
    page.on('download', (download) => names.push(download.suggestedFilename()));
    await page.getByRole('button', { name: 'Write all sets (PDF)' }).click();
    await expect.poll(() => names.length, PATIENT).toBe(2);
    expect(names.some((name) => name.endsWith('Seasons.pdf'))).toBe(true);
    await page.getByRole('button', { name: /^Undo place/ }).click();
    await fresh();
  });

  test('what is written is what is shown: PDF of A3 at the stated scale, SVG, PNG, GeoJSON, CSV', async () => {
    const pdf = await readPdf(new Uint8Array((await saveAs('All pages (PDF)')).bytes));
    expect(pdf.pages).toHaveLength(await page.locator('.sheet-page').count());
    expect(pdf.pages[0]?.width).toBeCloseTo(420, 1);
    expect(pdf.pages[0]?.height).toBeCloseTo(297, 1);
    const inPdf = pdf.pages[0]?.texts.map((t) => t.text).join('') ?? '';
    const scale =
      /Scale 1:\d+/.exec((await page.locator('.sheet-page text').allTextContents()).join(''))?.[0] ?? 'none';
    expect(inPdf).toContain(scale);
    const svg = (await saveAs('The page in view (SVG)')).bytes.toString();
    expect(svg).toContain('width="420mm" height="297mm"');
    const png = (await saveAs('The page in view (PNG, 150 dpi)')).bytes;
    expect(png.subarray(1, 4).toString()).toBe('PNG');
    expect(png.readUInt32BE(16)).toBe(Math.round((420 / 25.4) * 150));
    const shapes = JSON.parse((await saveAs('Shadows (GeoJSON)')).bytes.toString());
    expect(shapes.type).toBe('FeatureCollection');
    const table = readCsv((await saveAs('Shadows table (CSV)')).bytes.toString());
    expect(table.length).toBeGreaterThan(8);
  });

  test('printed at full size the check bar measures what it says, on paper of its own size', async () => {
    // The dialog of the system needs a person; what it would print is asked of the browser instead.
    await page.evaluate(() => {
      window.print = () => undefined;
    });
    await page.getByRole('button', { name: 'Print…' }).click();
    await page.locator('.print-root svg').first().waitFor({ state: 'attached' });
    const printed = await readPdf(new Uint8Array(await page.pdf({ preferCSSPageSize: true, printBackground: true })));
    expect(printed.pages).toHaveLength(await page.locator('.sheet-page').count());
    const [sheet] = printed.pages;
    expect(Math.abs((sheet?.width ?? 0) - 420)).toBeLessThan(0.5);
    expect(Math.abs((sheet?.height ?? 0) - 297)).toBeLessThan(0.5);
    expect(Math.abs(barLength(sheet?.paths ?? []) - 90)).toBeLessThan(0.1);
    await page.evaluate(() => window.dispatchEvent(new Event('afterprint')));
    await expect.poll(() => page.locator('.print-root').count(), PATIENT).toBe(0);
  });

  test('every kind of sheet is drawn, and a section begins with a window', async () => {
    for (const kind of ['Sun path', 'Light of areas and neighbours', 'Sun on roofs and ground', 'Findings report']) {
      await page.getByLabel('Sheet', { exact: true }).selectOption({ label: kind });
      await page.locator('.sheets-scroller.stale').waitFor({ state: 'detached' });
      await fresh();
    }
    expect(await page.locator('.sheet-page').count(), 'a report has many pages').toBeGreaterThan(10);
    await page.getByLabel('Sheet', { exact: true }).selectOption({ label: 'Section of a window' });
    await fresh();
    expect(await page.getByLabel('Window', { exact: true }).inputValue()).toBe('W1');
  });

  test('a long drawing shows how far it is and can be stopped', async () => {
    await page.getByLabel('Sheet', { exact: true }).selectOption({ label: 'Shadow study' });
    const dates = Array.from({ length: 30 }, (_, i) => `2025-06-${String(i + 1).padStart(2, '0')}`);
    const times = Array.from({ length: 48 }, (_, i) => `${String(i >> 1).padStart(2, '0')}:${i % 2 ? '30' : '00'}`);
    await page.getByLabel('Clock times').fill(times.join(', '));
    await page.keyboard.press('Enter');
    await page.getByLabel('Dates', { exact: true }).fill(dates.join(', '));
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Stop' }).click();
    await page.getByText('The drawing was stopped.').waitFor();
    await page.getByRole('button', { name: 'Back to the scheme' }).click();
    await page.getByRole('region', { name: 'Massing' }).waitFor();
    expect(desk.complaints).toEqual([]);
  });
});
