import type { ShadingMask } from '../shade/sky-view-mask.ts';
import { clockChanges, civilOf, offset_min } from '../sun/civil.ts';
import type { SunPath } from '../sun/sun-path.ts';
import { DEG, toDegrees } from '../units/angle.ts';
import type { Document, Mark, Mm, Page } from './drawing.ts';
import { ACCENT, FRAME, SOFT, WHITE } from './ink.ts';
import { line, type Piece, paragraph, rect } from './marks.ts';
import { measure, READ } from './measure.ts';
import { fixed, place } from './numerals.ts';
import { contentRect, finishPages, type PaperName, type Rect } from './paper.ts';
import { altitudeNames, bearingNames, horizonLine, SMALL_DISC, skyGrid } from './sun-path-grid.ts';
import { LabelRoom } from './sun-path-labels.ts';
import { DATE_STROKE, dateMarks, HOUR_STROKE, HOUR_STROKE_LATER, hourMarks } from './sun-path-lines.ts';
import { MASK_HATCH, maskMarks } from './sun-path-mask.ts';
import { dateNames, hourNames, keepOffPath } from './sun-path-names.ts';
import { type SkyView, type SunPathProjection, skyOnPage } from './sun-path-view.ts';

/** What a sun-path drawing is made of. */
export type SunPathInput = {
  readonly path: SunPath;
  readonly projection: SunPathProjection;
  readonly place: {
    /** Of the scheme or the site; may be empty. */
    readonly name: string;
    readonly latitude_deg: number;
    readonly longitude_deg: number;
    readonly elevation_m: number;
    /** IANA zone of the clock. */
    readonly zone: string;
  };
  /** The moment to mark, with the sun's true altitude; below the horizon it is only told. Null: none. */
  readonly moment: { readonly azimuth_deg: number; readonly altitude_deg: number; readonly text: string } | null;
  /** What hides the sky, and from where, such as `window W3`. */
  readonly mask?: { readonly of: string; readonly hidden: ShadingMask } | null;
};

const TITLE = 'Sun path';
/** Room round the drawing for the names of bearings and altitudes. */
const RIM = { stereographic: 7.5, left: 10, right: 5, top: 2, foot: 7.5 } as const;
/** Widths of a caption beside the drawing; the first that fits the height is taken. */
const CAPTIONS: readonly Mm[] = [66, 88, 112];
const GAP: Mm = 5;

/** The parts of a sun-path drawing on a page; `view` tells where a direction lies, for pointing at it. */
export type SunPathDrawing = { readonly view: SkyView; readonly marks: readonly Mark[] };

/** A sun-path drawing inside a rectangle: the drawing, and its caption beside it or, on an upright one, below. */
export function sunPathDrawing(box: Rect, input: SunPathInput): SunPathDrawing {
  const isWide = box.width > box.height * 1.15;
  const caption = (x: Mm, top: Mm, width: Mm): Piece => captionOf(input, x, top, width);
  const beside = captionWidth(box, (width) => caption(0, 0, width).height);
  const below = isWide ? 0 : caption(0, 0, box.width).height + GAP;
  const room: Rect = isWide
    ? { ...box, width: box.width - beside - GAP }
    : { ...box, height: Math.max(30, box.height - below) };
  const view = viewOf(room, input);
  const used = usedRect(view);
  const words = isWide
    ? caption(used.x + used.width + GAP, box.y, beside)
    : caption(box.x, used.y + used.height + GAP, box.width);
  return { view, marks: [...skyMarks(view, room, input), { kind: 'group', label: 'caption', marks: words.marks }] };
}

const captionWidth = (box: Rect, height: (width: Mm) => Mm): Mm => {
  const most = box.width * 0.45;
  return Math.min(most, CAPTIONS.find((width) => height(Math.min(width, most)) <= box.height) ?? most);
};

/** One sun-path drawing as a page of any size: for screens, and for pictures of its own. */
export function sunPathPage(width: Mm, height: Mm, input: SunPathInput): Page {
  const margin = 2;
  const box: Rect = { x: margin, y: margin, width: width - 2 * margin, height: height - 2 * margin };
  return { width, height, title: titleOf(input), marks: sunPathDrawing(box, input).marks };
}

/** Both drawings as printed pages, each with its caption and the foot that every sheet has. @param note repeated in the foot */
export function sunPathDocument(
  inputs: readonly SunPathInput[],
  paper: PaperName,
  landscape: boolean,
  facts: { readonly title: string; readonly author: string; readonly language: string; readonly note: string },
): Document {
  const contents = inputs.map((input) => ({
    title: titleOf(input),
    marks: sunPathDrawing(contentRect(paper, landscape), input).marks,
  }));
  const title = [facts.title, TITLE].filter((t) => t !== '').join(' – ');
  const { author, language, note } = facts;
  return { title, author, language, pages: finishPages(contents, paper, landscape, note, false) };
}

const PROJECTION_WORDS: { readonly [P in SunPathProjection]: string } = {
  stereographic: 'stereographic',
  'altitude-azimuth': 'altitude over azimuth',
};
const titleOf = (input: SunPathInput): string => `${TITLE}, ${PROJECTION_WORDS[input.projection]}`;

/** The highest sun of a path, with room above it for the names of the hours [°]. */
function topOf(path: SunPath): number {
  const highest = path.dates
    .flatMap((d) => d.runs)
    .reduce((most, run) => run.altitude_rad.reduce((m, a) => Math.max(m, a), most), 0);
  return Math.min(90, Math.max(30, Math.ceil((toDegrees(highest) + 7) / 10) * 10));
}

function viewOf(room: Rect, { projection, path, place: site }: SunPathInput): SkyView {
  if (projection === 'stereographic') {
    const radius = Math.min(room.width, room.height) / 2 - RIM.stereographic;
    return {
      kind: 'stereographic',
      centre: [room.x + radius + RIM.stereographic, room.y + radius + RIM.stereographic],
      radius,
    };
  }
  const width = room.width - RIM.left - RIM.right;
  const height = Math.min(room.height - RIM.top - RIM.foot, width * 0.85);
  return {
    kind: 'altitude-azimuth',
    frame: { x: room.x + RIM.left, y: room.y + RIM.top, width, height },
    middle_deg: site.latitude_deg < 0 ? 0 : 180,
    top_deg: topOf(path),
  };
}

/** The part of the page that a drawing takes up with the names round it. */
function usedRect(view: SkyView): Rect {
  if (view.kind === 'stereographic') {
    const half = view.radius + RIM.stereographic;
    return { x: view.centre[0] - half, y: view.centre[1] - half, width: 2 * half, height: 2 * half };
  }
  const { x, y, width, height } = view.frame;
  return {
    x: x - RIM.left,
    y: y - RIM.top,
    width: width + RIM.left + RIM.right,
    height: height + RIM.top + RIM.foot,
  };
}

function skyMarks(view: SkyView, room: Rect, input: SunPathInput): readonly Mark[] {
  const { mask, moment } = input;
  const path = isSmall(view) ? sparse(input.path) : input.path;
  const labels = new LabelRoom(room);
  keepOffPath(view, path, labels);
  labels.addLines('horizon', [horizonLine(view)]);
  const names = [
    ...bearingNames(view, labels),
    ...dateNames(view, path, labels, 'solstices'),
    ...hourNames(view, path, labels),
    ...dateNames(view, path, labels, 'others'),
    ...altitudeNames(view, labels),
  ];
  return [
    { kind: 'group', label: 'altitudes and bearings', marks: skyGrid(view) },
    ...(mask ? [{ kind: 'group' as const, label: 'hidden sky', marks: maskMarks(view, mask.hidden) }] : []),
    { kind: 'group', label: 'hours of the clock', marks: hourMarks(view, path) },
    { kind: 'group', label: 'dates', marks: dateMarks(view, path) },
    { kind: 'group', label: 'names', marks: names },
    ...(moment && moment.altitude_deg > 0
      ? [{ kind: 'group' as const, label: 'moment', marks: sunMark(view, moment) }]
      : []),
  ];
}

/** A disc on which the lines of every hour and month would run together. */
const isSmall = (view: SkyView): boolean => view.kind === 'stereographic' && view.radius < SMALL_DISC;

/** Solstices and equinoxes, and every third hour. */
const sparse = (path: SunPath): SunPath => ({
  ...path,
  dates: path.dates.filter((d) => Number(d.date.slice(5, 7)) % 3 === 0),
  hours: path.hours.filter((h) => Number(h.time.slice(0, 2)) % 3 === 0),
});

/** The sun at the moment. */
function sunMark(view: SkyView, moment: NonNullable<SunPathInput['moment']>): readonly Mark[] {
  const at = skyOnPage(view, moment.azimuth_deg * DEG, moment.altitude_deg * DEG);
  return [
    { kind: 'circle', at, radius: 2, fill: WHITE },
    { kind: 'circle', at, radius: 1.4, fill: ACCENT },
    { kind: 'circle', at, radius: 2, stroke: { colour: ACCENT, width: 0.3 } },
  ];
}

/** What the drawing shows, for where, by which clock, and how to read its lines. */
function captionOf(input: SunPathInput, x: Mm, top: Mm, width: Mm): Piece {
  const { place: site, path, moment, mask } = input;
  const marks: Mark[] = [];
  let y = top;
  const put = (text: string, style: Parameters<typeof paragraph>[4] = {}): void => {
    const piece = paragraph(text, x, y, width, style);
    marks.push(...piece.marks);
    y += piece.height;
  };
  const keys: { readonly sample: (x: Mm, y: Mm) => readonly Mark[]; readonly text: string }[] = [
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
  const putKeys = (): void => {
    let [left, height] = [x, 0];
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
    y += height;
  };
  put(`${TITLE} ${path.year}`, { size: 5, face: 'semibold' });
  if (site.name.trim() !== '') put(site.name.trim(), {});
  put(`${place(site.latitude_deg, site.longitude_deg)}, ${fixed(site.elevation_m, 0)} m`);
  put(clockWords(site.zone, path.year));
  y += 1.6;
  if (moment !== null) {
    put(moment.text, { face: 'semibold' });
    put(sunWords(moment));
    y += 1.6;
  }
  putKeys();
  put('Broken from the June to the December solstice. True altitude, no refraction. Bearings from true north.', {
    colour: SOFT,
  });
  return { marks, height: y - top };
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
