import type { Fault } from './fault.ts';
import { outlineOf } from './outline.ts';
import { Room } from './schema.ts';

type Loose = Record<string, unknown>;

/** Lengths that are worked out, to a tenth of a millimetre: finer than anyone builds, and short to read. */
const tidy = (x: number): number => Math.round(x * 1e4) / 1e4;

const listOf = (value: unknown): readonly unknown[] => (Array.isArray(value) ? value : []);
const isObject = (value: unknown): value is Loose =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/**
 * The width of a window and where it begins, so that the opening takes up a share of the room's side of its wall: as high as it is
 * said to be, in the middle of the wall unless it is said where it begins.
 * @param run   length of the wall [m]
 * @param rise  clear height of the room [m]
 */
export function widthForShare(
  share: number,
  height: number,
  run: number,
  rise: number,
): { readonly width: number; readonly from: number } {
  const width = tidy((share * run * rise) / height);
  return { width, from: tidy((run - width) / 2) };
}

/** Length of a wall of a room [m], and the room's height; null where the file does not say them soundly. */
function wallOf(file: Loose, window: Loose): { readonly run: number; readonly rise: number } | null {
  const raw = listOf(file['rooms']).find((room) => isObject(room) && room['id'] === window['room']);
  const room = Room.safeParse(raw);
  if (!room.success || typeof window['wall'] !== 'number') return null;
  const outline = outlineOf(room.data);
  const [a, b] = [outline[window['wall']], outline[(window['wall'] + 1) % outline.length]];
  return a && b ? { run: Math.hypot(b[0] - a[0], b[1] - a[1]), rise: room.data.height } : null;
}

/**
 * Gives windows that say their share of the wall in place of a width the width that makes it; the share itself is then gone, so
 * that a width that is changed later is the only one there is.
 * @param file as it was parsed, before it is validated
 */
export function fillShares(file: Loose): { readonly file: Loose; readonly faults: readonly Fault[] } {
  const faults: Fault[] = [];
  const windows = file['windows'];
  if (!Array.isArray(windows) || !windows.some((w) => isObject(w) && w['share'] !== undefined)) return { file, faults };
  const fault = (i: number, code: string, message: string, cure: string): void =>
    void faults.push({ level: 'error', code, place: `windows[${i}].share`, message, cure });
  const filled = windows.map((w: unknown, i) => {
    if (!isObject(w) || w['share'] === undefined) return w;
    const { share, ...window } = w;
    const { height } = window;
    if (typeof share !== 'number' || !(share > 0) || share > 1) {
      fault(
        i,
        'share',
        `must be more than 0 and at most 1, got ${JSON.stringify(share)}`,
        'write 0.4 for two fifths of the wall',
      );
      return w;
    }
    if (window['width'] !== undefined) {
      fault(i, 'one-size', 'both a width and a share of the wall are given', 'take one of them out');
      return w;
    }
    const wall = wallOf(file, window);
    if (wall === null || typeof height !== 'number' || !(height > 0)) {
      fault(
        i,
        'share',
        'the wall or the height that it is a share of is not to be read',
        'give a sound room, its wall and the height of the window',
      );
      return w;
    }
    const { width, from } = widthForShare(share, height, wall.run, wall.rise);
    if (width > wall.run) {
      const wide = `${tidy(width)} m wide at a height of ${height} m, and the wall is ${tidy(wall.run)} m long`;
      fault(i, 'share', `a share of ${share} would be ${wide}`, 'make the window higher or the share smaller');
      return w;
    }
    return { ...window, width, from: window['from'] ?? from };
  });
  return { file: { ...file, windows: filled }, faults };
}
