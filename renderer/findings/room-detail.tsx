import { useMemo, useState } from 'preact/hooks';
import type { Finding } from '../../core/limits/finding.ts';
import { needsWeather } from '../../core/limits/metric.ts';
import { workingOf } from '../../core/limits/working.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { CheckResult, RoomResult } from '../../core/study/check-result.ts';
import type { DayGrid } from '../../core/sky/day-grid.ts';
import { civilOf } from '../../core/sun/civil.ts';
import { civil, minutesOf } from '../state/moment.ts';
import { Button } from '../ui/button.tsx';
import { decimalsFor, fixed, signed } from '../ui/format.ts';
import { words } from '../words/words.ts';
import type { RoomFindings } from './by-room.ts';
import { DayCurve } from './day-curve.tsx';
import { Disc } from '../ui/disc.tsx';
import { roomCurve } from './room-curve.ts';
import { SensitivityOf } from './sensitivity.tsx';
import { WaysOf } from './ways.tsx';
import { YearFacts } from './year-facts.tsx';
import { stepValue, workingText } from './working-text.ts';

type Props = { readonly of: RoomFindings; readonly result: CheckResult; readonly scheme: Scheme };

/** One room opened: each of its limits, and for the one chosen why, the day's curve and the working. */
export function RoomDetail({ of, result, scheme }: Props) {
  const [chosen, setChosen] = useState<string>(of.worst.limit);
  const finding = of.findings.find((f) => f.limit === chosen) ?? of.worst;
  return (
    <div class="room-detail">
      {of.findings.length > 1 ? <Limits of={of} chosen={finding.limit} onChoose={setChosen} /> : null}
      <p class="reason">{finding.reason}</p>
      {finding.notes.map((note) => (
        <p key={note} class="reason soft">
          {note}
        </p>
      ))}
      <CurveOf finding={finding} result={result} />
      <ShowMoment finding={finding} zone={result.zone} />
      <YearFacts room={finding.room} result={result} />
      <WaysOf key={`ways ${finding.limit}`} finding={finding} result={result} scheme={scheme} />
      <SensitivityOf key={`moves ${finding.limit}`} finding={finding} result={result} scheme={scheme} />
      <WorkingOf key={finding.limit} finding={finding} result={result} scheme={scheme} />
    </div>
  );
}

/** The limits on the room, when there are several. */
function Limits({ of, chosen, onChoose }: { of: RoomFindings; chosen: string; onChoose: (limit: string) => void }) {
  return (
    <ul class="limits" aria-label={words.findings.otherLimits}>
      {of.findings.map((finding) => (
        <li key={finding.limit}>
          <button
            type="button"
            class={finding.verdict ?? 'none'}
            aria-pressed={finding.limit === chosen}
            onClick={() => onChoose(finding.limit)}
          >
            <Disc verdict={finding.verdict} />
            <span class="limit-name">{finding.metricName}</span>
            <span class="number">
              {fixed(finding.value, decimalsFor(finding.limitValue ?? finding.value))} {finding.unit}
            </span>
            <span class="number margin">
              {finding.margin === null ? '' : signed(finding.margin, decimalsFor(finding.limitValue ?? finding.value))}
            </span>
          </button>
        </li>
      ))}
    </ul>
  );
}

/** The day that a finding was read on, or the one that its room takes in most on. */
function dayOf(finding: Finding, result: CheckResult, room: RoomResult): number {
  const named = result.days.findIndex((d) => d.key === finding.day);
  if (named >= 0) return named;
  let best = 0;
  let most = -1;
  room.days.forEach((day, i) => {
    const top = day.total_W.reduce((a, b) => Math.max(a, b), 0);
    if (top > most) [best, most] = [i, top];
  });
  return best;
}

const WHOLE_DAY = { from_min: 0, to_min: 1440 };

function CurveOf({ finding, result }: { finding: Finding; result: CheckResult }) {
  const room = result.rooms.find((r) => r.room === finding.room);
  const at = room === undefined ? 0 : dayOf(finding, result, room);
  const grid = result.days[at];
  const day = room?.days[at];
  const curve = useMemo(
    () => (grid === undefined || day === undefined || room === undefined ? null : roomCurve(grid, day, room.floor_m2)),
    [grid, day, room],
  );
  if (curve === null || finding.metric === 'glazing-to-floor' || needsWeather(finding.metric)) return null;
  const over =
    finding.clock === null ? WHOLE_DAY : { from_min: minutesOf(finding.clock[0]), to_min: minutesOf(finding.clock[1]) };
  const isPower = finding.metric === 'peak-gain' || finding.metric === 'mean-gain';
  const limit = isPower && finding.limitValue !== null ? { value: finding.limitValue, ...over } : null;
  return (
    <figure>
      <figcaption>{words.findings.curve((grid as DayGrid).name)}</figcaption>
      <DayCurve
        curve={curve}
        label={words.findings.curveLabel(finding.roomName, (grid as DayGrid).name)}
        limit={limit}
        at_min={finding.when === null ? null : minutesOf(civilOf(finding.when.instant_ms, result.zone).time)}
      />
    </figure>
  );
}

function ShowMoment({ finding, zone }: { finding: Finding; zone: string }) {
  const { when } = finding;
  if (when === null) return null;
  return (
    <Button
      tip={when.text}
      onPress={() => {
        const { date, time } = civilOf(when.instant_ms, zone);
        civil.value = { date, time };
      }}
    >
      {words.findings.goTo}
    </Button>
  );
}

function WorkingOf({ finding, result, scheme }: { finding: Finding; result: CheckResult; scheme: Scheme }) {
  const [isCopied, setCopied] = useState(false);
  const working = useMemo(() => workingOf(result, scheme, finding), [result, scheme, finding]);
  const copy = async (): Promise<void> => {
    await navigator.clipboard.writeText(workingText(`${finding.room} ${finding.roomName}`, working));
    setCopied(true);
  };
  return (
    <details class="working">
      <summary>{words.findings.working_}</summary>
      <table>
        <tbody>
          {working.steps.map((step, i) => (
            <tr key={i}>
              <th scope="row">
                {step.label}
                {step.formula === undefined ? null : <span class="formula">{step.formula}</span>}
                {step.note === undefined ? null : <span class="formula">{step.note}</span>}
                {step.place ? <span class="formula">{step.place}</span> : null}
              </th>
              <td class="number">{stepValue(step)}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <dl class="working-head">
        <dt>{words.findings.method}</dt>
        <dd>{working.method}</dd>
        <dt>{words.findings.source}</dt>
        <dd>{working.source}</dd>
      </dl>
      <Button onPress={() => void copy()}>{isCopied ? words.findings.copied : words.findings.copy}</Button>
    </details>
  );
}
