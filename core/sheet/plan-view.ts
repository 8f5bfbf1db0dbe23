import type { Point } from '../plane/vec.ts';
import type { Mm } from './drawing.ts';
import type { Rect } from './paper.ts';

/** A window onto the plan: a frame on paper, a scale, and the place on the ground that stands at its middle. */
export type PlanView = { readonly frame: Rect; readonly scale: number; readonly centre: Point };

/** Where a place on the ground [m] lies on the page [mm]. Drawing north (+y) runs up the page. */
export const onPage = (view: PlanView, p: readonly [number, number, ...number[]]): readonly [Mm, Mm] => {
  const k = 1000 / view.scale;
  const { x, y, width, height } = view.frame;
  return [x + width / 2 + (p[0] - view.centre[0]) * k, y + height / 2 - (p[1] - view.centre[1]) * k];
};

/** Whether a place on the page lies inside the frame. */
export const inFrame = (view: PlanView, at: readonly [Mm, Mm]): boolean => {
  const { x, y, width, height } = view.frame;
  return at[0] >= x && at[0] <= x + width && at[1] >= y && at[1] <= y + height;
};
