import type { ShadingMask } from '../shade/sky-view-mask.ts';
import type { SunPath } from '../sun/sun-path.ts';
import type { SunPathProjection } from './sun-path-view.ts';

/** What a sun-path drawing is made of. */
export type SunPathInput = {
  readonly path: SunPath;
  readonly projection: SunPathProjection;
  readonly place: {
    /** Of the scheme or the site; may be empty. */
    readonly name: string;
    readonly latitude_deg: number;
    readonly longitude_deg: number;
    readonly elevation_m: number;
    /** IANA zone of the clock. */
    readonly zone: string;
  };
  /** The moment to mark, with the sun's true altitude; below the horizon it is only told. Null: none. */
  readonly moment: { readonly azimuth_deg: number; readonly altitude_deg: number; readonly text: string } | null;
  /** What hides the sky, and from where, such as `window W3`. */
  readonly mask?: { readonly of: string; readonly hidden: ShadingMask } | null;
};
