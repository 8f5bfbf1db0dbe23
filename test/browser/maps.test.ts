import type { Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, test } from 'vitest';
import { type LoopbackDesk, openLoopbackDesk } from '../helpers/loopback-desk.ts';

const executable = inject('chromium');

/** Workers start with their first job, which takes a while on a busy machine. */
const PATIENT = { timeout: 20_000 };

const button = (page: Page, name: string | RegExp): Locator => page.getByRole('button', { name });
const clock = async (page: Page): Promise<string> =>
  `${await page.getByLabel('Date', { exact: true }).inputValue()} ${await page.getByLabel('Time', { exact: true }).inputValue()}`;

/** Hours of sun above the horizon on level open ground, by the sunrise equation: cos H = −tan φ · tan δ. */
function openHours(latitude_deg: number, declination_deg: number): number {
  const tan = (deg: number): number => Math.tan((deg * Math.PI) / 180);
  return (24 / Math.PI) * Math.acos(-tan(latitude_deg) * tan(declination_deg));
}

describe.skipIf(executable === null)('maps, receptors and their year', () => {
  let desk: LoopbackDesk;
  let page: Page;
  const key = (): Locator => page.getByRole('region', { name: 'Sun map' }).filter({ has: page.locator('.ramp') });
  const settled = async (): Promise<void> => {
    await expect.poll(() => page.locator('.map-key .progress').count(), PATIENT).toBe(0);
    await page.locator('.map-spread').waitFor();
  };
  /** Where the receptor P1 is drawn, and the ground under it. */
  const bench = async (): Promise<{ x: number; y: number; ground: number }> => {
    const box = await page.locator('.massing').boundingBox();
    const mark = page.locator('.receptor-marks circle').first();
    const [x, y] = [Number(await mark.getAttribute('cx')), Number(await mark.getAttribute('cy'))];
    const stem = (await page.locator('.receptor-marks .stem').first().getAttribute('d')) ?? '';
    const ground = Number(/^M[\d.]+ ([\d.]+)/.exec(stem)?.[1]);
    return { x: x + (box?.x ?? 0), y: y + (box?.y ?? 0), ground: ground + (box?.y ?? 0) };
  };

  beforeAll(async () => {
    desk = await openLoopbackDesk(executable as string, 'tannery-yard');
    page = desk.page;
    page.setDefaultTimeout(20_000);
    await page.locator('.receptor-marks circle').first().waitFor();
  });
  afterAll(async () => {
    await desk.close();
  });

  test('a map of sun hours comes with its scale, its unit and its numbers', async () => {
    await button(page, 'Sun map').click();
    await page.getByText('sun hours', { exact: true }).click();
    await settled();
    await key().getByText('Hours of direct sun').waitFor();
    const said = await page.locator('.map-ramp svg').getAttribute('aria-label');
    expect(said).toMatch(/^0, \d+, .* h$/);
    // The roof of the highest block of the proposal is open all day, and nothing has more sun than that.
    const most = Number(/most ([\d.]+) h/.exec((await page.locator('.map-spread').textContent()) ?? '')?.[1]);
    expect(Math.abs(most - openHours(51.45, 23.44))).toBeLessThan(0.1);
    await page.getByText('21 June 2025', { exact: true }).waitFor();
  });

  test('the number under the pointer is that of the cell, and the keyboard reads the same', async () => {
    const { x, y } = await bench();
    await page.mouse.move(x - 100, y - 65);
    const reading = page.locator('.tag.reading');
    await reading.waitFor();
    expect(await reading.textContent()).toMatch(/^\d+\.\d h .*roof$/);
    await page.mouse.move(x - 100, 700);
    await expect.poll(() => reading.count(), PATIENT).toBe(0);
    await page.getByRole('application').focus();
    await page.keyboard.press('r');
    const said = page.getByRole('status').filter({ hasText: /, / });
    const first = await said.first().textContent();
    expect(first).toMatch(/^(\d+\.\d h|inside a block), Ground$/);
    for (let i = 0; i < 9; i++) await page.keyboard.press('ArrowRight');
    await expect.poll(() => said.first().textContent(), PATIENT).not.toBe(first);
    expect(await reading.textContent()).toContain((await said.first().textContent())?.split(',')[0]);
    await page.keyboard.press(']');
    await expect.poll(() => said.first().textContent(), PATIENT).toMatch(/wall facing/);
    await page.keyboard.press('Escape');
    await expect.poll(() => reading.count(), PATIENT).toBe(0);
  });

  test('the difference has a scale of its own, with nothing in its middle', async () => {
    await page.getByText('Change', { exact: true }).click();
    await key().getByText('Direct sun, after less before').waitFor();
    const said = (await page.locator('.map-ramp svg').getAttribute('aria-label')) ?? '';
    const numbers =
      said
        .replaceAll('−', '-')
        .match(/[+-]?[\d.]+/g)
        ?.map(Number) ?? [];
    expect(numbers[(numbers.length - 1) / 2]).toBe(0);
    expect(numbers[0]).toBe(-(numbers.at(-1) as number));
    await page.getByText('After', { exact: true }).click();
  });

  test('a long map comes piece by piece, can be stopped, and begun again', async () => {
    await page.getByLabel('For', { exact: true }).selectOption('year');
    await page.getByLabel('Walls and roofs').selectOption('all');
    await page.getByLabel('Ground').selectOption('around');
    await page.getByLabel('Cells of').selectOption('0.25');
    // The numbers of the pieces that are there stand in the key while the work goes on.
    await page.getByText('All of 2025', { exact: true }).waitFor();
    await page.locator('.map-spread').waitFor();
    expect(await page.locator('.map-key progress').count()).toBe(1);
    await page.locator('.map-key').getByRole('button', { name: 'Stop' }).click();
    await key().getByText('Stopped before it was done.').waitFor();
    // An edit says more than that: the pieces that are there are of another scheme.
    await page
      .locator('.top-bar')
      .getByRole('button', { name: /Europe\/London/ })
      .click();
    await page.getByLabel('Latitude').fill('50');
    await button(page, 'Set place').click();
    await key().getByText('The scheme has changed since.').waitFor();
    await page.keyboard.press('Control+z');
    await key().getByText('Stopped before it was done.').waitFor();
    await page.getByLabel('For', { exact: true }).selectOption('day');
    await page.getByLabel('Cells of').selectOption('2');
    await page.getByText('cells of about 2 m').waitFor();
    await settled();
  });

  test('a map that was asked for before is there at once', async () => {
    await page.getByLabel('Cells of').selectOption('5');
    await page.getByText('cells of about 5 m').waitFor();
    await settled();
    await page.getByLabel('Cells of').selectOption('2');
    await page.getByText('cells of about 2 m').waitFor();
    expect(await page.locator('.map-key .progress').count()).toBe(0);
  });

  test('a map that took long is marked out of date by an edit, and made anew when it is asked for', async () => {
    await page.getByText('solar energy', { exact: true }).click();
    await page.getByLabel('Cells of').selectOption('0.5');
    await page.getByText('cells of about 0.5 m').waitFor();
    await settled();
    const place = page.locator('.top-bar').getByRole('button', { name: /Europe\/London/ });
    await place.click();
    await page.getByLabel('Latitude').fill('50');
    await button(page, 'Set place').click();
    await key().getByText('The scheme has changed since.').waitFor();
    await page.keyboard.press('Control+z');
    await expect.poll(() => key().getByText('The scheme has changed since.').count(), PATIENT).toBe(0);
    await page.keyboard.press('Control+Shift+z');
    await key().getByRole('button', { name: 'Work it out again' }).click();
    await page.locator('.map-key progress').waitFor();
    await page.getByText('sun hours', { exact: true }).click();
    await page.getByLabel('Cells of').selectOption('2');
    await page.keyboard.press('Control+z');
    await page.getByText('cells of about 2 m').waitFor();
    await settled();
  });

  test('an edit works a quick map out again: at 60° north the June day is longer', async () => {
    const most = async (): Promise<number> =>
      Number(/most ([\d.]+) h/.exec((await page.locator('.map-spread').textContent()) ?? '')?.[1]);
    await page
      .locator('.top-bar')
      .getByRole('button', { name: /Europe\/London/ })
      .click();
    await page.getByLabel('Latitude').fill('60');
    await button(page, 'Set place').click();
    const away = async (): Promise<number> => Math.abs((await most()) - openHours(60, 23.44));
    await expect.poll(away, PATIENT).toBeLessThan(0.15);
    await page.keyboard.press('Control+z');
    await expect.poll(async () => Math.abs((await most()) - openHours(51.45, 23.44)), PATIENT).toBeLessThan(0.15);
    await page.getByText('nothing', { exact: true }).click();
    await button(page, 'Sun map').click();
    expect(await page.locator('.map-key').count()).toBe(0);
  });

  test('the courtyard is picked on the ground; the strip shows its year and is still the clock', async () => {
    const { x, ground } = await bench();
    await page.mouse.click(x - 16, ground + 4);
    const strip = page.getByRole('heading', { name: /through the year/ });
    await expect.poll(() => strip.textContent(), PATIENT).toMatch(/^A1 Courtyard .* share of the area in direct sun$/);
    expect(await page.locator('.tag:not(.reading)').textContent()).toMatch(/Courtyard.*in direct sun/);
    const before = await clock(page);
    const slider = page.getByRole('slider', { name: /Dates across/ });
    const box = await slider.boundingBox();
    await slider.click({ position: { x: (box?.width ?? 0) * 0.25, y: (box?.height ?? 0) * 0.5 } });
    await expect.poll(() => clock(page), PATIENT).not.toBe(before);
    expect(await clock(page)).toMatch(/^2025-03-/);
    await page.getByText('Before', { exact: true }).click();
    await expect.poll(() => strip.textContent(), PATIENT).toMatch(/before the proposal$/);
    await page.getByText('After', { exact: true }).click();
  });

  test('a block is picked first, then its faces; keys go through them', async () => {
    const { x, y } = await bench();
    const roof = [x - 100, y - 65] as const;
    await page.mouse.click(...roof);
    await page.locator('.tag', { hasText: 'proposed' }).waitFor();
    await page.mouse.click(...roof);
    const strip = page.getByRole('heading', { name: /through the year/ });
    await expect.poll(() => strip.textContent(), PATIENT).toMatch(/share of the roof in direct sun$/);
    await page.getByRole('application').focus();
    await page.keyboard.press(']');
    await expect.poll(() => strip.textContent(), PATIENT).toMatch(/wall facing .* share of the wall/);
    await page.keyboard.press('Escape');
    await page.locator('.tag', { hasText: 'proposed' }).waitFor();
  });

  test('the light that a neighbour keeps is after over before', async () => {
    await page.getByRole('tab', { name: 'Light' }).click();
    await button(page, /^V1/).click();
    const row = page.getByRole('row', { name: /vertical sky component/ });
    await row.waitFor();
    const numbers = (await row.getByRole('cell').allTextContents()).map((t) => Number.parseFloat(t));
    const [before, after, kept] = numbers as [number, number, number];
    // Nothing upright sees more of an overcast sky than 39.6 %: CIE overcast sky, integrated by hand.
    expect(before).toBeLessThanOrEqual(39.6);
    expect(after).toBeLessThanOrEqual(before);
    expect(Math.abs(kept - (100 * after) / before)).toBeLessThan(1);
    await page.getByRole('row', { name: /winter half/ }).waitFor();
    // Trees in front of the pane take of its sky what they hide, and what is said of them follows the figures.
    await page.getByText(/^Trees are left out, before and after/u).waitFor();
    await page.getByText('Trees counted', { exact: true }).click();
    await page.getByText(/^Trees are counted, before and after/u).waitFor();
    const treed = (await row.getByRole('cell').allTextContents()).map((t) => Number.parseFloat(t));
    expect(treed[0]).toBeLessThan(before);
    await page.getByText('Trees left out', { exact: true }).click();
    await page.getByText(/^Trees are left out, before and after/u).waitFor();
    // A choice that is taken back before its figures come leaves nothing waiting, and made again is answered.
    await page.evaluate(() => {
      for (const choice of ['Trees counted', 'Trees left out'])
        [...document.querySelectorAll('label')].find((label) => label.textContent === choice)?.click();
    });
    await page.waitForTimeout(1000);
    expect(await page.getByText('Working out the light…').count()).toBe(0);
    await page.getByText('Trees counted', { exact: true }).click();
    await page.getByText(/^Trees are counted, before and after/u).waitFor();
    await page.getByText('Trees left out', { exact: true }).click();
    await page.getByText(/^Trees are left out, before and after/u).waitFor();
    await expect.poll(() => row.getByRole('cell').first().textContent(), PATIENT).toContain(before.toFixed(1));
    await expect.poll(() => page.locator('.tag:not(.reading)').textContent(), PATIENT).toMatch(/No\. 14, ground floor/);
  });

  test('the smooth picture at rest gives way to a new size and a new theme, and takes them on', async () => {
    const still = page.locator('canvas.at-rest');
    // Where the graphics card smooths edges itself there is no such picture.
    const isUsed = (): Promise<boolean> => still.evaluate((canvas) => !(canvas as HTMLCanvasElement).hidden);
    await page.waitForTimeout(1500);
    if (!(await isUsed())) return;
    const corner = (): Promise<readonly number[]> =>
      still.evaluate((element) => {
        const from = element as HTMLCanvasElement;
        const one = Object.assign(document.createElement('canvas'), { width: 1, height: 1 });
        const context = one.getContext('2d', { willReadFrequently: true });
        context?.drawImage(from, 4, from.height >> 1, 1, 1, 0, 0, 1, 1);
        return [...(context?.getImageData(0, 0, 1, 1).data ?? [])].slice(0, 3);
      });
    const width = (): Promise<number> => still.evaluate((canvas) => (canvas as HTMLCanvasElement).width);
    const shown = await width();
    await page.setViewportSize({ width: 1100, height: 720 });
    await expect.poll(width, PATIENT).toBe(shown - 180);
    const ground = (): Promise<string> =>
      page.evaluate(() => getComputedStyle(document.documentElement).getPropertyValue('--ground').trim());
    const hex = async (): Promise<string> =>
      `#${(await corner()).map((v) => v.toString(16).padStart(2, '0')).join('')}`;
    await expect.poll(hex, PATIENT).toBe(await ground());
    await button(page, /dark theme/).click();
    expect(await ground()).toBe('#292c30');
    await expect.poll(hex, PATIENT).toBe('#292c30');
    expect(await isUsed()).toBe(true);
    // The drawing under it is still the one that is picked from.
    const { x, y } = await bench();
    await page.mouse.click(x, y);
    await page.locator('.tag', { hasText: 'bench by the lime' }).waitFor();
  });

  test('nothing was complained of: no error, no warning, no refusal by the content policy', () => {
    expect(desk.complaints).toEqual([]);
  });
});
