import { useMemo } from 'preact/hooks';
import { sunPathBox, sunPathLayout, sunPathMoment } from '../../core/sheet/sun-path.ts';
import type { SunPathInput } from '../../core/sheet/sun-path-input.ts';
import { pageToSky } from '../../core/sheet/sun-path-view.ts';
import { moveDays, moveMinutes } from '../state/moment.ts';
import { deskPaint } from '../ui/desk-paint.ts';
import { Marks } from '../ui/drawing-view.tsx';
import { degrees } from '../ui/format.ts';
import { useSize } from '../ui/use-size.ts';
import { words } from '../words/words.ts';
import { drawingOf, inputFor } from './drawing-input.ts';
import { projection, setMomentBySky } from './sun-path-state.ts';

/** A millimetre of the drawing is a millimetre of a screen with the usual 96 dots an inch, so that its text is never small. */
const PX_A_MM = 96 / 25.4;
/** Less than this is no room for a drawing [px]. */
const LEAST_px = 120;

/** The sun paths over the sky, as large as there is room; pointing at a place in the sky sets the clock. */
export function SunPathDrawing() {
  const { ref, width, height } = useSize<HTMLDivElement>();
  const fixed = drawingOf.value;
  return (
    <div ref={ref} class="sun-path-sheet">
      {fixed === null || width < LEAST_px || height < LEAST_px ? null : (
        <Drawing input={inputFor(fixed, projection.value)} width={width} height={height} />
      )}
    </div>
  );
}

type Props = { readonly input: SunPathInput; readonly width: number; readonly height: number };

function Drawing({ input, width, height }: Props) {
  const [wide, high] = [width / PX_A_MM, height / PX_A_MM];
  const { path, place, mask, moment } = input;
  const layout = useMemo(
    () => sunPathLayout(sunPathBox(wide, high), input),
    [path, mask, place.zone, place.name, place.latitude_deg, place.longitude_deg, input.projection, wide, high],
  );
  const sky = useMemo(() => <Marks marks={layout.sky} paint={deskPaint} />, [layout]);
  const point = (event: PointerEvent & { currentTarget: HTMLElement }): void => {
    const box = event.currentTarget.getBoundingClientRect();
    const at = [(event.clientX - box.left) / PX_A_MM, (event.clientY - box.top) / PX_A_MM] as const;
    const direction = pageToSky(layout.view, at);
    if (direction !== null) void setMomentBySky(direction.azimuth_rad, direction.altitude_rad);
  };
  return (
    <div
      class="sun-path-sky"
      role="slider"
      tabIndex={0}
      aria-label={words.sunPath.canvas}
      aria-valuemin={-90}
      aria-valuemax={90}
      aria-valuenow={Math.round(moment?.altitude_deg ?? 0)}
      aria-valuetext={readingOf(moment)}
      onKeyDown={(event) => {
        if (pressKey(event)) event.preventDefault();
      }}
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture(event.pointerId);
        point(event);
      }}
      onPointerMove={(event) => {
        if (event.buttons === 1) point(event);
      }}
    >
      <svg class="drawing" width={width} height={height} viewBox={`0 0 ${wide} ${high}`} aria-hidden="true">
        {sky}
        <Marks marks={sunPathMoment(layout, input)} paint={deskPaint} />
      </svg>
    </div>
  );
}

function readingOf(moment: SunPathInput['moment']): string {
  if (moment === null) return '';
  const { text, altitude_deg, azimuth_deg } = moment;
  const sun =
    altitude_deg > 0 ? words.sunPath.sun(degrees(altitude_deg, 1), degrees(azimuth_deg, 1)) : words.sunPath.down;
  return words.sunPath.reading(text, sun);
}

function pressKey(event: KeyboardEvent): boolean {
  const days = { ArrowLeft: -1, ArrowRight: 1, PageUp: 28, PageDown: -28 }[event.key];
  const minutes = { ArrowUp: 10, ArrowDown: -10 }[event.key];
  if (days !== undefined) moveDays(days);
  else if (minutes !== undefined) moveMinutes(minutes);
  else return false;
  return true;
}
