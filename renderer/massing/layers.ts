import { DoubleSide, LineBasicMaterial, LineDashedMaterial, type Material, MeshBasicMaterial } from 'three';

/**
 * The layers of the drawing in the order in which they are painted. Solids come first, so that no pixel of the ground is painted
 * that they hide; what lies on the ground is painted from the plot up, what lies on faces after those.
 */
export const ORDER = [
  'solids',
  'plot',
  'groundMap',
  'shadow',
  'added',
  'hatch',
  'boundary',
  'faceShadow',
  'faceMap',
  'openings',
  'crowns',
  'edges',
  'dashes',
] as const;
export type Layer = (typeof ORDER)[number];

const FLAT = { vertexColors: true, side: DoubleSide } as const;
/** What lies on the ground has no thickness: later layers lie over earlier ones. */
const ON_GROUND = { depthWrite: false } as const;
/** What lies flat on faces: nearer than they are, farther than what stands proud of them. */
const ON_FACES = { polygonOffset: true, polygonOffsetFactor: 1, polygonOffsetUnits: 2, depthWrite: false } as const;

/** Each layer's way of drawing. Faces stand back a little so that ink edges on them stay whole. */
export const materials = (): { readonly [L in Layer]: Material } => ({
  plot: new MeshBasicMaterial({ ...FLAT, ...ON_GROUND }),
  shadow: new MeshBasicMaterial({ ...FLAT, ...ON_GROUND }),
  added: new MeshBasicMaterial({ ...FLAT, ...ON_GROUND }),
  hatch: new LineBasicMaterial({ vertexColors: true, ...ON_GROUND }),
  boundary: new LineDashedMaterial({ vertexColors: true, ...ON_GROUND }),
  solids: new MeshBasicMaterial({ ...FLAT, polygonOffset: true, polygonOffsetFactor: 2, polygonOffsetUnits: 4 }),
  faceShadow: new MeshBasicMaterial({ ...FLAT, ...ON_FACES }),
  groundMap: new MeshBasicMaterial({ side: DoubleSide, ...ON_GROUND }),
  faceMap: new MeshBasicMaterial({ side: DoubleSide, ...ON_FACES }),
  openings: new MeshBasicMaterial({ ...FLAT, polygonOffset: true, polygonOffsetFactor: 0.5, polygonOffsetUnits: 1 }),
  crowns: new LineBasicMaterial({ vertexColors: true }),
  edges: new LineBasicMaterial({ vertexColors: true }),
  dashes: new LineDashedMaterial({ vertexColors: true }),
});
