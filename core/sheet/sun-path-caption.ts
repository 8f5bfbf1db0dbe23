import { clockChanges, civilOf, offset_min } from '../sun/civil.ts';
import type { Mark, Mm } from './drawing.ts';
import { FRAME, SOFT } from './ink.ts';
import { line, type Piece, paragraph, rect } from './marks.ts';
import { measure, READ } from './measure.ts';
import { fixed, place } from './numerals.ts';
import type { SunPathInput } from './sun-path-input.ts';
import { DATE_STROKE, HOUR_STROKE, HOUR_STROKE_LATER } from './sun-path-lines.ts';
import { MASK_HATCH } from './sun-path-mask.ts';

export const TITLE = 'Sun path';

/** Brief where room is short: without the heading and the key to the lines. */
export type CaptionAmount = 'full' | 'brief';

/** What the drawing shows, for where, by which clock, and how to read its lines. */
export function sunPathCaption(input: SunPathInput, x: Mm, top: Mm, width: Mm, amount: CaptionAmount): Piece {
  const { place: site, path, moment } = input;
  const isFull = amount === 'full';
  const marks: Mark[] = [];
  let y = top;
  const put = (text: string, style: Parameters<typeof paragraph>[4] = {}): void => {
    const piece = paragraph(text, x, y, width, style);
    marks.push(...piece.marks);
    y += piece.height;
  };
  if (isFull) put(`${TITLE} ${path.year}`, { size: 5, face: 'semibold' });
  if (isFull && site.name.trim() !== '') put(site.name.trim());
  put(`${place(site.latitude_deg, site.longitude_deg)}, ${fixed(site.elevation_m, 0)} m`);
  put(clockWords(site.zone, path.year));
  y += isFull ? 1.6 : 0.8;
  if (moment !== null) {
    put(moment.text, { face: 'semibold' });
    put(sunWords(moment));
    y += isFull ? 1.6 : 0.8;
  }
  if (isFull) {
    const key = lineKey(input, x, y, width);
    marks.push(...key.marks);
    y += key.height;
    put('Broken from the June to the December solstice.', { colour: SOFT });
  }
  put('True altitude, no refraction. Bearings from true north.', { colour: SOFT });
  return { marks, height: y - top };
}

type Key = { readonly sample: (x: Mm, y: Mm) => readonly Mark[]; readonly text: string };

/** Samples of the lines with their meaning, as many side by side as there is room for. */
function lineKey({ mask }: SunPathInput, x: Mm, top: Mm, width: Mm): Piece {
  const keys: readonly Key[] = [
    { sample: (kx, ky) => [line(kx, ky, kx + 8, ky, DATE_STROKE)], text: 'the sun’s way on a date' },
    {
      sample: (kx, ky) => [
        line(kx, ky - 0.8, kx + 8, ky - 0.8, HOUR_STROKE),
        line(kx, ky + 0.8, kx + 8, ky + 0.8, HOUR_STROKE_LATER),
      ],
      text: 'an hour of the clock',
    },
    ...(mask
      ? [
          {
            sample: (kx: Mm, ky: Mm) => [rect(kx, ky - 1.4, 8, 2.8, { hatch: MASK_HATCH, stroke: FRAME })],
            text: `sky hidden from ${mask.of}`,
          },
        ]
      : []),
  ];
  const marks: Mark[] = [];
  let [left, y, height] = [x, top, 0];
  for (const { sample, text } of keys) {
    const wide = 10 + measure(text, READ);
    if (left > x && left + wide > x + width) {
      left = x;
      y += height;
    }
    const piece = paragraph(text, left + 10, y, width - 10);
    marks.push(...sample(left, y + READ * 0.45), ...piece.marks);
    height = piece.height;
    left += wide + 5;
  }
  return { marks, height: y + height - top };
}

function sunWords({ azimuth_deg, altitude_deg }: NonNullable<SunPathInput['moment']>): string {
  const bearing = fixed(azimuth_deg, 1);
  return altitude_deg > 0
    ? `sun ${fixed(altitude_deg, 1)}° high, azimuth ${bearing}°`
    : `sun below the horizon (${fixed(altitude_deg, 1)}°), azimuth ${bearing}°`;
}

const sign = (minutes: number): string =>
  `UTC${minutes < 0 ? '−' : '+'}${String(Math.floor(Math.abs(minutes) / 60)).padStart(2, '0')}:${String(Math.abs(minutes) % 60).padStart(2, '0')}`;

/** A zone and what its clocks show in a year, such as `Europe/London: UTC+00:00, 30 March to 26 October UTC+01:00`. */
export function clockWords(zone: string, year: number): string {
  const start = Date.UTC(year, 0, 1, 12);
  const first = offset_min(start, zone);
  const changes = clockChanges(start, Date.UTC(year + 1, 0, 1), zone);
  const day = (instant_ms: number): string => civilOf(instant_ms, zone).text.replace(/ \d{4},.*$/u, '');
  const [on, off] = changes;
  if (on !== undefined && off !== undefined && changes.length === 2 && off.after_min === first)
    return `${zone}: ${sign(first)}, ${day(on.instant_ms)} to ${day(off.instant_ms)} ${sign(on.after_min)}`;
  const told = changes.map((change) => `from ${day(change.instant_ms)} ${sign(change.after_min)}`);
  return `${zone}: ${[sign(first), ...told].join(', ')}`;
}
