import { effect, untracked } from '@preact/signals';
import { valueAt } from '../maps/map-picture.ts';
import { colourTable, shadeOf } from '../maps/map-scale.ts';
import { cursor, mapScale, pointed, shownMap } from '../maps/map-shown.ts';
import { arrivals, quantity, side } from '../maps/map-state.ts';
import { theme } from '../state/theme.ts';
import { carriedMap, laidMap } from './laid-map.ts';
import { paint } from './map-atlas.ts';
import { readPalette, type Rgb } from './palette.ts';
import type { MassingScene } from './scene.ts';

type Rgb8 = readonly [number, number, number];
const bytesOf = (c: Rgb): Rgb8 => [Math.round(c[0] * 255), Math.round(c[1] * 255), Math.round(c[2] * 255)];

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
    effect(() => scene.setMap(carriedMap.value)),
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
      const palette = readPalette();
      const [nothing, none] = [palette.plot, palette['up-grey']].map(bytesOf) as [Rgb8, Rgb8];
      const shade = (surface: number, row: number): number =>
        shadeOf(scale, valueAt(shown.picture, of, shownSide, surface, row));
      const pixels = paint(laid.atlas, shade, colourTable(scale.isSigned, nothing, none, isOnDark));
      scene.setPicture(pixels, laid.atlas.width, laid.atlas.height);
    }),
  ];
  return () => {
    for (const stop of stops) stop();
  };
}
