import { computed, effect, untracked } from '@preact/signals';
import { useLayoutEffect, useRef } from 'preact/hooks';
import { areasOf } from './site.ts';
import { scheme } from '../state/document.ts';
import { selection, select, selectNothing, toggle } from '../state/selection.ts';
import { model, moment } from '../state/studies.ts';
import { theme } from '../state/theme.ts';
import { words } from '../words/words.ts';
import { faceShadowLayer } from './face-shadow-layer.ts';
import { Faces } from './faces.ts';
import { listenToPointer, pressKey } from './gestures.ts';
import { fillRegions, hatchRegions, hatchSpacing, outlineRegions } from './ground-layer.ts';
import { readPalette } from './palette.ts';
import { MassingScene } from './scene.ts';
import { solidsLayer } from './solids-layer.ts';
import { Strokes } from './strokes.ts';
import { camera, lookAs, size, stage } from './view-state.ts';

/** Changes only when the hatch should: most moves of the camera leave it alone. */
const hatchSpacing_m = computed(() => hatchSpacing(camera.value.scale));

/** The ground that shadows are drawn on [m]. */
const GROUND_m = 0;

/** Copies state into the scene, layer by layer: each effect reruns only for what it reads. */
function drive(scene: MassingScene): () => void {
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
      const sunlit = new Map(moment.value?.value.windows.map((w) => [w.window, w.sunlit]));
      const palette = readPalette();
      const ask = { model: shapes, stage: stage.value, selection: selection.value, sunlit, palette };
      const layer = solidsLayer(ask);
      scene.setFaces('solids', layer.faces);
      scene.setStrokes('edges', layer.edges);
      scene.setStrokes('dashes', layer.dashes);
    }),
    effect(() => {
      theme.value;
      const palette = readPalette();
      const change = moment.value?.value.shadows ?? null;
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
      const change = moment.value?.value.shadows ?? null;
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
      const isShown = shadows !== undefined && stage.value === 'after' && moment.value?.scheme === model.value?.scheme;
      scene.setFaces('faceShadow', isShown ? faceShadowLayer(shadows, shapes, readPalette()) : new Faces());
    }),
    effect(() => scene.setCamera(camera.value)),
  ];
  return () => {
    for (const stop of stops) stop();
  };
}

type Props = { readonly onUnavailable: (isLost: boolean) => void };

/** The massing on the graphics card, or in software where there is none. */
export function MassingCanvas({ onUnavailable }: Props) {
  const ref = useRef<HTMLCanvasElement>(null);
  const above = useRef<HTMLCanvasElement>(null);
  useLayoutEffect(() => {
    const canvas = ref.current as HTMLCanvasElement;
    let scene: MassingScene;
    try {
      scene = new MassingScene(canvas, above.current as HTMLCanvasElement);
    } catch {
      onUnavailable(false);
      return;
    }
    let wasFitted: unknown = null;
    const measure = (): void => {
      const { width, height } = canvas.getBoundingClientRect();
      size.value = { width: Math.max(1, width), height: Math.max(1, height) };
      scene.resize(size.value, Math.min(devicePixelRatio, 2));
      scene.draw();
    };
    const watch = new ResizeObserver(measure);
    watch.observe(canvas);
    measure();
    const stopDriving = drive(scene);
    const stopFitting = effect(() => {
      const title = model.value === null ? null : untracked(() => scheme.value?.title);
      if (title === null || title === wasFitted) return;
      wasFitted = title;
      untracked(() => lookAs('massing'));
    });
    const stopPointer = listenToPointer(canvas, (x, y, event) => {
      const owner = scene.pick(x, y);
      if (owner === null) selectNothing();
      else (event.ctrlKey || event.metaKey ? toggle : select)(owner.kind, owner.id);
    });
    const lost = (event: Event): void => {
      event.preventDefault();
      onUnavailable(true);
    };
    canvas.addEventListener('webglcontextlost', lost);
    return () => {
      canvas.removeEventListener('webglcontextlost', lost);
      watch.disconnect();
      stopPointer();
      stopFitting();
      stopDriving();
      scene.dispose();
    };
  }, [onUnavailable]);
  return (
    <div
      class="massing-canvas"
      // biome-ignore lint/a11y/noNoninteractiveTabindex: the drawing takes keys of its own, as its role says
      tabIndex={0}
      role="application"
      aria-label={words.massing.canvas}
      onKeyDown={(event) => {
        if (pressKey(event)) event.preventDefault();
      }}
    >
      <canvas ref={ref} class="massing-canvas" />
      <canvas ref={above} class="massing-canvas at-rest" />
    </div>
  );
}
