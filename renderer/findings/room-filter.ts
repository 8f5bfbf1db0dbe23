import { quarterOf } from '../../core/limits/room-facts.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { CheckResult, RoomResult } from '../../core/study/check-result.ts';
import type { RoomFindings } from './by-room.ts';

/** What rooms can be narrowed to. */
export const FIELDS = ['block', 'storey', 'use', 'bearing'] as const;
export type Field = (typeof FIELDS)[number];

/** What a room is in each field. A storey is named by the height of its floor [m]; a bearing by the quarter of most glass. */
export type RoomTraits = { readonly [F in Field]: string };
/** The value wanted in each field; null: any. */
export type RoomFilter = { readonly [F in Field]: string | null };

export const ANY: RoomFilter = { block: null, storey: null, use: null, bearing: null };

/** The quarter that most of a room's wall glass faces; empty for a room with rooflights alone. */
function bearingOf(room: RoomResult): string {
  const area = new Map<string, number>();
  for (const w of room.windows) {
    if (w.tilt_deg === 0) continue;
    const quarter = quarterOf(w.bearing_deg);
    area.set(quarter, (area.get(quarter) ?? 0) + w.opening_m2);
  }
  return [...area].toSorted((a, b) => b[1] - a[1])[0]?.[0] ?? '';
}

/** What every room of a check is, by id. */
export function traitsOf(result: CheckResult, scheme: Scheme): ReadonlyMap<string, RoomTraits> {
  const floors = new Map(scheme.rooms.map((room) => [room.id, room.floor]));
  return new Map(
    result.rooms.map((room) => [
      room.room,
      {
        block: room.block,
        storey: String(floors.get(room.room) ?? 0),
        use: room.use,
        bearing: bearingOf(room),
      },
    ]),
  );
}

const byNumber = (a: string, b: string): number => Number(a) - Number(b);
const byText = (a: string, b: string): number => a.localeCompare(b);

/** What there is to choose from in a field: storeys from the ground up, the rest by name. */
export function choicesOf(traits: ReadonlyMap<string, RoomTraits>, field: Field): readonly string[] {
  const all = new Set([...traits.values()].map((room) => room[field]).filter((value) => value !== ''));
  return [...all].sort(field === 'storey' ? byNumber : byText);
}

/** The rooms that are what is wanted in every field. */
export const narrowed = (
  rooms: readonly RoomFindings[],
  traits: ReadonlyMap<string, RoomTraits>,
  filter: RoomFilter,
): readonly RoomFindings[] =>
  rooms.filter((room) => {
    const own = traits.get(room.room);
    return FIELDS.every((field) => filter[field] === null || own?.[field] === filter[field]);
  });
