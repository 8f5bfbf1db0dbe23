/** A colour as the graphics card takes it: red, green, blue, 0..1. */
export type Rgb = readonly [number, number, number];

const ROLES = [
  'ground',
  'plot',
  'ink',
  'soft',
  'line',
  'edge',
  'accent',
  'accent-tint',
  'over',
  'shadow',
  'added',
  'proposed-roof',
  'proposed-wall',
  'standing-roof',
  'standing-wall',
  'context-roof',
  'context-wall',
  'crown',
  'glass-lit',
  'glass-shade',
  'device',
  'up-grey',
] as const;
export type Role = (typeof ROLES)[number];
export type Palette = { readonly [R in Role]: Rgb };

/** `#rrggbb` as red, green and blue. */
export function rgbOf(hex: string): Rgb {
  const n = Number.parseInt(hex.trim().slice(1), 16);
  return [(n >> 16) / 255, ((n >> 8) & 255) / 255, (n & 255) / 255];
}

export const mix = (a: Rgb, b: Rgb, share: number): Rgb => [
  a[0] + (b[0] - a[0]) * share,
  a[1] + (b[1] - a[1]) * share,
  a[2] + (b[2] - a[2]) * share,
];

export const cssOf = (c: Rgb): string => `rgb(${c.map((v) => Math.round(v * 255)).join(' ')})`;

/** The colours of the theme that is shown, read from the style sheet so that they are stated once. */
export function readPalette(): Palette {
  const style = getComputedStyle(document.documentElement);
  return Object.fromEntries(ROLES.map((role) => [role, rgbOf(style.getPropertyValue(`--${role}`))])) as Palette;
}
