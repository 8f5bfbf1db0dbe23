import type { Scheme } from '../scheme/schema.ts';
import type { SunPath } from '../sun/sun-path.ts';
import { DEG, toDegrees } from '../units/angle.ts';
import type { Document, Mark, Mm, Page } from './drawing.ts';
import { ACCENT, WHITE } from './ink.ts';
import { contentRect, finishPages, type PaperName, type Rect } from './paper.ts';
import { type CaptionAmount, sunPathCaption, TITLE } from './sun-path-caption.ts';
import { altitudeNames, bearingNames, horizonLine, SMALL_DISC, skyGrid } from './sun-path-grid.ts';
import type { SunPathInput } from './sun-path-input.ts';
import { LabelRoom } from './sun-path-labels.ts';
import { dateMarks, hourMarks } from './sun-path-lines.ts';
import { maskMarks } from './sun-path-mask.ts';
import { dateNames, hourNames, keepOffPath } from './sun-path-names.ts';
import { type TitleFacts, titleBlock } from './title-block.ts';
import { type SkyView, type SunPathProjection, skyOnPage } from './sun-path-view.ts';

/** Room round the drawing for the names of bearings and altitudes. */
const RIM = { stereographic: 7.5, left: 10, right: 5, top: 2, foot: 7.5 } as const;
/** Captions beside the drawing; the first that fits the height is taken. */
const CAPTIONS: readonly (readonly [width: Mm, amount: CaptionAmount])[] = [
  [66, 'full'],
  [88, 'full'],
  [66, 'brief'],
  [88, 'brief'],
];
const GAP: Mm = 5;

/**
 * How a sun-path drawing lies on the page, with all of it that the moment does not change; `view` tells where a direction lies,
 * for pointing at it.
 */
export type SunPathLayout = {
  readonly view: SkyView;
  /** Grid, lines and names. */
  readonly sky: readonly Mark[];
  readonly caption: { readonly x: Mm; readonly y: Mm; readonly width: Mm; readonly amount: CaptionAmount };
};

/** Lays a sun-path drawing out in a rectangle: its caption beside it or, in an upright one, below. */
export function sunPathLayout(box: Rect, input: SunPathInput): SunPathLayout {
  // Room for the longest that a moment can say, so that the drawing stands still while the moment moves.
  const longest = { ...input, moment: input.moment && LONGEST };
  const height = (width: Mm, amount: CaptionAmount): Mm => sunPathCaption(longest, 0, 0, width, amount).height;
  const isWide = box.width > box.height * 1.15;
  const { width: beside, amount } = besideOf(box, height);
  const room: Rect = isWide
    ? { ...box, width: box.width - beside - GAP }
    : { ...box, height: Math.max(30, box.height - height(box.width, 'full') - GAP) };
  const view = viewOf(room, input);
  const used = usedRect(view);
  const caption = isWide
    ? { x: used.x + used.width + GAP, y: box.y, width: beside, amount }
    : { x: box.x, y: used.y + used.height + GAP, width: box.width, amount: 'full' as const };
  return { view, sky: skyMarks(view, room, input), caption };
}

const LONGEST = { azimuth_deg: 188.8, altitude_deg: -28.8, text: '28 September 2025, 08:08 (UTC+08:00)' };

/** What the moment changes: the sun and the caption. */
export function sunPathMoment({ view, caption }: SunPathLayout, input: SunPathInput): readonly Mark[] {
  const { x, y, width, amount } = caption;
  const { moment } = input;
  return [
    ...(moment && moment.altitude_deg > 0
      ? [{ kind: 'group' as const, label: 'moment', marks: sunMark(view, moment) }]
      : []),
    { kind: 'group', label: 'caption', role: 'text', marks: sunPathCaption(input, x, y, width, amount).marks },
  ];
}

/** A sun-path drawing inside a rectangle. */
function sunPathDrawing(box: Rect, input: SunPathInput): readonly Mark[] {
  const layout = sunPathLayout(box, input);
  return [...layout.sky, ...sunPathMoment(layout, input)];
}

function besideOf(
  box: Rect,
  height: (width: Mm, amount: CaptionAmount) => Mm,
): { readonly width: Mm; readonly amount: CaptionAmount } {
  const most = box.width * 0.45;
  const fits = CAPTIONS.find(([width, amount]) => height(Math.min(width, most), amount) <= box.height);
  return fits === undefined ? { width: most, amount: 'brief' } : { width: Math.min(most, fits[0]), amount: fits[1] };
}

/** The rectangle of a page that holds nothing but one sun-path drawing. */
export function sunPathBox(width: Mm, height: Mm): Rect {
  const margin = 2;
  return { x: margin, y: margin, width: width - 2 * margin, height: height - 2 * margin };
}

/** One sun-path drawing as a page of any size. */
export const sunPathPage = (width: Mm, height: Mm, input: SunPathInput): Page => ({
  width,
  height,
  title: titleOf(input),
  marks: sunPathDrawing(sunPathBox(width, height), input),
});

/** Width of the title block, beside the drawing and under its caption. */
const BLOCK: Mm = 66;

/**
 * Both drawings as printed pages, each with its caption and the foot that every sheet has.
 * @param facts `note` is repeated in the foot; `block` puts a title block on every page
 */
export function sunPathDocument(
  inputs: readonly SunPathInput[],
  paper: PaperName,
  landscape: boolean,
  facts: {
    readonly title: string;
    readonly author: string;
    readonly language: string;
    readonly note: string;
    readonly block?: { readonly scheme: Scheme; readonly facts: Omit<TitleFacts, 'subject' | 'scale'> };
  },
): Document {
  const contents = inputs.map((input) => ({
    title: titleOf(input),
    marks: onSheet(contentRect(paper, landscape), landscape, input, facts.block),
  }));
  const title = [facts.title, TITLE].filter((t) => t !== '').join(' – ');
  const { author, language, note } = facts;
  return { title, author, language, pages: finishPages(contents, paper, landscape, note) };
}

/** A drawing and, where one is wanted, its title block: at the foot of the column beside it, or under it on an upright page. */
function onSheet(
  rect: Rect,
  landscape: boolean,
  input: SunPathInput,
  block: Parameters<typeof sunPathDocument>[3]['block'],
): readonly Mark[] {
  if (!block) return sunPathDrawing(rect, input);
  const facts = { ...block.facts, subject: titleOf(input), scale: '' };
  const width = landscape ? BLOCK : rect.width / 2;
  const { height } = titleBlock(0, 0, width, block.scheme, facts);
  const box = landscape ? rect : { ...rect, height: rect.height - height - GAP };
  const layout = sunPathLayout(box, input);
  const x = landscape ? layout.caption.x : rect.x + rect.width - width;
  const drawn = titleBlock(x, rect.y + rect.height - height, width, block.scheme, facts);
  return [...layout.sky, ...sunPathMoment(layout, input), ...drawn.marks];
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
  const { mask } = input;
  const path = isSmall(view) ? sparse(input.path) : input.path;
  const labels = new LabelRoom(room);
  keepOffPath(view, path, labels);
  labels.addLines('horizon', [horizonLine(view)]);
  const names = [
    ...bearingNames(view, labels),
    ...dateNames(view, path, labels, 'solstices'),
    ...hourNames(view, path, labels),
    ...(isSmall(view) ? [] : dateNames(view, path, labels, 'others')),
    ...altitudeNames(view, labels),
  ];
  return [
    { kind: 'group', label: 'altitudes and bearings', marks: skyGrid(view) },
    ...(mask ? [{ kind: 'group' as const, label: 'hidden sky', marks: maskMarks(view, mask.hidden) }] : []),
    { kind: 'group', label: 'hours of the clock', marks: hourMarks(view, path) },
    { kind: 'group', label: 'dates', marks: dateMarks(view, path) },
    { kind: 'group', label: 'names', marks: names },
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
