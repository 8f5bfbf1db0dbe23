import { computed, signal } from '@preact/signals';
import { type Cells, rowAt } from './map-cells.ts';
import { isBuiltOver, type Side, spreadOf, valueAt } from './map-picture.ts';
import { type MapScale, scaleFor } from './map-scale.ts';
import { arrivals, map, quantity, side } from './map-state.ts';

/** The map that is drawn, when one is. */
export const shownMap = computed(() => {
  const shown = map.value;
  return quantity.value === 'sun' || (quantity.value === 'energy' && shown?.hasEnergy) ? shown : null;
});

/** The scale of the numbers that are shown. Before and after have one in common, so that they can be compared. */
export const mapScale = computed<MapScale | null>(() => {
  arrivals.value;
  const shown = shownMap.value;
  const of = quantity.value;
  if (shown === null || of === 'off') return null;
  const sides: readonly Side[] = side.value === 'change' ? ['change'] : ['before', 'after'];
  const spreads = sides.map((s) => spreadOf(shown.picture, of, s));
  const size = Math.max(0, ...spreads.map((s) => (s === null ? 0 : Math.max(s.most, -s.least))));
  return scaleFor(of, side.value, size, 1 / shown.meanOf);
});

/** One cell of the map: its surface, and how far across and up that it lies. */
export type CellPlace = { readonly surface: number; readonly cell: readonly [number, number] };

/** The cell under the pointer, and the one that the keyboard has been led to. */
export const pointed = signal<CellPlace | null>(null);
export const cursor = signal<CellPlace | null>(null);

export type CellReading =
  | { readonly kind: 'value'; readonly value: number }
  | { readonly kind: 'built-over' | 'not-there' | 'unknown' };

/** What a cell holds of what is shown, in the unit of the scale. */
export function readCell(cells: Cells, place: CellPlace): CellReading | null {
  const shown = shownMap.value;
  const of = quantity.value;
  const scale = mapScale.value;
  if (shown === null || of === 'off' || scale === null) return null;
  arrivals.value;
  const row = rowAt(cells, place.cell);
  const { there } = shown.picture.surfaces[place.surface] ?? {};
  if (row === null || there === undefined) return null;
  const shownSide = side.value;
  const isThere = shownSide === 'change' ? there.before && there.after : there[shownSide];
  if (!isThere) return { kind: 'not-there' };
  if (isBuiltOver(shown.picture, shownSide, place.surface, row)) return { kind: 'built-over' };
  const value = valueAt(shown.picture, of, shownSide, place.surface, row);
  return value === null ? { kind: 'unknown' } : { kind: 'value', value: value * scale.factor };
}
