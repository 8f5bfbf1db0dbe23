import type { Model, ReceptorForm } from '../../core/form/model.ts';
import { trueBearing_deg } from '../../core/form/panel.ts';
import { solidWall } from '../../core/shade/exposure-grid.ts';
import { DEG } from '../../core/units/angle.ts';
import { bearing } from '../ui/format.ts';
import { words } from '../words/words.ts';
import { type Face, faceOf } from './faces.ts';
import type { YearSubject } from './year-subject.ts';

/** A face in words: its block, and where a wall looks. */
export function faceName(model: Model, face: Face): string {
  const solid = model.solids.find((s) => s.id === face.block);
  const block = solid?.name || face.block;
  if (face.kind === 'roof') return words.names.roof(block);
  const panel = solid === undefined || face.wall >= solid.outline.length ? null : solidWall(solid, face.wall);
  return panel === null
    ? words.names.wallNumber(block, face.wall)
    : words.names.wall(block, bearing(trueBearing_deg(panel.normal, model.north_rad / DEG)));
}

export const receptorName = (receptor: ReceptorForm): string =>
  receptor.name === '' ? receptor.id : `${receptor.id} ${receptor.name}`;

/** Whose year a strip shows, in words. */
export function subjectName(model: Model, { kind, id }: YearSubject): string {
  if (kind === 'all') return words.names.allWindows;
  if (kind === 'window') return words.names.window(id);
  if (kind === 'room') return words.names.room(id);
  if (kind === 'wall' || kind === 'roof') return faceName(model, faceOf(id));
  const receptor = model.receptors.find((r) => r.id === id);
  return receptor === undefined ? id : receptorName(receptor);
}
