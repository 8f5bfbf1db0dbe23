import type { Mark, Page } from '../../core/sheet/drawing.ts';
import { scriptRuns } from '../../core/sheet/text-runs.ts';
import type { FontName } from './fonts.ts';

/** The fonts that a page's text is set in, in a fixed order. */
export function fontsUsed(page: Page): readonly FontName[] {
  const used = new Set<FontName>(['regular']);
  const walk = (marks: readonly Mark[]): void => {
    for (const mark of marks) {
      if (mark.kind === 'group') walk(mark.marks);
      if (mark.kind !== 'text') continue;
      for (const run of scriptRuns(mark.text)) {
        used.add(run.script === 'house' || run.script === 'missing' ? mark.face : run.script);
      }
    }
  };
  walk(page.marks);
  return (['regular', 'semibold', 'italic', 'cjk', 'arabic', 'hebrew'] as const).filter((f) => used.has(f));
}
