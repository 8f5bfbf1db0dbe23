import { daysInMonth, monthKey, warmMonths } from '../gain/check-days.ts';
import { yearSums } from '../gain/room-year.ts';
import { energy_Wh } from '../gain/room-day.ts';
import { PARTS, type RoomDay } from '../gain/series.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import { DESIGN_DAY_METHOD } from '../sky/design-day.ts';
import { SKY_MODELS } from '../sky/transpose.ts';
import type { Finding, Working, WorkingStep } from './finding.ts';
import { METRICS, needsWeather } from './metric.ts';
import { peakStep, stepsCounted } from './reading.ts';
import { line, placeOfId, type Worked } from './worked.ts';
import { sunLines, windowLines } from './working-moment.ts';

type WorkedRoom = Worked['rooms'][number];

const sourcesOf = (result: Worked): string =>
  `Sun and sky: ${DESIGN_DAY_METHOD}. Light on the plane: ${SKY_MODELS[result.skyModel].source}. Glass by angle: J. Karlsson, A. Roos, Solar Energy 69, 321–329 (2000). Closed blinds: EN ISO 52022-1:2017, simplified (constants from memory, check a licensed copy).`;

const roomOf = (result: Worked, id: string): WorkedRoom => {
  const room = result.rooms.find((r) => r.room === id);
  if (!room) throw new RangeError(`the result holds no room ${JSON.stringify(id)}`);
  return room;
};

function floorLine(room: WorkedRoom, scheme: Scheme): WorkingStep {
  return line('floor of the room', room.floor_m2, 'm²', { place: placeOfId(scheme.rooms, room.room, 'rooms') });
}

/** One step of a room's day in full: sun, windows, parts, sum. */
function stepLines(result: Worked, scheme: Scheme, room: WorkedRoom, at: number, step: number): WorkingStep[] {
  const grid = result.days[at] as DayGrid;
  const day = room.days[at] as RoomDay;
  const source = { result, scheme, grid };
  return [
    ...sunLines(result, grid, step),
    ...day.windows.flatMap((w) => {
      const window = room.windows.find((x) => x.window === w.window);
      return window ? windowLines(source, window, w, step) : [];
    }),
    line('room, all windows', day.total_W[step]!, 'W', { formula: 'sum of its windows' }),
  ];
}

/**
 * How a room's gain at any step of a day was reached.
 * @param day   key of the day
 * @param step  row of the day's grid
 * @throws {RangeError} when the result holds no such room, day or step
 */
export function workingAt(result: Worked, scheme: Scheme, roomId: string, day: string, step: number): Working {
  const room = roomOf(result, roomId);
  const at = result.days.findIndex((g) => g.key === day);
  if (at < 0 || !(step >= 0 && step < (result.days[at] as DayGrid).instant_ms.length))
    throw new RangeError(`the result holds no step ${step} of ${JSON.stringify(day)}`);
  const watts = (room.days[at] as RoomDay).total_W[step]!;
  return {
    title: 'solar gain at one moment',
    method: METRICS['peak-gain'].method,
    source: sourcesOf(result),
    steps: [
      ...stepLines(result, scheme, room, at, step),
      floorLine(room, scheme),
      line('per m² of floor', watts / room.floor_m2, 'W/m²', { formula: 'watts / floor' }),
    ],
  };
}

/** A mean or a sum over a day: windows and parts over the period, then its highest step in full. */
function periodLines(result: Worked, scheme: Scheme, room: WorkedRoom, finding: Finding): WorkingStep[] {
  const at = result.days.findIndex((g) => g.key === finding.day);
  const grid = result.days[at] as DayGrid;
  const day = room.days[at] as RoomDay;
  const mean = finding.metric === 'mean-gain';
  const steps = stepsCounted(grid, mean ? (finding.clock ?? undefined) : undefined);
  const over = (column: Float64Array): number => {
    let sum = 0;
    for (const i of steps) sum += column[i]!;
    return mean ? sum / Math.max(1, steps.length) : (sum * grid.step_min) / 60;
  };
  const unit = mean ? 'W' : 'Wh';
  const lines = [
    line('day', grid.name, '', { note: grid.date }),
    line('steps counted', steps.length, '', {
      note: finding.clock ? `${finding.clock[0]} to ${finding.clock[1]} as the clock shows it` : 'the whole day',
    }),
  ];
  for (const w of day.windows) {
    for (const part of PARTS) {
      const value = over(w.parts[part]);
      if (value !== 0) lines.push(line(`${w.window}: ${part}`, value, unit));
    }
    lines.push(
      line(`${w.window}: in all`, over(w.total_W), unit, { place: placeOfId(scheme.windows, w.window, 'windows') }),
    );
  }
  lines.push(line('room, all windows', over(day.total_W), unit, { formula: mean ? 'Σ W / n' : 'Σ W × step' }));
  const peak = peakStep(day);
  if (day.total_W[peak]! > 0)
    lines.push(line('one step in full, the highest of the day', '', ''), ...stepLines(result, scheme, room, at, peak));
  return lines;
}

function seasonLines(result: Worked, scheme: Scheme, room: WorkedRoom): WorkingStep[] {
  return warmMonths(scheme.site.latitude).flatMap((month) => {
    const at = result.days.findIndex((g) => g.key === monthKey(month));
    const grid = result.days[at];
    const day = room.days[at];
    if (!grid || !day) return [];
    const days = daysInMonth(Number(grid.date.slice(0, 4)), month);
    return [
      line(`clear ${grid.name}`, energy_Wh(day.total_W, grid.step_min), 'Wh'),
      line(`its month of ${days} days`, (energy_Wh(day.total_W, grid.step_min) * days) / 1000, 'kWh'),
    ];
  });
}

const MONTHS = 'January February March April May June July August September October November December'.split(' ');

/** A year of weather: which file, what each window brings month by month, and the highest row in full. */
function yearLines(result: Worked, scheme: Scheme, room: WorkedRoom, finding: Finding): WorkingStep[] {
  const { year } = room;
  if (!year) return [];
  const lines = [
    line('weather file', result.weather?.file ?? '', '', { note: result.weather?.kind ?? '', place: 'weather' }),
  ];
  const { peak } = year;
  const peakLines =
    peak === null
      ? []
      : [
          ...sunLines(result, peak.grid, 0),
          ...peak.day.windows.flatMap((w) => {
            const window = room.windows.find((x) => x.window === w.window);
            return window ? windowLines({ result, scheme, grid: peak.grid }, window, w, 0) : [];
          }),
          line('room, all windows', peak.day.total_W[0]!, 'W', { formula: 'sum of its windows' }),
        ];
  if (finding.metric === 'year-peak') return [...lines, ...peakLines];
  if (finding.metric === 'hours-above') {
    const above = result.limitSet?.limits.find((l) => l.id === finding.limit)?.above ?? 0;
    lines.push(
      line('threshold', above, 'W/m²', { place: `limit set ${result.limitSet?.id ?? ''}, ${finding.limit}` }),
      line('threshold for the room', above * room.floor_m2, 'W', { formula: 'threshold × floor' }),
      line('rows above it', (finding.value * 60) / year.step_min, '', { note: `rows of ${year.step_min} minutes` }),
      line('the highest of them, in full:', '', ''),
      ...peakLines,
    );
    return lines;
  }
  const counted = finding.metric === 'warm-gain' ? warmMonths(scheme.site.latitude) : MONTHS.map((_, i) => i + 1);
  for (const { window, months } of year.windows) {
    for (const month of counted) {
      const parts = months[month - 1];
      if (!parts) continue;
      const sum = PARTS.reduce((total, part) => total + parts[part], 0);
      lines.push(line(`${window}: ${MONTHS[month - 1]}`, sum, 'kWh', { note: 'Σ W × row' }));
    }
  }
  const total = yearSums(year, counted).reduce((sum, w) => sum + PARTS.reduce((t, p) => t + w.parts[p], 0), 0);
  lines.push(line('room, all windows', total, 'kWh', { formula: 'sum of its windows and months' }));
  return lines;
}

const glazingLines = (scheme: Scheme, room: WorkedRoom): WorkingStep[] =>
  room.windows.map((w) => {
    const place = placeOfId(scheme.windows, w.window, 'windows');
    return line(`${w.window}: opening`, w.opening_m2, 'm²', { formula: 'width × height', place });
  });

function limitLines(result: Worked, finding: Finding): WorkingStep[] {
  if (finding.limitValue === null || finding.margin === null) return [];
  const limit = result.limitSet?.limits.find((l) => l.id === finding.limit);
  const set = result.limitSet;
  const from = [limit?.source, set?.example ? 'example limits: the local code decides' : undefined];
  return [
    line(finding.comparison === 'at-most' ? 'limit, at most' : 'limit, at least', finding.limitValue, finding.unit, {
      note: from.filter((x) => x !== undefined).join('; '),
      place: set ? `limit set ${set.id}, ${finding.limit}` : '',
    }),
    line('margin', finding.margin, finding.unit, {
      note: finding.margin > 0 ? 'over' : `not over: ${finding.verdict}`,
    }),
  ];
}

/** How a metric follows from what stands above it, where that is not a division by the floor. */
const FORMULAS: { readonly [M in Finding['metric']]?: string } = {
  'glazing-to-floor': '100 × openings / floor',
  'hours-above': 'rows above the threshold × length of a row',
};

/**
 * How a finding's number was reached, down to the moment, the window, the split and the five-minute step, with the places in the
 * scheme that its inputs come from.
 * @param result  of the check that the finding is from
 * @param scheme  the scheme that was checked
 */
export function workingOf(result: Worked, scheme: Scheme, finding: Finding): Working {
  const room = roomOf(result, finding.room);
  const metric = METRICS[finding.metric];
  const lines: WorkingStep[] = [];
  const at = result.days.findIndex((g) => g.key === finding.day);
  if (finding.metric === 'glazing-to-floor') lines.push(...glazingLines(scheme, room));
  else if (finding.metric === 'season-gain') lines.push(...seasonLines(result, scheme, room));
  else if (needsWeather(finding.metric)) lines.push(...yearLines(result, scheme, room, finding));
  else if (finding.metric === 'peak-gain')
    lines.push(...stepLines(result, scheme, room, at, peakStep(room.days[at] as RoomDay)));
  else lines.push(...periodLines(result, scheme, room, finding));
  lines.push(
    floorLine(room, scheme),
    line(metric.name, finding.value, metric.unit, {
      formula: FORMULAS[finding.metric] ?? 'the above / floor',
    }),
    ...limitLines(result, finding),
  );
  const own = finding.metric === 'glazing-to-floor' ? 'Areas as drawn.' : sourcesOf(result);
  return { title: finding.metricName, method: metric.method, source: own, steps: lines };
}
