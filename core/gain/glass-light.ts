import type { WindowForm } from '../form/model.ts';
import { type AngleCurve, karlssonRoosCurve } from './glass-angle.ts';

/** What a glass lets through of what it does square on, 0..1: at the sun's angle, one row a step, and of light from all sides. */
export type GlassLight = {
  /** 0 with the sun behind the glass or down. */
  readonly byAngle: Float64Array;
  readonly hemispherical: number;
};

type Glass = Pick<WindowForm['glass'], 'panes' | 'coating'>;

/** An opening without a pane lets light in alike from all sides. */
const OPEN: AngleCurve = { at: () => 1, hemispherical: 1 };

/** The angle curve of a glass of the scheme: Karlsson and Roos, since a scheme knows g, panes and coating. */
export const glassCurve = ({ panes, coating }: Glass): AngleCurve =>
  panes === 0 ? OPEN : karlssonRoosCurve(panes, coating);

/** Names all that the angle curve of a glass depends on. */
export const glassCurveName = ({ panes, coating }: Glass): string => (panes === 0 ? 'open' : `${panes} ${coating}`);

/**
 * A glass under the sun of a day.
 * @param cosIncidence cosine of the angle between the sun and the glass's normal, one row a step, 0 behind it
 */
export function glassLight(glass: Glass, cosIncidence: Float64Array): GlassLight {
  const { at, hemispherical } = glassCurve(glass);
  return { byAngle: cosIncidence.map((c) => (c > 0 ? at(c) : 0)), hemispherical };
}
