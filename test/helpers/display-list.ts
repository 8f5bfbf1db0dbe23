import type { Document } from '../../core/sheet/drawing.ts';

/** A display list as text for a golden file: lengths to 0.01 mm, one mark a line, so that a change can be read. */
export function displayList(document: Document): string {
  const round = (_: string, v: unknown): unknown => (typeof v === 'number' ? Math.round(v * 100) / 100 + 0 : v);
  const lines: string[] = [JSON.stringify({ ...document, pages: document.pages.length })];
  const walk = (marks: Document['pages'][number]['marks'], indent: string): void => {
    for (const mark of marks) {
      if (mark.kind !== 'group') lines.push(indent + JSON.stringify(mark, round));
      else {
        lines.push(`${indent}group ${JSON.stringify({ label: mark.label, clip: mark.clip }, round)}`);
        walk(mark.marks, `${indent}  `);
      }
    }
  };
  for (const page of document.pages) {
    lines.push(`page ${JSON.stringify({ title: page.title, width: page.width, height: page.height })}`);
    walk(page.marks, '  ');
  }
  return `${lines.join('\n')}\n`;
}
