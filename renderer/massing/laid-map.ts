import { computed } from '@preact/signals';
import { shownMap } from '../maps/map-shown.ts';
import { side } from '../maps/map-state.ts';
import { layMap } from './map-layer.ts';

/** The map that is drawn, laid out over its surfaces. */
export const laidMap = computed(() => (shownMap.value === null ? null : layMap(shownMap.value, side.value)));
