import { readFile } from 'node:fs/promises';
import type { Download, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, test } from 'vitest';
import { asText, madeYear } from '../core/sky/weather/made-year.ts';
import { type LoopbackDesk, openLoopbackDesk } from '../helpers/loopback-desk.ts';

const executable = inject('chromium');

/** Drops a file on the window, as from a folder. */
const drop = (page: Page, name: string, content: string): Promise<void> =>
  page.evaluate(
    ({ name: called, content: text }) => {
      const data = new DataTransfer();
      data.items.add(new File([text], called));
      document.body.dispatchEvent(new DragEvent('drop', { dataTransfer: data, bubbles: true, cancelable: true }));
    },
    { name, content },
  );

/** How far the widest thing reaches past the window's right edge [px]. */
const past = (page: Page): Promise<number> =>
  page.evaluate(() => {
    const parts = document.querySelectorAll('.top-bar, .top-bar > *, main, main > *, .massing-tools, .key, .clock > *');
    return Math.max(...[...parts].map((part) => part.getBoundingClientRect().right)) - window.innerWidth;
  });

describe.skipIf(executable === null)('a desk with little room or much in it', () => {
  let desk: LoopbackDesk;
  let page: Page;
  beforeAll(async () => {
    desk = await openLoopbackDesk(executable as string, 'tannery-yard', false, 'example');
    page = desk.page;
    page.setDefaultTimeout(15_000);
    await page.getByText('6 over', { exact: true }).waitFor();
  });
  afterAll(async () => {
    await desk?.close();
  });

  test('stays within its window however long the title and the names are', async () => {
    const scheme = JSON.parse(await readFile('assets/demo/tannery-yard.scheme.json', 'utf8'));
    scheme.title = 'Umbau der Gerberei an der Uferpromenade '.repeat(8).slice(0, 300);
    scheme.rooms[0].name = 'Raumbezeichnungohnejedenzwischenraum'.repeat(5);
    scheme.blocks[0].name = 'Ein langer Name '.repeat(12);
    await drop(page, 'long.scheme.json', JSON.stringify(scheme));
    await page.locator('h1', { hasText: 'Umbau' }).waitFor();
    expect(await past(page)).toBeLessThanOrEqual(0);
    await page.getByRole('tab', { name: /^Blocks/ }).click();
    const heads = page.getByRole('grid').locator('thead th');
    const last = await heads.last().boundingBox();
    expect((last?.x ?? 0) + (last?.width ?? 0)).toBeLessThanOrEqual(1280 - 384);
  });

  test.each([
    [640, 400],
    [960, 540],
  ])(
    'at %i × %i, a window enlarged to twice its size, everything is in reach and the massing can be seen',
    async (width, height) => {
      await page.setViewportSize({ width, height });
      expect(await past(page)).toBeLessThanOrEqual(0);
      const massing = await page.locator('.massing').boundingBox();
      expect(massing?.height).toBeGreaterThanOrEqual(220);
      const [tools, key] = [
        await page.locator('.massing-tools').boundingBox(),
        await page.locator('.massing .key').first().boundingBox(),
      ];
      const apart = (tools?.y ?? 0) + (tools?.height ?? 0) <= (key?.y ?? 0);
      expect(apart || (tools?.x ?? 0) + (tools?.width ?? 0) <= (key?.x ?? 0)).toBe(true);
      await page.locator('.room-head').last().scrollIntoViewIfNeeded();
      expect(await page.locator('.room-head').last().isVisible()).toBe(true);
      await page.setViewportSize({ width: 1280, height: 800 });
    },
  );

  test('a table of hours that is dropped is the weather of the open scheme; a picture is told to be no scheme', async () => {
    await drop(page, 'year.csv', asText(madeYear()));
    await page.getByRole('tab', { name: 'Weather', exact: true, selected: true }).waitFor();
    await page.locator('.schedules').getByText('year.csv').first().waitFor();
    await drop(page, 'picture.png', '\u0089PNG\r\n\u001a\n');
    const dialog = page.getByRole('dialog', { name: /picture\.png cannot be opened/ });
    expect(await dialog.textContent()).toMatch(/another kind of file/);
    expect(await dialog.textContent()).not.toMatch(/comma/);
    await page.keyboard.press('Escape');
  });

  test('lines pasted past the last row are rows of their own, in one step', async () => {
    await page.getByRole('tab', { name: /^Blocks/ }).click();
    const rows = page.getByRole('grid').locator('tbody tr');
    const last = rows.last();
    await last.scrollIntoViewIfNeeded();
    await last.locator('td').first().click();
    const lines = Array.from({ length: 30 }, (_, i) => `X${i}\tHaus ${i}\tcontext\t0\t${5 + i},5\t8\t9`).join('\r\n');
    await page.getByRole('grid').evaluate((table, typed) => {
      const data = new DataTransfer();
      data.setData('text/plain', typed);
      table.dispatchEvent(new ClipboardEvent('paste', { clipboardData: data, bubbles: true, cancelable: true }));
    }, lines);
    await page.getByRole('button', { name: 'Undo paste of 29 new rows' }).waitFor();
    const [download] = await Promise.all([page.waitForEvent('download'), page.keyboard.press('Control+s')]);
    const path = await (download as Download).path();
    const { blocks } = JSON.parse(await readFile(path, 'utf8')) as { blocks: { id: string; height: number }[] };
    const pasted = blocks.filter(({ id }) => id.startsWith('X'));
    expect(pasted.map(({ id, height }) => [id, height])).toEqual(
      Array.from({ length: 30 }, (_, i) => [`X${i}`, 5.5 + i]),
    );
    await page.keyboard.press('Control+z');
    await page
      .getByRole('tab', { name: 'Blocks 16' })
      .or(page.getByRole('tab', { name: 'Blocks16' }))
      .waitFor();
    expect(desk.complaints).toEqual([]);
  });
});
