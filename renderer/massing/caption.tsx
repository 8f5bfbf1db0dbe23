import { civilOf } from '../../core/sun/civil.ts';
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
