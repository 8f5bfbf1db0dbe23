import { caption } from './diagram.ts';
import type { Mm } from './drawing.ts';
import type { Rect } from './paper.ts';
import type { SheetUnits } from './sheet-units.ts';
import type { ShadowMoment } from './shadow-moment.ts';

/** Where the diagrams of one page stand. */
export type Grid = {
  readonly perPage: number;
  /** Size of every frame [mm]. */
  readonly frame: readonly [Mm, Mm];
  /** The frame of the n-th diagram of a page. */
  readonly place: (n: number) => Rect;
};

const GAP: Mm = 5;
/** Between one caption and the next frame. */
const UNDER: Mm = 3;

/**
 * The grid that leaves the largest frames: dates down and times across where the moments are a table of both and a page holds
 * more than one date; else as many columns as draw the scheme largest, one date a page where dates have equal numbers.
 */
export function gridOf(
  moments: readonly ShadowMoment[],
  zone: string,
  most: number,
  area: Rect,
  extent: readonly [number, number],
  units: SheetUnits = 'metric',
): Grid {
  const perDate = perDateCount(moments);
  const table = perDate !== null && most >= 2 * perDate;
  const onPage = Math.min(perDate !== null && !table ? Math.min(perDate, most) : most, moments.length);
  const choices: Grid[] = [];
  for (let columns = 1; columns <= onPage; columns++) {
    if (table && columns !== perDate) continue;
    const rows = table ? Math.floor(most / columns) : Math.ceil(onPage / columns);
    choices.push(
      grid(moments, zone, columns, Math.min(rows, Math.ceil(moments.length / columns)), onPage, area, units),
    );
  }
  const roominess = (g: Grid): number => Math.min(g.frame[0] / extent[0], g.frame[1] / extent[1]);
  return choices.reduce((best, g) => (roominess(g) > roominess(best) ? g : best));
}

/** How many moments each date has, where all dates have the same number and more than one; else null. */
function perDateCount(moments: readonly ShadowMoment[]): number | null {
  const counts = new Map<string, number>();
  for (const m of moments) counts.set(m.date, (counts.get(m.date) ?? 0) + 1);
  const [first] = counts.values();
  return first !== undefined && first > 1 && counts.size > 1 && [...counts.values()].every((n) => n === first)
    ? first
    : null;
}

function grid(
  moments: readonly ShadowMoment[],
  zone: string,
  columns: number,
  rows: number,
  onPage: number,
  area: Rect,
  units: SheetUnits,
): Grid {
  const width = (area.width - GAP * (columns - 1)) / columns;
  const under = Math.max(...moments.map((m) => caption(m, zone, true, 0, 0, width, units).height));
  const cell = area.height / rows;
  const height = Math.max(1, cell - 2 - under - (rows > 1 ? UNDER : 0));
  return {
    perPage: Math.min(columns * rows, onPage),
    frame: [width, height],
    place: (n) => ({
      x: area.x + (n % columns) * (width + GAP),
      y: area.y + Math.floor(n / columns) * cell,
      width,
      height,
    }),
  };
}
