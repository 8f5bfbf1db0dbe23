import { computed } from '@preact/signals';
import { shownMap } from '../maps/map-shown.ts';
import { arrivals, side } from '../maps/map-state.ts';
import { carryMap, layMap } from './map-layer.ts';

/** The map that is drawn, laid out over its surfaces. */
export const laidMap = computed(() => (shownMap.value === null ? null : layMap(shownMap.value)));

/** What carries it at what is shown. */
export const carriedMap = computed(() => {
  arrivals.value;
  const [laid, shown] = [laidMap.value, shownMap.value];
  return laid === null || shown === null ? null : carryMap(laid, shown, side.value);
});
