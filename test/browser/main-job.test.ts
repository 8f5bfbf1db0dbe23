import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { Equator, Horizon, MakeTime, Observer, Body } from 'astronomy-engine';
import { afterAll, beforeAll, describe, expect, inject, test } from 'vitest';
import { openLoopbackDesk, type LoopbackDesk } from '../helpers/loopback-desk.ts';
import { runCommand } from '../helpers/run-command.ts';
import { tempFolder } from '../helpers/temp-folder.ts';

const executable = inject('chromium');
const DEMO = resolve(import.meta.dirname, '../../assets/demo/tannery-yard.scheme.json');
const PATIENT = { timeout: 15_000 };

/** The scheme’s place, 18 m up. */
const YARD = new Observer(51.45, -2.59, 18);

/** Altitude and azimuth of the sun without refraction by an independent library [°]. */
function sunBy(instant: string): { altitude: number; azimuth: number } {
  const time = MakeTime(new Date(instant));
  const at = Equator(Body.Sun, time, YARD, true, true);
  return Horizon(time, YARD, at.ra, at.dec);
}

describe.skipIf(executable === null)('the main job at the desk', () => {
  let desk: LoopbackDesk;
  beforeAll(async () => {
    desk = await openLoopbackDesk(executable as string, 'tannery-yard', false, 'example');
    desk.page.setDefaultTimeout(PATIENT.timeout);
  });
  afterAll(async () => {
    await desk?.close();
  });

  test('the example stands there, checked, and has no file that it could be saved over', async () => {
    const { page } = desk;
    await page.getByRole('heading', { name: 'Tannery Yard infill' }).waitFor();
    await page.getByText(/^\d+ over$/).waitFor();
    expect(await page.locator('.top-bar .unsaved').count(), 'looking at an example leaves nothing to save').toBe(0);
    const before = readFileSync(DEMO, 'utf8');
    const [download] = await Promise.all([page.waitForEvent('download'), page.keyboard.press('Control+s')]);
    expect(download.suggestedFilename()).toMatch(/\.scheme\.json$/);
    expect(readFileSync(DEMO, 'utf8')).toBe(before);
  });

  test('moving the moment moves the sun as an independent library has it, and the shadows with it', async () => {
    const { page } = desk;
    const massing = page.getByRole('region', { name: 'Massing' });
    const shadow = async (): Promise<number> => {
      const text = await massing
        .getByText(/shadow on the ground/)
        .locator('..')
        .textContent();
      return Number(/([\d,]+)\s*m²/.exec(text ?? '')?.[1]?.replace(',', ''));
    };
    const seen: { area: number; altitude: number }[] = [];
    for (const [date, time, instant] of [
      ['2025-06-21', '12:00', '2025-06-21T11:00:00Z'],
      ['2025-06-21', '18:30', '2025-06-21T17:30:00Z'],
      ['2025-12-21', '12:00', '2025-12-21T12:00:00Z'],
    ] as const) {
      await page.getByLabel('Date', { exact: true }).fill(date);
      await page.getByLabel('Time', { exact: true }).fill(time);
      await page.keyboard.press('Enter');
      const { altitude, azimuth } = sunBy(instant);
      await massing.getByText(`sun ${altitude.toFixed(1)}° up, bearing ${azimuth.toFixed(1)}°`).waitFor();
      // The areas come with the same answer as the sun; the legend is drawn in the same frame.
      seen.push({ area: await shadow(), altitude });
    }
    const byHeight = seen.toSorted((a, b) => b.altitude - a.altitude).map((s) => s.area);
    expect(byHeight, 'the lower the sun, the more ground lies in shadow').toEqual(byHeight.toSorted((a, b) => a - b));
    expect(new Set(byHeight).size).toBe(3);
  });

  test('the worst room opens on why it is over and how its number was reached, the same as the command gives', async () => {
    const { page } = desk;
    const ran = await runCommand(['check', DEMO, '--json'], tempFolder());
    expect(ran.status).toBe(1);
    const { findings } = JSON.parse(ran.out) as {
      findings: { room: string; roomName: string; value: number; unit: string; verdict: string; margin: number }[];
    };
    const worst = findings[0];
    if (worst === undefined) throw new Error('the command found nothing');
    const head = page.getByRole('button', { name: new RegExp(`${worst.room.replace('.', '\\.')} ${worst.roomName}`) });
    expect(await head.textContent()).toContain(worst.value.toFixed(1));
    expect(await head.textContent()).toContain(worst.verdict);
    await head.click();
    const detail = page.locator('.room-detail');
    await detail.locator('.reason').first().waitFor();
    const working = detail.locator('details.working');
    await working.locator('summary').first().click();
    const said = await working.textContent();
    for (const word of ['Method', 'Source', 'sun', 'W/m²']) expect(said).toContain(word);
    expect(said, 'the working ends on the number that is shown').toContain(worst.value.toFixed(1));
  });

  test('a broken file that is dropped is refused with every place and cure, and what was open stays', async () => {
    const { page } = desk;
    const broken = JSON.parse(readFileSync(DEMO, 'utf8'));
    broken.site.latitude = 91;
    broken.windows[0].width = -1;
    await page.evaluate((text) => {
      const data = new DataTransfer();
      data.items.add(new File([text], 'broken.scheme.json', { type: 'application/json' }));
      for (const kind of ['dragenter', 'dragover', 'drop'])
        document.body.dispatchEvent(new DragEvent(kind, { dataTransfer: data, bubbles: true, cancelable: true }));
    }, JSON.stringify(broken));
    const dialog = page.getByRole('dialog', { name: /broken\.scheme\.json cannot be opened/ });
    await dialog.waitFor();
    const said = (await dialog.textContent()) ?? '';
    expect(said).toContain('site.latitude');
    expect(said).toContain('windows[0].width');
    await dialog.getByRole('button', { name: 'Close' }).click();
    await page.getByRole('heading', { name: 'Tannery Yard infill' }).waitFor();
    expect(desk.complaints).toEqual([]);
  });
});
