import type { Model, Stage } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import { differenceOf } from '../plane/boolean.ts';
import { regionArea } from '../plane/region.ts';
import type { ShadowChange } from '../shade/shadow.ts';
import type { AreaSun } from './shadow-moment.ts';

/**
 * The share of every amenity area that lies in sun at a moment, before and after.
 * @param change   shadow on the ground at that moment
 * @param level_m  level of the ground; blocks that float above it leave their ground open
 */
export function areaSun(model: Model, change: ShadowChange, level_m = 0): readonly AreaSun[] {
  const footprints = (stage: Stage) =>
    solidsAt(model.solids, stage)
      .filter((s) => s.base_m <= level_m && s.top_m > level_m)
      .map((s) => s.outline);
  const covered = { before: footprints('before'), after: footprints('after') };
  return model.receptors.flatMap((r) => {
    if (r.kind !== 'area') return [];
    const at = (stage: Stage): readonly [open: number, sunlit: number] => {
      const open = differenceOf([r.outline], covered[stage]);
      const open_m2 = regionArea(open);
      const lit_m2 = regionArea(differenceOf(open, change[stage].regions));
      return [open_m2, open_m2 > 0 ? lit_m2 / open_m2 : 0];
    };
    const [openBefore_m2, sunlitBefore] = at('before');
    const [openAfter_m2, sunlitAfter] = at('after');
    return [{ id: r.id, name: r.name, openBefore_m2, openAfter_m2, sunlitBefore, sunlitAfter }];
  });
}
