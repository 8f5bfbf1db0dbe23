import type { Model, RoomForm, WindowForm } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import type { Checked } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import { DEFAULT_YEAR } from '../scheme/schema.ts';
import { sunVector } from '../shade/sun-vector.ts';
import { sunlitFraction, windowShade } from '../shade/sunlit-fraction.ts';
import { profileAngle_rad } from '../sizing/cut-off.ts';
import { civilOf } from '../sun/civil.ts';
import { sunEvents } from '../sun/events.ts';
import { sunPosition } from '../sun/spa.ts';
import { DEG, toDegrees, wrap180 } from '../units/angle.ts';
import type { Document, Mark } from './drawing.ts';
import { FRAME, SOFT } from './ink.ts';
import { paragraph, rect } from './marks.ts';
import { fixed, percent } from './numerals.ts';
import { finishPages, type PaperName, type Rect } from './paper.ts';
import { chooseScale } from './scale.ts';
import { dimension, type SheetUnits, scaleWords } from './sheet-units.ts';
import { scaleBar } from './scale-marks.ts';
import { sectionDrawing, sectionReach } from './section-drawing.ts';
import { DRAWING_CAUTIONS, type Note, pageAreas, placeNotes, withNotes } from './side-panel.ts';
import { shortHash, titleBlock } from './title-block.ts';
import { litOnGlass, type WindowSection, windowSection } from './window-section.ts';

export type SectionSheetInput = {
  readonly scheme: Scheme;
  readonly model: Model;
  /** Id of a window in a wall. */
  readonly window: string;
  readonly scale: number | null;
  readonly paper: PaperName;
  readonly number?: string;
  readonly drawn: string;
  readonly engine: string;
  readonly hash: string;
  readonly language?: string;
  /** Absent: metric. */
  readonly units?: SheetUnits;
};

/** The sun at its highest on one day, as the section sees it. */
type NoonSun = {
  readonly text: string;
  readonly altitude_deg: number;
  readonly azimuth_deg: number;
  /** Null: the sun is not in front of the wall, or not up. */
  readonly profile_rad: number | null;
  readonly lit: readonly (readonly [number, number])[];
  /** Sunlit share of the whole glass, exact, with everything that stands round it. */
  readonly share: number;
  /** The same with devices and reveal alone, as the section is drawn. */
  readonly shareAlone: number;
};

/** The section of a window with its overhang or blades, and the noon sun of both solstices through it, to scale. */
export function sectionSheet(input: SectionSheetInput): Checked<Document> {
  const { scheme, model, paper } = input;
  const window = model.windows.find((w) => w.id === input.window);
  const room = model.rooms.find((r) => r.id === window?.room);
  if (!window || !room || window.tilt_deg < 45) {
    const message = window
      ? `window ${input.window} lies in a roof and has no section of this kind`
      : `the scheme has no window ${input.window}`;
    return {
      ok: false,
      faults: [
        { level: 'error', code: 'no-such-window', place: '', message, cure: 'name a window that stands in a wall' },
      ],
    };
  }
  const section = windowSection(window);
  const suns = solstices(scheme).map((date) => noonSun(scheme, model, window, section, date));
  const areas = pageAreas(paper, true);
  const frames = split(areas.drawing);
  const reach = sectionReach(section, window, room);
  const size = [reach.out + reach.in, reach.up + reach.down] as const;
  const scale = chooseScale(
    input.scale,
    size,
    size,
    [frames[0].width, frames[0].height],
    `${paper} landscape`,
    input.units,
  );
  if (typeof scale !== 'number') return { ok: false, faults: [scale] };
  const marks: Mark[] = [];
  suns.forEach((sun, i) => {
    const frame = frames[i] as Rect;
    marks.push(
      ...sectionDrawing({
        frame,
        scale,
        section,
        window,
        room,
        reach,
        profile_rad: sun.profile_rad,
        lit: sun.lit,
        units: input.units ?? 'metric',
      }),
    );
    marks.push(rect(frame.x, frame.y, frame.width, frame.height, { stroke: FRAME }));
    marks.push(...sunCaption(sun, scheme.site.zone, frame));
  });
  const beside = panel(input, areas.panel[0] as Rect, scale, window, room);
  marks.push(...beside.marks);
  const title = `Section through window ${window.id}`;
  return {
    ok: true,
    notes: [],
    value: {
      title: [scheme.title, title].filter((t) => t !== '').join(' – '),
      author: scheme.author,
      language: input.language ?? 'en-GB',
      pages: finishPages(
        withNotes([{ title, marks }], beside.spill, paper, true),
        paper,
        true,
        `scheme ${shortHash(input.hash)}, drawn ${input.drawn}`,
      ),
    },
  };
}

/** The days of the highest and the lowest noon sun, summer of the hemisphere first. */
function solstices(scheme: Scheme): readonly [string, string] {
  const year = scheme.year ?? DEFAULT_YEAR;
  const [june, december] = [`${year}-06-21`, `${year}-12-21`];
  return scheme.site.latitude < 0 ? [december, june] : [june, december];
}

function noonSun(scheme: Scheme, model: Model, window: WindowForm, section: WindowSection, date: string): NoonSun {
  const { site } = scheme;
  const observer = { latitude_deg: site.latitude, longitude_deg: site.longitude, elevation_m: site.elevation };
  const { transit_ms } = sunEvents(date, site.zone, observer);
  const sun = sunPosition(transit_ms, observer);
  const across = wrap180(sun.azimuth_deg - window.bearing_deg) * DEG;
  const profile = profileAngle_rad(sun.altitude_deg * DEG, across);
  const shade = windowShade(window, solidsAt(model.solids, 'after'), model.trees);
  const towards = sunVector(sun.azimuth_deg * DEG, sun.altitude_deg * DEG, model.north_rad);
  const seen = Number.isFinite(profile);
  return {
    text: civilOf(transit_ms, site.zone).text,
    altitude_deg: sun.altitude_deg,
    azimuth_deg: sun.azimuth_deg,
    profile_rad: seen ? profile : null,
    lit: seen ? litOnGlass(section, profile) : [],
    share: seen ? sunlitFraction(shade, towards, Number(date.slice(5, 7))) : 0,
    shareAlone: seen ? sunlitFraction(windowShade(window, [], []), towards) : 0,
  };
}

/** Two frames, one above the other, with room for a caption under each. */
function split(area: Rect): readonly [Rect, Rect] {
  const height = area.height / 2 - 19;
  const at = (y: number): Rect => ({ x: area.x, y, width: area.width, height });
  return [at(area.y), at(area.y + area.height / 2 + 1)];
}

function sunCaption(sun: NoonSun, zone: string, frame: Rect): readonly Mark[] {
  const top = frame.y + frame.height + 2;
  const first = paragraph(`${sun.text}, sun at its highest`, frame.x, top, frame.width, { face: 'semibold' }, 1);
  const where = `sun ${fixed(sun.altitude_deg, 1)}° high, azimuth ${fixed(sun.azimuth_deg, 1)}°, ${zone}`;
  const profile =
    sun.profile_rad === null
      ? 'the sun does not stand in front of this wall'
      : `profile angle ${fixed(toDegrees(sun.profile_rad), 1)}°`;
  const second = paragraph(`${where}; ${profile}`, frame.x, top + first.height, frame.width, { colour: SOFT }, 1);
  const alone = sun.shareAlone - sun.share > 0.005;
  const said = alone
    ? `${percent(sun.share)} of the whole glass is in sun; without neighbours, its own block and trees, as drawn here, ${percent(sun.shareAlone)}`
    : `${percent(sun.share)} of the whole glass is in sun at that moment`;
  const third = paragraph(said, frame.x, top + first.height + second.height, frame.width, {}, 1);
  return [...first.marks, ...second.marks, ...third.marks];
}

function panel(
  input: SectionSheetInput,
  area: Rect,
  scale: number,
  window: WindowForm,
  room: RoomForm,
): { readonly marks: readonly Mark[]; readonly spill: readonly Note[] } {
  const bar = scaleBar(area.x, area.y, area.width - 4, scale, input.paper, input.units);
  const facts = {
    subject: `Section, window ${window.id}`,
    number: input.number ?? '',
    date: input.drawn,
    engine: input.engine,
    hash: input.hash,
    scale: `${scaleWords(scale, input.units)} on ${input.paper}`,
  };
  const height = titleBlock(area.x, 0, area.width, input.scheme, facts).height;
  const foot = area.y + area.height - height;
  const units = input.units ?? 'metric';
  const long = (m: number): string => `${dimension(m, units)}${units === 'metric' ? ' m' : ''}`;
  const notes: readonly Note[] = [
    {
      heading: `Window ${window.id}, room ${room.id} ${room.name}`.trim(),
      lines: [
        `Faces ${fixed(window.bearing_deg, 1)}° from true north. ${long(window.width_m)} wide, ${long(window.height_m)} high, glass ${long(window.reveal_m)} behind the face of the wall.`,
      ],
    },
    {
      heading: 'How it was worked out',
      lines: [
        'Sun at its true altitude, without refraction. Profile angle: its altitude as seen along the wall, tan p = tan h / cos (azimuth less bearing).',
        'The cut takes devices to run on sideways; the share of the whole glass does not. Sun that goes past the sides, over neighbours or through trees is in that share only.',
        `Walls are drawn ${long(0.3)} and floors ${long(0.25)} thick, as the scheme gives no thickness. Fins are left out of the cut; of a room deeper than ${long(6)} the far part is not drawn.`,
      ],
    },
    DRAWING_CAUTIONS,
    {
      heading: 'Structure',
      lines: ['Devices that overhang or project are loads on a structure and need an engineer.'],
    },
  ];
  const placed = placeNotes(notes, [{ x: area.x, y: area.y + bar.height + 4, end: foot - 2 }], area.width);
  const block = titleBlock(area.x, foot, area.width, input.scheme, facts);
  return { marks: [...bar.marks, ...placed.marks, ...block.marks], spill: placed.spill };
}
