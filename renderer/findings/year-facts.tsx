import { warmMonths } from '../../core/gain/check-days.ts';
import { yearSums } from '../../core/gain/room-year.ts';
import { PARTS } from '../../core/gain/series.ts';
import type { CheckResult } from '../../core/study/check-result.ts';
import { civilOf } from '../../core/sun/civil.ts';
import { decimalsFor, fixed } from '../ui/format.ts';
import { words } from '../words/words.ts';

const text = words.findings.year;

/** What a room takes in over the weather year that the scheme goes by; nothing where the check had none. */
export function YearFacts({ room: id, result }: { readonly room: string; readonly result: CheckResult }) {
  const room = result.rooms.find((r) => r.room === id);
  const { weather } = result;
  if (!room?.year || weather === null || !(room.floor_m2 > 0)) return null;
  const { year, floor_m2 } = room;
  const sum = (months?: readonly number[]): string => {
    const value = yearSums(year, months).reduce((t, w) => t + PARTS.reduce((u, p) => u + w.parts[p], 0), 0) / floor_m2;
    return `${fixed(value, decimalsFor(value))} kWh/m²`;
  };
  const highest = (year.peak?.day.total_W[0] ?? 0) / floor_m2;
  return (
    <section class="year-facts" aria-label={text.title}>
      <h3>{text.title}</h3>
      <dl>
        <dt>{text.whole}</dt>
        <dd class="number">{sum()}</dd>
        <dt>{text.warm}</dt>
        <dd class="number">{sum(warmMonths(result.latitude_deg))}</dd>
        <dt>
          {text.highest}
          {year.peak === null ? null : (
            <span class="formula">{civilOf(year.peak.grid.instant_ms[0]!, result.zone).text}</span>
          )}
        </dt>
        <dd class="number">{`${fixed(highest, decimalsFor(highest))} W/m²`}</dd>
      </dl>
      <p class="soft">{text.source(weather.file, weather.kind)}</p>
    </section>
  );
}
