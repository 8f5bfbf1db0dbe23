import * as maths from '../maths/maths.ts';
import type { Mark, Mm } from './drawing.ts';
import { INK } from './ink.ts';
import { CAP_HEIGHT, measure } from './measure.ts';
import type { Rect } from './paper.ts';
import type { PagePoint } from './sun-path-view.ts';

/** A label with its middle at a place, turned anticlockwise. */
export type LabelSpot = { readonly at: PagePoint; readonly turn_deg: number };
export type LabelText = {
  readonly text: string;
  readonly size: Mm;
  readonly face?: 'regular' | 'semibold';
  readonly colour?: string;
};

type Box = {
  readonly at: PagePoint;
  /** Along the text, and square to it. */
  readonly ux: number;
  readonly uy: number;
  readonly halfWidth: Mm;
  readonly halfHeight: Mm;
};

/** Clear of other labels by so much [mm]. */
const CLEAR: Mm = 0.7;

/**
 * What has been drawn where, so that labels find a place of their own: they never touch each other, and they keep off the lines
 * that they are told to.
 */
export class LabelRoom {
  readonly #frame: Rect;
  readonly #boxes: Box[] = [];
  readonly #lines = new Map<string, (readonly PagePoint[])[]>();

  /** @param frame no label reaches out of it */
  constructor(frame: Rect) {
    this.#frame = frame;
  }

  /** Lines of one kind, to be kept off by the name of the kind. */
  addLines(kind: string, lines: readonly (readonly PagePoint[])[]): void {
    this.#lines.set(kind, [...(this.#lines.get(kind) ?? []), ...lines]);
  }

  /** Keeps labels off a round thing. */
  addDisc(at: PagePoint, radius: Mm): void {
    this.#boxes.push({ at, ux: 1, uy: 0, halfWidth: radius, halfHeight: radius });
  }

  /**
   * The first of several spots where the label touches no other and none of the lines named.
   * @param off kinds of line to keep off
   */
  find(label: LabelText, spots: Iterable<LabelSpot>, off: readonly string[]): LabelSpot | null {
    for (const spot of spots) {
      const box = boxOf(label, spot);
      if (this.#isFree(box, off)) return spot;
    }
    return null;
  }

  /** Takes the spot. @returns the marks of the label. @param ground colour to lay under it, where it stands on a line */
  take(label: LabelText, spot: LabelSpot, ground: string | null): readonly Mark[] {
    const box = boxOf(label, spot);
    this.#boxes.push(box);
    return [...(ground === null ? [] : [underlay(box, ground)]), centred(label, spot)];
  }

  #isFree(box: Box, off: readonly string[]): boolean {
    const { x, y, width, height } = this.#frame;
    for (const [cx, cy] of corners(box)) if (cx < x || cx > x + width || cy < y || cy > y + height) return false;
    if (this.#boxes.some((other) => overlap(box, other))) return false;
    return !off.some((kind) => (this.#lines.get(kind) ?? []).some((line) => crosses(box, line)));
  }
}

function boxOf({ text, size, face }: LabelText, { at, turn_deg }: LabelSpot): Box {
  const turn = (turn_deg * Math.PI) / 180;
  return {
    at,
    ux: maths.cos(turn),
    uy: -maths.sin(turn),
    halfWidth: measure(text, size, face) / 2 + CLEAR / 2,
    halfHeight: (size * CAP_HEIGHT) / 2 + CLEAR / 2,
  };
}

function corners({ at, ux, uy, halfWidth: w, halfHeight: h }: Box): PagePoint[] {
  const corner = (s: number, t: number): PagePoint => [
    at[0] + s * w * ux - t * h * uy,
    at[1] + s * w * uy + t * h * ux,
  ];
  return [corner(-1, -1), corner(1, -1), corner(1, 1), corner(-1, 1)];
}

/** Two turned rectangles overlap unless a side of one of them parts them. */
function overlap(a: Box, b: Box): boolean {
  const reach = Math.hypot(a.halfWidth, a.halfHeight) + Math.hypot(b.halfWidth, b.halfHeight);
  if (Math.hypot(a.at[0] - b.at[0], a.at[1] - b.at[1]) > reach) return false;
  return !parted(a, b) && !parted(b, a);
}

function parted(a: Box, b: Box): boolean {
  const local = corners(b).map(([x, y]): PagePoint => {
    const [dx, dy] = [x - a.at[0], y - a.at[1]];
    return [dx * a.ux + dy * a.uy, dy * a.ux - dx * a.uy];
  });
  const xs = local.map((p) => p[0]);
  const ys = local.map((p) => p[1]);
  return (
    Math.min(...xs) > a.halfWidth ||
    Math.max(...xs) < -a.halfWidth ||
    Math.min(...ys) > a.halfHeight ||
    Math.max(...ys) < -a.halfHeight
  );
}

/** Whether a line runs into a turned rectangle: each of its stretches clipped to it (Liang and Barsky). */
function crosses(box: Box, line: readonly PagePoint[]): boolean {
  const { at, ux, uy, halfWidth: w, halfHeight: h } = box;
  const reach = Math.hypot(w, h);
  for (let i = 1; i < line.length; i++) {
    const a = line[i - 1] as PagePoint;
    const b = line[i] as PagePoint;
    if (Math.min(a[0], b[0]) > at[0] + reach || Math.max(a[0], b[0]) < at[0] - reach) continue;
    if (Math.min(a[1], b[1]) > at[1] + reach || Math.max(a[1], b[1]) < at[1] - reach) continue;
    const [ax, ay] = [a[0] - at[0], a[1] - at[1]];
    const [px, py] = [ax * ux + ay * uy, ay * ux - ax * uy];
    const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
    const [qx, qy] = [dx * ux + dy * uy, dy * ux - dx * uy];
    let [from, to] = [0, 1];
    for (const [p, q] of [
      [-qx, px + w],
      [qx, w - px],
      [-qy, py + h],
      [qy, h - py],
    ] as const) {
      if (p === 0) {
        if (q < 0) to = -1;
      } else if (p < 0) from = Math.max(from, q / p);
      else to = Math.min(to, q / p);
    }
    if (from <= to) return true;
  }
  return false;
}

const underlay = (box: Box, fill: string): Mark => ({ kind: 'path', runs: [corners(box)], closed: true, fill });

function centred({ text, size, face = 'regular', colour = INK }: LabelText, { at, turn_deg }: LabelSpot): Mark {
  const turn = (turn_deg * Math.PI) / 180;
  const drop = (size * CAP_HEIGHT) / 2;
  return {
    kind: 'text',
    text,
    at: [at[0] + maths.sin(turn) * drop, at[1] + maths.cos(turn) * drop],
    size,
    face,
    colour,
    anchor: 'middle',
    tabular: true,
    ...(turn_deg === 0 ? {} : { turn_deg }),
  };
}
