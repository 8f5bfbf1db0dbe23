import type { Verdict } from '../limits/finding.ts';
import * as maths from '../maths/maths.ts';
import type { Mark, Mm } from './drawing.ts';
import { CLOSE, OVER, SOFT, WHITE, WITHIN } from './ink.ts';

/** Colour of a verdict; never told by it alone. */
export const verdictColour = (verdict: Verdict | null): string =>
  verdict === 'over' ? OVER : verdict === 'close' ? CLOSE : verdict === 'within' ? WITHIN : SOFT;

/** The disc of a finding: full is over, half is close, empty is within; it reads without colour. */
export function verdictDisc(verdict: Verdict | null, x: Mm, y: Mm, radius: Mm = 1.5): readonly Mark[] {
  if (verdict === null) return [];
  const colour = verdictColour(verdict);
  const ring: Mark = {
    kind: 'circle',
    at: [x, y],
    radius,
    fill: verdict === 'over' ? colour : WHITE,
    stroke: { colour, width: 0.3 },
  };
  if (verdict !== 'close') return [ring];
  const half: (readonly [Mm, Mm])[] = [];
  for (let i = 0; i <= 24; i++) {
    const angle = Math.PI / 2 + (Math.PI * i) / 24;
    half.push([x + radius * maths.cos(angle), y + radius * maths.sin(angle)]);
  }
  return [ring, { kind: 'path', runs: [half], closed: true, fill: colour }];
}
