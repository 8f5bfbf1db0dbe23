import { computed } from '@preact/signals';
import { cividisRgb } from '../../core/sheet/cividis.ts';
import { divergingRgb } from '../../core/sheet/diverging.ts';
import { scheme } from '../state/document.ts';
import { faceOf } from '../state/faces.ts';
import { faceName } from '../state/names.ts';
import { leadOf } from '../state/selection.ts';
import { theme } from '../state/theme.ts';
import { Button } from '../ui/button.tsx';
import { fixed, signed } from '../ui/format.ts';
import { Progress } from '../ui/progress.tsx';
import { words } from '../words/words.ts';
import { spreadOf } from './map-picture.ts';
import type { MapScale } from './map-scale.ts';
import { mapScale, shownMap } from './map-shown.ts';
import { arrivals, isMapStale, mapJob, quantity, side, stopWorkingOut, surfaces, workOutMap } from './map-state.ts';
import { mapNumber } from './map-words.ts';

const WIDTH = 232;
const INSET = 16;

/** What the colours of the map mean, with numbers, and how the work on it stands. */
export function MapKey() {
  const scale = mapScale.value;
  return (
    <section class="map-key" aria-label={words.maps.panel}>
      <h3>{titleOf()}</h3>
      {scale === null ? null : <Ramp scale={scale} />}
      <Spread />
      <MapWork />
    </section>
  );
}

function titleOf(): string {
  const of = quantity.value === 'energy' ? 'energy' : 'sun';
  return words.maps.title[side.value === 'change' ? (`${of}Change` as const) : of];
}

const STOPS = 24;

function Ramp({ scale }: { scale: MapScale }) {
  const { isSigned, most, ticks, decimals, unit } = scale;
  const isOnDark = theme.value === 'dark';
  const colour = (t: number): string =>
    `rgb(${(isSigned ? divergingRgb(2 * t - 1, isOnDark) : cividisRgb(t)).join(' ')})`;
  const stops = Array.from({ length: STOPS + 1 }, (_, i) => colour(i / STOPS));
  const x = (v: number): number => INSET + (isSigned ? (v + most) / (2 * most) : v / most) * (WIDTH - 2 * INSET);
  const writeTo = (places: number, v: number): string => (isSigned ? signed(v, places) : fixed(v, places));
  // Where they would touch, every other number is left out; of a signed scale never an end nor the middle.
  const isRoomy = ticks.length * (writeTo(decimals, most).length + 2) * 7 < WIDTH;
  const last = ticks.length - 1;
  const isShown = (i: number): boolean =>
    isRoomy || (isSigned && last % 4 !== 0 ? i === 0 || i === last / 2 || i === last : i % 2 === 0);
  const isWhole = ticks.every((v, i) => !isShown(i) || Math.abs(v - Math.round(v)) < 1e-9);
  const write = (v: number): string => writeTo(isWhole ? 0 : decimals, v);
  return (
    <div class="map-ramp">
      <div class="ramp" style={{ background: `linear-gradient(to right, ${stops.join(', ')})` }} aria-hidden="true" />
      <svg
        width={WIDTH}
        height="24"
        role="img"
        aria-label={`${ticks
          .filter((_, i) => isShown(i))
          .map(write)
          .join(', ')} ${unit}`}
      >
        {ticks.map((v, i) => (
          <g key={v}>
            <path d={`M${x(v)} 0v${isSigned && v === 0 ? 7 : 5}`} />
            {isShown(i) ? (
              <text x={x(v)} y="18" text-anchor="middle">
                {write(v)}
              </text>
            ) : null}
          </g>
        ))}
      </svg>
      <div class="ramp-foot">
        {isSigned ? (
          <>
            <span>{words.maps.less}</span>
            <span>{unit}</span>
            <span>{words.maps.more}</span>
          </>
        ) : (
          <>
            <span class="ramp-none">
              {quantity.value === 'sun' ? (
                <>
                  <span class="swatch none" aria-hidden="true" /> {words.maps.none}
                </>
              ) : null}
            </span>
            <span>{unit}</span>
          </>
        )}
      </div>
    </div>
  );
}

/** Least, mean and most of the selected face, or of all that is shown. */
const spread = computed(() => {
  arrivals.value;
  const shown = shownMap.value;
  const of = quantity.value;
  if (shown === null || of === 'off') return null;
  const id = leadOf('face');
  const face = id === null ? null : faceOf(id);
  const index =
    face === null
      ? -1
      : shown.picture.surfaces.findIndex(
          ({ surface: s }) =>
            s.kind === face.kind &&
            s.block === face.block &&
            (s.kind === 'roof' || face.kind === 'roof' || s.wall === face.wall),
        );
  const found = spreadOf(shown.picture, of, side.value, index < 0 ? undefined : [index]);
  const name = face !== null && index >= 0 ? faceName(shown.model, face) : words.maps.whole;
  return found === null ? null : { name, ...found };
});

function Spread() {
  const [found, scale] = [spread.value, mapScale.value];
  if (found === null || scale === null) return null;
  const write = (v: number): string => mapNumber(scale, v * scale.factor);
  return (
    <p class="map-spread">
      <strong>{found.name}</strong>
      <span>
        {words.maps.spread(write(found.least), write(found.mean), write(found.most))} {scale.unit}
      </span>
    </p>
  );
}

function MapWork() {
  const job = mapJob.value;
  if (surfaces.value.length === 0 && scheme.value !== null) return <p class="soft">{words.maps.nothingAsked}</p>;
  if (job.kind === 'working')
    return <Progress text={words.maps.working} done={job.done} total={job.total} onStop={stopWorkingOut} />;
  if (job.kind === 'failed')
    return (
      <p class="map-failed" role="alert">
        {words.status.workerFailed(words.maps.panel, job.message)}
      </p>
    );
  const again = (why: string, press: string) => (
    <p class="map-again">
      {why} <Button onPress={() => void workOutMap()}>{press}</Button>
    </p>
  );
  if (isMapStale.value) return again(words.maps.stale, words.maps.again);
  if (job.kind === 'stopped') return again(words.maps.stopped, words.maps.goOn);
  return <p class="soft">{words.maps.hint}</p>;
}
