import { beforeAll, describe, expect, test } from 'vitest';
import { writePdf } from '../../../app/pdf/write-pdf.ts';
import { SHORT_CAUTION } from '../../../core/limits/cautions.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { ACCENT, SHADOW } from '../../../core/sheet/ink.ts';
import { shadowSheet } from '../../../core/sheet/shadow-sheet.ts';
import { shadowMoments } from '../../../core/study/shadow-moments.ts';
import { demoScheme, modelOf } from '../../helpers/demo-scheme.ts';
import { type ReadPage, type ReadPdf, readPdf } from '../../helpers/read-pdf.ts';

const FACTS = { drawn: '2026-03-02', engine: '0.1.0', hash: '0123456789abcdef', number: 'SH-01' } as const;
const CREATED = new Date('2026-03-02T00:00:00Z');

/** ISO 216:2007, main series, trimmed sizes [mm]. */
const ISO_216 = { A4: [210, 297], A3: [297, 420], A2: [420, 594], A1: [594, 841] } as const;

/** A block of 10 m by 6 m and a pole of 0.1 m by 0.1 m, 8 m high, on a level site. */
const ruled = (): Scheme =>
  Scheme.parse({
    format: 'shadewright',
    version: 1,
    title: 'Łódź, São Paulo, 東京',
    site: { latitude: 51.5, longitude: 0, zone: 'Europe/London', north: 0 },
    blocks: [
      { id: 'B', name: 'Ruled', standing: 'proposed', box: { at: [-5, -3], width: 10, depth: 6 }, height: 0.02 },
      { id: 'P', name: 'Pole', standing: 'context', box: { at: [-0.05, 19.95], width: 0.1, depth: 0.1 }, height: 8 },
    ],
  });

async function drawn(
  scheme: Scheme,
  more: Partial<Parameters<typeof shadowSheet>[0]>,
  dates: string[],
  times: string[],
): Promise<ReadPdf> {
  const model = modelOf(scheme);
  const moments = shadowMoments(scheme, model, dates, times);
  const sheet = shadowSheet({ scheme, model, moments, scale: null, paper: 'A3', landscape: true, ...FACTS, ...more });
  if (!sheet.ok) throw new Error(JSON.stringify(sheet.faults));
  return readPdf(await writePdf(sheet.value, { created: CREATED }));
}

const allText = (page: ReadPage): string => page.texts.map((t) => t.text).join(' ');

describe('true to scale', () => {
  test.each([200, 500, 1000])('a side of 10 m is 10 000/%i mm long, to 0.05 mm', async (scale) => {
    const pdf = await drawn(ruled(), { scale }, ['2025-06-21'], ['12:00']);
    const block = pdf.pages[0]?.paths.find(
      (p) => p.painted === 'stroke' && p.stroke === ACCENT && p.runs[0]?.length === 4,
    );
    const xs = block?.runs[0]?.map((c) => c[0]) ?? [];
    const ys = block?.runs[0]?.map((c) => c[1]) ?? [];
    expect(Math.max(...xs) - Math.min(...xs)).toBeCloseTo(10_000 / scale, 1);
    expect(Math.abs(Math.max(...xs) - Math.min(...xs) - 10_000 / scale)).toBeLessThan(0.05);
    expect(Math.abs(Math.max(...ys) - Math.min(...ys) - 6_000 / scale)).toBeLessThan(0.05);
  });

  test('the tip of a pole’s shadow lies height/tan(altitude) away, away from the sun, to 0.1 mm', async () => {
    const scheme = ruled();
    const [moment] = shadowMoments(scheme, modelOf(scheme), ['2025-03-21'], ['15:00']);
    const pdf = await drawn(scheme, { scale: 200 }, ['2025-03-21'], ['15:00']);
    const page = pdf.pages[0] as ReadPage;
    const shadow = page.paths.filter((p) => p.painted === 'fill' && p.fill === SHADOW).flatMap((p) => p.runs);
    const block = page.paths.find((p) => p.painted === 'stroke' && p.stroke === ACCENT && p.runs[0]?.length === 4);
    const middle = (i: 0 | 1): number => (block?.runs[0] ?? []).reduce((sum, c) => sum + c[i] / 4, 0);
    // Closed form: L = h / tan(altitude), towards azimuth + 180°; the pole stands 20 m north of the block's middle.
    const { altitude_deg, azimuth_deg } = moment as { altitude_deg: number; azimuth_deg: number };
    const rad = Math.PI / 180;
    const reach = 8 / Math.tan(altitude_deg * rad);
    const tip = [-reach * Math.sin(azimuth_deg * rad), 20 - reach * Math.cos(azimuth_deg * rad)] as const;
    const on = [middle(0) + tip[0] * 5, middle(1) - tip[1] * 5] as const;
    // The shadow of the pole's four top corners is a square of 0.5 mm round the tip: its middle must be the tip.
    const near = shadow.flat().filter((c) => Math.hypot(c[0] - on[0], c[1] - on[1]) < 0.6);
    expect(near.length).toBeGreaterThanOrEqual(3);
    const xs = near.map((c) => c[0]);
    const ys = near.map((c) => c[1]);
    expect(Math.abs((Math.min(...xs) + Math.max(...xs)) / 2 - on[0])).toBeLessThan(0.1);
    expect(Math.abs((Math.min(...ys) + Math.max(...ys)) / 2 - on[1])).toBeLessThan(0.1);
  });

  test.each(['A4', 'A3', 'A2', 'A1'] as const)(
    '%s pages have the size of ISO 216, upright and lying',
    async (paper) => {
      for (const landscape of [true, false]) {
        const pdf = await drawn(ruled(), { paper, landscape }, ['2025-06-21'], ['12:00']);
        const [short, long] = ISO_216[paper];
        const [width, height] = landscape ? [long, short] : [short, long];
        expect(Math.abs((pdf.pages[0] as ReadPage).width - width)).toBeLessThan(0.01);
        expect(Math.abs((pdf.pages[0] as ReadPage).height - height)).toBeLessThan(0.01);
      }
    },
  );

  test('the check bar is 100 mm long', async () => {
    const pdf = await drawn(ruled(), {}, ['2025-06-21'], ['12:00']);
    const bars = (pdf.pages[0] as ReadPage).paths.flatMap((p) => (p.painted === 'stroke' ? p.runs : []));
    const lengths = bars
      .filter((r) => r.length === 4)
      .map((r) => Math.max(...r.map((c) => c[0])) - Math.min(...r.map((c) => c[0])));
    expect(lengths.some((l) => Math.abs(l - 100) < 0.01)).toBe(true);
  });
});

describe('what every page says', () => {
  let pdf: ReadPdf;
  beforeAll(async () => {
    pdf = await drawn(
      demoScheme('tannery-yard'),
      { scale: 1000, perPage: 3 },
      ['2025-03-21', '2025-06-21', '2025-12-21'],
      ['09:00', '12:00', '15:00', '16:30'],
    );
  });

  test('scale, caution, page number, north, civil time with offset and zone, altitude and azimuth, added area', () => {
    const count = pdf.pages.length;
    expect(count).toBeGreaterThan(3);
    pdf.pages.forEach((page, i) => {
      const text = allText(page);
      expect(text).toContain(SHORT_CAUTION);
      expect(text).toContain(`page ${i + 1} of ${count}`);
      expect(text).toContain('100 mm on paper when printed at full size');
    });
    for (const page of pdf.pages.slice(0, 4)) {
      const text = allText(page);
      expect(text).toContain('Scale 1:1000 on A3');
      expect(text).toMatch(/\d+ (March|June|December) 2025, \d\d:\d\d \(UTC\+0[01]:00\)/u);
      expect(text).toMatch(/sun −?\d+\.\d° high, azimuth \d+\.\d°, Europe\/London/u);
      expect(text).toMatch(/added [\d.]+\sm²/u);
      expect(text).toContain('true altitude, without refraction');
      expect(page.texts.some((t) => t.text === 'N')).toBe(true);
    }
  });

  test('a moment after sunset says so and adds nothing', () => {
    const page = pdf.pages.find((p) => allText(p).includes('21 December 2025, 16:30')) as ReadPage;
    expect(allText(page)).toContain('sun below the horizon');
    expect(allText(page)).toContain('sun −4.2° high');
  });

  test('title, language and one bookmark a page', () => {
    expect(pdf.title).toBe('Tannery Yard infill – Shadow study');
    expect(pdf.language).toBe('en-GB');
    expect(pdf.bookmarks.length).toBe(pdf.pages.length);
    expect(pdf.bookmarks[0]).toContain('21 March 2025');
  });

  test('text that must be read has capitals of 2.5 mm; labels have 1.8 mm or more', () => {
    for (const page of pdf.pages) {
      for (const t of page.texts) expect(t.size * 0.698).toBeGreaterThan(1.8);
      const read = page.texts.filter((t) => /UTC|altitude|added|Estimates|Scale/u.test(t.text));
      for (const t of read) expect(t.size * 0.698).toBeGreaterThan(2.5);
    }
  });

  test('no text runs off the page or past the margins', async () => {
    const scheme = {
      ...demoScheme('tannery-yard'),
      title: 'Ŵ'.repeat(300),
      address: `${'long road '.repeat(60)}`,
      author: 'x'.repeat(200),
    };
    const long = await drawn(scheme, { paper: 'A4', landscape: false }, ['2025-03-21'], ['12:00']);
    for (const page of [...pdf.pages, ...long.pages]) {
      for (const t of page.texts) {
        expect(t.x).toBeGreaterThan(9.9);
        expect(t.x).toBeLessThan(page.width - 9.9);
        expect(t.y).toBeLessThan(page.height - 9.9);
      }
    }
  });
});

/** Letters in order of their code points, without spaces. */
const sorted = (text: string): string => [...text.replace(/\s/gu, '')].sort().join('');

test('text is selectable Unicode, whatever the script', async () => {
  const scheme = { ...ruled(), address: 'חצר הבורסקאים', author: 'ساحة المدبغة' };
  const pdf = await drawn(scheme, {}, ['2025-06-21'], ['12:00']);
  // Readers guess spaces from gaps, so that letters are compared without them.
  const letters = allText(pdf.pages[0] as ReadPage).replace(/ /gu, '');
  expect(letters).toContain('Łódź,SãoPaulo,東京');
  expect(letters).toContain('חצרהבורסקאים');
  // This reader puts the pieces of a shaped Arabic word in the order of the page and knows no ActualText: all letters must be there.
  const arabic = [...letters].filter((l) => /\p{Script=Arabic}/u.test(l)).join('');
  expect(sorted(arabic)).toBe(sorted(scheme.author));
});

test('what right-to-left text and letters without a glyph say stands beside them as ActualText', async () => {
  const scheme = { ...ruled(), title: 'ساحة', author: '😀' };
  const model = modelOf(scheme);
  const moments = shadowMoments(scheme, model, ['2025-06-21'], ['12:00']);
  const sheet = shadowSheet({ scheme, model, moments, scale: null, paper: 'A3', landscape: true, ...FACTS });
  if (!sheet.ok) throw new Error('does not draw');
  const bytes = Buffer.from(await writePdf(sheet.value, { created: CREATED, compress: false })).toString('latin1');
  for (const said of [scheme.title, scheme.author]) {
    // PDF 32000-1:2008, 7.9.2.2: text strings in UTF-16, high byte first, after a byte order mark.
    const utf16 = Buffer.from(`\ufeff${said}`, 'utf16le').swap16().toString('latin1');
    const escaped = utf16.replace(
      /[\n\r\t\b\f()\\]/gu,
      (c) => ({ '\n': '\\n', '\r': '\\r', '\t': '\\t', '\b': '\\b', '\f': '\\f' })[c] ?? `\\${c}`,
    );
    expect(bytes).toContain(`/ActualText (${escaped})`);
  }
});

test('the same drawing gives the same bytes', async () => {
  const scheme = demoScheme('tannery-yard');
  const model = modelOf(scheme);
  const moments = shadowMoments(scheme, model, ['2025-03-21'], ['09:00', '12:00']);
  const write = async (): Promise<Uint8Array> => {
    const sheet = shadowSheet({ scheme, model, moments, scale: 1000, paper: 'A3', landscape: true, ...FACTS });
    if (!sheet.ok) throw new Error('does not draw');
    return writePdf(sheet.value, { created: CREATED });
  };
  expect(Buffer.compare(await write(), await write())).toBe(0);
});
