import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';

const css = readFileSync(resolve(import.meta.dirname, '../../renderer/ui/tokens.css'), 'utf8');

function tokens(selector: string): Map<string, string> {
  const block = css.slice(css.indexOf(`${selector} {`), css.indexOf('\n}', css.indexOf(`${selector} {`)));
  return new Map([...block.matchAll(/--([\w-]+): (#[0-9a-f]{6})/g)].map((m) => [m[1] as string, m[2] as string]));
}

/** Relative luminance and contrast, WCAG 2.2 § 1.4.3 and its definitions. */
const luminance = (hex: string): number => {
  const [r, g, b] = [1, 3, 5].map((i) => {
    const v = Number.parseInt(hex.slice(i, i + 2), 16) / 255;
    return v <= 0.04045 ? v / 12.92 : ((v + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
};
const contrast = (a: string, b: string): number => {
  const [high, low] = [luminance(a), luminance(b)].sort((p, q) => q - p) as [number, number];
  return (high + 0.05) / (low + 0.05);
};

const TEXT = 4.5;
const GRAPHIC = 3;
const pairs: readonly (readonly [string, string, number])[] = [
  ...['paper', 'sheet', 'wash', 'ground', 'accent-tint', 'plot'].map((under) => ['ink', under, TEXT] as const),
  ...['paper', 'sheet', 'wash', 'accent-tint'].map((under) => ['soft', under, TEXT] as const),
  ...['over', 'close', 'within'].flatMap((v) =>
    ['sheet', 'wash', 'accent-tint'].map((under) => [v, under, TEXT] as const),
  ),
  ['accent', 'sheet', TEXT],
  ['accent', 'paper', TEXT],
  ['accent-ink', 'accent', TEXT],
  ['accent', 'wash', GRAPHIC],
  ['accent', 'ground', GRAPHIC],
  ['over', 'track', GRAPHIC],
  ['close', 'track', GRAPHIC],
  ['within', 'track', GRAPHIC],
  ['edge', 'sheet', GRAPHIC],
];

for (const [theme, selector] of [
  ['light', ':root'],
  ['dark', ':root[data-theme="dark"]'],
] as const) {
  describe(`the ${theme} theme`, () => {
    const t = tokens(selector);
    it.each(pairs)('%s on %s reads at %s to 1', (over, under, least) => {
      expect(contrast(t.get(over) as string, t.get(under) as string)).toBeGreaterThanOrEqual(least);
    });
  });
}

describe('text sizes', () => {
  it('are 13 px or more in every style sheet', () => {
    for (const name of [
      'ui/tokens.css',
      'ui/base.css',
      'desk.css',
      'findings/findings.css',
      'year-strip/year-strip.css',
      'massing/massing.css',
      'moment/clock.css',
      'schedule/schedule.css',
    ]) {
      const text = readFileSync(resolve(import.meta.dirname, '../../renderer', name), 'utf8');
      for (const [, size] of text.matchAll(/(?:font-size|--text|--small|--head|--title): (\d+)px/g))
        expect(Number(size)).toBeGreaterThanOrEqual(13);
    }
  });
});
