import type { RefObject } from 'preact';
import { useLayoutEffect, useRef, useState } from 'preact/hooks';

type Goal = { readonly row: number; readonly column: number };

/**
 * Moves the keyboard to a cell as soon as the cell is there: in the same step in which the table is drawn anew, never a frame
 * later, when the next key may have opened a cell already that would then be closed under the user's hands. A row out of sight is
 * waited for until it is made.
 * @returns the way to ask for it
 */
export function useCellFocus(scroller: RefObject<HTMLDivElement | null>): (row: number, column: number) => void {
  const goal = useRef<Goal | null>(null);
  const [, redraw] = useState<Goal | null>(null);
  // After every drawing: the row may come into sight only by the second.
  useLayoutEffect(() => {
    if (goal.current === null) return;
    const { row, column } = goal.current;
    const cell = scroller.current?.querySelector<HTMLElement>(`[data-row="${row}"] [data-column="${column}"]`);
    if (!cell) return;
    goal.current = null;
    // A cell that is open has the keyboard itself.
    if (!cell.contains(document.activeElement) || cell === document.activeElement) cell.focus();
  });
  return (row, column) => {
    const next = { row, column };
    goal.current = next;
    redraw(next);
  };
}
