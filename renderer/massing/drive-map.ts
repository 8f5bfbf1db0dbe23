import { effect, untracked } from '@preact/signals';
import { valueAt } from '../maps/map-picture.ts';
import { colourTable, shadeOf } from '../maps/map-scale.ts';
import { cursor, mapScale, pointed, shownMap } from '../maps/map-shown.ts';
import { arrivals, quantity, side } from '../maps/map-state.ts';
import { theme } from '../state/theme.ts';
import { laidMap } from './laid-map.ts';
import { paint } from './map-atlas.ts';
import { readPalette } from './palette.ts';
import type { MassingScene } from './scene.ts';

/** Copies the map into the scene: what carries it when that changes, its colours whenever numbers arrive. @returns how to stop */
export function driveMap(scene: MassingScene): () => void {
  const stops = [
    effect(() => {
      // Cells are named by their surface: another map has others.
      const count = shownMap.value?.picture.surfaces.length ?? 0;
      untracked(() => {
        pointed.value = null;
        if (cursor.value !== null && cursor.value.surface >= count) cursor.value = null;
      });
    }),
    effect(() => scene.setMap(laidMap.value?.atlas ? laidMap.value : null)),
    effect(() => {
      const isOnDark = theme.value === 'dark';
      arrivals.value;
      const [laid, shown, scale, of, shownSide] = [
        laidMap.value,
        shownMap.value,
        mapScale.value,
        quantity.value,
        side.value,
      ];
      if (!laid?.atlas || shown === null || scale === null || of === 'off') return;
      const [r, g, b] = readPalette()['up-grey'].map((v) => Math.round(v * 255)) as [number, number, number];
      const shade = (surface: number, row: number): number =>
        shadeOf(scale, valueAt(shown.picture, of, shownSide, surface, row));
      const pixels = paint(laid.atlas, shade, colourTable(scale.isSigned, [r, g, b], isOnDark));
      scene.setPicture(pixels, laid.atlas.width, laid.atlas.height);
    }),
  ];
  return () => {
    for (const stop of stops) stop();
  };
}
