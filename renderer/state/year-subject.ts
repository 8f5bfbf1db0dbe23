import type { Model, Stage } from '../../core/form/model.ts';
import { stands } from '../../core/form/stands.ts';
import type { YearSubject as Asked } from '../../core/study/year-subject.ts';
import type { CheckResult } from '../../core/study/check-result.ts';
import { faceOf } from './faces.ts';
import { type Selection, selection } from './selection.ts';
import { stage } from './stage.ts';

/** Whose year the strip shows, and what is asked of the engine for it. */
export type YearSubject = {
  readonly kind: 'window' | 'room' | 'all' | 'wall' | 'roof' | 'point' | 'area' | 'neighbour';
  readonly id: string;
  readonly asked: Asked;
  /** What stands: the proposal's own windows are asked as they will be, everything else as the drawing shows it. */
  readonly stage: Stage;
};

type Source = { readonly model: Model | null; readonly check: CheckResult | null };

/**
 * What is selected, where it has a year of sun; else the window that brings most into the worst room; before the first check,
 * all windows; without windows the first receptor.
 */
export const yearSubjectOf = ({ model, check }: Source): YearSubject | null => {
  if (model === null) return null;
  return subjectOfSelection(model, selection.value, stage.value) ?? usualSubject(model, check, stage.value);
};

const windows = (kind: 'window' | 'room' | 'all', id: string, ids: readonly string[]): YearSubject => ({
  kind,
  id,
  asked: { kind: 'windows', ids },
  stage: 'after',
});

function subjectOfSelection(model: Model, selected: Selection | null, shown: Stage): YearSubject | null {
  const id = selected?.ids.at(-1);
  if (selected === null || id === undefined) return null;
  if (selected.kind === 'window') return model.windows.some((w) => w.id === id) ? windows('window', id, [id]) : null;
  if (selected.kind === 'room') {
    const ids = model.windows.filter((w) => w.room === id).map((w) => w.id);
    return ids.length === 0 ? null : windows('room', id, ids);
  }
  if (selected.kind === 'receptor') return receptorSubject(model, id, shown);
  if (selected.kind !== 'face') return null;
  const face = faceOf(id);
  const solid = model.solids.find((s) => s.id === face.block);
  if (solid === undefined) return null;
  // The faces of a block that is not there at the stage are asked at the one at which it is.
  const other = shown === 'after' ? 'before' : 'after';
  return { kind: face.kind, id, asked: face, stage: stands(solid.standing, shown) ? shown : other };
}

function receptorSubject(model: Model, id: string, shown: Stage): YearSubject | null {
  const receptor = model.receptors.find((r) => r.id === id);
  if (receptor === undefined) return null;
  const kind = receptor.kind === 'window' ? 'neighbour' : receptor.kind;
  return { kind, id, asked: { kind: 'receptor', id }, stage: shown };
}

function usualSubject(model: Model, check: CheckResult | null, shown: Stage): YearSubject | null {
  const worst = check?.findings[0]?.through?.window;
  if (worst !== undefined && model.windows.some((w) => w.id === worst)) return windows('window', worst, [worst]);
  const first = model.receptors[0];
  if (model.windows.length === 0) return first === undefined ? null : receptorSubject(model, first.id, shown);
  return windows(
    'all',
    '',
    model.windows.map((w) => w.id),
  );
}
