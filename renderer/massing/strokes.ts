import type { Vec3 } from '../../core/plane/vec.ts';
import type { Rgb } from './palette.ts';

/** Line segments with a colour at each end, ready for the graphics card. */
export class Strokes {
  readonly #positions: number[] = [];
  readonly #colours: number[] = [];

  add(a: Vec3, b: Vec3, colour: Rgb): void {
    this.#positions.push(...a, ...b);
    this.#colours.push(...colour, ...colour);
  }

  /** A closed outline through some corners. */
  loop(corners: readonly Vec3[], colour: Rgb): void {
    for (let i = 0; i < corners.length; i++)
      this.add(corners[i] as Vec3, corners[(i + 1) % corners.length] as Vec3, colour);
  }

  get positions(): Float32Array {
    return new Float32Array(this.#positions);
  }

  get colours(): Float32Array {
    return new Float32Array(this.#colours);
  }
}
