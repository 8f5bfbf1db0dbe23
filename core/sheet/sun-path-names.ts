import * as maths from '../maths/maths.ts';
import { seasons } from '../sun/seasons.ts';
import type { PathRun, SunPath } from '../sun/sun-path.ts';
import { toDegrees } from '../units/angle.ts';
import type { Mark, Mm } from './drawing.ts';
import { ACCENT, INK, WHITE } from './ink.ts';
import { measure, READ } from './measure.ts';
import type { LabelRoom, LabelSpot, LabelText } from './sun-path-labels.ts';
import { type DateOnPage, datesOnPage, type HourStretch, hourStretches } from './sun-path-lines.ts';
import { type PagePoint, pageToSky, type SkyView, skyOnPage } from './sun-path-view.ts';

/** Adds the lines of a path to what labels keep off. */
export function keepOffPath(view: SkyView, path: SunPath, room: LabelRoom): void {
  for (const date of datesOnPage(view, path)) {
    room.addLines('date', date.lines);
    room.addLines(`date ${date.family}`, date.lines);
  }
  hourStretches(view, path).forEach((stretch, i) => {
    room.addLines('hour', stretch.lines);
    room.addLines(`hour ${i}`, stretch.lines);
  });
}

/**
 * The dates, written along their lines where these run clear of the others: January to June in the morning, July to December in
 * the afternoon. What finds no room goes without; the date as far from the solstice on the other side lies next to it.
 */
export function dateNames(
  view: SkyView,
  path: SunPath,
  room: LabelRoom,
  which: 'solstices' | 'others',
): readonly Mark[] {
  const dates = datesOnPage(view, path);
  const families = [...new Set(dates.map((d) => d.family))];
  return dates.flatMap((date) => {
    if ((date.month % 6 === 0) !== (which === 'solstices')) return [];
    const others = families.filter((f) => f !== date.family).map((f) => `date ${f}`);
    const label: LabelText = { text: date.name, size: READ, colour: INK };
    const spots = alongSpots(view, date, measure(date.name, READ));
    const spot = room.find(label, spots, [...others, 'hour']) ?? room.find(label, spots, others);
    return spot === null ? [] : room.take(label, spot, WHITE);
  });
}

/** Text along a bent line looks laid on it while the line strays no farther than this from the chord [mm]. */
const BEND: Mm = 0.9;
/** Dates are written low in the sky, where their lines lie farthest apart. */
const LOW_deg = 9;

/** Places along the line of a date, those low in the sky first. */
function alongSpots(view: SkyView, { month, lines }: DateOnPage, width: Mm): readonly LabelSpot[] {
  const found: (LabelSpot & { readonly rank: number })[] = [];
  const low = heightAt(view, LOW_deg);
  for (const line of lines) {
    const lengths = lengthsOf(line);
    const total = lengths.at(-1) ?? 0;
    for (let s = width / 2 + 1; s <= total - width / 2 - 1; s += 1.5) {
      const [a, b] = [pointAt(line, lengths, s - width / 2), pointAt(line, lengths, s + width / 2)];
      const on = pointAt(line, lengths, s);
      const at: PagePoint = [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2];
      if (Math.hypot(on[0] - at[0], on[1] - at[1]) > BEND) continue;
      const middle: PagePoint = [(on[0] + at[0]) / 2, (on[1] + at[1]) / 2];
      found.push({
        at: middle,
        turn_deg: upright(a, b),
        rank: Math.abs(low(on)) + (isMorning(view, on) === month <= 6 ? 0 : OTHER_SIDE),
      });
    }
  }
  return found.sort((p, q) => p.rank - q.rank);
}

/** A place in the wrong half of the day counts as this much higher or lower [mm]. */
const OTHER_SIDE: Mm = 40;

/** Whether a place on the page lies in the eastern half of the sky. */
function isMorning(view: SkyView, [x]: PagePoint): boolean {
  if (view.kind === 'stereographic') return x > view.centre[0];
  const isLeft = x < view.frame.x + view.frame.width / 2;
  return isLeft === (view.middle_deg === 180);
}

/** How far above an altitude a place stands on the page [mm]. */
function heightAt(view: SkyView, altitude_deg: number): (p: PagePoint) => Mm {
  const altitude_rad = (altitude_deg * Math.PI) / 180;
  if (view.kind === 'altitude-azimuth') {
    const level = skyOnPage(view, 0, altitude_rad)[1];
    return (p) => level - p[1];
  }
  const radius = view.centre[1] - skyOnPage(view, 0, altitude_rad)[1];
  return (p) => radius - Math.hypot(p[0] - view.centre[0], p[1] - view.centre[1]);
}

/** The angle of a chord, so that its text is never upside down [°]. */
function upright(a: PagePoint, b: PagePoint): number {
  const turn = toDegrees(maths.atan2(a[1] - b[1], b[0] - a[0]));
  return turn > 90 ? turn - 180 : turn <= -90 ? turn + 180 : turn;
}

function lengthsOf(line: readonly PagePoint[]): readonly Mm[] {
  let sum = 0;
  return line.map((p, i) => {
    const before = line[i - 1];
    if (before !== undefined) sum += Math.hypot(p[0] - before[0], p[1] - before[1]);
    return sum;
  });
}

function pointAt(line: readonly PagePoint[], lengths: readonly Mm[], s: Mm): PagePoint {
  const i = Math.max(
    1,
    lengths.findIndex((l) => l >= s),
  );
  const [a, b] = [line[i - 1] as PagePoint, line[i] as PagePoint];
  const [from, to] = [lengths[i - 1] as Mm, lengths[i] as Mm];
  const t = to > from ? Math.min(1, Math.max(0, (s - from) / (to - from))) : 0;
  return [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])];
}

/** Hours that keep their names where room is short. */
const HOUR_ORDER = [12, 6, 18, 9, 15, 3, 21, 0, 8, 10, 14, 16, 4, 20, 2, 22, 5, 7, 11, 13, 17, 19, 1, 23];

/** The hours of the clock, each stretch named once: off its end at a solstice, or on the line where it ends at none. */
export function hourNames(view: SkyView, path: SunPath, room: LabelRoom): readonly Mark[] {
  const { juneSolstice_ms, decemberSolstice_ms } = seasons(path.year);
  const stretches = hourStretches(view, path);
  const order = stretches
    .map((_, i) => i)
    .sort((a, b) => rankOf(stretches[a] as HourStretch) - rankOf(stretches[b] as HourStretch));
  const named: { readonly hour: string; readonly at: PagePoint }[] = [];
  return order.flatMap((i) => {
    const stretch = stretches[i] as HourStretch;
    const label: LabelText = { text: stretch.hour, size: READ, face: 'semibold', colour: ACCENT };
    const tips = [juneSolstice_ms, decemberSolstice_ms].flatMap((t) => tipAt(view, stretch.runs, t) ?? []);
    const inSky = tips.flatMap(tipSpots).filter((spot) => pageToSky(view, spot.at) !== null);
    const beyond = room.find(label, inSky, ['date', 'hour', 'horizon']);
    const others = stretches.flatMap((_, k) => (k === i ? [] : [`hour ${k}`]));
    const spot = beyond ?? room.find(label, onLineSpots(stretch), ['date', 'horizon', ...others]);
    if (spot === null || named.some((n) => n.hour === stretch.hour && apart(n.at, spot.at) < TWICE)) return [];
    named.push({ hour: stretch.hour, at: spot.at });
    return room.take(label, spot, beyond === null ? WHITE : null);
  });
}

/** An hour is not named twice within this [mm]. */
const TWICE: Mm = 14;
const apart = (a: PagePoint, b: PagePoint): Mm => Math.hypot(a[0] - b[0], a[1] - b[1]);
const rankOf = (stretch: HourStretch): number => HOUR_ORDER.indexOf(Number(stretch.hour));

/** Beyond the turning point of a stretch, straight on or a little aside. */
const tipSpots = ({ at, way }: Tip): readonly LabelSpot[] =>
  [2.6, 3.2, 4, 5].flatMap((out) =>
    [0, 25, -25, 50, -50].map((aside): LabelSpot => {
      const [s, c] = [maths.sin((aside * Math.PI) / 180), maths.cos((aside * Math.PI) / 180)];
      const [wx, wy] = [way[0] * c - way[1] * s, way[0] * s + way[1] * c];
      return { at: [at[0] + wx * out, at[1] + wy * out], turn_deg: 0 };
    }),
  );

/** On a stretch itself, from the higher of its ends on. */
function onLineSpots(stretch: HourStretch): readonly LabelSpot[] {
  return stretch.lines.flatMap((line) => {
    const lengths = lengthsOf(line);
    const total = lengths.at(-1) ?? 0;
    const count = Math.max(0, Math.floor((total - 4) / 1.5));
    const spots = Array.from(
      { length: count },
      (_, k): LabelSpot => ({ at: pointAt(line, lengths, 2 + k * 1.5), turn_deg: 0 }),
    );
    return spots;
  });
}

type Tip = { readonly at: PagePoint; readonly way: readonly [number, number] };

const MONTH_ms = 30 * 86_400_000;
const DAY_ms = 86_400_000;

const spotOf = (view: SkyView, run: PathRun, i: number): PagePoint =>
  skyOnPage(view, run.azimuth_rad[i] as number, run.altitude_rad[i] as number);

function nearest(run: PathRun, t: number): number {
  let best = 0;
  for (let i = 1; i < run.instant_ms.length; i++)
    if (Math.abs((run.instant_ms[i] as number) - t) < Math.abs((run.instant_ms[best] as number) - t)) best = i;
  return best;
}

/** The turning point of a stretch at a solstice, and the way out of it: from where it stands a month before and after. */
function tipAt(view: SkyView, runs: readonly PathRun[], solstice_ms: number): Tip | null {
  const run = runs.find((r) => Math.abs((r.instant_ms[nearest(r, solstice_ms)] as number) - solstice_ms) < DAY_ms);
  if (run === undefined) return null;
  const at = spotOf(view, run, nearest(run, solstice_ms));
  const around = runs
    .flatMap((r) =>
      [nearest(r, solstice_ms - MONTH_ms), nearest(r, solstice_ms + MONTH_ms)].map((i) => spotOf(view, r, i)),
    )
    .filter((p) => Math.hypot(p[0] - at[0], p[1] - at[1]) > 1e-6);
  const from: PagePoint = [
    around.reduce((sum, p) => sum + p[0], 0) / around.length,
    around.reduce((sum, p) => sum + p[1], 0) / around.length,
  ];
  return { at, way: unit(from, at) };
}

function unit(a: PagePoint, b: PagePoint): readonly [number, number] {
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
  return length > 0 ? [(b[0] - a[0]) / length, (b[1] - a[1]) / length] : [0, -1];
}
