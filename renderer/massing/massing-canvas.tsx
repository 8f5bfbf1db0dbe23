import { effect, untracked } from '@preact/signals';
import { useLayoutEffect, useRef } from 'preact/hooks';
import { pointed } from '../maps/map-shown.ts';
import { scheme } from '../state/document.ts';
import { model } from '../state/studies.ts';
import { words } from '../words/words.ts';
import { driveScene } from './drive-scene.ts';
import { listenToPointer, pressKey } from './gestures.ts';
import { cellUnder, pressAt } from './pick.ts';
import { pressReadingKey } from './reading-keys.ts';
import { pressSelectionKey } from './selection-keys.ts';
import { MassingScene } from './scene.ts';
import { lookAs, size } from './view-state.ts';

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
    const stopDriving = driveScene(scene);
    const stopFitting = effect(() => {
      const title = model.value === null ? null : untracked(() => scheme.value?.title);
      if (title === null || title === wasFitted) return;
      wasFitted = title;
      untracked(() => lookAs('massing'));
    });
    const stopPointer = listenToPointer(canvas, {
      press: (x, y, event) => pressAt(scene, x, y, event.ctrlKey || event.metaKey),
      hover: (x, y) => {
        pointed.value = x < 0 ? null : cellUnder(scene, x, y);
      },
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
        if (pressReadingKey(event) || pressSelectionKey(event) || pressKey(event)) event.preventDefault();
      }}
    >
      <canvas ref={ref} class="massing-canvas" />
      <canvas ref={above} class="massing-canvas at-rest" />
    </div>
  );
}
