import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import type { Download, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, test } from 'vitest';
import { asText, madeYear } from '../core/sky/weather/made-year.ts';
import { type LoopbackDesk, openLoopbackDesk } from '../helpers/loopback-desk.ts';

const executable = inject('chromium');

/** Workers start with their first job, which takes a while on a busy machine. */
const PATIENT = { timeout: 10_000 };

const tab = (page: Page, name: string): Locator => page.getByRole('tab', { name, exact: true });
const button = (page: Page | Locator, name: string): Locator => page.getByRole('button', { name, exact: true });
const clock = async (page: Page): Promise<string> =>
  `${await page.getByLabel('Date', { exact: true }).inputValue()} ${await page.getByLabel('Time', { exact: true }).inputValue()}`;

/** What pressing makes the page download. */
async function downloaded(page: Page, press: () => Promise<void>): Promise<{ name: string; bytes: Buffer }> {
  const [download] = await Promise.all([page.waitForEvent('download'), press()]);
  const bytes = await readFile(await (download as Download).path());
  return { name: download.suggestedFilename(), bytes };
}

describe.skipIf(executable === null)('place, sun path and weather', () => {
  let desk: LoopbackDesk;
  let page: Page;
  beforeAll(async () => {
    desk = await openLoopbackDesk(executable as string, 'tannery-yard');
    page = desk.page;
    page.setDefaultTimeout(15_000);
  });
  afterAll(async () => {
    await desk.close();
  });

  test('the sun path shows the place and its clock, in text that can be read', async () => {
    await tab(page, 'Sun path').click();
    const sky = page.locator('.sun-path-sky');
    await sky.locator('text', { hasText: 'True altitude, no refraction' }).waitFor();
    const said = (await sky.locator('text').allTextContents()).join('\n');
    for (const word of ['Europe/London', '51.4500° N, 2.5900° W', 'N', 'E', '21 Jun', '12'])
      expect(said.split('\n').some((line) => line.includes(word))).toBe(true);
    const smallest = await sky.locator('svg').evaluate((element) => {
      const svg = element as unknown as SVGSVGElement;
      const scale = svg.getBoundingClientRect().width / svg.viewBox.baseVal.width;
      return scale * Math.min(...[...svg.querySelectorAll('text')].map((t) => Number(t.getAttribute('font-size'))));
    });
    expect(smallest).toBeGreaterThanOrEqual(13);
  });

  test('pointing at a place in the sky sets the clock to when the sun is there', async () => {
    const before = await clock(page);
    await button(page, 'Larger…').click();
    const large = page.locator('.sun-path.large');
    await large.getByText('Stereographic').click();
    const sky = large.locator('.sun-path-sky');
    const box = await sky.boundingBox();
    const south = sky.locator('text', { hasText: /^S$/ });
    const zenithX = ((await south.boundingBox())?.x ?? 0) + 5 - (box?.x ?? 0);
    const north = ((await sky.locator('text', { hasText: /^N$/ }).boundingBox())?.y ?? 0) - (box?.y ?? 0);
    const rim = ((await south.boundingBox())?.y ?? 0) - (box?.y ?? 0);
    // Due south, at about 30° on this disc: noon by the sun in the weeks before the equinox.
    await sky.click({ position: { x: zenithX, y: (north + rim) / 2 + ((rim - north) / 2) * 0.55 } });
    await expect.poll(() => clock(page), PATIENT).not.toBe(before);
    const [, time] = (await clock(page)).split(' ');
    // Noon at 2.59° W is at 12:10 by GMT or 13:10 by BST, give or take the equation of time (17 min) and a click's width.
    const minutes = Number(time?.slice(0, 2)) * 60 + Number(time?.slice(3));
    expect(Math.min(Math.abs(minutes - 730), Math.abs(minutes - 790))).toBeLessThan(25);
    const shown = await sky.getAttribute('aria-valuetext');
    expect(shown).toMatch(/azimuth 1[78]\d/);
    await sky.focus();
    const at = await clock(page);
    await page.keyboard.press('ArrowRight');
    await expect.poll(() => clock(page), PATIENT).not.toBe(at);
  });

  test('the drawing is saved as SVG and as PDF', async () => {
    const large = page.locator('.sun-path.large');
    const svg = await downloaded(page, async () => {
      await large.getByRole('button', { name: 'Save drawing' }).click();
      await page.getByRole('menuitem', { name: /SVG/ }).click();
    });
    expect(svg.name).toBe('tannery-yard sun path.svg');
    expect(svg.bytes.toString()).toMatch(/^<\?xml[\s\S]*width="297mm"[\s\S]*True altitude, no refraction/);
    const pdf = await downloaded(page, async () => {
      await large.getByRole('button', { name: 'Save drawing' }).click();
      await page.getByRole('menuitem', { name: /PDF/ }).click();
    });
    expect(pdf.bytes.subarray(0, 5).toString()).toBe('%PDF-');
    await button(page, 'Close').click();
  });

  test('a town is found by name, sets place and zone in one step, and undo brings the old place back', async () => {
    const bar = page.locator('.top-bar');
    await bar.getByRole('button', { name: /Europe\/London/ }).click();
    await page.getByRole('combobox', { name: 'Town or city' }).fill('tromso');
    await page.getByRole('option', { name: /Tromsø/ }).waitFor();
    expect(await page.locator('.place-search').textContent()).toContain('GeoNames');
    await page.keyboard.press('Enter');
    expect(await page.getByLabel('Time zone').inputValue()).toBe('Europe/Oslo');
    await button(page, 'Set place').click();
    await bar.getByText(/69\.65° N 18\.96° E · Europe\/Oslo/).waitFor();
    await page.locator('.sun-path-sky text', { hasText: 'Europe/Oslo' }).waitFor();
    await bar.getByRole('button', { name: 'Undo place' }).click();
    await bar.getByText(/51\.45° N 2\.59° W · Europe\/London/).waitFor();
  });

  test('coordinates that mean nothing are named, and a zone far from the sun is warned of', async () => {
    await page
      .locator('.top-bar')
      .getByRole('button', { name: /Europe\/London/ })
      .click();
    await page.getByLabel('Latitude').fill('95');
    expect(await page.getByLabel('Latitude').getAttribute('aria-invalid')).toBe('true');
    expect(await button(page, 'Set place').getAttribute('aria-disabled')).toBe('true');
    await page.getByLabel('Latitude').fill('51°27′N 2°35′W');
    expect(await page.getByLabel('Longitude').inputValue()).toMatch(/^−2\.58/);
    await page.getByLabel('Time zone').fill('Asia/Tokyo');
    await page.getByRole('alert').filter({ hasText: 'more than three hours' }).waitFor();
    await button(page, 'Use Europe/London').click();
    await expect.poll(() => page.getByRole('alert').filter({ hasText: 'three hours' }).count(), PATIENT).toBe(0);
    await button(page, 'Cancel').click();
  });

  test('a table of weather is read by its mapping; the scheme keeps name, hash and mapping, not the data', async () => {
    const rows = madeYear();
    const bytes = Buffer.from(asText(rows));
    await tab(page, 'Weather').click();
    const [chooser] = await Promise.all([page.waitForEvent('filechooser'), button(page, 'Choose a file…').click()]);
    await chooser.setFiles({ name: 'roof.csv', mimeType: 'text/csv', buffer: bytes });
    await page.getByText('roof.csv does not say what its columns are').waitFor();
    await button(page, 'Columns…').click();
    await page.getByLabel('Hours ahead of UTC').fill('1');
    await page.getByLabel('air pressure, unit').selectOption('Pa');
    await button(page, 'Read the file so').click();
    const months = page.getByRole('table', { name: /Sums of sunlight/ });
    await months.waitFor();
    const total = rows.reduce((sum, row) => sum + Number(row.global), 0) / 1000;
    const whole = await months
      .getByRole('row', { name: /global/ })
      .getByRole('cell')
      .last()
      .textContent();
    expect(Number(whole?.replace(/\D/g, ''))).toBe(Math.round(total));
    await page.keyboard.press('Control+s');
    await page.getByText('Saved: tannery-yard.scheme.json').waitFor();
    const saved = await readFile(desk.scheme, 'utf8');
    const { weather } = JSON.parse(saved) as { weather: { file: string; hash: string; mapping: { headLine: number } } };
    expect(weather).toMatchObject({
      file: 'roof.csv',
      hash: createHash('sha256').update(bytes).digest('hex'),
      mapping: { headLine: 2, delimiter: ';', time: { columns: ['when'], offset_h: 1 } },
    });
    expect(saved).not.toContain(rows[4000]?.when);
    // The rooms are checked over it as well.
    await page.locator('.room-head').first().click();
    const year = page.getByRole('region', { name: 'Over the weather year' });
    await year.getByText('By roof.csv').waitFor();
    expect(await year.textContent()).toMatch(/whole year, per m² of floor[\d,.]+ kWh\/m².*highest.*W\/m²/);
    await page.locator('.room-head').first().click();
  });

  test('a file that is no weather is refused with its cure, and what the scheme goes by stays', async () => {
    const [chooser] = await Promise.all([page.waitForEvent('filechooser'), button(page, 'Another file…').click()]);
    await chooser.setFiles({
      name: 'letter.txt',
      mimeType: 'text/plain',
      buffer: Buffer.from('Dear all,\nno weather here.\n'),
    });
    await page.getByText('letter.txt does not say what its columns are').waitFor();
    expect(await page.locator('.top-bar .unsaved').count()).toBe(0);
  });

  test('about names the licences and the cautions', async () => {
    await button(page, 'About').click();
    const about = await page.getByRole('dialog', { name: 'About Shadewright' }).textContent();
    for (const word of ['Version 0.0.0', 'Open Font License', 'GeoNames', 'CC BY 4.0', 'licensed professional'])
      expect(about).toContain(word);
    await button(page, 'Close').click();
  });

  test('nothing was complained of: no error, no warning, no refusal by the content policy', () => {
    expect(desk.complaints).toEqual([]);
  });
});
