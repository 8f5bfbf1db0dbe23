/** Samples a pixel in a picture at rest; each is drawn a fraction of a pixel aside from the others. */
const SAMPLES = 8;

/** The radical inverse of a whole number, 0..1: an even spread without a pattern (J. H. Halton, Numer. Math. 2, 84–90, 1960). */
function halton(index: number, base: number): number {
  let [value, f] = [0, 1];
  for (let i = index; i > 0; i = Math.floor(i / base)) {
    f /= base;
    value += f * (i % base);
  }
  return value;
}

type Draw = (dx: number, dy: number) => HTMLCanvasElement;

/**
 * Smooth edges without the graphics card's help, which is dear when there is no card: while the view moves, the plain picture
 * shows; when it rests, pictures drawn a fraction of a pixel aside are laid over one another, one a frame, on a canvas above it.
 */
export class StillPicture {
  readonly #canvas: HTMLCanvasElement;
  readonly #draw: Draw;
  #frame = 0;

  /** @param draw draws the scene moved by a fraction of a pixel and gives the canvas that it is on */
  constructor(canvas: HTMLCanvasElement, draw: Draw) {
    this.#canvas = canvas;
    this.#draw = draw;
    canvas.hidden = true;
  }

  /** The picture has changed: the plain one shows again. */
  disturb(): void {
    cancelAnimationFrame(this.#frame);
    this.#canvas.hidden = true;
  }

  /** Nothing has changed for a while: the smooth picture is made. */
  rest(): void {
    const context = this.#canvas.getContext('2d', { alpha: false });
    if (context === null) return;
    let sample = 0;
    const add = (): void => {
      const picture = this.#draw(halton(sample + 1, 2) - 0.5, halton(sample + 1, 3) - 0.5);
      if (sample === 0) [this.#canvas.width, this.#canvas.height] = [picture.width, picture.height];
      context.globalAlpha = 1 / (sample + 1);
      context.drawImage(picture, 0, 0);
      this.#canvas.hidden = false;
      sample++;
      if (sample < SAMPLES) this.#frame = requestAnimationFrame(add);
    };
    this.#frame = requestAnimationFrame(add);
  }

  dispose(): void {
    cancelAnimationFrame(this.#frame);
  }
}
