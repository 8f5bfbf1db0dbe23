import type { Model, ReceptorForm, Stage } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import { contains, distanceToOutline } from '../plane/ring.ts';
import type { Vec3 } from '../plane/vec.ts';
import type { Fault } from '../scheme/fault.ts';
import { DRAWN_m } from '../units/tolerance.ts';

/** How much of an area is built over at a stage. */
export type BuiltOver = { readonly stage: Stage /** 0..1 */; readonly share: number };

const note = (code: string, place: string, message: string, cure: string): Fault => ({
  level: 'warning',
  code,
  place,
  message,
  cure,
});

/** The block that a point lies inside of, and not in its faces; undefined for none. */
const blockRound = (model: Model, stage: Stage, [x, y, z]: Vec3): string | undefined =>
  solidsAt(model.solids, stage).find(
    (s) =>
      z > s.base_m + DRAWN_m &&
      z < s.top_m - DRAWN_m &&
      contains(s.outline, x, y) &&
      distanceToOutline(s.outline, x, y) > DRAWN_m,
  )?.id;

const metres = (m: number): string => `${Number(m.toPrecision(3))} m`;

/** Ground is level and hides nothing: what lies under it gets the sun of the open. */
function underGround(r: ReceptorForm): Fault[] {
  const level_m = r.kind === 'area' ? r.level : r.kind === 'point' ? r.at[2] : 0;
  if (level_m >= -DRAWN_m) return [];
  const what = r.kind === 'area' ? `area ${r.id}` : `point ${r.id}`;
  return [
    note(
      'under-ground',
      r.place,
      `${what} lies ${metres(-level_m)} under the ground, and the ground round it hides no sun from it here`,
      'draw what stands round it as blocks, or check its height',
    ),
  ];
}

function insideBlock(model: Model, stages: readonly Stage[], r: ReceptorForm): Fault[] {
  if (r.kind !== 'point') return [];
  for (const stage of stages) {
    const block = blockRound(model, stage, r.at);
    if (block !== undefined)
      return [
        note(
          'inside-block',
          r.place,
          `point ${r.id} stands inside block ${block} ${stage} the proposal, where no light comes`,
          'move it to the face of the block, or into the open',
        ),
      ];
  }
  return [];
}

const percent = (share: number): string => `${share > 0 && share < 0.01 ? 'under 1' : Math.round(100 * share)} %`;

/** What is built over leaves the mean, so that a garden of which little is left may still be called sunny. */
function builtOverNote(r: ReceptorForm, built: readonly BuiltOver[]): Fault[] {
  if (built.every(({ share }) => share === 0)) return [];
  const said = [...built].reverse().map(({ stage, share }, i) => {
    const how = percent(share);
    return i === 0 ? `${how} of area ${r.id} is built over ${stage} the proposal` : `${how} ${stage}`;
  });
  return [
    note(
      'built-over',
      r.place,
      `${said.join(' and ')}; what is built over counts neither way`,
      'read its numbers as those of the ground that is left',
    ),
  ];
}

/**
 * What the reader of a receptor's numbers should know: points inside blocks or under the ground, and areas that are built on.
 * @param built  for each receptor the shares of an area that are built over, at the stages that were looked at
 */
export const receptorNotes = (
  model: Model,
  stages: readonly Stage[],
  built: readonly (readonly BuiltOver[])[],
): readonly Fault[] =>
  model.receptors.flatMap((r, i) => [
    ...underGround(r),
    ...insideBlock(model, stages, r),
    ...builtOverNote(r, built[i] ?? []),
  ]);

/** The share of an area's points that lie inside solids. @param covered 1 for those */
export const builtShare = (covered: Uint8Array): number =>
  covered.length === 0 ? 0 : covered.reduce((n, c) => n + c, 0) / covered.length;
