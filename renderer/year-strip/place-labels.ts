export type Anchor = 'middle' | 'start' | 'end';
/** A mark on a line and how wide its label is, in the same unit. */
export type Labelled = { readonly at: number; readonly width: number };

const ANCHORS = ['middle', 'end', 'start'] as const;
/** Leaving a label out is worse than turning every other one aside. */
const COST = { middle: 0, end: 1, start: 1, none: 100 } as const;
/** Labels stand at least this far apart. */
const APART = 6;

/**
 * On which side of its mark each label stands so that no two overlap: over it where there is room, else beside it; the fewest are
 * left out.
 * @param marks in the order of `at`; @param left, right the ends of the line
 * @returns one for each mark; null where its label has no room
 */
export function placeLabels(marks: readonly Labelled[], left: number, right: number): readonly (Anchor | null)[] {
  let best: { cost: number; anchors: readonly (Anchor | null)[] } = { cost: Number.POSITIVE_INFINITY, anchors: [] };
  const go = (i: number, end: number, cost: number, anchors: readonly (Anchor | null)[]): void => {
    if (cost >= best.cost) return;
    const mark = marks[i];
    if (mark === undefined) {
      best = { cost, anchors };
      return;
    }
    for (const anchor of ANCHORS) {
      const from = mark.at - mark.width * (anchor === 'middle' ? 0.5 : anchor === 'end' ? 1 : 0);
      if (from < end || from + mark.width > right) continue;
      go(i + 1, from + mark.width + APART, cost + COST[anchor], [...anchors, anchor]);
    }
    go(i + 1, end, cost + COST.none, [...anchors, null]);
  };
  go(0, left, 0, []);
  return best.anchors;
}
