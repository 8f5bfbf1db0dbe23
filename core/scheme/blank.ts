import { Glass, Scheme } from './schema.ts';

/** What a new scheme is told to begin with. */
export type Beginning = {
  readonly title: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly zone: string;
  /** Id of the limit set to begin with; null: none. */
  readonly limits: string | null;
};

/** Glass to begin with, so that a first window has some: typical published values for the kind, not a product. */
const FIRST_GLASS = Glass.parse({
  id: 'G1',
  name: 'double, low-e',
  g: 0.59,
  u: 1.2,
  light: 0.74,
  panes: 2,
  frame: 0.2,
  source: 'typical published values for the kind, not a product',
});

/** A scheme with a place, one kind of glass, and nothing drawn yet. */
export const blankScheme = ({ title, latitude, longitude, zone, limits }: Beginning): Scheme =>
  Scheme.parse({
    format: 'shadewright',
    version: 1,
    title,
    site: { latitude, longitude, zone },
    glass: [FIRST_GLASS],
    limits,
  });
