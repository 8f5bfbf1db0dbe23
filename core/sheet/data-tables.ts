import { PARTS } from '../gain/series.ts';
import type { DataTable } from './csv.ts';
import type { ReportResult } from './report-input.ts';
import type { ShadowMoment } from './shadow-moment.ts';

/** Every finding of a check, worst first. Shares run from 0 to 1; units of value, limit and margin stand in their own column. */
export function findingsTable(result: ReportResult): DataTable {
  return {
    header: [
      'room',
      'name',
      'limit',
      'metric',
      'unit',
      'value [unit]',
      'limit value [unit]',
      'margin [unit]',
      'verdict',
      'when (civil time)',
      'when (UTC)',
      'most through window',
      'its share [0..1]',
      ...PARTS.map((p) => `${p} share [0..1]`),
      'reason',
    ],
    rows: result.findings.map((f) => [
      f.room,
      f.roomName,
      f.limit,
      f.metric,
      f.unit,
      f.value,
      f.limitValue,
      f.margin,
      f.verdict,
      f.when?.text ?? null,
      f.when ? utc(f.when.instant_ms) : null,
      f.through?.window ?? null,
      f.through?.share ?? null,
      ...PARTS.map((p) => f.parts[p]),
      f.reason,
    ]),
  };
}

/** A day of a room, step by step: what comes in by each part and by each window. */
export function roomDayTable(result: ReportResult, room: string, day: string): DataTable | null {
  const found = result.rooms.find((r) => r.room === room)?.days.find((d) => d.day === day);
  const grid = result.days.find((d) => d.key === day);
  if (!found || !grid) return null;
  const clock = (minute: number): string =>
    `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(Math.floor(minute % 60)).padStart(2, '0')}`;
  return {
    header: [
      'clock (middle of step)',
      'UTC',
      'total [W]',
      ...PARTS.map((p) => `${p} [W]`),
      ...found.windows.map((w) => `${w.window} [W]`),
    ],
    rows: [...grid.instant_ms].map((instant, i) => [
      clock(grid.clock_min[i] as number),
      utc(instant),
      found.total_W[i] as number,
      ...PARTS.map((p) => found.windows.reduce((sum, w) => sum + (w.parts[p][i] as number), 0)),
      ...found.windows.map((w) => w.total_W[i] as number),
    ]),
  };
}

/** The moments of a shadow study, with the sun on each amenity area. Azimuth from true north, altitude without refraction. */
export function shadowTable(moments: readonly ShadowMoment[]): DataTable {
  const areas = moments.find((m) => m.areas.length > 0)?.areas ?? [];
  const named = areas.map((a) => a.name || a.id);
  return {
    header: [
      'civil time',
      'UTC',
      'sun azimuth [°]',
      'sun altitude [°]',
      'shadow before [m²]',
      'shadow after [m²]',
      'added [m²]',
      'gained [m²]',
      ...named.flatMap((n) => [
        `${n}: in sun before [0..1]`,
        `${n}: in sun after [0..1]`,
        `${n}: open ground after [m²]`,
      ]),
      'note',
    ],
    rows: moments.map((m) => [
      m.text,
      utc(m.instant_ms),
      m.azimuth_deg,
      m.altitude_deg,
      m.change?.before.area_m2 ?? null,
      m.change?.after.area_m2 ?? null,
      m.change?.added.area_m2 ?? null,
      m.change?.gained.area_m2 ?? null,
      ...areas.flatMap((a) => {
        const at = m.change ? m.areas.find((x) => x.id === a.id) : undefined;
        return at ? [at.before.share, at.after.share, at.after.open_m2] : [null, null, null];
      }),
      m.change ? m.notes.join('; ') : 'sun below the horizon',
    ]),
  };
}

/** An instant as programs read it, to the second. */
export const utc = (instant_ms: number): string => new Date(instant_ms).toISOString().replace('.000Z', 'Z');
