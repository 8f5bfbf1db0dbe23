import type { Model } from '../form/model.ts';
import type { GroundShadow } from '../shade/shadow.ts';
import type { Mark, Mm } from './drawing.ts';
import { FRAME, OVER, SOFT, WHITE } from './ink.ts';
import { leading, type Piece, paragraph, rect, words } from './marks.ts';
import { measure, READ } from './measure.ts';
import { fixed, percent } from './numerals.ts';
import { areaText, type SheetUnits } from './sheet-units.ts';
import { plan } from './plan.ts';
import { inFrame, onPage, type PlanView } from './plan-view.ts';
import { treeShadows } from './tree-shadow.ts';
import type { ShadowMoment } from './shadow-moment.ts';

/** Whether a shadow runs on past the frame. */
const runsOn = (view: PlanView, shadow: GroundShadow): boolean =>
  shadow.regions.some((r) => r.outer.some((p) => !inFrame(view, onPage(view, p))));

/** What a star after an added area means; printed wherever one may stand. */
export const STAR_NOTE = '* The added shadow runs on past the frame; its whole area is counted.';

/**
 * The lines under a diagram: when, where the sun stands, what the proposal adds, how much of each area is left in sun.
 * @param star  whether the added shadow runs on past the frame
 */
export function caption(
  moment: ShadowMoment,
  zone: string,
  star: boolean,
  x: Mm,
  top: Mm,
  width: Mm,
  units: SheetUnits = 'metric',
): Piece {
  const marks: Mark[] = [];
  let y = top;
  const put = (text: string, style: Parameters<typeof paragraph>[4] = {}): void => {
    const piece = paragraph(text, x, y, width, style, 2);
    marks.push(...piece.marks);
    y += piece.height;
  };
  const added = moment.change ? `added ${areaText(moment.change.added.area_m2, units)}` : '';
  const bold = (text: string): Mm => measure(text, READ, 'semibold');
  put(moment.text, { face: 'semibold' });
  if (added !== '' && bold(moment.text) + bold(added) + 2 <= width) {
    // The star hangs out into the gap, so that the figures end where the frame does.
    const right = x + width;
    const at = y - leading(READ) + READ * 0.75;
    marks.push(words(added, right, at, { face: 'semibold', colour: OVER, anchor: 'end' }));
    if (star) marks.push(words('*', right, at, { face: 'semibold', colour: OVER }));
  } else if (added !== '') put(`${added}${star ? '*' : ''}`, { face: 'semibold', colour: OVER });
  put(`sun ${fixed(moment.altitude_deg, 1)}° high, azimuth ${fixed(moment.azimuth_deg, 1)}°, ${zone}`, {
    colour: SOFT,
  });
  if (moment.change) {
    for (const a of moment.areas.slice(0, 3)) {
      put(`${a.name || a.id}: ${percent(a.after.share)} in sun, ${percent(a.before.share)} before`);
    }
    if (moment.areas.length > 3) put(`and ${moment.areas.length - 3} more areas`, { colour: SOFT });
  }
  for (const note of moment.notes) put(note, { colour: SOFT, face: 'italic' });
  return { marks, height: y - top };
}

/** One moment: its plan in a frame and its caption under it. */
export function diagram(
  view: PlanView,
  model: Model,
  zone: string,
  moment: ShadowMoment,
  units: SheetUnits = 'metric',
): readonly Mark[] {
  const { x, y, width, height } = view.frame;
  const crowns = moment.change ? treeShadows(model, moment.azimuth_deg, moment.altitude_deg) : [];
  const marks: Mark[] = [...plan(view, model, moment.change, crowns, units)];
  if (!moment.change) marks.push(...tag('sun below the horizon', x, y + height));
  marks.push(rect(x, y, width, height, { stroke: FRAME }));
  const star = moment.change !== null && runsOn(view, moment.change.added);
  marks.push(...caption(moment, zone, star, x, y + height + 2, width, units).marks);
  return [{ kind: 'group', label: moment.text, marks }];
}

/** Words on white at the lower left corner of a frame. */
function tag(text: string, x: Mm, bottom: Mm): readonly Mark[] {
  return [
    rect(x, bottom - 6.4, measure(text, READ, 'semibold') + 4, 6.4, { fill: WHITE, stroke: FRAME }),
    words(text, x + 2, bottom - 3.2 + READ * 0.35, { face: 'semibold' }),
  ];
}
