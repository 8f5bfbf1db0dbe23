/** A reload breaks the window's held request and makes a new one; longer than this without one, the window has been closed. */
const GRACE_ms = 5000;

/** Whether a window is there, by the requests that it holds open. */
export class Presence {
  #held = 0;
  #timer: NodeJS.Timeout | null = null;
  #onGone: () => void;
  #grace_ms: number;

  constructor(onGone: () => void, grace_ms: number = GRACE_ms) {
    this.#onGone = onGone;
    this.#grace_ms = grace_ms;
  }

  arrive(): void {
    this.#held++;
    this.stop();
  }

  leave(): void {
    this.#held--;
    if (this.#held > 0) return;
    this.stop();
    this.#timer = setTimeout(this.#onGone, this.#grace_ms);
  }

  /** Forgets a window that was about to count as gone. */
  stop(): void {
    if (this.#timer) clearTimeout(this.#timer);
    this.#timer = null;
  }
}
