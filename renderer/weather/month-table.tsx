import type { WeatherSummary, WeatherSum } from '../../core/sky/weather/summary.ts';
import { fixed, monthNames } from '../ui/format.ts';
import { words } from '../words/words.ts';

/** Height of a bar [px]. */
const BAR = 16;

type Energy = 'global_kWhm2' | 'beamNormal_kWhm2' | 'diffuse_kWhm2';
const SUNLIGHT: readonly {
  readonly key: Energy;
  readonly name: string;
  readonly tip: string;
  readonly tone: string;
}[] = [
  { key: 'global_kWhm2', name: words.weather.global, tip: words.weather.quantity.global_Wm2, tone: 'global' },
  { key: 'beamNormal_kWhm2', name: words.weather.beam, tip: words.weather.quantity.beamNormal_Wm2, tone: 'beam' },
  { key: 'diffuse_kWhm2', name: words.weather.diffuse, tip: words.weather.quantity.diffuse_Wm2, tone: 'diffuse' },
];

/** A year of weather by months: sums of sunlight as bars with their numbers, and the range of the air. */
export function MonthTable({ summary }: { readonly summary: WeatherSummary }) {
  const { months, year } = summary;
  const highest = Math.max(...SUNLIGHT.flatMap(({ key }) => months.map((m) => m[key] ?? 0)));
  return (
    <table class="months">
      <caption class="unseen">{words.weather.table}</caption>
      <thead>
        <tr>
          <td />
          {monthNames().map((name) => (
            <th key={name} scope="col">
              {name}
            </th>
          ))}
          <th scope="col" class="whole">
            {words.weather.whole}
          </th>
        </tr>
      </thead>
      <tbody>
        {SUNLIGHT.map(({ key, name, tip, tone }) =>
          year[key] === null ? null : (
            <tr key={key}>
              <RowHead name={name} unit={words.weather.perArea} tip={tip} />
              {months.map((m) => (
                <td key={m.month}>
                  <Bar share={(m[key] ?? 0) / highest} tone={tone} />
                  {fixed(m[key] ?? 0, 0)}
                </td>
              ))}
              <td class="whole">{fixed(year[key] ?? 0, 0)}</td>
            </tr>
          ),
        )}
        <tr>
          <RowHead name={words.weather.air} unit={words.weather.celsius} tip={words.weather.airTip} />
          {months.map((m) => (
            <td key={m.month}>
              <Range of={m} within={year} />
            </td>
          ))}
          <td class="whole">
            <Range of={year} within={year} />
          </td>
        </tr>
      </tbody>
    </table>
  );
}

const RowHead = ({ name, unit, tip }: { readonly name: string; readonly unit: string; readonly tip: string }) => (
  <th scope="row" title={tip}>
    {name}
    <span class="soft">{unit}</span>
  </th>
);

const Bar = ({ share, tone }: { readonly share: number; readonly tone: string }) => (
  <svg class="bar" width="100%" height={BAR} aria-hidden="true">
    <rect class={tone} x="22%" width="56%" y={BAR * (1 - share)} height={BAR * share} />
  </svg>
);

/** Highest over lowest, beside a bar that shows where in the year's range the month lies. */
function Range({ of, within }: { readonly of: WeatherSum; readonly within: WeatherSum }) {
  const tall = 32;
  const [low, high] = [within.tAirLowest_C, within.tAirHighest_C];
  if (!Number.isFinite(low) || !Number.isFinite(of.tAirLowest_C)) return null;
  const y = (t: number): number => tall * (1 - (t - low) / Math.max(1, high - low));
  return (
    <span class="range">
      <svg width="7" height={tall} aria-hidden="true">
        <rect class="span" x="2" width="4" y={y(of.tAirHighest_C)} height={y(of.tAirLowest_C) - y(of.tAirHighest_C)} />
        <rect class="mean" x="0" width="8" y={y(of.tAirMean_C) - 0.75} height="1.5" />
      </svg>
      <span>
        <span>{fixed(of.tAirHighest_C, 0)}</span>
        <span>{fixed(of.tAirLowest_C, 0)}</span>
      </span>
    </span>
  );
}
