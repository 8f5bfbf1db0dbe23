import type { RefObject } from 'preact';
import { useLayoutEffect, useState } from 'preact/hooks';

/** Height of a row, as in the style sheet [px]: rows out of sight are not made. */
export const ROW_px = 28;
const SPARE_ROWS = 12;

type Visible = {
  /** First row that is made, and the one after the last. */
  readonly from: number;
  readonly to: number;
  /** To be called when the list is scrolled. */
  readonly look: () => void;
};

/** Which rows of a long list are in sight, and some to either side. @param lead row that is kept in sight; −1: none */
export function useVisibleRows(scroller: RefObject<HTMLDivElement | null>, count: number, lead: number): Visible {
  const [range, setRange] = useState<readonly [number, number]>([0, 40]);
  const look = (): void => {
    const { scrollTop, clientHeight } = scroller.current as HTMLDivElement;
    const from = Math.max(0, Math.floor(scrollTop / ROW_px) - SPARE_ROWS);
    setRange([from, from + Math.ceil(clientHeight / ROW_px) + 2 * SPARE_ROWS]);
  };
  useLayoutEffect(() => {
    const watch = new ResizeObserver(look);
    watch.observe(scroller.current as HTMLDivElement);
    return () => watch.disconnect();
  }, []);
  useLayoutEffect(() => {
    if (lead >= 0) bringIntoView(scroller.current as HTMLDivElement, lead);
  }, [lead]);
  return { from: Math.min(range[0], count), to: Math.min(range[1], count), look };
}

function bringIntoView(scroller: HTMLDivElement, index: number): void {
  const top = index * ROW_px;
  const room = scroller.clientHeight - 2 * ROW_px;
  if (top < scroller.scrollTop) scroller.scrollTop = top;
  else if (top > scroller.scrollTop + room) scroller.scrollTop = top - room;
}
