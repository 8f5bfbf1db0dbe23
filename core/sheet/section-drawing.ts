import type { RoomForm, WindowForm } from '../form/model.ts';
import { pointOn } from '../form/panel.ts';
import * as maths from '../maths/maths.ts';
import type { Point } from '../plane/vec.ts';
import type { Mark, Mm, Stroke } from './drawing.ts';
import { BEAM, EXISTING_FILL, FINE, INK, PROPOSED_LINE, SOFT, THIN, WHITE } from './ink.ts';
import { line, rect, words } from './marks.ts';
import { measure, READ } from './measure.ts';
import { fixed } from './numerals.ts';
import type { Rect } from './paper.ts';
import { dimension, type SheetUnits } from './sheet-units.ts';
import type { SectionPoint, WindowSection } from './window-section.ts';

/** Thickness that a wall is drawn with; the scheme has none [m]. */
const WALL_m = 0.3;
const SLAB_m = 0.25;
/** Of a deep room no more than this is drawn, and air in front of whatever projects furthest [m]. */
const DEEPEST_m = 6;
const AIR_m = 1;

const BEAM_LINE: Stroke = { colour: INK, width: 0.18, dash: [2.4, 1] };
const GLASS_LINE: Stroke = { colour: INK, width: 0.5 };
/** Sun in the section: pale, so that lines over it stay legible. */
const BEAM_FILL = '#f4e3bd';

/** How far a section reaches from the sill's outer edge [m]. */
export type Reach = {
  readonly out: number;
  readonly in: number;
  readonly up: number;
  readonly down: number;
  /** From the face of the wall to the far side of the room, behind the middle of the window. */
  readonly depth: number;
};

/** How deep a room is behind the middle of a window, square to its wall: to the furthest side of its outline [m]. */
function depthBehind(window: WindowForm, room: RoomForm): number {
  const [px, py] = pointOn(window, window.width_m / 2, 0, 0);
  const [nx, ny] = window.normal;
  let depth = 0;
  room.outline.forEach((a, i) => {
    const b = room.outline[(i + 1) % room.outline.length] as Point;
    const side = (p: Point): number => (p[0] - px) * -ny + (p[1] - py) * nx;
    const [sa, sb] = [side(a), side(b)];
    if (sa > 0 === sb > 0) return;
    const t = sa / (sa - sb);
    const [x, y] = [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])];
    depth = Math.max(depth, -((x - px) * nx + (y - py) * ny));
  });
  return depth > 0.5 ? depth : DEEPEST_m;
}

/** What a drawing of a window must show: its storey, and everything that projects from it. */
export function sectionReach(section: WindowSection, window: WindowForm, room: RoomForm): Reach {
  const sill = window.origin[2] - room.floor_m;
  const tops = section.blades.flatMap((b) => b.ends.map((e) => e[1]));
  const depth = depthBehind(window, room);
  const outs = section.blades.flatMap((b) => b.ends.map((e) => e[0]));
  return {
    out: Math.max(0, ...outs) + AIR_m,
    in: Math.min(DEEPEST_m, depth) + WALL_m + 0.2,
    depth,
    up: Math.max(room.height_m - sill + SLAB_m, ...tops) + 0.3,
    down: sill + SLAB_m + 0.15,
  };
}

export type SectionInput = {
  readonly frame: Rect;
  readonly scale: number;
  readonly section: WindowSection;
  readonly window: WindowForm;
  readonly room: RoomForm;
  readonly reach: Reach;
  /** Null: no sun in front of the wall. */
  readonly profile_rad: number | null;
  /** Stretches of the glass in sun, above the sill [m]. */
  readonly lit: readonly (readonly [number, number])[];
  /** Of the dimensions. */
  readonly units: SheetUnits;
};

type Place = (p: SectionPoint) => readonly [Mm, Mm];

/** The section in its frame: outside on the left, inside on the right. */
export function sectionDrawing(input: SectionInput): readonly Mark[] {
  const { frame, scale, section, window, room, reach } = input;
  const k = 1000 / scale;
  const x0 = frame.x + frame.width / 2 + ((reach.out - reach.in) / 2) * k;
  const y0 = frame.y + frame.height / 2 + ((reach.up - reach.down) / 2) * k;
  const at: Place = ([out, up]) => [x0 - out * k, y0 - up * k];
  const sill = window.origin[2] - room.floor_m;
  const marks: Mark[] = [];
  if (input.profile_rad !== null) {
    const back = at([-Math.min(reach.depth, reach.in), 0])[0];
    const clip = [
      frame.x,
      frame.y,
      Math.max(0, Math.min(back, frame.x + frame.width) - frame.x),
      frame.height,
    ] as const;
    marks.push({ kind: 'group', clip, marks: beams(input, at, sill, input.profile_rad) });
    if (input.lit.length === 0) marks.push(...grazing(section, input.profile_rad, sill, at, reach));
  }
  marks.push(...walls(section, room, reach, sill, at));
  for (const blade of section.blades)
    marks.push(line(...at(blade.ends[0]), ...at(blade.ends[1]), { ...PROPOSED_LINE, width: 0.9 }));
  marks.push(line(...at([-section.reveal_m, 0]), ...at([-section.reveal_m, section.height_m]), GLASS_LINE));
  marks.push(...dimensions(section, sill, at, input.units));
  if (input.profile_rad !== null) marks.push(...angleMark(input.profile_rad, section, reach, at));
  return [
    { kind: 'group', label: `section of ${window.id}`, clip: [frame.x, frame.y, frame.width, frame.height], marks },
  ];
}

/** Sunlight as bands from the air through the glass down to the floor. */
function beams(input: SectionInput, at: Place, sill: number, profile_rad: number): readonly Mark[] {
  const { section, reach } = input;
  const slope = maths.tan(profile_rad);
  const glass = -section.reveal_m;
  const far = Math.max(reach.out + 2, 20);
  return input.lit.flatMap(([low, high]) => {
    const outside = (up: number): SectionPoint => [far, up + (far - glass) * slope];
    const floor = (up: number): SectionPoint => [glass - (up + sill) / slope, -sill];
    const band = [outside(high), [glass, high] as const, floor(high), floor(low), [glass, low] as const, outside(low)];
    return [
      { kind: 'path', runs: [band.map(at)], closed: true, fill: BEAM_FILL } as const,
      line(...at(outside(high)), ...at(floor(high)), BEAM_LINE),
      line(...at(outside(low)), ...at(floor(low)), BEAM_LINE),
      line(...at(floor(high)), ...at(floor(low)), { colour: BEAM, width: 1 }),
      line(...at([glass, low]), ...at([glass, high]), { colour: BEAM, width: 1.2 }),
    ];
  });
}

/** Where nothing comes in: the ray that passes the tip of whatever projects furthest, down to the wall. */
function grazing(section: WindowSection, profile_rad: number, sill: number, at: Place, reach: Reach): readonly Mark[] {
  const [out, up] = furthestTip(section);
  if (out <= 0.02) return [];
  const slope = maths.tan(profile_rad);
  const end = Math.max(up - out * slope, -sill - SLAB_m);
  const far = reach.out + 2;
  return [line(...at([far, up + (far - out) * slope]), ...at([out - (up - end) / slope, end]), BEAM_LINE)];
}

/** The end of a device that projects furthest; the head of the opening where none does. */
function furthestTip(section: WindowSection): SectionPoint {
  return section.blades
    .flatMap((b) => b.ends)
    .reduce<SectionPoint>((best, p) => (p[0] > best[0] ? p : best), [0, section.height_m]);
}

/** Wall above and below the window, floor and ceiling. */
function walls(section: WindowSection, room: RoomForm, reach: Reach, sill: number, at: Place): readonly Mark[] {
  const cut = (out1: number, up1: number, out2: number, up2: number): Mark => {
    const [ax, ay] = at([out1, up1]);
    const [bx, by] = at([out2, up2]);
    return rect(ax, by, bx - ax, ay - by, { fill: EXISTING_FILL, stroke: FINE });
  };
  const ceiling = room.height_m - sill;
  const wall = Math.max(WALL_m, section.reveal_m + 0.1);
  const top = Math.max(ceiling + SLAB_m, section.height_m);
  return [
    cut(0, -sill - SLAB_m, -wall, 0),
    ...(top > section.height_m + 1e-6 ? [cut(0, section.height_m, -wall, top)] : []),
    cut(-wall, -sill - SLAB_m, -reach.in, -sill),
    ...(reach.depth < reach.in ? [cut(-reach.depth, -sill, -reach.depth - WALL_m, ceiling)] : []),
    ...(ceiling > section.height_m - 1 ? [cut(-wall, ceiling, -reach.in, ceiling + SLAB_m)] : []),
  ];
}

/** Heights inside, and how far the devices project. */
function dimensions(section: WindowSection, sill: number, at: Place, units: SheetUnits): readonly Mark[] {
  const marks: Mark[] = [];
  const upright = (out: number, from: number, to: number): void => {
    if (to - from < 0.05) return;
    const [x, y1] = at([out, from]);
    const [, y2] = at([out, to]);
    const text = dimension(to - from, units);
    const middle = (y1 + y2) / 2;
    const said = y1 - y2 < 6 ? [words(text, x + 1.6, middle + READ * 0.35)] : boxed(text, x, middle);
    marks.push(line(x, y1, x, y2, THIN), tick(x, y1), tick(x, y2), ...said);
  };
  upright(-1.1, -sill, 0);
  upright(-1.1, 0, section.height_m);
  const furthest = furthestTip(section);
  if (furthest[0] > 0.02) {
    const up = Math.max(...section.blades.flatMap((b) => b.ends.map((e) => e[1]))) + 0.22;
    const [x1, y] = at([furthest[0], up]);
    const [x2] = at([0, up]);
    marks.push(
      line(x1, y, x2, y, THIN),
      tick(x1, y),
      tick(x2, y),
      ...boxed(dimension(furthest[0], units), (x1 + x2) / 2, y),
    );
  }
  return marks;
}

const tick = (x: Mm, y: Mm): Mark => line(x - 0.8, y + 0.8, x + 0.8, y - 0.8, FINE);

/** A figure on a white ground over the line it belongs to. */
function boxed(text: string, x: Mm, y: Mm): readonly Mark[] {
  const half = measure(text, READ) / 2 + 0.6;
  return [rect(x - half, y - 2, 2 * half, 4, { fill: WHITE }), words(text, x, y + READ * 0.35, { anchor: 'middle' })];
}

/** The profile angle at the tip of whatever projects furthest, or at the head. */
function angleMark(profile_rad: number, section: WindowSection, reach: Reach, at: Place): readonly Mark[] {
  const tip = furthestTip(section);
  const radius = Math.min(0.6, reach.out - tip[0] - 0.1);
  const arc: (readonly [Mm, Mm])[] = [];
  for (let i = 0; i <= 16; i++) {
    const a = (profile_rad * i) / 16;
    arc.push(at([tip[0] + radius * maths.cos(a), tip[1] + radius * maths.sin(a)]));
  }
  const [lx, ly] = at([tip[0] + radius + 0.05, tip[1] + 0.06]);
  return [
    line(...at(tip), ...at([tip[0] + radius + 0.3, tip[1]]), THIN),
    { kind: 'path', runs: [arc], closed: false, stroke: { colour: SOFT, width: 0.18 } },
    words(`${fixed((profile_rad * 180) / Math.PI, 1)}°`, lx, ly, { anchor: 'end' }),
  ];
}
