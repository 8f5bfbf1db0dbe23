import { NO_SUCH_TIME, SUN_DOWN, type SunYear } from '../../core/study/sun-year.ts';
import { cividisRgb } from '../../core/sheet/cividis.ts';

type Rgb8 = readonly [number, number, number];
/** The two greys that are no share: the sun up and not on the glass, and down. */
export type Greys = { readonly up: Rgb8; readonly down: Rgb8 };

/** The clock minutes that the strip shows: whole hours round the lightest and longest days. */
export function shownHours(year: SunYear): { readonly from_min: number; readonly to_min: number } {
  let [low, high] = [1440, 0];
  for (let d = 0; d < year.dates.length; d++) {
    const [rise, set] = [year.sunrise_min[d]!, year.sunset_min[d]!];
    if (!Number.isNaN(rise)) [low, high] = [Math.min(low, rise), Math.max(high, set)];
  }
  if (low >= high) return { from_min: 0, to_min: 1440 };
  return {
    from_min: Math.max(0, Math.floor(low / 60 - 0.25) * 60),
    to_min: Math.min(1440, Math.ceil(high / 60 + 0.25) * 60),
  };
}

/** One pixel a cell, dates across and the day upwards, as RGBA rows from the top. */
export function stripPixels(
  year: SunYear,
  from_min: number,
  to_min: number,
  greys: Greys,
): { data: Uint8ClampedArray<ArrayBuffer>; width: number; height: number } {
  const first = Math.round(from_min / year.step_min);
  const height = Math.round(to_min / year.step_min) - first;
  const width = year.dates.length;
  const data = new Uint8ClampedArray(width * height * 4);
  for (let d = 0; d < width; d++) {
    for (let r = 0; r < height; r++) {
      const share = year.share[d * year.rows + first + r]!;
      const colour =
        share === SUN_DOWN || share === NO_SUCH_TIME ? greys.down : share <= 0 ? greys.up : cividisRgb(share);
      const at = ((height - 1 - r) * width + d) * 4;
      data[at] = colour[0];
      data[at + 1] = colour[1];
      data[at + 2] = colour[2];
      data[at + 3] = 255;
    }
  }
  return { data, width, height };
}

/** The share at a date and clock time, as the cell holds it; null outside the year. */
export function shareAt(year: SunYear, date: string, clock_min: number): number | null {
  const d = year.dates.indexOf(date);
  if (d < 0) return null;
  const row = Math.min(year.rows - 1, Math.floor(clock_min / year.step_min));
  return year.share[d * year.rows + row] ?? null;
}

/** Dates on which the clock is moved, with by how many minutes. */
export function clockMoves(year: SunYear): readonly { readonly index: number; readonly by_min: number }[] {
  const moves: { index: number; by_min: number }[] = [];
  for (let d = 1; d < year.dates.length; d++) {
    const by_min = year.offset_min[d]! - year.offset_min[d - 1]!;
    if (by_min !== 0) moves.push({ index: d, by_min });
  }
  return moves;
}
