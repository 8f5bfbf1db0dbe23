import type { Standing } from '../scheme/schema.ts';
import type { Solid, Stage } from './model.ts';

/** Whether a block of this standing is there, before or after the proposal. */
export function stands(standing: Standing, stage: Stage): boolean {
  if (standing === 'context' || standing === 'existing') return true;
  return stage === 'before' ? standing === 'removed' : standing === 'proposed';
}

/** The solids that stand at a stage, in the order of the scheme. */
export const solidsAt = (solids: readonly Solid[], stage: Stage): readonly Solid[] =>
  solids.filter((s) => stands(s.standing, stage));
