import { expect, test } from 'vitest';
import { CAUTIONS, SHORT_CAUTION } from '../../../core/limits/cautions.ts';
import type { Mark } from '../../../core/sheet/drawing.ts';
import { lightReport } from '../../../core/sheet/light-report.ts';
import { demoScheme } from '../../helpers/demo-scheme.ts';

const texts = (marks: readonly Mark[]): string =>
  marks
    .map((m) => (m.kind === 'text' ? m.text.replaceAll('\u00a0', ' ') : m.kind === 'group' ? texts(m.marks) : ''))
    .join(' ');

const kept = (before: number, after: number) => ({ before, after, kept: before > 0 ? after / before : 1 });

const reportOf = (trees: 'none' | 'left-out' | 'counted') =>
  lightReport({
    scheme: demoScheme('tannery-yard'),
    light: {
      year: 2025,
      date: '2025-03-21',
      hours: 2,
      openHours: 4476,
      trees,
      receptors: [
        { kind: 'area', id: 'A1', share: kept(0.5, 0.4) },
        {
          kind: 'window',
          id: 'V1',
          skyComponent: kept(0.274, 0.216),
          annual: kept(0.3, 0.24),
          winter: kept(0.06, 0.03),
          sunMinutes: kept(205, 65),
        },
      ],
    },
    drawn: '2026-03-02',
    engine: '0.1.0',
    hash: '0123456789abcdef',
  });

const allOf = (document: ReturnType<typeof lightReport>): string =>
  document.pages
    .map((p) => texts(p.marks))
    .join(' ')
    .replace(/ +/gu, ' ');

test('before, after and kept stand beside each other for ground and windows', () => {
  const document = reportOf('left-out');
  const all = allOf(document);
  expect(all).toContain('Courtyard 50 % 40 % 80 %');
  // 27.4 % before and 21.6 % after keep 0.788 of it.
  expect(all).toContain('27.4 % 21.6 % 79 %');
  expect(all).toContain('3 h 25 1 h 05 32 %');
  for (const caution of CAUTIONS) expect(all).toContain(caution);
  for (const page of document.pages) expect(texts(page.marks)).toContain(SHORT_CAUTION);
});

test('every table says beside its figures whether trees are in them, and the method says why', () => {
  // One table of ground, four of windows.
  const left = allOf(reportOf('left-out'));
  expect(left.match(/Trees are left out\./gu)).toHaveLength(5);
  expect(left).toContain('common practice, no source');
  expect(left).not.toContain('counted');
  const counted = allOf(reportOf('counted'));
  expect(counted.match(/Trees are counted\./gu)).toHaveLength(5);
  expect(counted).toContain('of sky light the mean of the year');
  expect(counted).not.toContain('Trees are left out');
  const none = allOf(reportOf('none'));
  expect(none).toContain('The scheme has no trees.');
  expect(none).not.toMatch(/Trees are/u);
});
