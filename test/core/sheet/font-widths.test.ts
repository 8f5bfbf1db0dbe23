import { expect, test } from 'vitest';
import { hasGlyph, measure } from '../../../core/sheet/measure.ts';
import { fontWidthsSource, openFace } from '../../helpers/font-widths-source.ts';

test('the width table is what the fonts say', async () => {
  await expect(fontWidthsSource()).toMatchFileSnapshot('../../../core/sheet/font-widths.ts');
});

test('a line measured by the table is the line that the font sets, to the kerning', () => {
  for (const face of ['regular', 'semibold', 'italic'] as const) {
    const font = openFace(face);
    for (const line of [
      '21 March 2025, 09:00 (UTC+00:00)',
      'added 412.6 m²',
      'Łódź, São Paulo',
      'x → 3 ≤ 4 · 51.45° N −2.59°',
    ]) {
      const set_mm = (font.layout(line).advanceWidth / font.unitsPerEm) * 10;
      expect(Math.abs(measure(line, 10, face) - set_mm) / set_mm).toBeLessThan(0.02);
      expect(measure(line, 10, face)).toBeGreaterThanOrEqual(set_mm - 1e-9);
    }
  }
});

test('figures are tabular in every face, so that columns line up', () => {
  for (const face of ['regular', 'semibold', 'italic'] as const)
    for (const figure of '0123456789') expect(measure(figure, 1, face)).toBeCloseTo(0.6, 9);
});

test('the table knows which letters the house face has', () => {
  for (const letter of 'Aź²°→≤≥Ωα−…’') expect(hasGlyph(letter.codePointAt(0) ?? 0)).toBe(true);
  for (const letter of '東שع⌀😀') expect(hasGlyph(letter.codePointAt(0) ?? 0)).toBe(false);
});
