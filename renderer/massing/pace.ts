/** A moving view keeps pace while its frames follow one another within this [ms]. */
const BAR_ms = 30;
/** Frames farther apart than this belong to different moves [ms]. */
const PAUSE_ms = 150;
/** Weight of the newest frame. */
const NEWEST = 0.2;
/** Frames that are looked at before anything is judged. */
const LEAST_FRAMES = 6;

/** How fast the frames of a moving view follow one another. */
export class Pace {
  #last = Number.NEGATIVE_INFINITY;
  #mean_ms = 0;
  #frames = 0;

  /** Takes note of a frame. @param now when it is drawn [ms] @returns whether the frames come too slowly */
  isTooSlow(now: number): boolean {
    const since = now - this.#last;
    this.#last = now;
    if (since > PAUSE_ms) return this.#judge();
    this.#mean_ms = this.#frames === 0 ? since : this.#mean_ms + NEWEST * (since - this.#mean_ms);
    this.#frames++;
    return this.#judge();
  }

  #judge(): boolean {
    return this.#frames >= LEAST_FRAMES && this.#mean_ms > BAR_ms;
  }

  /** The view has come to rest. */
  reset(): void {
    this.#last = Number.NEGATIVE_INFINITY;
    this.#mean_ms = 0;
    this.#frames = 0;
  }
}
