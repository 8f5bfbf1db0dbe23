import { orbit, pan, zoomAt } from './camera.ts';
import { camera, isPlan, lookAs, showAll, size } from './view-state.ts';

/** A press that moves less than this is a click [px]. */
const SLACK_px = 4;
const TURN_PER_px = 0.006;
const STEP_rad = Math.PI / 36;
const STEP_px = 40;
const ZOOM_STEP = 1.2;

type Hand = { x: number; y: number };

export type Listener = {
  /** A press and release in one place [px from the top left]. */
  readonly press: (x: number, y: number, event: PointerEvent) => void;
  /** Where the pointer stands while no button is held; x is −1 when it has gone or begins to drag. */
  readonly hover: (x: number, y: number) => void;
};

/**
 * Turning, moving and zooming by pointer: drag turns (moves, in a plan), drag with shift or the other buttons moves, the wheel
 * zooms at the pointer, two fingers zoom and move.
 * @returns the way to stop listening
 */
export function listenToPointer(surface: HTMLElement, { press, hover }: Listener): () => void {
  const hands = new Map<number, Hand>();
  let travelled = 0;

  const place = (event: PointerEvent | WheelEvent): Hand => {
    const box = surface.getBoundingClientRect();
    return { x: event.clientX - box.left, y: event.clientY - box.top };
  };

  const down = (event: PointerEvent): void => {
    surface.setPointerCapture(event.pointerId);
    hands.set(event.pointerId, place(event));
    travelled = hands.size > 1 ? Infinity : 0;
  };

  const move = (event: PointerEvent): void => {
    const before = hands.get(event.pointerId);
    const now = place(event);
    if (before === undefined) {
      hover(now.x, now.y);
      return;
    }
    const [dx, dy] = [now.x - before.x, now.y - before.y];
    travelled += Math.abs(dx) + Math.abs(dy);
    if (travelled <= SLACK_px) return;
    hover(-1, -1);
    if (hands.size === 2) pinch(event.pointerId, before, now);
    else if (event.shiftKey || event.buttons !== 1 || isPlan.peek()) camera.value = pan(camera.peek(), dx, dy);
    else camera.value = orbit(camera.peek(), dx * TURN_PER_px, dy * TURN_PER_px);
    hands.set(event.pointerId, now);
  };

  const pinch = (id: number, before: Hand, now: Hand): void => {
    const other = [...hands.entries()].find(([key]) => key !== id)?.[1];
    if (other === undefined) return;
    const spread = (h: Hand): number => Math.max(1, Math.hypot(h.x - other.x, h.y - other.y));
    const moved = pan(camera.peek(), (now.x - before.x) / 2, (now.y - before.y) / 2);
    camera.value = zoomAt(
      moved,
      size.peek(),
      spread(now) / spread(before),
      (now.x + other.x) / 2,
      (now.y + other.y) / 2,
    );
  };

  const up = (event: PointerEvent): void => {
    if (!hands.delete(event.pointerId)) return;
    if (travelled <= SLACK_px && event.type === 'pointerup' && event.button === 0) {
      const { x, y } = place(event);
      press(x, y, event);
    }
  };

  const wheel = (event: WheelEvent): void => {
    event.preventDefault();
    const { x, y } = place(event);
    camera.value = zoomAt(camera.peek(), size.peek(), Math.exp(-event.deltaY * 0.0015), x, y);
  };

  const leave = (): void => hover(-1, -1);

  const menu = (event: Event): void => event.preventDefault();

  surface.addEventListener('pointerdown', down);
  surface.addEventListener('pointermove', move);
  surface.addEventListener('pointerup', up);
  surface.addEventListener('pointercancel', up);
  surface.addEventListener('pointerleave', leave);
  surface.addEventListener('wheel', wheel, { passive: false });
  surface.addEventListener('contextmenu', menu);
  return () => {
    surface.removeEventListener('pointerdown', down);
    surface.removeEventListener('pointermove', move);
    surface.removeEventListener('pointerup', up);
    surface.removeEventListener('pointercancel', up);
    surface.removeEventListener('pointerleave', leave);
    surface.removeEventListener('wheel', wheel);
    surface.removeEventListener('contextmenu', menu);
  };
}

export function zoomBy(steps: number): void {
  const { width, height } = size.peek();
  camera.value = zoomAt(camera.peek(), size.peek(), ZOOM_STEP ** steps, width / 2, height / 2);
}

const TURNS: { readonly [key: string]: readonly [number, number] } = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};

/** The same by keyboard. @returns whether the key meant something here */
export function pressKey(event: KeyboardEvent): boolean {
  if (event.ctrlKey || event.metaKey || event.altKey) return false;
  const turn = TURNS[event.key];
  if (turn !== undefined) {
    const [x, y] = turn;
    camera.value =
      event.shiftKey || isPlan.peek()
        ? pan(camera.peek(), -x * STEP_px, -y * STEP_px)
        : orbit(camera.peek(), x * STEP_rad, y * STEP_rad);
    return true;
  }
  if (event.key === '+' || event.key === '=') zoomBy(1);
  else if (event.key === '-') zoomBy(-1);
  else if (event.key === 'f' || event.key === 'F') showAll();
  else if (event.key === 'p' || event.key === 'P') lookAs(isPlan.peek() ? 'massing' : 'plan');
  else return false;
  return true;
}
