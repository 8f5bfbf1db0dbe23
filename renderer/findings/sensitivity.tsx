import { useState } from 'preact/hooks';
import type { Finding } from '../../core/limits/finding.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { Bar } from '../../core/sizing/sensitivity.ts';
import type { CheckResult } from '../../core/study/check-result.ts';
import { hands } from '../jobs/hands.ts';
import { useStudy } from '../jobs/use-study.ts';
import { decimalsFor, fixed } from '../ui/format.ts';
import { useSize } from '../ui/use-size.ts';
import { weatherOf } from '../state/weather-at-hand.ts';
import { words } from '../words/words.ts';

type Props = { readonly finding: Finding; readonly result: CheckResult; readonly scheme: Scheme };

const text = words.findings.sensitivity;

/** Which input moves a result most: worked out only once somebody asks. */
export function SensitivityOf({ finding, result, scheme }: Props) {
  const [isOpen, setOpen] = useState(false);
  const { limitSet } = result;
  if (limitSet === null) return null;
  return (
    <details class="sensitivity" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>{text.title}</summary>
      {isOpen ? <Bars finding={finding} result={result} scheme={scheme} limitSet={limitSet} /> : null}
    </details>
  );
}

type BarsProps = {
  readonly finding: Finding;
  readonly result: CheckResult;
  readonly scheme: Scheme;
  readonly limitSet: NonNullable<CheckResult['limitSet']>;
};

const BAR_px = 9;

function Bars({ finding, result, scheme, limitSet }: BarsProps) {
  const key = `${finding.room}\n${finding.limit}\n${finding.day}\n${finding.value}`;
  const ask = { limitSet, skyModel: result.skyModel, weather: weatherOf(result), finding };
  const study = useStudy(hands.sensitivity, 'sensitivity', ask, scheme, key);
  const { ref, width } = useSize<HTMLDivElement>();
  return (
    <div class={study.isWorking ? 'tornado being-redone' : 'tornado'} ref={ref}>
      <p class="soft">{text.line}</p>
      {study.failure === null ? null : <p role="alert">{text.failed(study.failure)}</p>}
      {study.value === null ? <p class="soft">{text.working}</p> : null}
      <Rows bars={study.value ?? []} finding={finding} width={width} />
    </div>
  );
}

type RowsProps = { readonly bars: readonly Bar[]; readonly finding: Finding; readonly width: number };

function Rows({ bars, finding, width }: RowsProps) {
  const values = bars.flatMap((bar) => [bar.low.value, bar.high.value]).concat(finding.value);
  const least = Math.min(...values);
  const span = Math.max(...values) - least || 1;
  const x = (value: number): number => ((value - least) / span) * Math.max(0, width - 2) + 1;
  const now = x(finding.value);
  const piece = (kind: 'low' | 'high', value: number) => (
    <rect class={kind} x={Math.min(x(value), now)} width={Math.abs(x(value) - now)} height={BAR_px} />
  );
  return (
    <ul>
      {bars.map((bar) => (
        <li key={bar.input} title={bar.place}>
          <Labels bar={bar} decimals={decimalsFor(finding.value)} unit={finding.unit} />
          <svg width="100%" height={BAR_px} aria-hidden="true">
            {piece('low', bar.low.value)}
            {piece('high', bar.high.value)}
            <path class="now" d={`M${now} 0V${BAR_px}`} />
          </svg>
        </li>
      ))}
    </ul>
  );
}

/** Name and both ends in figures, so that the bars need not be seen. */
function Labels({ bar, decimals, unit }: { bar: Bar; decimals: number; unit: string }) {
  return (
    <span class="tornado-text">
      <span class="tornado-input">{bar.input}</span>
      <span class="soft number">
        {bar.low.setting} {fixed(bar.low.value, decimals)} · {bar.high.setting} {fixed(bar.high.value, decimals)} {unit}
      </span>
    </span>
  );
}
