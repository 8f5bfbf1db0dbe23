import type { Fault } from '../../core/scheme/fault.ts';
import type { Scheme, SheetSet } from '../../core/scheme/schema.ts';
import { words } from '../words/words.ts';

/** A change of the settings that may cure a fault, in words that stand on a button. */
export type Cure = { readonly text: string; readonly change: Partial<SheetSet> };

const LARGER: { readonly [P in SheetSet['paper']]: SheetSet['paper'] | null } = {
  A4: 'A3',
  A3: 'A2',
  A2: 'A1',
  A1: null,
};
/** What nine diagrams come down to, step by step. */
const FEWER = [6, 4, 2, 1] as const;

/** What can be pressed to have a sheet after all. */
export function curesOf(fault: Fault, set: SheetSet, scheme: Scheme): readonly Cure[] {
  const text = words.sheets.cure;
  if (fault.code === 'no-such-window')
    return scheme.windows.slice(0, 1).map(({ id }) => ({ text: text.window(id), change: { window: id } }));
  if (fault.code !== 'scale-too-large') return [];
  const cures: Cure[] = [];
  if (set.scale !== undefined) cures.push({ text: text.bestFit, change: { scale: undefined } as Partial<SheetSet> });
  const paper = LARGER[set.paper];
  if (paper !== null) cures.push({ text: text.paper(paper), change: { paper } });
  const fewer = FEWER.find((n) => n < (set.perPage ?? 9));
  if (set.kind === 'shadow-study' && fewer !== undefined)
    cures.push({ text: text.fewer(fewer), change: { perPage: fewer } });
  return cures;
}
