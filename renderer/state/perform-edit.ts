import { applyEdit, editName, type SchemeEdit } from '../../core/scheme/edit.ts';
import { type Fault, faultLine } from '../../core/scheme/fault.ts';
import { words } from '../words/words.ts';
import { committed, edit } from './document.ts';
import { tell } from './messages.ts';

/**
 * Makes an edit as one step that can be undone. One that would contradict the scheme is refused whole, and the reader is told why.
 * @param isSaid whether to tell why in the line of messages; not where the faults are shown where they were made
 * @returns what was wrong with it; nothing when it was made
 */
export function performEdit(change: SchemeEdit, name = editName(change), isSaid = true): readonly Fault[] {
  const now = committed.peek();
  if (now === null) return [];
  const next = applyEdit(now, change);
  if (!next.ok) {
    if (isSaid) tell('failure', words.status.notEdited(next.faults.map(faultLine).join(' · ')));
    return next.faults;
  }
  edit(name, () => next.value);
  return [];
}
