import { buildModel } from '../form/build-model.ts';
import type { Model } from '../form/model.ts';
import { applyEdit, type SchemeEdit } from '../scheme/edit.ts';
import type { Checked } from '../scheme/fault.ts';
import type { Scheme, Tree } from '../scheme/schema.ts';

/** What stands around the room in a trial: everything, or all but the trees or the neighbours. */
export type Around = 'everything' | 'no-trees' | 'no-neighbours';

/** The scheme of one room under an edit, and its shapes with all that stands around. */
export type Trial = { readonly now: Scheme; readonly built: Model };

/**
 * One room under many edits. Only the room, its windows and its block are built anew; what stands around is shared, so that a trial
 * costs what its own windows cost. The edit asked about last is kept: several limits look at each.
 */
export type RoomTrials = {
  readonly room: string;
  /** How many windows it has. */
  readonly windows: number;
  readonly of: (edit: SchemeEdit | null, around: Around) => Checked<Trial>;
};

const NO_TREES: Tree[] = [];

/** The scheme with nothing of its rooms but one, its windows and its block. Other entries keep their ids and their order. */
function onlyRoom(scheme: Scheme, roomId: string): Scheme {
  const room = scheme.rooms.find((r) => r.id === roomId);
  if (!room) throw new RangeError(`the scheme holds no room ${JSON.stringify(roomId)}`);
  const windows = scheme.windows.filter((w) => w.room === roomId);
  return {
    ...scheme,
    blocks: scheme.blocks.filter((b) => b.id === room.block),
    rooms: [room],
    windows,
    receptors: [],
    sheets: [],
  };
}

/** @param model of the whole scheme */
export function roomTrials(scheme: Scheme, model: Model, roomId: string): RoomTrials {
  const small = onlyRoom(scheme, roomId);
  const own = small.blocks[0]?.id;
  const noNeighbours = model.solids.filter((s) => s.id === own || s.standing === 'proposed');
  let last: { readonly edit: SchemeEdit | null; readonly trial: Checked<Trial> } | null = null;
  const bare = (edit: SchemeEdit | null): Checked<Trial> => {
    if (last !== null && last.edit === edit) return last.trial;
    const now: Checked<Scheme> = edit ? applyEdit(small, edit) : { ok: true, value: small, notes: [] };
    const trial: Checked<Trial> = now.ok
      ? { ok: true, value: { now: now.value, built: buildModel(now.value) }, notes: [] }
      : now;
    last = { edit, trial };
    return trial;
  };
  return {
    room: roomId,
    windows: small.windows.length,
    of: (edit, around) => {
      const trial = bare(edit);
      if (!trial.ok) return trial;
      const solids = around === 'no-neighbours' ? noNeighbours : model.solids;
      const trees = around === 'no-trees' ? NO_TREES : scheme.trees;
      return { ok: true, value: { now: trial.value.now, built: { ...trial.value.built, solids, trees } }, notes: [] };
    },
  };
}
