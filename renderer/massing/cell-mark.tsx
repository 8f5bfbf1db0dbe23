import { computed } from '@preact/signals';
import { cornersOfCell } from '../maps/map-cells.ts';
import { cursor, mapScale, pointed, readCell, shownMap } from '../maps/map-shown.ts';
import { mapNumber } from '../maps/map-words.ts';
import { faceName } from '../state/names.ts';
import { words } from '../words/words.ts';
import { project } from './camera.ts';
import { laidMap } from './laid-map.ts';
import { camera, size } from './view-state.ts';

/** The cell that is read: the keyboard's while it reads, else the one under the pointer. */
const read = computed(() => {
  const place = cursor.value ?? pointed.value;
  const cells = place === null ? undefined : laidMap.value?.cells[place.surface];
  const [shown, scale] = [shownMap.value, mapScale.value];
  if (place === null || cells === undefined || shown === null || scale === null) return null;
  const reading = readCell(cells, place);
  const surface = shown.picture.surfaces[place.surface]?.surface;
  if (reading === null || surface === undefined) return null;
  const text =
    reading.kind === 'value'
      ? `${mapNumber(scale, reading.value)} ${scale.unit}`
      : { 'built-over': words.maps.builtOver, 'not-there': words.maps.notThere, unknown: words.maps.unknown }[
          reading.kind
        ];
  const where = surface.kind === 'ground' ? words.names.ground : faceName(shown.model, surface);
  return { corners: cornersOfCell(cells, place.cell), text, where };
});

/** The cell that is read, outlined, with its number beside it. */
export function CellMark() {
  const found = read.value;
  if (found === null) return null;
  const corners = found.corners.map((p) => project(camera.value, size.value, p));
  const path = `M${corners.map(([x, y]) => `${x.toFixed(1)} ${y.toFixed(1)}`).join('L')}Z`;
  const x = corners.reduce((sum, p) => sum + p[0], 0) / corners.length;
  const top = Math.min(...corners.map((p) => p[1]));
  return (
    <>
      <svg class="map-cell" aria-hidden="true">
        <path class="halo" d={path} />
        <path d={path} />
      </svg>
      <div class="tag reading" style={{ left: `${Math.round(x)}px`, top: `${Math.round(top)}px` }}>
        <strong>{found.text}</strong> {found.where}
      </div>
    </>
  );
}

/** The same for a reader of the screen, while the keyboard reads. */
export function CellReader() {
  const found = read.value;
  return (
    <p class="unseen" role="status">
      {cursor.value === null || found === null ? '' : words.maps.reading(found.text, found.where)}
    </p>
  );
}
