import type { Device, Glass, Scheme } from '../../core/scheme/schema.ts';
import { fixed, percent } from '../ui/format.ts';
import { words } from '../words/words.ts';
import { head, length, number, type Schedule, text } from './columns.ts';

export function glassSchedule(scheme: Scheme): Schedule<Glass> {
  const used = new Map<string, number>();
  for (const w of scheme.windows) used.set(w.glass, (used.get(w.glass) ?? 0) + 1);
  return {
    kind: 'glass',
    list: 'glass',
    rows: scheme.glass,
    columns: [
      { key: 'id', head: head.id, value: (r) => r.id, ...text('id', (r: Glass) => r.id) },
      { key: 'name', head: head.name, value: (r) => r.name, ...text('name', (r: Glass) => r.name) },
      { key: 'g', head: head.g, value: (r) => r.g, write: length, ...number('g', (r: Glass) => r.g) },
      { key: 'u', head: head.u, unit: 'W/m²K', value: (r) => r.u, write: length, ...number('u', (r: Glass) => r.u) },
      {
        key: 'light',
        head: head.light,
        value: (r) => r.light,
        write: length,
        ...number('light', (r: Glass) => r.light),
      },
      {
        key: 'panes',
        head: head.panes,
        value: (r) => r.panes,
        write: (v) => fixed(v, 0),
        ...number('panes', (r: Glass) => r.panes),
      },
      {
        key: 'frame',
        head: head.frame,
        value: (r) => r.frame,
        write: percent,
        edit: { field: 'frame', kind: 'share', typed: (r) => `${Math.round(r.frame * 1e6) / 1e4} %` },
      },
      { key: 'used', head: head.usedBy, value: (r) => used.get(r.id) ?? 0, write: (v) => fixed(v, 0) },
    ],
  };
}

export function deviceSchedule(scheme: Scheme): Schedule<Device> {
  const used = new Map<string, number>();
  for (const id of scheme.windows.flatMap((w) => w.devices)) used.set(id, (used.get(id) ?? 0) + 1);
  return {
    kind: 'device',
    list: 'devices',
    rows: scheme.devices,
    columns: [
      { key: 'id', head: head.id, value: (r) => r.id, ...text('id', (r: Device) => r.id) },
      { key: 'kind', head: head.kind, value: (r) => words.schedule.kinds[r.kind] },
      {
        key: 'depth',
        head: head.depth,
        unit: 'm',
        value: (r) => (r.kind === 'blind' ? null : r.depth),
        write: length,
        ...number('depth', (r: Device) => (r.kind === 'blind' ? null : r.depth)),
      },
      { key: 'size', head: head.size, value: sizeOf },
      { key: 'place', head: head.place, value: placeOf },
      { key: 'used', head: head.usedBy, value: (r) => used.get(r.id) ?? 0, write: (v) => fixed(v, 0) },
    ],
  };
}

/** A device in two words, for the windows that have it. */
export const shortDevice = (d: Device): string =>
  d.kind === 'blind'
    ? `${words.schedule.kinds.blind} ${words.schedule.places[d.place]}`
    : d.kind === 'louvres'
      ? `${words.schedule.kinds.louvres} ${d.count}`
      : `${words.schedule.kinds[d.kind]} ${length(d.depth)}`;

function sizeOf(d: Device): string {
  if (d.kind === 'louvres') return `${d.count} × ${length(d.spacing)} m`;
  if (d.kind === 'blind') return `τ ${length(d.transmittance)}, ρ ${length(d.reflectance)}`;
  return d.kind === 'overhang' ? `${fixed(d.tilt, 0)}°` : `${length(d.gap)} m`;
}

function placeOf(d: Device): string {
  if (d.kind === 'fin') return words.schedule.sides[d.side];
  if (d.kind === 'blind') return words.schedule.places[d.place];
  if (d.kind === 'overhang') return words.schedule.above(length(d.above));
  return words.schedule.gap(length(d.gap));
}
