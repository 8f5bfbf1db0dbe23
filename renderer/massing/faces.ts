import type { Vec3 } from '../../core/plane/vec.ts';
import type { Face } from '../state/faces.ts';
import type { Rgb } from './palette.ts';

/** What a triangle belongs to, for picking. */
export type Owner =
  | { readonly kind: 'block'; readonly id: string; readonly face: Face }
  | { readonly kind: 'window' | 'receptor'; readonly id: string };

/** Flat-tinted triangles of many things in one list, with their owners. */
export class Faces {
  readonly #positions: number[] = [];
  readonly #colours: number[] = [];
  /** One entry a triangle. */
  readonly owners: (Owner | null)[] = [];

  triangle(a: Vec3, b: Vec3, c: Vec3, colour: Rgb, owner: Owner | null): void {
    this.#positions.push(...a, ...b, ...c);
    this.#colours.push(...colour, ...colour, ...colour);
    this.owners.push(owner);
  }

  /** A convex polygon, its corners in order. */
  convex(corners: readonly Vec3[], colour: Rgb, owner: Owner | null): void {
    for (let i = 1; i + 1 < corners.length; i++) {
      this.triangle(corners[0] as Vec3, corners[i] as Vec3, corners[i + 1] as Vec3, colour, owner);
    }
  }

  get positions(): Float32Array {
    return new Float32Array(this.#positions);
  }

  get colours(): Float32Array {
    return new Float32Array(this.#colours);
  }
}
