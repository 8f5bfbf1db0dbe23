import type { Model, RoomForm, WindowForm } from '../form/model.ts';
import { pointOn } from '../form/panel.ts';
import * as maths from '../maths/maths.ts';
import { centroid } from '../plane/ring.ts';
import { DEG } from '../units/angle.ts';
import type { Mark, Mm } from './drawing.ts';
import { ACCENT, BEAM, CONTEXT_FILL, EXISTING_LINE, FINE, FRAME, INK, PROPOSED_FILL, SOFT } from './ink.ts';
import { line, type Piece, rect, words } from './marks.ts';
import { measure, READ, shorten } from './measure.ts';
import type { Rect } from './paper.ts';
import { onPage, type PlanView } from './plan-view.ts';
import { bestScale } from './scale.ts';
import { northPoint, scaleBar } from './scale-marks.ts';

/** Rooms whose floors lie this near each other are on one storey [m]. */
const STOREY_m = 0.6;
/** Beside the plan: north, scale bar and what the marks mean. */
const BESIDE: Mm = 62;

/**
 * Where a room lies: the storey of its block, its windows with their names, and the way the sun comes in at a moment.
 * @param sun_deg  true azimuth of the sun; null draws none
 */
export function roomPlan(
  x: Mm,
  top: Mm,
  width: Mm,
  height: Mm,
  model: Model,
  room: RoomForm,
  sun_deg: number | null,
): Piece | null {
  const block = model.solids.find((s) => s.id === room.block);
  if (!block) return null;
  const frame: Rect = { x, y: top, width: width - BESIDE, height };
  const xs = block.outline.map((p) => p[0]);
  const ys = block.outline.map((p) => p[1]);
  const size = [Math.max(...xs) - Math.min(...xs), Math.max(...ys) - Math.min(...ys)] as const;
  const scale = bestScale(size, [frame.width - 24, frame.height - 16]);
  if (scale === null) return null;
  const centre = [(Math.max(...xs) + Math.min(...xs)) / 2, (Math.max(...ys) + Math.min(...ys)) / 2] as const;
  const view: PlanView = { frame, scale, centre };
  const marks: Mark[] = [
    {
      kind: 'path',
      closed: true,
      runs: [block.outline.map((p) => onPage(view, p))],
      fill: CONTEXT_FILL,
      stroke: EXISTING_LINE,
    },
  ];
  const storey = model.rooms.filter((r) => r.block === room.block && Math.abs(r.floor_m - room.floor_m) < STOREY_m);
  for (const r of [...storey.filter((s) => s.id !== room.id), room]) {
    const runs = [r.outline.map((p) => onPage(view, p))];
    marks.push({
      kind: 'path',
      closed: true,
      runs,
      ...(r.id === room.id ? { fill: PROPOSED_FILL, stroke: { colour: ACCENT, width: 0.35 } } : { stroke: FINE }),
    });
  }
  for (const r of storey) marks.push(...roomName(view, r, r.id === room.id));
  for (const w of model.windows)
    if (storey.some((r) => r.id === w.room) && w.tilt_deg > 45) marks.push(...windowMark(view, w, w.room === room.id));
  if (sun_deg !== null) marks.push(...sunArrow(view, room, model.north_rad / DEG + sun_deg));
  const side = x + width - BESIDE + 8;
  const bar = scaleBar(side + 18, top + 1, BESIDE - 28, scale, 'A4');
  return {
    height,
    marks: [
      { kind: 'group', label: `plan of room ${room.id}`, clip: [frame.x, frame.y, frame.width, frame.height], marks },
      rect(frame.x, frame.y, frame.width, frame.height, { stroke: FRAME }),
      northPoint(side + 6, top + 12, 6, model.north_rad / DEG),
      ...bar.marks,
      ...(sun_deg === null ? [] : [words('Arrow: the way the sun comes', side, top + 28, { colour: SOFT })]),
    ],
  };
}

function roomName(view: PlanView, room: RoomForm, chosen: boolean): readonly Mark[] {
  const ring = room.outline.map((p) => onPage(view, p));
  const [x, y] = centroid(ring);
  const xs = ring.map((p) => p[0]);
  const wide = Math.max(...xs) - Math.min(...xs) - 2;
  const text = shorten(room.id, wide, READ, chosen ? 'semibold' : 'regular');
  return measure(text, READ) > wide
    ? []
    : [
        words(text, x, y + READ * 0.35, {
          anchor: 'middle',
          face: chosen ? 'semibold' : 'regular',
          colour: chosen ? INK : SOFT,
        }),
      ];
}

/** A window as a thick stroke in its wall, named on the outside where the room is the chosen one. */
function windowMark(view: PlanView, w: WindowForm, chosen: boolean): readonly Mark[] {
  const a = onPage(view, pointOn(w, 0, 0, 0));
  const b = onPage(view, pointOn(w, w.width_m, 0, 0));
  const marks: Mark[] = [line(a[0], a[1], b[0], b[1], { colour: chosen ? ACCENT : SOFT, width: chosen ? 1.2 : 0.7 })];
  if (!chosen) return marks;
  const [nx, ny] = [w.normal[0], -w.normal[1]];
  const away = Math.abs(ny) * 3.2 + Math.abs(nx) * 1.6;
  const anchor = nx > 0.5 ? 'start' : nx < -0.5 ? 'end' : 'middle';
  marks.push(words(w.id, (a[0] + b[0]) / 2 + nx * away, (a[1] + b[1]) / 2 + ny * away + READ * 0.35, { anchor }));
  return marks;
}

/** An arrow that points the way the light goes, ending short of the room. @param bearing_deg  towards the sun, from the top of the page */
function sunArrow(view: PlanView, room: RoomForm, bearing_deg: number): readonly Mark[] {
  const [cx, cy] = centroid(room.outline.map((p) => onPage(view, p)));
  const [ux, uy] = [maths.sin(bearing_deg * DEG), -maths.cos(bearing_deg * DEG)];
  const { x, y, width, height } = view.frame;
  const reach = (p: number, u: number, low: number, high: number): number =>
    u > 1e-9 ? (high - p) / u : u < -1e-9 ? (low - p) / u : Number.POSITIVE_INFINITY;
  const far = Math.min(reach(cx, ux, x + 3, x + width - 3), reach(cy, uy, y + 3, y + height - 3));
  const near = Math.max(4, Math.min(far - 6, far * 0.55));
  const at = (r: number, side = 0): readonly [Mm, Mm] => [cx + ux * r - uy * side, cy + uy * r + ux * side];
  const stroke = { colour: BEAM, width: 0.9 };
  return [
    line(...at(far), ...at(near), stroke),
    { kind: 'path', closed: true, runs: [[at(near - 1.6), at(near + 1.8, 1.4), at(near + 1.8, -1.4)]], fill: BEAM },
  ];
}
