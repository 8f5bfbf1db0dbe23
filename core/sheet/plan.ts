import type { Model, Solid } from '../form/model.ts';
import type { Region } from '../plane/region.ts';
import { centroid, contains } from '../plane/ring.ts';
import type { Ring } from '../plane/vec.ts';
import type { ShadowChange } from '../shade/shadow.ts';
import type { Mark, Mm, Stroke } from './drawing.ts';
import {
  ADDED,
  ADDED_HATCH,
  ADDED_LINE,
  AREA_LINE,
  BOUNDARY_LINE,
  CONTEXT_FILL,
  EXISTING_FILL,
  EXISTING_LINE,
  FINE,
  GAINED_HATCH,
  GAINED_LINE,
  PROPOSED_FILL,
  PROPOSED_LINE,
  REMOVED_LINE,
  SHADOW,
  TREE_LINE,
  WHITE,
} from './ink.ts';
import { rect, words } from './marks.ts';
import { measure, READ, SMALL } from './measure.ts';
import { inFrame, onPage, type PlanView } from './plan-view.ts';
import { planHeight, type SheetUnits } from './sheet-units.ts';

type Look = { readonly fill?: string; readonly stroke: Stroke };

/** How a block of each standing is drawn; each is told from the others by its line as well as by its tint. */
export const BLOCK_LOOK: { readonly [S in Solid['standing']]: Look } = {
  context: { fill: CONTEXT_FILL, stroke: FINE },
  existing: { fill: EXISTING_FILL, stroke: EXISTING_LINE },
  removed: { stroke: REMOVED_LINE },
  proposed: { fill: PROPOSED_FILL, stroke: PROPOSED_LINE },
};

const ringOnPage = (view: PlanView, ring: Ring): readonly (readonly [Mm, Mm])[] => ring.map((p) => onPage(view, p));

const outline = (
  view: PlanView,
  ring: Ring,
  look: Omit<Extract<Mark, { kind: 'path' }>, 'kind' | 'runs' | 'closed'>,
): Mark => ({
  kind: 'path',
  runs: [ringOnPage(view, ring)],
  closed: true,
  ...look,
});

const patch = (
  view: PlanView,
  regions: readonly Region[],
  look: Omit<Extract<Mark, { kind: 'path' }>, 'kind' | 'runs' | 'closed'>,
): readonly Mark[] =>
  regions.length === 0
    ? []
    : [
        {
          kind: 'path',
          runs: regions.flatMap((r) => [r.outer, ...r.holes]).map((ring) => ringOnPage(view, ring)),
          closed: true,
          ...look,
        },
      ];

/** Shadow on the ground: what stays, what the proposal takes away, what it adds. */
function shadows(view: PlanView, change: ShadowChange): readonly Mark[] {
  return [
    ...patch(view, change.before.regions, { fill: SHADOW }),
    ...patch(view, change.after.regions, { fill: SHADOW }),
    ...patch(view, change.gained.regions, { fill: WHITE, hatch: GAINED_HATCH, stroke: GAINED_LINE }),
    ...patch(view, change.added.regions, { fill: ADDED, hatch: ADDED_HATCH, stroke: ADDED_LINE }),
  ];
}

/** Order of painting: what is proposed lies over what stands, what goes lies over all as a dashed line. */
const ORDER: readonly Solid['standing'][] = ['context', 'existing', 'proposed', 'removed'];

function blocks(view: PlanView, solids: readonly Solid[]): readonly Mark[] {
  return ORDER.flatMap((standing) =>
    solids
      .filter((s) => s.standing === standing)
      .toSorted((a, b) => a.top_m - b.top_m)
      .map((s) => outline(view, s.outline, BLOCK_LOOK[standing])),
  );
}

/** Height of a block in metres as it stands on a drawing: its top, and its underside where it floats. */
export const heightWords = (s: Solid, units: SheetUnits = 'metric'): string =>
  s.base_m > 0.005 ? `${planHeight(s.base_m, units)}–${planHeight(s.top_m, units)}` : planHeight(s.top_m, units);

/** Whether a line of text centred on a place lies inside an outline on the page, with a little air. */
function holds(ring: readonly (readonly [Mm, Mm])[], x: Mm, y: Mm, half: Mm, up: Mm, down: Mm): boolean {
  for (const dx of [-half, 0, half]) for (const dy of [-up, down]) if (!contains(ring, x + dx, y + dy)) return false;
  return true;
}

/**
 * Names and heights written inside the blocks that are large enough at this scale: both, or the height, or the height in small
 * figures. A removed block stands aside for what is proposed in its place and carries none.
 * @returns the marks, and the standing blocks in the frame that found no room for their height
 */
export function blockLabels(
  view: PlanView,
  solids: readonly Solid[],
  units: SheetUnits = 'metric',
): { readonly marks: readonly Mark[]; readonly left: readonly Solid[] } {
  const marks: Mark[] = [];
  const left: Solid[] = [];
  const gone = solids.some((s) => s.standing === 'removed');
  for (const s of solids) {
    if (s.standing === 'removed') continue;
    const ring = ringOnPage(view, s.outline);
    const [x, y] = labelPlace(ring);
    // The dashes of what is removed are kept off the figures.
    const mask = (half: Mm, up: Mm, down: Mm): readonly Mark[] =>
      gone ? [rect(x - half, y - up, 2 * half, up + down, { fill: BLOCK_LOOK[s.standing].fill ?? WHITE })] : [];
    if (!inFrame(view, [x, y])) continue;
    const height = heightWords(s, units);
    const alone = (size: Mm): boolean =>
      holds(ring, x, y, measure(height, size) / 2 + 0.3, size * 0.35 + 0.25, size * 0.35 + 0.25);
    const cap = READ * 0.7;
    const wide = Math.max(measure(s.name, READ), measure(height, READ)) / 2 + 0.4;
    if (s.name !== '' && holds(ring, x, y, wide, cap + 1, cap + 1)) {
      marks.push(
        ...mask(wide, cap + 0.7, cap + 1.1),
        words(s.name, x, y - 0.5, { anchor: 'middle' }),
        words(height, x, y + cap + 0.9, { anchor: 'middle' }),
      );
      continue;
    }
    const size = [READ, SMALL].find(alone);
    if (size === undefined) left.push(s);
    else {
      marks.push(
        ...mask(measure(height, size) / 2 + 0.2, size * 0.45, size * 0.45),
        words(height, x, y + size * 0.35, { size, anchor: 'middle' }),
      );
    }
  }
  return { marks, left };
}

/** The middle of a block, or a place inside it where its middle falls outside. */
function labelPlace(ring: readonly (readonly [Mm, Mm])[]): readonly [Mm, Mm] {
  const middle = centroid(ring);
  if (contains(ring, middle[0], middle[1])) return middle;
  const ys = ring.map((p) => p[1]);
  let best: readonly [Mm, Mm] = middle;
  let widest = 0;
  for (let i = 1; i < 8; i++) {
    const y = Math.min(...ys) + ((Math.max(...ys) - Math.min(...ys)) * i) / 8;
    const cuts = ring
      .flatMap((a, k) => {
        const b = ring[(k + 1) % ring.length] as readonly [Mm, Mm];
        return a[1] > y !== b[1] > y ? [a[0] + ((y - a[1]) / (b[1] - a[1])) * (b[0] - a[0])] : [];
      })
      .sort((p, q) => p - q);
    for (let k = 0; k + 1 < cuts.length; k += 2) {
      const width = (cuts[k + 1] as number) - (cuts[k] as number);
      if (width > widest) {
        widest = width;
        best = [((cuts[k + 1] as number) + (cuts[k] as number)) / 2, y];
      }
    }
  }
  return best;
}

/**
 * The plan of one moment inside its frame: shadows, boundary, amenity areas, trees and blocks, cut at the frame.
 * @param crowns  outlines of the shadows of tree crowns
 * @param change  null draws the scheme without shadows
 */
export function plan(
  view: PlanView,
  model: Model,
  change: ShadowChange | null,
  crowns: readonly Ring[] = [],
  units: SheetUnits = 'metric',
): readonly Mark[] {
  const { x, y, width, height } = view.frame;
  const marks: Mark[] = [...(change ? shadows(view, change) : [])];
  for (const crown of crowns) marks.push(outline(view, crown, { stroke: TREE_LINE }));
  if (model.boundary) marks.push(outline(view, model.boundary, { stroke: BOUNDARY_LINE }));
  for (const r of model.receptors) if (r.kind === 'area') marks.push(outline(view, r.outline, { stroke: AREA_LINE }));
  marks.push(...blocks(view, model.solids));
  for (const t of model.trees) {
    marks.push({ kind: 'circle', at: onPage(view, t.at), radius: (t.spread * 500) / view.scale, stroke: TREE_LINE });
  }
  marks.push(...blockLabels(view, model.solids, units).marks);
  return [{ kind: 'group', label: 'plan', clip: [x, y, width, height], marks }];
}
