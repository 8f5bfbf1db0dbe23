import { readFile } from 'node:fs/promises';
import type { Download, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, test } from 'vitest';
import { type LoopbackDesk, openLoopbackDesk } from '../helpers/loopback-desk.ts';

const executable = inject('chromium');
const PATIENT = { timeout: 15_000 };

type Saved = {
  windows: { id: string; width: number; height: number; sill: number }[];
  rooms: { id: string }[];
  blocks: { id: string }[];
};

describe.skipIf(executable === null)('schedules that are changed in place', () => {
  let desk: LoopbackDesk;
  let page: Page;
  beforeAll(async () => {
    desk = await openLoopbackDesk(executable as string, 'tannery-yard', false, 'example');
    page = desk.page;
    page.setDefaultTimeout(PATIENT.timeout);
    await page.getByText('6 over', { exact: true }).waitFor();
    await page.getByRole('tab', { name: /^Windows/ }).click();
  });
  afterAll(async () => {
    await desk?.close();
  });

  const grid = (): Locator => page.getByRole('grid');
  const row = (id: string): Locator => grid().getByRole('row', { name: new RegExp(`^${id} `) });
  /** The cell of a row under a head. */
  const cell = async (id: string, head: string): Promise<Locator> => {
    const heads = await grid().locator('thead th').allTextContents();
    return row(id)
      .locator('td')
      .nth(heads.findIndex((text) => text.replace(/[↑↓]/, '').trim().startsWith(head)));
  };
  const saved = async (): Promise<Saved> => {
    const [download] = await Promise.all([page.waitForEvent('download'), page.keyboard.press('Control+s')]);
    return JSON.parse(await readFile(await (download as Download).path(), 'utf8')) as Saved;
  };
  const paste = (text: string): Promise<void> =>
    grid().evaluate((table, typed) => {
      const data = new DataTransfer();
      data.setData('text/plain', typed);
      table.dispatchEvent(new ClipboardEvent('paste', { clipboardData: data, bubbles: true, cancelable: true }));
    }, text);

  test('typing replaces a cell, Enter takes it, the rooms are checked again, and undo names it', async () => {
    await (await cell('W4', 'width')).click();
    await page.keyboard.type('2,5');
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Undo width of W4' }).waitFor();
    expect(await (await cell('W4', 'width')).textContent()).toBe('2.50');
    await page.getByText('5 over', { exact: true }).waitFor();
    await page.keyboard.press('Control+z');
    await page.getByText('6 over', { exact: true }).waitFor();
    expect(await (await cell('W4', 'width')).textContent()).toBe('4.90');
  });

  test('arrows go from cell to cell, F2 opens one as it is, Escape gives up', async () => {
    await (await cell('W4', 'width')).click();
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('F2');
    const editor = page.getByLabel('height of W4', { exact: true });
    expect(await editor.inputValue()).toBe('2.4');
    await page.keyboard.type('9');
    await page.keyboard.press('Escape');
    expect(await (await cell('W4', 'height')).textContent()).toBe('2.40');
  });

  test('a cell that is opened in the same frame as the arrow that went to it stays open', async () => {
    await (await cell('W4', 'width')).click();
    const label = await page.evaluate(async () => {
      const press = async (key: string): Promise<void> => {
        document.activeElement?.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }));
        // The next key comes as a task of its own, before anything is painted.
        await new Promise((next) => setTimeout(next, 0));
      };
      await press('ArrowRight');
      await press('F2');
      for (let i = 0; i < 3; i++) await new Promise((next) => requestAnimationFrame(next));
      return document.activeElement?.getAttribute('aria-label');
    });
    expect(label).toBe('height of W4');
    await page.keyboard.press('Escape');
    await page.keyboard.press('PageDown');
    await page.keyboard.press('End');
    await page.keyboard.press('Home');
    expect(await grid().locator('td:focus').getAttribute('data-column')).toBe('0');
  });

  test('a value that the scheme would contradict is refused at its place, and nothing changes', async () => {
    await (await cell('W4', 'width')).click();
    await page.keyboard.type('50');
    await page.keyboard.press('Enter');
    const notice = page.getByRole('alert').filter({ hasText: 'nothing is changed' });
    await notice.waitFor();
    expect(await notice.textContent()).toMatch(/windows\[3\]/);
    // It is told once, where it was typed.
    expect(await page.locator('.message-line.failure').count()).toBe(0);
    expect(await (await cell('W4', 'width')).textContent()).toBe('4.90');
    await notice.getByRole('button', { name: 'Dismiss' }).click();
  });

  test('a width in per cent is a share of the wall, in the middle of it', async () => {
    await (await cell('W4', 'width')).click();
    await page.keyboard.type('40 %');
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Undo width of W4' }).waitFor();
    const [wide, high, from] = await Promise.all(
      ['width', 'height', 'from'].map(async (head) => Number(await (await cell('W4', head)).textContent())),
    );
    const file = await saved();
    const window = file.windows.find((one) => one.id === 'W4');
    // The wall of room 1.3 is 5.9 m long and 2.7 m high in the file of the demo.
    const room = file.rooms.find((one) => one.id === '1.3') as unknown as { box: { depth: number }; height: number };
    const area = room.box.depth * room.height;
    expect(((window?.width ?? 0) * (window?.height ?? 0)) / area).toBeCloseTo(0.4, 4);
    expect(wide).toBeCloseTo(window?.width ?? 0, 2);
    expect((from ?? 0) + (wide ?? 0) / 2).toBeCloseTo(room.box.depth / 2, 1);
    expect(high).toBe(2.4);
    await page.keyboard.press('Control+z');
  });

  test('several rows change together, in one step', async () => {
    await row('W14').click();
    await row('W16').click({ modifiers: ['Shift'] });
    await (await cell('W16', 'sill')).focus();
    await page.keyboard.type('1.1');
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Undo sill of 3 rows' }).waitFor();
    for (const id of ['W14', 'W15', 'W16']) expect(await (await cell(id, 'sill')).textContent()).toBe('1.10');
    await page.keyboard.press('Control+z');
  });

  test('cells are pasted from a spreadsheet as one step; with one bad cell none is taken', async () => {
    await (await cell('W14', 'width')).click();
    await paste('1.5\t1.3\n1.6\tlow\n');
    const notice = page.getByRole('alert').filter({ hasText: 'nothing is changed' });
    expect(await notice.textContent()).toMatch(/W15, height.*“low” is no number/);
    expect(await (await cell('W14', 'width')).textContent()).toBe('1.40');
    await paste('1.5\t1.3\n1.6\t1.2\n1.4\t1.1\n');
    await page.getByRole('button', { name: 'Undo 6 pasted cells' }).waitFor();
    const { windows } = await saved();
    expect(windows.filter((w) => ['W14', 'W15', 'W16'].includes(w.id)).map((w) => [w.width, w.height])).toEqual([
      [1.5, 1.3],
      [1.6, 1.2],
      [1.4, 1.1],
    ]);
    await page.keyboard.press('Control+z');
    // Whole rows go over: what follows from the rest is passed over, and an id that is taken is refused.
    await (await cell('W14', 'id')).click();
    await paste('W14\t2.4\t2\tN\t1.9\t1.3\n');
    await page.getByRole('button', { name: 'Undo 5 pasted cells' }).waitFor();
    expect(await (await cell('W14', 'width')).textContent()).toBe('1.90');
    await page.keyboard.press('Control+z');
  });

  test('rows are added, copied and taken out; what hangs on one goes with it and comes back by undo', async () => {
    const before = (await saved()).windows.length;
    await row('W6').click();
    await page.getByRole('button', { name: 'Duplicate' }).click();
    await expect.poll(async () => (await saved()).windows.length, PATIENT).toBe(before + 1);
    await page.getByRole('button', { name: 'Take out' }).click();
    await page.getByRole('tab', { name: /^Rooms/ }).click();
    await row('3.3').click();
    await page.keyboard.press('Delete');
    await page.getByRole('button', { name: 'Undo take out room' }).waitFor();
    const { windows, rooms } = await saved();
    expect(rooms.some((r) => r.id === '3.3')).toBe(false);
    expect(windows.length).toBe(before - 1);
    await page.keyboard.press('Control+z');
    expect((await saved()).windows.length).toBe(before);
    await page.getByRole('tab', { name: /^Blocks/ }).click();
    await page.getByRole('button', { name: 'Add', exact: true }).click();
    await page.getByRole('button', { name: 'Undo add block' }).waitFor();
    await page.keyboard.press('Control+z');
    expect(desk.complaints).toEqual([]);
  });

  test('glass is taken from the typical kinds that ship with the program, with where its values come from', async () => {
    await page.getByRole('tab', { name: /^Glass/ }).click();
    await page.getByLabel('Add a typical glass').selectOption({ label: 'double, clear, air' });
    await row('double-clear').waitFor();
    const { glass } = (await saved()) as unknown as { glass: { id: string; g: number; source: string }[] };
    expect(glass.at(-1)).toMatchObject({ id: 'double-clear', g: 0.76, source: expect.stringContaining('EN 410') });
    await page.keyboard.press('Control+z');
  });

  test('a scheme is begun from nothing: its place, a block, a room, a window, and the room is checked', async () => {
    await page.getByRole('button', { name: 'Scheme', exact: true }).click();
    await page.getByRole('menuitem', { name: 'New scheme' }).click();
    const unsaved = page.getByRole('button', { name: 'Discard the changes' });
    if (await unsaved.isVisible().catch(() => false)) await unsaved.click();
    await page.getByRole('combobox', { name: 'Town or city' }).fill('lisbon');
    await page
      .getByRole('option', { name: /Lisbon/ })
      .first()
      .waitFor();
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Set place', exact: true }).click();
    await page
      .locator('.top-bar')
      .getByText(/38\.7\d° N 9\.1\d° W · Europe\/Lisbon/)
      .waitFor();
    for (const kind of ['Blocks', 'Rooms', 'Windows']) {
      await page.getByRole('tab', { name: new RegExp(`^${kind}`) }).click();
      await page.getByRole('button', { name: 'Add', exact: true }).click();
      await grid().locator('tbody tr.chosen').waitFor();
    }
    await (await cell('W1', 'width')).click();
    await page.keyboard.type('8');
    await page.keyboard.press('Enter');
    await page.locator('.room-head', { hasText: '1.1 New room' }).waitFor();
    await page.getByRole('button', { name: 'Scheme', exact: true }).click();
    await page.getByRole('menuitem', { name: 'Title, address and author' }).click();
    await page.getByLabel('Title', { exact: true }).fill('Casa Nova');
    await page.keyboard.press('Enter');
    await page.getByRole('heading', { name: 'Casa Nova' }).waitFor();
    await page.getByRole('button', { name: 'Scheme', exact: true }).click();
    await page.getByRole('menuitem', { name: 'Back to the start' }).click();
    await page.getByRole('button', { name: 'Discard the changes' }).click();
    await page.getByRole('heading', { name: 'Nothing is open' }).waitFor();
    expect(desk.complaints).toEqual([]);
  });
});
