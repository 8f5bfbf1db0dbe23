import { expect, test } from 'vitest';
import { SHORT_CAUTION } from '../../../core/limits/cautions.ts';
import { SheetSet } from '../../../core/scheme/schema.ts';
import type { Mark } from '../../../core/sheet/drawing.ts';
import { PAPER } from '../../../core/sheet/drawing.ts';
import { sheetDocument } from '../../../core/study/sheet-document.ts';
import { SHEET_KINDS, type SheetKind } from '../../../core/study/sheet-kinds.ts';
import { demoScheme, modelOf } from '../../helpers/demo-scheme.ts';

const context = { drawn: '2026-12-01', limitSet: null };
const go = async () => 'go' as const;
const flat = (marks: readonly Mark[]): Mark[] => marks.flatMap((m) => (m.kind === 'group' ? flat(m.marks) : [m]));
const textOf = (marks: readonly Mark[]): string =>
  flat(marks)
    .flatMap((m) => (m.kind === 'text' ? [m.text] : []))
    .join(' ');

const asked = (kind: string, more: object = {}): SheetSet =>
  SheetSet.parse({ id: 'S', kind, dates: ['2025-03-21'], times: ['12:00'], ...more });

for (const name of ['tannery-yard', 'jacaranda-clinic']) {
  const scheme = demoScheme(name);
  const model = modelOf(scheme);
  const window = scheme.windows.find((w) => w.wall !== undefined)?.id ?? '';
  const needs: { readonly [K in SheetKind]?: object } = { section: { window }, 'sun-path': { window } };
  for (const kind of SHEET_KINDS) {
    test(`${kind} of ${name} is drawn, on paper of ISO 216, with the caution on every page`, async () => {
      const made = await sheetDocument(scheme, model, asked(kind, needs[kind]), context, go);
      if (!made?.ok) throw new Error(JSON.stringify(made));
      expect(made.value.pages.length).toBeGreaterThan(0);
      const sizes = Object.values(PAPER).map((p) => [...p].join());
      for (const page of made.value.pages) {
        expect(sizes).toContain([page.width, page.height].sort((a, b) => a - b).join());
        expect(textOf(page.marks)).toContain(SHORT_CAUTION);
        expect(textOf(page.marks)).toContain('100 mm on paper when printed at full size');
      }
    });

    test(`${kind} of ${name} stops when it is told to, or is done at once`, async () => {
      let asks = 0;
      const made = await sheetDocument(scheme, model, asked(kind, needs[kind]), context, async () => {
        asks++;
        return 'stop';
      });
      if (asks > 0) expect(made).toBeNull();
      else expect(made).toMatchObject({ ok: true });
    });
  }
}

test.each(['facades', 'exposure-plan', 'section', 'shadow-study'])(
  '%s says on small paper too how it was worked out, on a page of its own where it must',
  async (kind) => {
    const scheme = demoScheme('tannery-yard');
    for (const landscape of [true, false]) {
      const set = asked(kind, { paper: 'A4', landscape, window: 'W10' });
      const made = await sheetDocument(scheme, modelOf(scheme), set, context, go);
      if (!made?.ok) throw new Error(JSON.stringify(made));
      const text = made.value.pages.map((p) => textOf(p.marks)).join(' ');
      for (const needed of ['How it was worked out', 'Cautions', 'Scale 1:']) expect(text).toContain(needed);
    }
  },
);

test.each([
  ['a kind that is not known', asked('axonometric'), 'unknown-sheet', /known: shadow-study/u],
  ['a date that does not exist', asked('shadow-study', { dates: ['2025-02-30'] }), 'bad-date', /2025-06-21/u],
  ['a date beyond the sun’s years', asked('shadow-study', { dates: ['2101-01-01'] }), 'bad-date', /./u],
  ['a time that does not exist', asked('shadow-study', { times: ['24:00'] }), 'bad-time', /09:00/u],
  ['a section without a window', asked('section'), 'no-such-window', /window/u],
  ['a section of a window that is not there', asked('section', { window: 'W999' }), 'no-such-window', /window/u],
  ['a mask of a window that is not there', asked('sun-path', { window: 'W999' }), 'no-such-window', /window/u],
  ['facades of a block that is not there', asked('facades', { block: 'B999' }), 'no-such-block', /name one/u],
  ['a study too large for the paper', asked('shadow-study', { scale: 50, paper: 'A4' }), 'scale-too-large', /fits/u],
  ['a plan too large for the paper', asked('exposure-plan', { scale: 50, paper: 'A4' }), 'scale-too-large', /fits/u],
])('%s is refused with its cure', async (_, set, code, cure) => {
  const scheme = demoScheme('tannery-yard');
  const made = await sheetDocument(scheme, modelOf(scheme), set, context, go);
  expect(made).toMatchObject({ ok: false, faults: [{ code, cure: expect.stringMatching(cure) }] });
});

test('best fit takes fewer diagrams a page before it draws a town like a stamp', async () => {
  const scheme = demoScheme('two-hundred-blocks');
  const set = asked('shadow-study', { dates: ['2025-03-21', '2025-06-21'], times: ['09:00', '12:00'] });
  const made = await sheetDocument(scheme, modelOf(scheme), set, context, go);
  if (!made?.ok) throw new Error(JSON.stringify(made));
  const scale = Number(/Scale 1:(\d+)/u.exec(textOf(made.value.pages[0]?.marks ?? []))?.[1]);
  expect(scale).toBeLessThanOrEqual(2500);
  const named = made.value.pages.flatMap((p) => [...textOf(p.marks).matchAll(/2025, \d\d:00 \(UTC/gu)]);
  expect(named).toHaveLength(4);
});

test('a scale that fits with fewer diagrams a page is taken, not refused', async () => {
  const scheme = demoScheme('two-hundred-blocks');
  const made = await sheetDocument(scheme, modelOf(scheme), asked('shadow-study', { scale: 2500 }), context, go);
  expect(made).toMatchObject({ ok: true });
});

test('every sheet set of the demos draws as it stands', async () => {
  for (const name of ['tannery-yard', 'jacaranda-clinic', 'two-hundred-blocks']) {
    const scheme = demoScheme(name);
    for (const set of scheme.sheets)
      expect(await sheetDocument(scheme, modelOf(scheme), set, context, go)).toMatchObject({ ok: true });
  }
});

test('facades of a proposal of many blocks go on over as many pages as they need, every wall once', async () => {
  const town = demoScheme('two-hundred-blocks');
  let proposed = 0;
  const blocks = town.blocks.map((b) =>
    b.standing === 'context' && proposed++ < 24 ? { ...b, standing: 'proposed' as const } : b,
  );
  const scheme = { ...town, blocks };
  const made = await sheetDocument(scheme, modelOf(scheme), asked('facades'), context, go);
  if (!made?.ok) throw new Error(JSON.stringify(made));
  const text = made.value.pages.map((p) => textOf(p.marks)).join(' ');
  const walls = blocks.filter((b) => b.standing === 'proposed').reduce((sum, b) => sum + (b.outline?.length ?? 4), 0);
  expect(walls).toBeGreaterThan(80);
  expect(text.match(/, wall \d+, faces /gu)).toHaveLength(walls);
  expect(text).toContain(`page ${made.value.pages.length} of ${made.value.pages.length}`);
});
