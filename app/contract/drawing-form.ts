import * as z from 'zod';
import type { Document } from '../../core/sheet/drawing.ts';

/**
 * The display list as the page sends it to be printed: checked before it meets the PDF writer, because the page is no more trusted
 * with memory and time than with files.
 */
const mm = z.number().min(-1e5).max(1e5);
const colour = z.string().regex(/^#[0-9a-f]{6}$/i);
const point = z.tuple([mm, mm]);
const stroke = z.object({
  colour,
  width: z.number().min(0).max(100),
  dash: z.array(z.number().min(0).max(1000)).max(16).optional(),
});
const hatch = z.object({ angle_deg: z.number(), spacing: z.number().min(0.1).max(1000), stroke });

const path = z.object({
  kind: z.literal('path'),
  runs: z.array(z.array(point).max(200_000)).max(200_000),
  closed: z.boolean(),
  fill: colour.optional(),
  hatch: hatch.optional(),
  stroke: stroke.optional(),
});
const circle = z.object({
  kind: z.literal('circle'),
  at: point,
  radius: z.number().min(0).max(1e5),
  fill: colour.optional(),
  stroke: stroke.optional(),
});
const text = z.object({
  kind: z.literal('text'),
  text: z.string().max(20_000),
  at: point,
  size: z.number().min(0).max(1000),
  face: z.enum(['regular', 'semibold', 'italic']),
  colour,
  anchor: z.enum(['start', 'middle', 'end']),
  turn_deg: z.number().optional(),
  tabular: z.boolean().optional(),
  rtl: z.boolean().optional(),
});
const group = z.object({
  kind: z.literal('group'),
  clip: z.tuple([mm, mm, mm, mm]).optional(),
  label: z.string().max(2000).optional(),
  role: z.enum(['text', 'head', 'row', 'cell']).optional(),
  get marks() {
    return z.array(mark).max(500_000);
  },
});
const mark = z.discriminatedUnion('kind', [path, circle, text, group]);
const page = z.object({
  width: z.number().gt(0).max(5000),
  height: z.number().gt(0).max(5000),
  title: z.string().max(2000),
  marks: z.array(mark).max(500_000),
});
const document = z.object({
  title: z.string().max(2000),
  author: z.string().max(2000),
  language: z.string().max(40),
  pages: z.array(page).min(1).max(5000),
});

/** How deep groups may stand in groups. */
const MAX_DEPTH = 24;

/** Depth by a loop of our own: validators recurse, and a list made to be deep must not reach them. */
function isTooDeep(value: unknown): boolean {
  let level: readonly unknown[] = [value];
  for (let depth = 0; level.length > 0; depth++) {
    if (depth > 2 * MAX_DEPTH + 6) return true;
    level = level
      .flatMap((item) =>
        typeof item === 'object' && item !== null && !Array.isArray(item)
          ? Object.values(item)
          : Array.isArray(item)
            ? item
            : [],
      )
      .filter((item) => typeof item === 'object' && item !== null);
  }
  return false;
}

/** The document if it has the form of core/sheet/drawing.ts, else null. */
export function checkedDocument(value: unknown): Document | null {
  if (isTooDeep(value)) return null;
  const read = document.safeParse(value);
  return read.success ? (read.data as Document) : null;
}
