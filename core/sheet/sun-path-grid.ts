import * as maths from '../maths/maths.ts';
import { DEG, wrap360 } from '../units/angle.ts';
import type { Mark, Mm, Stroke } from './drawing.ts';
import { HAIR, INK, SOFT, WHITE } from './ink.ts';
import { line, rect } from './marks.ts';
import { READ } from './measure.ts';
import type { LabelRoom, LabelSpot, LabelText } from './sun-path-labels.ts';
import { type PagePoint, type SkyView, skyOnPage } from './sun-path-view.ts';

const FINE_GRID: Stroke = { colour: HAIR, width: 0.15 };
const GRID: Stroke = { colour: HAIR, width: 0.25 };
const EDGE: Stroke = { colour: SOFT, width: 0.25 };

const CARDINAL: { readonly [bearing: number]: string } = { 0: 'N', 90: 'E', 180: 'S', 270: 'W' };

/** A disc with a radius below this is drawn with fewer lines and names [mm]. */
export const SMALL_DISC: Mm = 32;

/** What a bearing is called: a letter at the quarters, degrees between them. */
const bearingLabel = (bearing: number): LabelText =>
  CARDINAL[bearing] === undefined
    ? { text: `${bearing}°`, size: READ, colour: SOFT }
    : { text: CARDINAL[bearing], size: READ, face: 'semibold', colour: INK };

/** Bearings that are named, the quarters first, so that they have the first choice of place. */
const BEARINGS = [0, 90, 180, 270, 30, 60, 120, 150, 210, 240, 300, 330];

/** Rings or lines of altitude and bearings, without their names. */
export function skyGrid(view: SkyView): readonly Mark[] {
  return view.kind === 'stereographic' ? discGrid(view) : frameGrid(view);
}

function discGrid(view: SkyView & { kind: 'stereographic' }): readonly Mark[] {
  const { centre, radius } = view;
  const spoke = (bearing: number, from_deg: number, to_deg: number, stroke: Stroke): Mark =>
    line(...skyOnPage(view, bearing * DEG, from_deg * DEG), ...skyOnPage(view, bearing * DEG, to_deg * DEG), stroke);
  const ring = (altitude: number): Mark => ({
    kind: 'circle',
    at: centre,
    radius: radius * maths.tan(((90 - altitude) * DEG) / 2),
    stroke: altitude % 30 === 0 ? GRID : FINE_GRID,
  });
  const tick = (bearing: number): Mark => {
    const long = bearing % 30 === 0 ? 1.6 : 0.9;
    const [s, c] = [maths.sin(bearing * DEG), maths.cos(bearing * DEG)];
    const end = radius + long;
    return line(centre[0] + s * radius, centre[1] - c * radius, centre[0] + s * end, centre[1] - c * end, EDGE);
  };
  return [
    { kind: 'circle', at: centre, radius, fill: WHITE },
    ...[10, 20, 30, 40, 50, 60, 70, 80].filter((a) => radius >= SMALL_DISC || a % 30 === 0).map(ring),
    ...BEARINGS.map((b) => spoke(b, 0, b % 90 === 0 ? 90 : 80, b % 90 === 0 ? GRID : FINE_GRID)),
    ...Array.from({ length: 36 }, (_, i) => i * 10)
      .filter((b) => radius >= SMALL_DISC || b % 30 === 0)
      .map(tick),
    { kind: 'circle', at: centre, radius, stroke: EDGE },
  ];
}

function frameGrid(view: SkyView & { kind: 'altitude-azimuth' }): readonly Mark[] {
  const { x, y, width, height } = view.frame;
  const foot = y + height;
  const marks: Mark[] = [rect(x, y, width, height, { fill: WHITE })];
  for (let a = 10; a < view.top_deg; a += 10) {
    const level = skyOnPage(view, 0, a * DEG)[1];
    marks.push(line(x, level, x + width, level, a % 30 === 0 ? GRID : FINE_GRID));
  }
  for (let off = -180; off <= 180; off += 10) {
    const at = x + width * (0.5 + off / 360);
    const bearing = view.middle_deg + off;
    if (bearing % 30 === 0) marks.push(line(at, y, at, foot, bearing % 90 === 0 ? GRID : FINE_GRID));
    marks.push(line(at, foot, at, foot + (bearing % 30 === 0 ? 1.6 : 0.9), EDGE));
  }
  marks.push(rect(x, y, width, height, { stroke: EDGE }));
  return marks;
}

/** The line of the horizon, for names to keep off. */
export function horizonLine(view: SkyView): readonly PagePoint[] {
  if (view.kind === 'altitude-azimuth') {
    const { x, y, width, height } = view.frame;
    return [
      [x, y + height],
      [x + width, y + height],
    ];
  }
  return Array.from({ length: 73 }, (_, i) => skyOnPage(view, i * 5 * DEG, 0));
}

/** Names of the bearings. */
export function bearingNames(view: SkyView, room: LabelRoom): readonly Mark[] {
  const isSmall = view.kind === 'stereographic' && view.radius < SMALL_DISC;
  return bearingSpots(view).flatMap(({ bearing, spot }) => {
    if (isSmall && bearing % 90 !== 0) return [];
    const label = bearingLabel(bearing);
    return room.find(label, [spot], []) === null ? [] : room.take(label, spot, null);
  });
}

/** Names of the altitudes, each where there is room. */
export function altitudeNames(view: SkyView, room: LabelRoom): readonly Mark[] {
  const marks: Mark[] = [];
  const place = (
    label: LabelText,
    spots: readonly LabelSpot[],
    off: readonly string[],
    ground: string | null,
  ): void => {
    const spot = room.find(label, spots, off);
    if (spot !== null) marks.push(...room.take(label, spot, ground));
  };
  const isSmall = view.kind === 'stereographic' && view.radius < SMALL_DISC;
  for (const altitude of isSmall ? [30, 60] : [30, 60, 10, 20, 40, 50, 70, 80]) {
    const label: LabelText = { text: `${altitude}°`, size: READ, colour: SOFT };
    const spots = view.kind === 'stereographic' ? ringSpots(view, altitude) : levelSpots(view, altitude);
    place(label, spots, ['date', 'hour'], view.kind === 'stereographic' ? WHITE : null);
  }
  return marks;
}

/** Just outside the rim; under the frame, where the bearing at its ends is named at both. The quarters choose first. */
function bearingSpots(view: SkyView): readonly { readonly bearing: number; readonly spot: LabelSpot }[] {
  if (view.kind === 'stereographic') {
    const out = view.radius + 4.4;
    return BEARINGS.map((bearing) => {
      const [s, c] = [maths.sin(bearing * DEG), maths.cos(bearing * DEG)];
      return { bearing, spot: { at: [view.centre[0] + s * out, view.centre[1] - c * out], turn_deg: 0 } };
    });
  }
  const { x, y, width, height } = view.frame;
  return [-180, -90, 0, 90, 180, -150, -120, -60, -30, 30, 60, 120, 150].map((off) => ({
    bearing: wrap360(view.middle_deg + off),
    spot: { at: [x + width * (0.5 + off / 360), y + height + 4], turn_deg: 0 },
  }));
}

/** On the ring, where the sun is least likely to be: round from the dark pole of the sky. */
function ringSpots(view: SkyView & { kind: 'stereographic' }, altitude: number): readonly LabelSpot[] {
  return [0, 180, 15, -15, 165, -165, 30, -30, 45, -45, 135, -135, 60, -60, 90, -90].map((bearing) => ({
    at: skyOnPage(view, bearing * DEG, altitude * DEG),
    turn_deg: 0,
  }));
}

/** Left of the frame. */
function levelSpots(view: SkyView & { kind: 'altitude-azimuth' }, altitude: number): readonly LabelSpot[] {
  if (altitude > view.top_deg) return [];
  const at: readonly [Mm, Mm] = [view.frame.x - 4.6, skyOnPage(view, 0, altitude * DEG)[1]];
  return [{ at, turn_deg: 0 }];
}
