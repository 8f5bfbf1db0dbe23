import type { Region } from '../../core/plane/region.ts';
import type { Scheme } from '../../core/scheme/schema.ts';

/** Amenity areas of a scheme, as regions of the ground. */
export const areasOf = (scheme: Scheme | null): readonly Region[] =>
  (scheme?.receptors ?? []).flatMap((r) => (r.kind === 'area' ? [{ outer: r.outline, holes: [] }] : []));
