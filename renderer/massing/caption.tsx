import { civilOf } from '../../core/sun/civil.ts';
import { shownMap } from '../maps/map-shown.ts';
import { isMapOn, quantity } from '../maps/map-state.ts';
import { cellSize, periodText } from '../maps/map-words.ts';
import { scheme } from '../state/document.ts';
import { instant } from '../state/moment.ts';
import { moment } from '../state/studies.ts';
import { degrees } from '../ui/format.ts';
import { words } from '../words/words.ts';

/** What the drawing shows: the moment in civil time, and where the sun stands. */
export function Caption() {
  const at = instant.value;
  const zone = scheme.value?.site.zone;
  const sun = moment.value?.value.sun;
  if (at === null || zone === undefined) return null;
  if (isMapOn.value) return <MapCaption />;
  return (
    <p class="caption">
      <strong>{civilOf(at.instant_ms, zone).text}</strong>
      {sun === undefined ? null : (
        <span>
          {sun.altitude_deg > 0
            ? words.moment.sunUp(degrees(sun.altitude_deg, 1), degrees(sun.azimuth_deg, 1))
            : words.moment.sunDown(degrees(sun.azimuth_deg, 1), degrees(sun.altitude_deg, 1))}
        </span>
      )}
    </p>
  );
}

/** For when the map holds, and how it was made. */
function MapCaption() {
  const shown = shownMap.value;
  if (shown === null) return null;
  const made = words.maps.made(`${shown.step_min}`, cellSize(shown.spacing_m));
  const left = [
    quantity.value === 'energy' ? words.maps.clear : '',
    shown.scheme.trees.length > 0 ? words.maps.crowns : '',
  ].filter(Boolean);
  return (
    <p class="caption">
      <strong>{periodText(shown.dates)}</strong>
      <span>{[made, ...left].join(', ')}</span>
    </p>
  );
}
