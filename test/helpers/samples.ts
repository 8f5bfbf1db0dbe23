import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { parseLimitSet } from '../../core/limits/load-limits.ts';
import { SheetSet } from '../../core/scheme/schema.ts';
import type { Document } from '../../core/sheet/drawing.ts';
import { sheetDocument } from '../../core/study/sheet-document.ts';
import { demoScheme, modelOf } from './demo-scheme.ts';

/** The sheets that are shipped to be looked at: which set makes each, and the pages of it that are shown as pictures. */
export type Sample = {
  readonly name: string;
  readonly set: Parameters<typeof SheetSet.parse>[0];
  /** Whether the whole document is shipped as PDF. */
  readonly pdf: boolean;
  /** Page numbers from 1, and what each picture is called after the name. */
  readonly pictures: readonly (readonly [page: number, called: string])[];
};

const PICTURE: Sample['pictures'] = [[1, '']];

export const SAMPLES: readonly Sample[] = [
  {
    name: 'tannery-yard-shadows',
    set: {
      id: 'S1',
      kind: 'shadow-study',
      dates: ['2025-03-21', '2025-06-21', '2025-12-21'],
      times: ['09:00', '12:00', '15:00'],
      scale: 1000,
      number: 'SH-01',
    },
    pdf: true,
    pictures: PICTURE,
  },
  {
    name: 'tannery-yard-findings',
    set: { id: 'R', kind: 'findings' },
    pdf: true,
    pictures: [
      [1, ''],
      [4, '-room'],
    ],
  },
  {
    name: 'tannery-yard-section-w10',
    set: { id: 'X', kind: 'section', window: 'W10', scale: 50, number: 'S-01' },
    pdf: true,
    pictures: PICTURE,
  },
  {
    name: 'tannery-yard-facades',
    set: { id: 'F', kind: 'facades', dates: ['2025-03-21'], number: 'E-01' },
    pdf: false,
    pictures: PICTURE,
  },
  {
    name: 'tannery-yard-roofs-and-ground',
    set: { id: 'G', kind: 'exposure-plan', dates: ['2025-03-21'], number: 'E-02' },
    pdf: false,
    pictures: [[2, '']],
  },
  {
    name: 'tannery-yard-sun-path-w10',
    set: { id: 'P', kind: 'sun-path', window: 'W10', paper: 'A4', number: 'P-01' },
    pdf: false,
    pictures: PICTURE,
  },
  { name: 'tannery-yard-light', set: { id: 'L', kind: 'light' }, pdf: false, pictures: PICTURE },
];

/** Draws a sample from the demo, dated so that it is the same whenever it is made. */
export async function drawSample(sample: Sample): Promise<Document> {
  const scheme = demoScheme('tannery-yard');
  const file = join(import.meta.dirname, '../../assets/limits/example-gain.json');
  const limits = parseLimitSet(readFileSync(file, 'utf8'));
  if (!limits.ok) throw new Error('the example limits do not read');
  const context = { drawn: '2026-12-01', limitSet: limits.value };
  const made = await sheetDocument(scheme, modelOf(scheme), SheetSet.parse(sample.set), context, async () => 'go');
  if (!made?.ok) throw new Error(JSON.stringify(made));
  return made.value;
}
