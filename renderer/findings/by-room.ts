import type { Finding, Verdict } from '../../core/limits/finding.ts';

/** A room with its findings, the worst first. */
export type RoomFindings = {
  readonly room: string;
  readonly name: string;
  readonly findings: readonly Finding[];
  readonly worst: Finding;
};

export type Group = Verdict | 'all';

/** The findings gathered by room; rooms stand in the order of their worst one, which is the order the check gave. */
export function byRoom(findings: readonly Finding[]): readonly RoomFindings[] {
  const rooms = new Map<string, Finding[]>();
  for (const finding of findings) {
    const list = rooms.get(finding.room);
    if (list === undefined) rooms.set(finding.room, [finding]);
    else list.push(finding);
  }
  return [...rooms].map(([room, list]) => {
    const worst = list[0] as Finding;
    return { room, name: worst.roomName, findings: list, worst };
  });
}

export const inGroup = (rooms: readonly RoomFindings[], group: Group): readonly RoomFindings[] =>
  group === 'all' ? rooms : rooms.filter((r) => r.worst.verdict === group);
