import type { Model, Panel, ReceptorForm, Solid, Stage, WindowForm } from '../../core/form/model.ts';
import { stands } from '../../core/form/stands.ts';
import { along, type Point, type Vec3 } from '../../core/plane/vec.ts';
import { type Face, faceOf } from '../state/faces.ts';
import type { Selection } from '../state/selection.ts';
import { crown } from './crown.ts';
import { Faces, type Owner } from './faces.ts';
import { mix, type Palette, type Rgb } from './palette.ts';
import { Strokes } from './strokes.ts';

/** A window drawn this far in front of its wall does not flicker with it [m]. */
const PROUD_m = 0.02;

/** `openings`: glass and devices, which stand proud of the faces that they are in and are painted after what lies on those. */
export type SolidsLayer = {
  readonly faces: Faces;
  readonly openings: Faces;
  readonly edges: Strokes;
  readonly dashes: Strokes;
};

type Tints = { readonly roof: Rgb; readonly wall: Rgb; readonly edge: Rgb };

export function tintsOf(standing: Solid['standing'], palette: Palette): Tints {
  if (standing === 'proposed')
    return { roof: palette['proposed-roof'], wall: palette['proposed-wall'], edge: palette.ink };
  if (standing === 'context') {
    return {
      roof: palette['context-roof'],
      wall: palette['context-wall'],
      edge: mix(palette.ink, palette['context-wall'], 0.35),
    };
  }
  return { roof: palette['standing-roof'], wall: palette['standing-wall'], edge: palette.ink };
}

/** A wall's tint by the way it faces, so that neighbouring walls differ: fixed to the drawing and nothing to do with the sun. */
export function wallTint(tints: { roof: Rgb; wall: Rgb }, nx: number, ny: number): Rgb {
  const towards = (nx * Math.cos(2.2) + ny * Math.sin(2.2) + 1) / 2;
  return mix(tints.wall, tints.roof, 0.75 * towards);
}

const lifted = (ring: readonly Point[], z: number): Vec3[] => ring.map(([x, y]): Vec3 => [x, y, z]);

function edgesOf(solid: Solid, strokes: Strokes, colour: Rgb): void {
  for (const [a, b] of prismEdges(solid.outline, solid.base_m, solid.top_m)) strokes.add(a, b, colour);
}

/** The corners of a wall, from its lower left as seen from outside. */
export function wallCorners(solid: Solid, wall: number): readonly Vec3[] {
  const a = solid.outline[wall] as Point;
  const b = solid.outline[(wall + 1) % solid.outline.length] as Point;
  const { base_m, top_m } = solid;
  return [
    [...a, base_m],
    [...b, base_m],
    [...b, top_m],
    [...a, top_m],
  ];
}

function drawSolid(solid: Solid, tints: Tints, layer: SolidsLayer): void {
  const owner = (face: Face): Owner => ({ kind: 'block', id: solid.id, face });
  const roof = owner({ kind: 'roof', block: solid.id });
  for (const piece of solid.pieces) layer.faces.convex(lifted(piece, solid.top_m), tints.roof, roof);
  const n = solid.outline.length;
  for (let i = 0; i < n; i++) {
    const a = solid.outline[i] as Point;
    const b = solid.outline[(i + 1) % n] as Point;
    const span = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1;
    const tint = wallTint(tints, (b[1] - a[1]) / span, (a[0] - b[0]) / span);
    layer.faces.convex(wallCorners(solid, i), tint, owner({ kind: 'wall', block: solid.id, wall: i }));
  }
  edgesOf(solid, layer.edges, tints.edge);
}

/** The corners of a window, a little proud of its wall, from its lower left. */
export function windowCorners(w: Panel, proud_m = PROUD_m): readonly Vec3[] {
  const o = along(w.origin, w.normal, proud_m);
  const r = along(o, w.right, w.width_m);
  return [o, r, along(r, w.up, w.height_m), along(o, w.up, w.height_m)];
}

/** @param sunlit  share of the glass in direct sun; null where a map shows through it */
function drawWindow(w: WindowForm, sunlit: number | null, palette: Palette, layer: SolidsLayer): void {
  const owner = { kind: 'window', id: w.id } as const;
  if (sunlit !== null) layer.openings.convex(windowCorners(w), glassTint(sunlit, palette), owner);
  layer.edges.loop(windowCorners(w, PROUD_m * 1.5), mix(palette.ink, palette['proposed-wall'], 0.35));
  for (const shader of w.shaders) {
    layer.openings.convex(shader.corners, palette.device, owner);
    layer.edges.loop(shader.corners, mix(palette.ink, palette['proposed-wall'], 0.25));
  }
}

const glassTint = (sunlit: number, palette: Palette): Rgb => mix(palette['glass-shade'], palette['glass-lit'], sunlit);

/** A neighbour's window that the scheme asks after. */
function drawNeighbour(r: ReceptorForm, sunlit: number | null, palette: Palette, layer: SolidsLayer): void {
  if (r.panel === undefined) return;
  const owner = { kind: 'receptor', id: r.id } as const;
  if (sunlit !== null) layer.openings.convex(windowCorners(r.panel), glassTint(sunlit, palette), owner);
  layer.edges.loop(windowCorners(r.panel, PROUD_m * 1.5), palette.ink);
}

export type SolidsAsk = {
  readonly model: Model;
  readonly stage: Stage;
  readonly selection: Selection | null;
  /** Share of each window's glass in direct sun, by id; null while a map shows on the faces, through the glass. */
  readonly sunlit: ReadonlyMap<string, number> | null;
  /** The same of neighbours' windows, at the stage. */
  readonly neighbours: ReadonlyMap<string, number> | null;
  readonly palette: Palette;
};

/** Everything that stands, as one list of flat faces and one of ink edges; what does not stand at the stage is dashed. */
export function solidsLayer({ model, stage, selection, sunlit, neighbours, palette }: SolidsAsk): SolidsLayer {
  const layer: SolidsLayer = {
    faces: new Faces(),
    openings: new Faces(),
    edges: new Strokes(),
    dashes: new Strokes(),
  };
  const isChosen = (id: string): boolean => selection?.kind === 'block' && selection.ids.includes(id);
  const standing = new Set<string>();
  for (const solid of model.solids) {
    const tints = tintsOf(solid.standing, palette);
    if (!stands(solid.standing, stage)) {
      edgesOf(solid, layer.dashes, palette.soft);
      continue;
    }
    standing.add(solid.id);
    drawSolid(solid, isChosen(solid.id) ? chosen(tints, palette) : tints, layer);
  }
  for (const w of model.windows) {
    if (!standing.has(w.block)) continue;
    const share = stage === 'after' ? (sunlit?.get(w.id) ?? 0) : 0;
    drawWindow(w, sunlit === null ? null : share, palette, layer);
  }
  for (const r of model.receptors) {
    if (r.kind === 'window' && standing.has(r.block))
      drawNeighbour(r, neighbours === null ? null : (neighbours.get(r.id) ?? 0), palette, layer);
  }
  for (const tree of model.trees) crown(tree, palette, layer.faces, layer.edges);
  return layer;
}

const chosen = (tints: Tints, palette: Palette): Tints => ({
  roof: mix(tints.roof, palette.accent, 0.3),
  wall: mix(tints.wall, palette.accent, 0.3),
  edge: palette.accent,
});

/** Edges of what is selected, end to end: drawn over everything, so that they show through what hides them. */
export function selectionEdges(model: Model, selection: Selection | null): readonly (readonly [Vec3, Vec3])[] {
  if (selection === null) return [];
  const ids = new Set(selection.ids);
  if (selection.kind === 'room') {
    return model.rooms
      .filter((room) => ids.has(room.id))
      .flatMap((room) => prismEdges(room.outline, room.floor_m, room.floor_m + room.height_m));
  }
  if (selection.kind === 'block') {
    return model.solids.filter((s) => ids.has(s.id)).flatMap((s) => prismEdges(s.outline, s.base_m, s.top_m));
  }
  if (selection.kind === 'face') return selection.ids.flatMap((id) => faceEdges(model, id));
  if (selection.kind === 'receptor') {
    return model.receptors.filter((r) => ids.has(r.id)).flatMap(receptorEdges);
  }
  const isChosen = (w: WindowForm): boolean =>
    (selection.kind === 'window' && ids.has(w.id)) ||
    (selection.kind === 'glass' && ids.has(w.glass.id)) ||
    (selection.kind === 'device' && w.shaders.some((shader) => ids.has(shader.device)));
  return model.windows.filter(isChosen).flatMap((w) => loopEdges(windowCorners(w)));
}

function faceEdges(model: Model, id: string): readonly (readonly [Vec3, Vec3])[] {
  const face = faceOf(id);
  const solid = model.solids.find((s) => s.id === face.block);
  if (solid === undefined) return [];
  if (face.kind === 'roof') return loopEdges(lifted(solid.outline, solid.top_m));
  return face.wall < solid.outline.length ? loopEdges(wallCorners(solid, face.wall)) : [];
}

/** A point has no edges: its mark says that it is selected. */
function receptorEdges(r: ReceptorForm): readonly (readonly [Vec3, Vec3])[] {
  if (r.kind === 'area') return loopEdges(lifted(r.outline, r.level));
  return r.panel === undefined ? [] : loopEdges(windowCorners(r.panel));
}

const loopEdges = (corners: readonly Vec3[]): readonly (readonly [Vec3, Vec3])[] =>
  corners.map((corner, i) => [corner, corners[(i + 1) % corners.length] as Vec3]);

function prismEdges(outline: readonly Point[], low_m: number, high_m: number): readonly (readonly [Vec3, Vec3])[] {
  const low = lifted(outline, low_m);
  const high = lifted(outline, high_m);
  const upright = low.map((corner, i): readonly [Vec3, Vec3] => [corner, high[i] as Vec3]);
  return [...loopEdges(low), ...loopEdges(high), ...upright];
}
