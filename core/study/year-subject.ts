import type { Model, Solid, Stage } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import { unit, type Vec3 } from '../plane/vec.ts';
import { areaShade, areaSunlit } from '../shade/area-sunlit.ts';
import { solidWall } from '../shade/exposure-grid.ts';
import { pointSun } from '../shade/point-sun.ts';
import { makeOccluders } from '../shade/skyline-occluders.ts';
import { panelShade, sunlitFraction, windowShade } from '../shade/sunlit-fraction.ts';
import { shadersAt } from './exposure.ts';

/** What a year of direct sun can be asked of. */
export type YearSubject =
  | { readonly kind: 'windows'; readonly ids: readonly string[] }
  /** A point, an amenity area or a neighbour's window. */
  | { readonly kind: 'receptor'; readonly id: string }
  | { readonly kind: 'wall'; readonly block: string; readonly wall: number }
  | { readonly kind: 'roof'; readonly block: string };

/**
 * Share in direct sun, 0..1, for each of some sun directions above the horizon of one month (1..12).
 *
 * Windows, neighbours' windows, walls, roofs and amenity areas: exact, by clipping. A point: exactly 0 or 1, or what the crowns
 * of trees let through. Nothing is sampled over the surface.
 */
export type ShareInSun = (suns: readonly Vec3[], month: number) => Float64Array;

const each =
  (share: (sun: Vec3, month: number) => number): ShareInSun =>
  (suns, month) =>
    Float64Array.from(suns, (sun) => share(sun, month));

/** Nothing that the scheme holds: never in sun. */
const NOTHING: ShareInSun = each(() => 0);

/**
 * A subject prepared once, for any number of sun directions.
 * @param stage  what stands; of windows, those of the proposal with what will stand. The faces of a block that does not stand at
 *               the stage are asked at the other one
 */
export function shareInSun(model: Model, subject: YearSubject, stage: Stage): ShareInSun {
  if (subject.kind === 'windows') return windowsInSun(model, subject.ids);
  if (subject.kind === 'receptor') return receptorInSun(model, subject.id, stage);
  const solid = model.solids.find((s) => s.id === subject.block);
  if (solid === undefined) return NOTHING;
  const standing = standingWith(model, solid, stage);
  if (subject.kind === 'roof') return levelInSun(model, solid.outline, solid.top_m, standing.solids);
  const panel = subject.wall < solid.outline.length ? solidWall(solid, subject.wall) : null;
  if (panel === null) return NOTHING;
  const shade = panelShade(panel, 0, shadersAt(model, standing.stage), standing.solids, model.trees);
  return each((sun, month) => sunlitFraction(shade, sun, month));
}

function standingWith(model: Model, solid: Solid, stage: Stage): { stage: Stage; solids: readonly Solid[] } {
  const solids = solidsAt(model.solids, stage);
  if (solids.includes(solid)) return { stage, solids };
  const other = stage === 'after' ? 'before' : 'after';
  return { stage: other, solids: solidsAt(model.solids, other) };
}

/** Several windows count by the area of their glass. */
function windowsInSun(model: Model, ids: readonly string[]): ShareInSun {
  const wanted = new Set(ids);
  const solids = solidsAt(model.solids, 'after');
  const windows = model.windows
    .filter((form) => wanted.has(form.id))
    .map((form) => ({ glass_m2: form.glass_m2, shade: windowShade(form, solids, model.trees) }));
  const all = windows.reduce((sum, w) => sum + w.glass_m2, 0);
  if (!(all > 0)) return NOTHING;
  return each((sun, month) => {
    let lit = 0;
    for (const { glass_m2, shade } of windows) lit += glass_m2 * sunlitFraction(shade, sun, month);
    return Math.min(1, lit / all);
  });
}

function receptorInSun(model: Model, id: string, stage: Stage): ShareInSun {
  const receptor = model.receptors.find((r) => r.id === id);
  if (receptor === undefined) return NOTHING;
  const solids = solidsAt(model.solids, stage);
  if (receptor.kind === 'area') return levelInSun(model, receptor.outline, receptor.level, solids);
  if (receptor.kind === 'point') {
    const occluders = makeOccluders(solids, shadersAt(model, stage));
    const normal = unit(receptor.normal);
    return (suns, month) => pointSun(occluders, model.trees, receptor.at, normal, suns, month);
  }
  if (receptor.panel === undefined) return NOTHING;
  const shade = panelShade(receptor.panel, 0, [], solids, model.trees);
  return each((sun, month) => sunlitFraction(shade, sun, month));
}

/** An amenity area or a roof: its share in sun, of what is not built over. */
function levelInSun(model: Model, outline: Solid['outline'], level_m: number, solids: readonly Solid[]): ShareInSun {
  const shade = areaShade(outline, level_m, solids, model.trees);
  return each((sun, month) => areaSunlit(shade, sun, month).share);
}
