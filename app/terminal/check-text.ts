import { warmMonths } from '../../core/gain/check-days.ts';
import { yearSums } from '../../core/gain/room-year.ts';
import { PARTS } from '../../core/gain/series.ts';
import { civilOf } from '../../core/sun/civil.ts';
import type { Finding } from '../../core/limits/finding.ts';
import type { CheckResult } from '../../core/study/check-result.ts';
import { table } from './table.ts';

/** The disc of the findings, which reads without colour: full over, half close, empty within. */
const DISC = { over: '●', close: '◐', within: '○' } as const;

/** @param like the quantity that sets the decimals: of a value and its margin the limit, so that they add up as they are read */
const number = (value: number | null, like: number | null = value): string =>
  value === null ? '–' : value.toFixed(Math.abs(like ?? value) < 100 ? 1 : 0);
const signed = (value: number | null, like: number | null): string =>
  value === null ? '–' : `${value > 0 ? '+' : ''}${number(value, like)}`;

/** The worst finding of each room, in the order of the findings. */
function worstOfRooms(findings: readonly Finding[]): readonly Finding[] {
  const seen = new Set<string>();
  return findings.filter((f) => !seen.has(f.room) && seen.add(f.room));
}

function roomTable(findings: readonly Finding[]): string {
  const judged = findings.some((f) => f.verdict !== null);
  return table(
    [
      { head: judged ? 'verdict' : '', align: 'left' },
      { head: 'room', align: 'left' },
      { head: 'name', align: 'left' },
      { head: 'value', align: 'right' },
      { head: 'limit', align: 'right' },
      { head: 'margin', align: 'right' },
      { head: 'unit', align: 'left' },
      { head: 'of', align: 'left' },
    ],
    findings.map((f) => [
      f.verdict === null ? '' : `${DISC[f.verdict]} ${f.verdict}`,
      f.room,
      f.roomName,
      number(f.value, f.limitValue ?? f.value),
      number(f.limitValue),
      signed(f.margin, f.limitValue),
      f.unit,
      f.metricName,
    ]),
  );
}

/** What each room takes in over the year of weather. */
function yearTable(result: CheckResult): string {
  const warm = warmMonths(result.latitude_deg);
  return table(
    [
      { head: 'room', align: 'left' },
      { head: 'name', align: 'left' },
      { head: 'year kWh/m²', align: 'right' },
      { head: 'warm half kWh/m²', align: 'right' },
      { head: 'highest W/m²', align: 'right' },
      { head: 'when', align: 'left' },
    ],
    result.rooms.flatMap((room) => {
      const { year, floor_m2 } = room;
      if (year === null || room.windows.length === 0 || !(floor_m2 > 0)) return [];
      const sum = (months?: readonly number[]): string =>
        number(yearSums(year, months).reduce((t, w) => t + PARTS.reduce((u, p) => u + w.parts[p], 0), 0) / floor_m2);
      const { peak } = year;
      return [
        [
          room.room,
          room.name,
          sum(),
          sum(warm),
          peak === null ? '–' : number(peak.day.total_W[0]! / floor_m2),
          peak === null ? '–' : civilOf(peak.grid.instant_ms[0]!, result.zone).text,
        ],
      ];
    }),
  );
}

/** The weather year, where one was looked at. */
function weatherLines(result: CheckResult): readonly string[] {
  const { weather } = result;
  if (weather === null) return [];
  const { place, kind, file, rows, step_min } = weather;
  return [
    `Weather year: ${file}, ${kind}${place.name === '' ? '' : `, ${place.name}`}, ${rows} rows of ${step_min} min`,
    '',
    yearTable(result),
  ];
}

/** A check as text for people: what it rests on, every room by its worst finding, why rooms are over, and the cautions. */
export function checkText(result: CheckResult): string {
  const { over, close, within } = result.counts;
  const set = result.limitSet;
  const head = [
    `${result.title || 'Untitled scheme'}: ${result.rooms.length} ${result.rooms.length === 1 ? 'room' : 'rooms'}, scheme ${result.schemeHash.slice(0, 12)}, engine ${result.engine}`,
    set === null
      ? 'No limit set is chosen: these are metrics without a verdict. Choose one in the scheme ("limits") or with --limits FILE.'
      : `${over} over, ${close} close, ${within} within; limits: ${set.name}${set.example ? ' (example: check your local code)' : ''}`,
    `Clear-sky days at five-minute steps: ${result.days.map((d) => `${d.name} (${d.date})`).join(', ')}`,
  ];
  const why = result.findings.filter((f) => f.verdict === 'over').map((f) => `  ${f.room} ${f.roomName}: ${f.reason}`);
  const notes = result.notes.map((n) => `  ${n.place}: ${n.message}; ${n.cure}`);
  return [
    ...head,
    '',
    roomTable(worstOfRooms(result.findings)),
    ...weatherLines(result),
    ...(why.length > 0 ? ['Why rooms are over:', ...why, ''] : []),
    ...(notes.length > 0 ? ['Notes:', ...notes, ''] : []),
    ...result.cautions,
    '',
  ].join('\n');
}
