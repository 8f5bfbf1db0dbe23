import { computed } from '@preact/signals';
import type { Model } from '../../core/form/model.ts';
import type { Vec3 } from '../../core/plane/vec.ts';
import { model, moment } from '../state/studies.ts';
import { scheme } from '../state/document.ts';
import { isMapOn } from '../maps/map-state.ts';
import { type Face, faceOf } from '../state/faces.ts';
import { faceName, receptorName } from '../state/names.ts';
import { selection } from '../state/selection.ts';
import { stage } from '../state/stage.ts';
import { fixed, percent } from '../ui/format.ts';
import { words } from '../words/words.ts';
import { axesOf, barLength, project } from './camera.ts';
import { selectionEdges, wallCorners, windowCorners } from './solids-layer.ts';
import { camera, size } from './view-state.ts';

const BAR_MOST_px = 120;

/** A length on the screen; in a parallel view it holds for every level line across the picture. */
export function ScaleBar() {
  const { scale } = camera.value;
  const length = barLength(scale, BAR_MOST_px);
  const wide = length * scale;
  return (
    <svg
      class="scale-bar"
      width={wide + 60}
      height="22"
      role="img"
      aria-label={`${fixed(length, length < 1 ? 1 : 0)} m`}
    >
      <path d={`M0.5 6v8M${wide / 2 + 0.5} 8v4M${wide + 0.5} 6v8M0.5 10h${wide}`} stroke="currentColor" fill="none" />
      <text x={wide + 8} y="14.5">
        {fixed(length, length < 1 ? 1 : 0)} m
      </text>
    </svg>
  );
}

/** Which way true north lies in the picture. */
export function NorthPoint() {
  const north_rad = model.value?.value.north_rad ?? 0;
  const { right, up } = axesOf(camera.value);
  const [e, n] = [Math.sin(north_rad), Math.cos(north_rad)];
  const x = e * right[0] + n * right[1];
  const y = -(e * up[0] + n * up[1]);
  const [tipX, tipY] = [20 + x * 15, 20 + y * 15];
  const [tailX, tailY] = [20 - x * 15, 20 - y * 15];
  // The barb's two ends, across the arrow in the plane of the ground.
  const barb = (side: number): string => {
    const [be, bn] = [-n * side, e * side];
    const bx = be * right[0] + bn * right[1];
    const by = -(be * up[0] + bn * up[1]);
    return `${20 + x * 5 + bx * 5} ${20 + y * 5 + by * 5}`;
  };
  return (
    <div class="north-point">
      <svg width="40" height="40" aria-hidden="true">
        <path d={`M${tailX} ${tailY}L${tipX} ${tipY}`} stroke="currentColor" stroke-width="1.4" fill="none" />
        <path d={`M${tipX} ${tipY}L${barb(1)}L${barb(-1)}Z`} fill="currentColor" />
      </svg>
      <span>{words.massing.trueNorth}</span>
    </div>
  );
}

const m2 = (area: number): string => `${fixed(area, 0)} m²`;

/** What the tints and lines mean, with the areas of this moment. */
export function Key() {
  const shadows = moment.value?.value.shadows ?? null;
  const standings = new Set(model.value?.value.solids.map((s) => s.standing));
  const isAfter = stage.value === 'after';
  const key = words.massing.key;
  return (
    <dl class="key">
      {shadows === null ? null : (
        <>
          <Entry swatch="shadow" text={key.shadow} value={m2(shadows[stage.value].area_m2)} />
          {isAfter ? <Entry swatch="added" text={key.added} value={m2(shadows.added.area_m2)} /> : null}
          {isAfter && shadows.gained.area_m2 >= 0.5 ? (
            <Entry swatch="gained" text={key.gained} value={m2(shadows.gained.area_m2)} />
          ) : null}
        </>
      )}
      {moment.value === null || moment.value.value.windows.length === 0 ? null : (
        <Entry swatch="glass" text={key.glass} />
      )}
      {standings.has('proposed') ? <Entry swatch={isAfter ? 'proposed' : 'removed'} text={key.proposed} /> : null}
      {standings.has('removed') ? <Entry swatch={isAfter ? 'removed' : 'existing'} text={key.removed} /> : null}
    </dl>
  );
}

function Entry({ swatch, text, value }: { swatch: string; text: string; value?: string }) {
  return (
    <div class="key-entry">
      <dt>
        <span class={`swatch ${swatch}`} aria-hidden="true" />
        {text}
      </dt>
      <dd>{value}</dd>
    </div>
  );
}

type Tag = { readonly at: Vec3; readonly title: string; readonly line: string };

const tag = computed<Tag | null>(() => {
  const shapes = model.value?.value;
  const chosen = selection.value;
  const id = chosen?.ids.at(-1);
  if (shapes === undefined || id === undefined) return null;
  if (chosen?.kind === 'block') {
    const solid = shapes.solids.find((s) => s.id === id);
    if (solid === undefined) return null;
    const [x, y] = middle(solid.outline);
    const line = words.massing.block(words.massing.standing[solid.standing], `${fixed(solid.top_m, 2)} m`);
    return { at: [x, y, solid.top_m], title: solid.name || solid.id, line };
  }
  if (chosen?.kind === 'room') {
    const room = shapes.rooms.find((r) => r.id === id);
    if (room === undefined) return null;
    const [x, y] = middle(room.outline);
    return {
      at: [x, y, room.floor_m + room.height_m],
      title: `${room.id} ${room.name}`,
      line: `${fixed(room.floor_m2, 1)} m²`,
    };
  }
  if (chosen?.kind === 'face') return faceTag(shapes, faceOf(id));
  if (chosen?.kind === 'receptor') return receptorTag(shapes, id);
  if (chosen?.kind === 'window') {
    const w = shapes.windows.find((other) => other.id === id);
    if (w === undefined) return null;
    const lit = moment.value?.value.windows.find((other) => other.window === id)?.sunlit;
    const corners = windowCorners(w);
    return {
      at: between(corners[2] as Vec3, corners[3] as Vec3),
      title: w.id,
      line: lit === undefined ? '' : words.massing.inSun(percent(lit)),
    };
  }
  return null;
});

function faceTag(shapes: Model, face: Face): Tag | null {
  const solid = shapes.solids.find((s) => s.id === face.block);
  if (solid === undefined || (face.kind === 'wall' && face.wall >= solid.outline.length)) return null;
  const [x, y] = middle(solid.outline);
  const corners = face.kind === 'wall' ? wallCorners(solid, face.wall) : null;
  const at: Vec3 = corners === null ? [x, y, solid.top_m] : between(corners[2] as Vec3, corners[3] as Vec3);
  return { at, title: faceName(shapes, face), line: '' };
}

function receptorTag(shapes: Model, id: string): Tag | null {
  const receptor = shapes.receptors.find((r) => r.id === id);
  if (receptor === undefined) return null;
  const sun = moment.value?.value;
  const lit =
    receptor.kind === 'area'
      ? sun?.areas.find((a) => a.receptor === id)?.[stage.value].share
      : sun?.neighbours.find((n) => n.receptor === id)?.[stage.value];
  const line = lit === undefined ? '' : words.massing.inSun(percent(lit));
  const title = receptorName(receptor);
  if (receptor.kind === 'point') return { at: receptor.at, title, line };
  if (receptor.kind === 'area') {
    const [x, y] = middle(receptor.outline);
    return { at: [x, y, receptor.level], title, line };
  }
  if (receptor.panel === undefined) return null;
  const corners = windowCorners(receptor.panel);
  return { at: between(corners[2] as Vec3, corners[3] as Vec3), title, line };
}

/** Halfway along the head of a window. */
const between = (a: Vec3, b: Vec3): Vec3 => [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2, (a[2] + b[2]) / 2];

const middle = (ring: readonly (readonly [number, number])[]): readonly [number, number] => {
  const sum = ring.reduce(([x, y], p): [number, number] => [x + p[0], y + p[1]], [0, 0] as [number, number]);
  return [sum[0] / ring.length, sum[1] / ring.length];
};

/** The edges of what is selected, over the drawing. */
export function SelectionOutline() {
  const shapes = model.value?.value;
  if (shapes === undefined) return null;
  const place = (p: Vec3): string => {
    const [x, y] = project(camera.value, size.value, p);
    return `${x.toFixed(1)} ${y.toFixed(1)}`;
  };
  const path = selectionEdges(shapes, selection.value)
    .map(([a, b]) => `M${place(a)}L${place(b)}`)
    .join('');
  return path === '' ? null : (
    <svg class="selection-outline" aria-hidden="true">
      <path d={path} />
    </svg>
  );
}

/** A small label above what is selected. */
export function SelectionTag() {
  const shown = tag.value;
  // A map names what is selected in its key, and its cells where they are read.
  if (shown === null || scheme.value === null || isMapOn.value) return null;
  const [x, y] = project(camera.value, size.value, shown.at);
  const { width, height } = size.value;
  if (x < 0 || y < 0 || x > width || y > height) return null;
  return (
    <div class="tag" style={{ left: `${Math.round(x)}px`, top: `${Math.round(y)}px` }}>
      <strong>{shown.title}</strong> {shown.line}
    </div>
  );
}
