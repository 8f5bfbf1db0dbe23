import { beforeAll, describe, expect, it } from 'vitest';
import type { Scheme } from '../../core/scheme/schema.ts';
import { checkScheme } from '../../core/study/check.ts';
import type { CheckResult } from '../../core/study/check-result.ts';
import { byRoom, type RoomFindings } from '../../renderer/findings/by-room.ts';
import { ANY, choicesOf, narrowed, type RoomTraits, traitsOf } from '../../renderer/findings/room-filter.ts';
import { demoScheme } from '../helpers/demo-scheme.ts';

describe('narrowing the rooms of the demo', () => {
  const scheme: Scheme = demoScheme('tannery-yard');
  let rooms: readonly RoomFindings[];
  let traits: ReadonlyMap<string, RoomTraits>;
  beforeAll(async () => {
    const result = (await checkScheme(scheme, null, [], async () => 'go')) as CheckResult;
    rooms = byRoom(result.findings);
    traits = traitsOf(result, scheme);
  });
  const ids = (filter: Partial<typeof ANY>): readonly string[] =>
    narrowed(rooms, traits, { ...ANY, ...filter })
      .map((r) => r.room)
      .toSorted();

  it('offers what there is: storeys from the ground up, the rest by name', () => {
    expect(choicesOf(traits, 'storey')).toEqual(['0.3', '3.4', '6.5']);
    expect(choicesOf(traits, 'block')).toEqual(['B1', 'B2']);
    expect(choicesOf(traits, 'bearing').every((b) => ['N', 'E', 'S', 'W'].includes(b))).toBe(true);
  });

  it('keeps the rooms that are what is wanted in every field', () => {
    expect(ids({})).toHaveLength(scheme.rooms.length);
    expect(ids({ block: 'B2' })).toEqual(['0.6']);
    expect(ids({ storey: '6.5' })).toEqual(['3.1', '3.2', '3.3', '3.4', '3.5']);
    expect(ids({ storey: '6.5', bearing: 'W' })).toEqual(['3.3', '3.4']);
    expect(ids({ block: 'B2', storey: '6.5' })).toEqual([]);
  });
});
