import { computed, effect } from '@preact/signals';
import { isMapOn } from '../maps/map-state.ts';
import { scheme } from '../state/document.ts';
import { selection } from '../state/selection.ts';
import { stage } from '../state/stage.ts';
import { model, moment } from '../state/studies.ts';
import { theme } from '../state/theme.ts';
import { axesOf } from './camera.ts';
import { crownOutline } from './crown.ts';
import { driveMap } from './drive-map.ts';
import { faceShadowLayer } from './face-shadow-layer.ts';
import { Faces } from './faces.ts';
import { fillRegions, hatchRegions, hatchSpacing, outlineRegions } from './ground-layer.ts';
import { readPalette } from './palette.ts';
import type { MassingScene } from './scene.ts';
import { areasOf } from './site.ts';
import { solidsLayer } from './solids-layer.ts';
import { Strokes } from './strokes.ts';
import { camera } from './view-state.ts';

/** Changes only when the hatch should: most moves of the camera leave it alone. */
const hatchSpacing_m = computed(() => hatchSpacing(camera.value.scale));

/** The ground that shadows are drawn on [m]. */
const GROUND_m = 0;

/** Outlines of crowns turn with the view: with more trees than this they would hold it up. */
const MOST_OUTLINED = 400;

const turn = computed(() => camera.value.turn_rad);
const tilt = computed(() => camera.value.tilt_rad);
/** Which way the view looks: it stays while the view only moves or zooms. */
const direction = computed(() => axesOf({ ...camera.peek(), turn_rad: turn.value, tilt_rad: tilt.value }).into);

/** The shadows of the moment on the ground; a map takes their place. */
const shadowsShown = computed(() => (isMapOn.value ? null : (moment.value?.value.shadows ?? null)));

/** Copies state into the scene, layer by layer: each effect reruns only for what it reads. */
export function driveScene(scene: MassingScene): () => void {
  const stops = [
    effect(() => {
      theme.value;
      const palette = readPalette();
      scene.setGround(palette.ground);
      const [plot, boundary] = [new Faces(), new Strokes()];
      const ring = model.value?.value.boundary ?? null;
      if (ring !== null) {
        fillRegions([{ outer: ring, holes: [] }], GROUND_m, palette.plot, plot);
        outlineRegions([{ outer: ring, holes: [] }], GROUND_m, palette.accent, boundary);
      }
      for (const area of areasOf(scheme.value)) outlineRegions([area], GROUND_m, palette.soft, boundary);
      scene.setFaces('plot', plot);
      scene.setStrokes('boundary', boundary);
    }),
    effect(() => {
      theme.value;
      const shapes = model.value?.value;
      if (shapes === undefined) return;
      const sun = isMapOn.value ? null : (moment.value?.value ?? null);
      const layer = solidsLayer({
        model: shapes,
        stage: stage.value,
        selection: selection.value,
        sunlit: sun && new Map(sun.windows.map((w) => [w.window, w.sunlit])),
        neighbours: sun && new Map(sun.neighbours.map((n) => [n.receptor, n[stage.value]])),
        palette: readPalette(),
      });
      scene.setFaces('solids', layer.faces);
      scene.setFaces('openings', layer.openings);
      scene.setStrokes('edges', layer.edges);
      scene.setStrokes('dashes', layer.dashes);
    }),
    effect(() => {
      theme.value;
      const palette = readPalette();
      const change = shadowsShown.value;
      const [shadow, added] = [new Faces(), new Faces()];
      if (change !== null) {
        fillRegions(change[stage.value].regions, GROUND_m, palette.shadow, shadow);
        if (stage.value === 'after') fillRegions(change.added.regions, GROUND_m, palette.added, added);
      }
      scene.setFaces('shadow', shadow);
      scene.setFaces('added', added);
    }),
    effect(() => {
      theme.value;
      const palette = readPalette();
      const hatch = new Strokes();
      const change = shadowsShown.value;
      if (change !== null && stage.value === 'after') {
        hatchRegions(change.added.regions, hatchSpacing_m.value, GROUND_m, palette.over, hatch);
        outlineRegions(change.added.regions, GROUND_m, palette.over, hatch);
        outlineRegions(change.gained.regions, GROUND_m, palette.edge, hatch);
      }
      scene.setStrokes('hatch', hatch);
    }),
    effect(() => {
      theme.value;
      const shapes = model.value?.value;
      const shadows = moment.value?.value.faces;
      if (shapes === undefined) return;
      const isShown =
        shadows !== undefined &&
        !isMapOn.value &&
        stage.value === 'after' &&
        moment.value?.scheme === model.value?.scheme;
      scene.setFaces('faceShadow', isShown ? faceShadowLayer(shadows, shapes, readPalette()) : new Faces());
    }),
    effect(() => {
      theme.value;
      const outlines = new Strokes();
      const trees = model.value?.value.trees ?? [];
      const colour = readPalette().edge;
      if (trees.length <= MOST_OUTLINED)
        for (const tree of trees) crownOutline(tree, direction.value, colour, outlines);
      scene.setStrokes('crowns', outlines);
    }),
    driveMap(scene),
    effect(() => scene.setCamera(camera.value)),
  ];
  return () => {
    for (const stop of stops) stop();
  };
}
