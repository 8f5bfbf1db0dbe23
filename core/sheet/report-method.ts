import { METRICS } from '../limits/metric.ts';
import { DEFAULT_YEAR } from '../scheme/schema.ts';
import { DEG } from '../units/angle.ts';
import { SKY_MODELS } from '../sky/transpose.ts';
import { limitWords } from './finding-words.ts';
import type { Flow } from './flow.ts';
import { FRAME, SOFT } from './ink.ts';
import { paragraph, rect } from './marks.ts';
import { plan } from './plan.ts';
import { bestScale } from './scale.ts';
import { northPoint, scaleBar } from './scale-marks.ts';
import { fixed, place } from './numerals.ts';
import type { Report } from './report-input.ts';
import { table } from './table.ts';

const list = (v: number | readonly number[]): string => (typeof v === 'number' ? String(v) : v.join(', '));

/** Where the scheme stands, what the check looked at and how. */
export function methodPage(flow: Flow, report: Report): void {
  const { result, scheme } = report;
  const { site } = scheme;
  flow.turn('Site and method');
  flow.heading('Site');
  sitePlan(flow, report);
  pairs(flow, [
    ['place', place(site.latitude, site.longitude)],
    ['height above the sea', `${fixed(site.elevation, 0)} m`],
    ['time zone', site.zone],
    ['true north', `${fixed(site.north, 1)}° clockwise from the top of the drawing`],
    ['Linke turbidity', list(site.linkeTurbidity)],
    ['reflectance of the ground', list(site.groundReflectance)],
    ...(site.lowSun === undefined
      ? []
      : [['low sun', `at or below ${site.lowSun}° it counts in gains, and in no sun hours`] as const]),
    ['year of the design days', String(scheme.year ?? DEFAULT_YEAR)],
  ]);
  flow.heading('Design days', 30);
  table(
    flow,
    [
      { head: 'day', width: 62 },
      { head: 'date', width: 30 },
      { head: 'highest sun and sky, level', width: 50, align: 'end' },
      { head: 'warmest air', width: 38, align: 'end' },
    ],
    result.days.map((d) => [
      d.name,
      d.date,
      `${fixed(Math.max(...d.global_Wm2), 0)} W/m²`,
      Number.isFinite(d.tAir_C[0]) ? `${fixed(Math.max(...d.tAir_C), 1)} °C` : 'not used',
    ]),
  );
  flow.heading('Method', 30);
  const sky = SKY_MODELS[result.skyModel];
  const used = [...new Set(result.findings.map((f) => f.metric))];
  flow.say(
    `Cloudless days in steps of ${result.days[0]?.step_min ?? 5} minutes, each taken at its middle, with the sun at its true altitude. Sky: ${sky.name} (${sky.source}); valid for ${sky.valid}.`,
  );
  const [shared, own] = sharedStart(used.map((metric) => METRICS[metric].method));
  if (shared !== '') {
    flow.gap(1.5);
    flow.say(shared);
  }
  used.forEach((metric, i) => {
    flow.gap(1.5);
    flow.say(METRICS[metric].name, { face: 'semibold' });
    flow.say(own[i] as string);
  });
  flow.gap(1.5);
  flow.say('The workings at the end give every step and the source of every formula for each room that is over.', {
    colour: SOFT,
  });
}

/** The scheme in plan, to the largest scale that fits, with north and scale beside it. */
function sitePlan(flow: Flow, report: Report): void {
  const { model } = report;
  const [x0, y0, x1, y1] = model.extent;
  const beside = 54;
  const frame = { x: flow.x, y: flow.y, width: flow.width - beside, height: 84 };
  const scale = bestScale([x1 - x0, y1 - y0], [frame.width - 4, frame.height - 4]);
  if (scale === null || model.solids.length === 0) return;
  const view = { frame, scale, centre: [(x0 + x1) / 2, (y0 + y1) / 2] as const };
  const side = frame.x + frame.width + 6;
  const bar = scaleBar(side, flow.y + 22, beside - 6, scale, 'A4');
  const note = paragraph(
    'Figures on blocks: height of the top in metres.',
    side,
    flow.y + 24 + bar.height,
    beside - 6,
    { colour: SOFT },
  );
  flow.put(
    [
      ...plan(view, model, null),
      rect(frame.x, frame.y, frame.width, frame.height, { stroke: FRAME }),
      northPoint(side + 7, flow.y + 13, 7, model.north_rad / DEG),
      ...bar.marks,
      ...note.marks,
    ],
    frame.height + 3,
  );
}

/** The sentences that several texts start with, and what each has of its own: nothing is printed three times. */
function sharedStart(texts: readonly string[]): readonly [string, readonly string[]] {
  if (texts.length < 2) return ['', texts];
  const split = texts.map((t) => t.split(/(?<=\.) /u));
  const first = split[0] as readonly string[];
  let n = 0;
  while (n < first.length - 1 && split.every((s) => s[n] === first[n])) n++;
  return [first.slice(0, n).join(' '), split.map((s) => s.slice(n).join(' '))];
}

/** Labels and values in two columns. */
function pairs(flow: Flow, entries: readonly (readonly [string, string])[]): void {
  table(
    flow,
    [
      { head: 'what', width: 62 },
      { head: 'value', width: 118 },
    ],
    entries,
  );
  flow.gap(2);
}

/** The limits that were set, with where each comes from. */
export function limitsPage(flow: Flow, report: Report): void {
  const set = report.result.limitSet;
  if (!set) return;
  flow.turn('Limits and their sources');
  flow.say(set.name, { size: 4.6, face: 'semibold' });
  if (set.note !== '') flow.say(set.note);
  flow.say(`Close to a limit: within ${fixed(set.close * 100, 0)} % of it.`, { colour: SOFT });
  for (const limit of set.limits) {
    flow.heading(limit.name, 30);
    const one = report.result.findings.find((f) => f.limit === limit.id);
    const by = limit.byBearing;
    const value = by
      ? `by the bearing of the most glazed wall: N ${by.N}, E ${by.E}, S ${by.S}, W ${by.W} ${limit.unit}`
      : one
        ? limitWords(one)
        : `${limit.comparison === 'at-most' ? 'at most' : 'at least'} ${limit.value} ${limit.unit}`;
    flow.say(`${METRICS[limit.metric].name}: ${value}`, { face: 'semibold' });
    if (limit.uses) flow.say(`For rooms used as: ${limit.uses.join(', ')}.`);
    if (limit.clock) flow.say(`Between ${limit.clock[0]} and ${limit.clock[1]} of the clock.`);
    flow.say(`Source: ${limit.source}`, { colour: SOFT });
    flow.say(limit.checked ? `Last compared with its source on ${limit.checked}.` : 'Never compared with its source.', {
      colour: SOFT,
    });
  }
}

/** All cautions in full, and what the check had to say about the scheme. */
export function cautionsPage(flow: Flow, report: Report): void {
  flow.turn('Cautions and notes');
  flow.heading('Cautions', 30);
  for (const caution of report.result.cautions) {
    flow.say(caution);
    flow.gap(1.5);
  }
  if (report.result.notes.length === 0) return;
  flow.heading('Notes on this scheme', 30);
  for (const note of report.result.notes) {
    flow.say(
      `${note.place === '' ? '' : `${note.place}: `}${note.message}${note.cure === '' ? '' : `; ${note.cure}`}.`,
    );
    flow.gap(1);
  }
}
