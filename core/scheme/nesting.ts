/** How deep the objects and lists of a file may stand in one another. A scheme needs six levels; fields unknown here may need more. */
export const MOST_NESTED = 64;

/**
 * Whether what was read from a file nests deeper than `MOST_NESTED`. Such a file is none of ours, and walking it would use up
 * the stack; this walk uses none.
 */
export function nestsTooDeep(read: unknown): boolean {
  const open: { readonly value: unknown; readonly level: number }[] = [{ value: read, level: 0 }];
  for (let now = open.pop(); now !== undefined; now = open.pop()) {
    const { value, level } = now;
    if (value === null || typeof value !== 'object') continue;
    if (level >= MOST_NESTED) return true;
    for (const inner of Array.isArray(value) ? value : Object.values(value))
      if (inner !== null && typeof inner === 'object') open.push({ value: inner, level: level + 1 });
  }
  return false;
}
