import type { Device, Scheme } from '../scheme/schema.ts';
import type { Flow } from './flow.ts';
import { fixed, plain } from './numerals.ts';
import type { Report } from './report-input.ts';
import { type Column, table } from './table.ts';

type Shaped = Pick<Scheme['blocks'][number], 'box' | 'outline'>;

/** Corners that stand in one row of a table; an outline of more runs on over rows of its own. */
const CORNERS_A_ROW = 8;

/** The shape of a block or room in as many texts as it needs rows. */
function shapeRows(s: Shaped): readonly string[] {
  if (s.box) {
    const turned = s.box.turn === 0 ? '' : `; turned ${plain(s.box.turn)}°`;
    return [`box at ${s.box.at.map(plain).join(', ')}; ${s.box.width} × ${s.box.depth}${turned}`];
  }
  const corners = (s.outline ?? []).map((p) => p.map(plain).join(', '));
  const rows: string[] = [];
  for (let i = 0; i < corners.length; i += CORNERS_A_ROW) rows.push(corners.slice(i, i + CORNERS_A_ROW).join('; '));
  return rows.length > 0 ? rows : [''];
}

/** Rows of something with a shape: its own cells in the first, the rest of a long outline under it. */
const withShape = (cells: readonly string[], s: Shaped): readonly (readonly string[])[] =>
  shapeRows(s).map((text, i) => [...(i === 0 ? cells : cells.map(() => '')), text]);

/** A device in words, with its own dimensions. */
export function deviceWords(d: Device): string {
  switch (d.kind) {
    case 'overhang':
      return `overhang ${d.depth} deep, ${d.above} above the head, runs on ${d.left} left and ${d.right} right, droops ${plain(d.tilt)}°`;
    case 'fin':
      return `fin ${d.side}, ${d.depth} deep, gap ${d.gap}, ${d.above} above and ${d.below} below`;
    case 'louvres':
      return `${d.count} blades ${d.depth} wide every ${d.spacing}, droop ${plain(d.tilt)}°, gap ${d.gap}, runs on ${d.left} left and ${d.right} right`;
    case 'blind':
      return `${d.place} blind, transmits ${d.transmittance}, reflects ${d.reflectance}${d.closedAbove === undefined ? '' : `, closed above ${d.closedAbove} W/m²`}${d.closedFrom === undefined ? '' : `, closed ${d.closedFrom} to ${d.closedTo ?? 'night'}`}`;
  }
}

/** One list of the scheme as a table. */
type InputTable = {
  readonly title: string;
  readonly columns: readonly Column[];
  readonly rows: (scheme: Scheme) => readonly (readonly string[])[];
};

const TABLES: readonly InputTable[] = [
  {
    title: 'Blocks',
    columns: [
      { head: 'id', width: 18 },
      { head: 'name', width: 34 },
      { head: 'standing', width: 22 },
      { head: 'base', width: 16, align: 'end' },
      { head: 'height', width: 18, align: 'end' },
      { head: 'outline', width: 72 },
    ],
    rows: (scheme) =>
      scheme.blocks.flatMap((b) => withShape([b.id, b.name, b.standing, fixed(b.base, 2), fixed(b.height, 2)], b)),
  },
  {
    title: 'Rooms',
    columns: [
      { head: 'id', width: 18 },
      { head: 'name', width: 34 },
      { head: 'use', width: 22 },
      { head: 'block', width: 18 },
      { head: 'floor', width: 16, align: 'end' },
      { head: 'height', width: 16, align: 'end' },
      { head: 'outline', width: 56 },
    ],
    rows: (scheme) =>
      scheme.rooms.flatMap((r) => withShape([r.id, r.name, r.use, r.block, fixed(r.floor, 2), fixed(r.height, 2)], r)),
  },
  {
    title: 'Windows',
    columns: [
      { head: 'id', width: 18 },
      { head: 'room', width: 18 },
      { head: 'wall', width: 20 },
      { head: 'from', width: 15, align: 'end' },
      { head: 'sill', width: 15, align: 'end' },
      { head: 'width', width: 16, align: 'end' },
      { head: 'height', width: 16, align: 'end' },
      { head: 'reveal', width: 16, align: 'end' },
      { head: 'glass', width: 16 },
      { head: 'devices', width: 30 },
    ],
    rows: (scheme) =>
      scheme.windows.map((w) => [
        w.id,
        w.room,
        w.roof ? `roof at ${w.roof.at.map(plain).join(', ')}` : String(w.wall ?? ''),
        fixed(w.from, 2),
        fixed(w.sill, 2),
        fixed(w.width, 2),
        fixed(w.height, 2),
        fixed(w.reveal, 2),
        w.glass,
        w.devices.join(', '),
      ]),
  },
  {
    title: 'Glass',
    columns: [
      { head: 'id', width: 18 },
      { head: 'name', width: 58 },
      { head: 'g', width: 15, align: 'end' },
      { head: 'U', width: 15, align: 'end' },
      { head: 'light', width: 15, align: 'end' },
      { head: 'panes', width: 16, align: 'end' },
      { head: 'coating', width: 18, align: 'end' },
      { head: 'frame', width: 25, align: 'end' },
    ],
    rows: (scheme) =>
      scheme.glass.map((g) => [
        g.id,
        g.name,
        fixed(g.g, 2),
        fixed(g.u, 2),
        fixed(g.light, 2),
        String(g.panes),
        String(g.coating),
        fixed(g.frame, 2),
      ]),
  },
  {
    title: 'Devices',
    columns: [
      { head: 'id', width: 18 },
      { head: 'what it is', width: 162 },
    ],
    rows: (scheme) => scheme.devices.map((d) => [d.id, deviceWords(d)]),
  },
  {
    title: 'Trees',
    columns: [
      { head: 'id', width: 18 },
      { head: 'name', width: 36 },
      { head: 'at', width: 30 },
      { head: 'height', width: 18, align: 'end' },
      { head: 'spread', width: 18, align: 'end' },
      { head: 'lets through, January to December', width: 60 },
    ],
    rows: (scheme) =>
      scheme.trees.map((t) => [
        t.id,
        t.name,
        t.at.map(plain).join(', '),
        fixed(t.height, 1),
        fixed(t.spread, 1),
        t.transmittance.join(' '),
      ]),
  },
];

/** The scheme in full: whoever has these pages can work everything out again. Lengths in metres, angles in degrees. */
export function inputsPages(flow: Flow, { scheme }: Report): void {
  flow.turn('Inputs');
  flow.say('Lengths in metres, angles in degrees, axes of the drawing: x east, y to the top of the drawing, z up.');
  for (const { title, columns, rows } of TABLES) {
    const cells = rows(scheme);
    if (cells.length === 0) continue;
    flow.heading(title, 30);
    table(flow, columns, cells);
    flow.gap(2);
  }
}
