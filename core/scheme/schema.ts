import * as z from 'zod';
import { Weather } from './weather-schema.ts';

/**
 * The scheme file, version 1: what a person may write by hand. Metres and degrees; axes as in core/units/angle.ts.
 * Objects are loose: fields that this version does not know are kept and written back. `describe` texts feed the published
 * JSON Schema (assets/schema).
 */
const finite = z.number();
const metres = finite.min(-1e5).max(1e5);
const positive = finite.gt(0).max(1e5);
const share = finite.min(0).max(1);
const id = z.string().min(1).max(60);
const text = z.string().max(2000);
const clock = z
  .string()
  .regex(/^([01]\d|2[0-3]):[0-5]\d$|^24:00$/, 'must be a time of the clock from 00:00 to 24:00, such as 09:30');
const point = z.tuple([metres, metres]);
const outline = z.array(point).min(3).max(2000);

export const Box = z.looseObject({
  at: point.describe('lower left corner of the box before it is turned'),
  width: positive.describe('along x [m]'),
  depth: positive.describe('along y [m]'),
  turn: finite.min(-360).max(360).default(0).describe('degrees clockwise about `at`'),
});

const shape = { box: Box.optional(), outline: outline.optional() };
const oneShape = <T extends { box?: unknown; outline?: unknown }>(v: T): boolean =>
  (v.box === undefined) !== (v.outline === undefined);
const oneShapeMessage = { params: { code: 'one-shape', either: ['box', 'outline'] } };

export const Standing = z.enum(['existing', 'proposed', 'removed', 'context']);

export const Block = z
  .looseObject({
    id,
    name: text.default(''),
    standing: Standing,
    ...shape,
    base: metres.default(0).describe('height of the underside [m]; a block may float'),
    height: positive.describe('from base to top [m]'),
    reflectance: share.optional(),
  })
  .refine(oneShape, oneShapeMessage);

export const Room = z
  .looseObject({
    id,
    name: text.default(''),
    use: z.enum(['living', 'bedroom', 'kitchen', 'office', 'classroom', 'shop', 'ward', 'circulation', 'other']),
    block: id,
    ...shape,
    floor: metres.describe('height of the finished floor [m]'),
    height: positive.describe('clear height [m]'),
    mass: z.enum(['very-light', 'light', 'medium', 'heavy', 'very-heavy']).optional(),
  })
  .refine(oneShape, oneShapeMessage);

export const Rooflight = z.looseObject({ at: point, turn: finite.min(-360).max(360).default(0) });

export const Window = z
  .looseObject({
    id,
    room: id,
    wall: z.int().min(0).max(1999).optional().describe('edge n of the room outline, from corner n to corner n + 1'),
    roof: Rooflight.optional().describe('in place of wall: a rooflight in the flat roof, `at` its corner'),
    from: metres.default(0).describe('from corner n along the wall [m]'),
    sill: metres.default(0).describe('above the floor [m]'),
    width: positive,
    share: share
      .gt(0)
      .optional()
      .describe(
        'in place of width: the share of its wall that the opening takes up, in the middle of it unless `from` is given',
      ),
    height: positive,
    reveal: finite.min(0).max(5).default(0).describe('depth of the glass behind the face of the wall [m]'),
    glass: id,
    devices: z.array(id).max(50).default([]),
  })
  .refine((v) => (v.wall === undefined) !== (v.roof === undefined), {
    params: { code: 'one-place', either: ['wall', 'roof'] },
  });

export const Glass = z.looseObject({
  id,
  name: text.default(''),
  g: share.gt(0).describe('total solar energy transmittance at normal incidence, centre of pane'),
  u: finite.gt(0).max(10).describe('U-value of the pane [W/m²K]'),
  light: share.describe('light transmittance'),
  panes: z.int().min(0).max(4).default(2).describe('0 for an opening without glass'),
  coating: finite.min(1).max(10).default(4).describe('category q of Karlsson and Roos (2000); 4 is clear float'),
  frame: share.lt(1).default(0.2).describe('share of the opening taken by the frame'),
  source: text.optional(),
});

const overhang = z.looseObject({
  id,
  kind: z.literal('overhang'),
  name: text.optional(),
  depth: finite.min(0).max(50).describe('how far it projects from the face of the wall [m]'),
  above: finite.min(0).max(50).default(0).describe('from the window head up to its underside [m]'),
  left: finite.min(0).max(50).default(0).describe('how far it runs on past the window, left as seen from outside [m]'),
  right: finite.min(0).max(50).default(0),
  tilt: finite.min(-80).max(80).default(0).describe('degrees that the front edge droops below level'),
});

const fin = z.looseObject({
  id,
  kind: z.literal('fin'),
  name: text.optional(),
  side: z.enum(['left', 'right', 'both']).default('both').describe('as seen from outside'),
  depth: finite.min(0).max(50),
  gap: finite.min(0).max(50).default(0).describe('from the window jamb to the fin [m]'),
  above: finite.min(0).max(50).default(0).describe('how far it runs on above the head [m]'),
  below: finite.min(-50).max(50).default(0).describe('how far it runs on below the sill [m]'),
});

const louvres = z.looseObject({
  id,
  kind: z.literal('louvres'),
  name: text.optional(),
  count: z.int().min(1).max(200),
  spacing: positive.describe('between blades, centre to centre [m]'),
  depth: finite.gt(0).max(5).describe('width of a blade [m]'),
  tilt: finite.min(-90).max(90).default(0).describe('degrees that the outer edge droops below level'),
  gap: finite.min(0).max(5).default(0).describe('from the face of the wall to the inner edge of a level blade [m]'),
  left: finite.min(0).max(50).default(0),
  right: finite.min(0).max(50).default(0),
});

const blind = z.looseObject({
  id,
  kind: z.literal('blind'),
  name: text.optional(),
  place: z.enum(['external', 'between', 'internal']),
  transmittance: share.describe('solar transmittance of the closed blind'),
  reflectance: share.describe('solar reflectance of the side that faces the sun'),
  closedAbove: finite
    .min(0)
    .max(2000)
    .optional()
    .describe('closed when the irradiance on the glass exceeds this [W/m²]'),
  closedFrom: clock.optional(),
  closedTo: clock.optional(),
});

export const Device = z.discriminatedUnion('kind', [overhang, fin, louvres, blind]);

export const Tree = z.looseObject({
  id,
  name: text.default(''),
  at: point,
  base: metres.default(0),
  trunk: finite.min(0).max(100).default(2).describe('clear height below the crown [m]'),
  height: positive.describe('from base to the top of the crown [m]'),
  spread: positive.describe('diameter of the crown [m]'),
  transmittance: z.array(share).length(12).describe('of the beam, January to December'),
});

export const Receptor = z.discriminatedUnion('kind', [
  z.looseObject({
    id,
    kind: z.literal('point'),
    name: text.default(''),
    at: z.tuple([metres, metres, metres]),
    normal: z.tuple([finite, finite, finite]).default([0, 0, 1]),
  }),
  z.looseObject({ id, kind: z.literal('area'), name: text.default(''), outline, level: metres.default(0) }),
  z.looseObject({
    id,
    kind: z.literal('window'),
    name: text.default(''),
    block: id,
    wall: z.int().min(0).max(1999),
    from: metres,
    sill: metres.describe('above the base of the block [m]'),
    width: positive,
    height: positive,
  }),
]);

export const Site = z.looseObject({
  latitude: finite.min(-90).max(90),
  longitude: finite.min(-180).max(180),
  zone: z.string().min(1).max(80).describe('IANA time zone, such as Europe/London'),
  elevation: finite.min(-500).max(9000).default(0),
  north: finite.min(-360).max(360).default(0).describe('true north, degrees clockwise from +y of the drawing'),
  groundReflectance: z.union([share, z.array(share).length(12)]).default(0.2),
  linkeTurbidity: z.union([finite.min(1).max(15), z.array(finite.min(1).max(15)).length(12)]).default(3),
  skyModel: z
    .enum(['isotropic', 'hay-davies', 'perez'])
    .optional()
    .describe('how the light of the sky is spread over the dome; the checks take perez where none is given'),
  boundary: outline.optional(),
  lowSun: finite.min(0).max(45).optional().describe('sun at or below this altitude is left out [°]'),
  hottest: z
    .looseObject({ maximum: finite.min(-30).max(60), range: finite.min(0).max(40) })
    .optional()
    .describe('the hottest design day: daily maximum [°C] and daily range [K]'),
});

export const SheetSet = z.looseObject({
  id,
  name: text.default(''),
  kind: z.string().max(60),
  dates: z.array(z.string()).max(60).default([]),
  times: z.array(z.string()).max(60).default([]),
  scale: finite.gt(0).max(100000).optional(),
  paper: z.enum(['A4', 'A3', 'A2', 'A1']).default('A3'),
  landscape: z.boolean().default(true),
  perPage: z.int().min(1).max(60).optional().describe('diagrams a page, at most'),
  window: id.optional().describe('of a section, or whose shading mask a sun path shows'),
  block: id.optional().describe('whose facades are drawn; absent: those of every proposed block'),
  trees: z.boolean().optional().describe('whether light counts the crowns of trees; absent: they are left out'),
  units: z.enum(['metric', 'imperial']).optional().describe('units of the drawing; absent: metric'),
  number: z.string().max(60).optional().describe('drawing number'),
});

/** What is kept is read as a scheme of its own (load.ts). */
export const Variant = z.looseObject({
  name: z.string().min(1).max(60),
  scheme: z.looseObject({}).describe('a whole scheme, without variants of its own'),
});

export const Scheme = z.looseObject({
  format: z.literal('shadewright'),
  version: z.literal(1),
  title: text.default(''),
  author: text.default(''),
  address: text.default(''),
  revision: text.default(''),
  year: z
    .int()
    .min(1900)
    .max(2100)
    .optional()
    .describe('the year of the design days; the checks take 2025 where none is given'),
  site: Site,
  blocks: z.array(Block).max(20000).default([]),
  rooms: z.array(Room).max(5000).default([]),
  windows: z.array(Window).max(20000).default([]),
  glass: z.array(Glass).max(500).default([]),
  devices: z.array(Device).max(20000).default([]),
  trees: z.array(Tree).max(5000).default([]),
  weather: Weather.nullable().optional(),
  limits: z
    .union([z.string().max(200), z.looseObject({ format: z.literal('shadewright-limits') }), z.null()])
    .default(null),
  receptors: z.array(Receptor).max(20000).default([]),
  sheets: z.array(SheetSet).max(200).default([]),
  variants: z.array(Variant).max(7).optional().describe('other states of the scheme, kept to be compared with'),
});

export type Scheme = z.output<typeof Scheme>;
export type Site = z.output<typeof Site>;
export type Block = z.output<typeof Block>;
export type Room = z.output<typeof Room>;
export type Window = z.output<typeof Window>;
export type Glass = z.output<typeof Glass>;
export type Device = z.output<typeof Device>;
export type Overhang = Extract<Device, { kind: 'overhang' }>;
export type Fin = Extract<Device, { kind: 'fin' }>;
export type Louvres = Extract<Device, { kind: 'louvres' }>;
export type Blind = Extract<Device, { kind: 'blind' }>;
export type Tree = z.output<typeof Tree>;
export type Receptor = z.output<typeof Receptor>;
export type Standing = z.output<typeof Standing>;
export type SheetSet = z.output<typeof SheetSet>;

/** The year of the design days of a scheme that names none: fixed, so that results do not depend on the day they are asked for. */
export const DEFAULT_YEAR = 2025;
