import { decadeOf, tenTo } from '../maths/decade.ts';
import * as maths from '../maths/maths.ts';
import { DEG } from '../units/angle.ts';
import type { Mark, Mm } from './drawing.ts';
import { FINE, INK, WHITE } from './ink.ts';
import { leading, type Piece, rect, words } from './marks.ts';
import { READ } from './measure.ts';
import { FOOT_m, type SheetUnits, scaleWords } from './sheet-units.ts';

/**
 * North point: an arrow to true north, turned against the drawing as the site is.
 * @param north_deg  true north, clockwise from the top of the page
 */
export function northPoint(cx: Mm, cy: Mm, radius: Mm, north_deg: number): Mark {
  const s = maths.sin(north_deg * DEG);
  const c = maths.cos(north_deg * DEG);
  const at = (along: number, across: number): readonly [Mm, Mm] => [
    cx + radius * (along * s + across * c),
    cy - radius * (along * c - across * s),
  ];
  const letter = at(1.34, 0);
  return {
    kind: 'group',
    label: 'true north',
    marks: [
      { kind: 'circle', at: [cx, cy], radius: radius * 0.62, stroke: FINE },
      { kind: 'path', closed: true, runs: [[at(1, 0), at(-0.62, 0.36), at(-0.36, 0)]], fill: WHITE, stroke: FINE },
      { kind: 'path', closed: true, runs: [[at(1, 0), at(-0.62, -0.36), at(-0.36, 0)]], fill: INK, stroke: FINE },
      words('N', letter[0], letter[1] + READ * 0.35, { face: 'semibold', anchor: 'middle' }),
    ],
  };
}

/** The longest round length of ground whose bar is no wider than a place, in metres, or in feet. */
export function barLength(width: Mm, scale: number, units: SheetUnits = 'metric'): number {
  const most = (width * scale) / 1000 / (units === 'imperial' ? FOOT_m : 1);
  const ten = tenTo(decadeOf(most));
  for (const k of [5, 2, 1]) if (k * ten <= most) return k * ten;
  return ten;
}

/** Scale bar with its lengths in metres or feet, and the scale in words under it. */
export function scaleBar(x: Mm, top: Mm, width: Mm, scale: number, paper: string, units: SheetUnits = 'metric'): Piece {
  const whole = barLength(width - 12, scale, units);
  const length = (whole * (units === 'imperial' ? FOOT_m : 1) * 1000) / scale;
  const y = top + leading(READ);
  const marks: Mark[] = [];
  const parts = String(whole).startsWith('2') ? 4 : 5;
  for (let i = 0; i < parts; i++) {
    const part = length / parts;
    marks.push(rect(x + i * part, y, part, 1.4, { fill: i % 2 === 0 ? INK : WHITE, stroke: FINE }));
  }
  const label = (m: number): string => String(Number(m.toFixed(2)));
  return {
    height: leading(READ) * 2 + 4,
    marks: [
      { kind: 'group', label: 'scale bar', marks },
      words('0', x, y - 1.2, { anchor: 'start' }),
      words(label(whole / 2), x + length / 2, y - 1.2, { anchor: 'middle' }),
      words(`${label(whole)} ${units === 'imperial' ? 'ft' : 'm'}`, x + length, y - 1.2, {
        anchor: length > width - 12 ? 'end' : 'middle',
      }),
      words(`Scale ${scaleWords(scale, units)} on ${paper}`, x, y + 1.4 + leading(READ), { face: 'semibold' }),
    ],
  };
}
