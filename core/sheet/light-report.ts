import type { Scheme } from '../scheme/schema.ts';
import type { Document } from './drawing.ts';
import { Flow } from './flow.ts';
import { treesBrief, treesSentence, type TreesInLight } from './light-trees.ts';
import { RULE, SOFT } from './ink.ts';
import { field, leading, line, type Piece, words } from './marks.ts';
import { measure, READ } from './measure.ts';
import { percent, place } from './numerals.ts';
import { contentRect, finishPages, type Rect } from './paper.ts';
import { CAUTIONS } from '../limits/cautions.ts';
import { dateText } from '../sun/civil.ts';
import { type Column, table } from './table.ts';
import { shortHash } from './title-block.ts';

type BeforeAfter = { readonly before: number; readonly after: number; readonly kept: number };

/** What neighbours and open ground keep of their light. A `NeighbourLight` of the study is one. */
export type LightResult = {
  readonly year: number;
  readonly date: string;
  readonly hours: number;
  readonly openHours: number;
  readonly trees: TreesInLight;
  readonly receptors: readonly (
    | {
        readonly kind: 'point' | 'window';
        readonly id: string;
        readonly skyComponent: BeforeAfter;
        readonly annual: BeforeAfter;
        readonly winter: BeforeAfter;
        readonly sunMinutes: BeforeAfter;
      }
    | { readonly kind: 'area'; readonly id: string; readonly share: BeforeAfter }
  )[];
};

export type LightReportInput = {
  readonly scheme: Scheme;
  readonly light: LightResult;
  readonly drawn: string;
  readonly engine: string;
  readonly hash: string;
  readonly language?: string;
};

/** Sun on open ground, and light and sun of neighbours' windows, before and after, on A4. Numbers only: the guide that they are read against is the reader's. */
export function lightReport(input: LightReportInput): Document {
  const { scheme, light } = input;
  const flow = new Flow(contentRect('A4', false), (rect, title) => head(rect, title, input));
  const title = 'Sun and light of neighbours';
  flow.turn(title);
  flow.say(scheme.title.trim() === '' ? 'Scheme without a title' : scheme.title, { size: 7.5, face: 'semibold' }, 0, 3);
  flow.say('Sun and light of neighbours and open ground, before and after', { size: 5 });
  flow.gap(4);
  const names = new Map(scheme.receptors.map((r) => [r.id, r.name]));
  groundTable(flow, light, names);
  windowTable(flow, light, names);
  flow.heading('How it was worked out', 30);
  flow.say(
    `Site ${place(scheme.site.latitude, scheme.site.longitude)}, ${scheme.site.zone}. Sun at its true altitude without refraction, a cloudless sky for sun time; sky light under the overcast sky of the CIE. Before: what stands now. After: with the proposal, without what is removed.`,
  );
  flow.say(
    `Hours of probable sun are shares of the ${light.openHours.toFixed(0)} h that an open place has in ${light.year}. Sun on ground counts a place that has the sun for ${light.hours} h or more on ${dateText(light.date)}.`,
  );
  flow.say(treesSentence(light.trees));
  if (light.receptors.some((r) => r.kind !== 'area')) {
    flow.say(
      'Share kept: after as a share of before. Which share is enough is for local policy and its guide to say.',
      { colour: SOFT },
    );
  }
  flow.heading('Cautions', 30);
  for (const caution of CAUTIONS) {
    flow.say(caution);
    flow.gap(0.8);
  }
  return {
    title: [scheme.title, title].filter((t) => t !== '').join(' – '),
    author: scheme.author,
    language: input.language ?? 'en-GB',
    pages: finishPages(flow.pages, 'A4', false, `drawn ${input.drawn}`),
  };
}

const AREA_COLUMNS: readonly Column[] = [
  { head: 'area', width: 26 },
  { head: 'name', width: 64 },
  { head: 'before', width: 30, align: 'end' },
  { head: 'after', width: 30, align: 'end' },
  { head: 'kept', width: 30, align: 'end' },
];

function groundTable(flow: Flow, light: LightResult, names: ReadonlyMap<string, string>): void {
  const rows = light.receptors.flatMap((r) =>
    r.kind === 'area'
      ? [[r.id, names.get(r.id) ?? '', percent(r.share.before), percent(r.share.after), percent(r.share.kept)]]
      : [],
  );
  if (rows.length === 0) return;
  flow.heading(`Open ground with ${light.hours} h of sun or more on ${dateText(light.date)}`, 30);
  table(flow, AREA_COLUMNS, rows);
  flow.say(
    `Shares of the open ground of each area; ground under buildings is left out. ${treesBrief(light.trees)}`.trimEnd(),
    { colour: SOFT },
  );
  flow.gap(3);
}

function windowTable(flow: Flow, light: LightResult, names: ReadonlyMap<string, string>): void {
  const places = light.receptors.flatMap((r) => (r.kind === 'area' ? [] : [r]));
  if (places.length === 0) return;
  const columns: readonly Column[] = [
    { head: 'place', width: 26 },
    { head: 'name', width: 64 },
    { head: 'before', width: 30, align: 'end' },
    { head: 'after', width: 30, align: 'end' },
    { head: 'kept', width: 30, align: 'end' },
  ];
  const put = (
    heading: string,
    note: string,
    of: (r: (typeof places)[number]) => BeforeAfter,
    unit: (v: number) => string,
  ): void => {
    flow.heading(heading, 30);
    table(
      flow,
      columns,
      places.map((r) => [r.id, names.get(r.id) ?? '', unit(of(r).before), unit(of(r).after), percent(of(r).kept)]),
    );
    const said = [note, treesBrief(light.trees)].filter((part) => part !== '').join(' ');
    if (said !== '') flow.say(said, { colour: SOFT });
    flow.gap(1.5);
  };
  const tenths = (v: number): string => `${(v * 100).toFixed(1)}\u00a0%`;
  put(
    'Sky light',
    'Under the overcast sky, as a share of that on open level ground; on an upright pane the vertical sky component.',
    (r) => r.skyComponent,
    tenths,
  );
  put('Probable sun of the year, share of the hours of an open place', '', (r) => r.annual, tenths);
  put(
    'Probable sun of the winter half',
    'Share of the year’s hours of an open place that fall in the winter half.',
    (r) => r.winter,
    tenths,
  );
  put(`Sun time on ${dateText(light.date)}, cloudless sky`, '', (r) => r.sunMinutes, hoursAndMinutes);
}

const hoursAndMinutes = (minutes: number): string =>
  `${Math.floor(Math.round(minutes) / 60)}\u00a0h ${String(Math.round(minutes) % 60).padStart(2, '0')}`;

function head(rect: Rect, title: string, input: LightReportInput): Piece {
  const right = `scheme ${shortHash(input.hash)}, Shadewright ${input.engine}`;
  const y = rect.y + READ * 0.75;
  const room = rect.width - measure(right, READ) - 6;
  const height = leading(READ);
  return {
    marks: [
      field([title, input.scheme.title].filter((t) => t !== '').join(' · '), rect.x, y, room, { colour: SOFT }),
      words(right, rect.x + rect.width, y, { colour: SOFT, anchor: 'end' }),
      line(rect.x, rect.y + height + 0.6, rect.x + rect.width, rect.y + height + 0.6, RULE),
    ],
    height: height + 6,
  };
}
