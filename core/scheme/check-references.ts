import type { Fault } from './fault.ts';
import type { Scheme } from './schema.ts';

type Named = { readonly id: string };

function repeated(list: readonly Named[], place: string): Fault[] {
  const first = new Map<string, number>();
  const faults: Fault[] = [];
  list.forEach((entry, i) => {
    const before = first.get(entry.id);
    if (before === undefined) first.set(entry.id, i);
    else
      faults.push({
        level: 'error',
        code: 'repeated-id',
        place: `${place}[${i}].id`,
        message: `${JSON.stringify(entry.id)} is already the id of ${place}[${before}]`,
        cure: 'give it an id of its own',
      });
  });
  return faults;
}

/** Ids that stand twice, and references to things that are not there. */
export function checkReferences(scheme: Scheme): Fault[] {
  const faults: Fault[] = [];
  const lists = ['blocks', 'rooms', 'windows', 'glass', 'devices', 'trees', 'receptors', 'sheets'] as const;
  for (const key of lists) faults.push(...repeated(scheme[key], key));
  const ids = (list: readonly Named[]) => new Set(list.map((entry) => entry.id));
  const blocks = ids(scheme.blocks);
  const rooms = ids(scheme.rooms);
  const glass = ids(scheme.glass);
  const devices = ids(scheme.devices);
  const need = (known: Set<string>, id: string, place: string, what: string) => {
    if (known.has(id)) return;
    const choices = [...known].slice(0, 6).join(', ');
    faults.push({
      level: 'error',
      code: `unknown-${what}`,
      place,
      message: `there is no ${what} ${JSON.stringify(id)}`,
      cure:
        choices === '' ? `the scheme has no ${what} yet; add one` : `known: ${choices}${known.size > 6 ? ', …' : ''}`,
    });
  };
  for (const [i, room] of scheme.rooms.entries()) need(blocks, room.block, `rooms[${i}].block`, 'block');
  scheme.windows.forEach((window, i) => {
    need(rooms, window.room, `windows[${i}].room`, 'room');
    need(glass, window.glass, `windows[${i}].glass`, 'glass');
    for (const [k, device] of window.devices.entries()) need(devices, device, `windows[${i}].devices[${k}]`, 'device');
  });
  scheme.receptors.forEach((receptor, i) => {
    if (receptor.kind === 'window') need(blocks, receptor.block, `receptors[${i}].block`, 'block');
  });
  return faults;
}
