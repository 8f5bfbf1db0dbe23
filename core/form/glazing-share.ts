import type { RoomForm, WindowForm } from './model.ts';

/** Openings in walls over the outside walls of a room, inner side, rooflights left out; null where it has no outside wall. */
export function glazingToWall(room: RoomForm, windows: readonly WindowForm[]): number | null {
  const walls_m2 = room.walls.reduce((sum, wall) => sum + (wall.outside ? wall.area_m2 : 0), 0);
  const openings_m2 = windows.reduce((sum, w) => sum + (w.tilt_deg === 0 ? 0 : w.opening_m2), 0);
  return walls_m2 > 0 ? openings_m2 / walls_m2 : null;
}
