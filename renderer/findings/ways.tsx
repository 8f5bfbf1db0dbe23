import { signal } from '@preact/signals';
import { useEffect, useRef } from 'preact/hooks';
import type { Finding } from '../../core/limits/finding.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { WayThatFails, WayThatPasses, Ways } from '../../core/sizing/ways.ts';
import type { CheckResult } from '../../core/study/check-result.ts';
import { hands } from '../jobs/hands.ts';
import { useStudy } from '../jobs/use-study.ts';
import { undoEdit, undoName } from '../state/document.ts';
import { performEdit } from '../state/perform-edit.ts';
import { weatherOf } from '../state/weather-at-hand.ts';
import { Button } from '../ui/button.tsx';
import { Disc } from '../ui/disc.tsx';
import { decimalsFor, fixed, signedPercent } from '../ui/format.ts';
import { words } from '../words/words.ts';

type Props = { readonly finding: Finding; readonly result: CheckResult; readonly scheme: Scheme };

/** The last way that was applied, and to which room: it can be undone where it was applied. */
const applied = signal<{ readonly room: string; readonly text: string } | null>(null);

const text = words.findings.ways;

/** The smallest change of each lever that brings a room within, each to apply and to undo. */
export function WaysOf({ finding, result, scheme }: Props) {
  const { limitSet, skyModel } = result;
  const isOver = finding.verdict === 'over' && limitSet !== null;
  const ask = {
    limitSet: limitSet as NonNullable<typeof limitSet>,
    skyModel,
    weather: weatherOf(result),
    finding,
  };
  const key = isOver ? `${finding.room}\n${finding.limit}\n${finding.day}\n${finding.value}` : null;
  const study = useStudy(hands.ways, 'ways', ask, scheme, key);
  const isUndoable = applied.value?.room === finding.room && undoName.value === applied.value.text;
  const section = useRef<HTMLElement>(null);
  const wasUndoable = useRef(isUndoable);
  // The button that was pressed is gone, and the room may have moved in the list: who goes by keyboard goes on from the next one.
  useEffect(() => {
    const isTurned = wasUndoable.current !== isUndoable;
    wasUndoable.current = isUndoable;
    if (document.activeElement !== document.body || !(isUndoable || isTurned)) return;
    const next = isUndoable ? section.current?.querySelector<HTMLElement>('.applied button') : section.current;
    next?.focus({ preventScroll: true });
  }, [isUndoable, finding]);
  if (!isOver && !isUndoable) return null;
  return (
    <section ref={section} class="ways" aria-label={text.title} tabIndex={-1}>
      <h3>{text.title}</h3>
      {isUndoable ? (
        <div class="applied" role="status">
          <span>{text.applied(applied.value?.text ?? '')}</span>
          <Button onPress={undoEdit}>{text.undo}</Button>
        </div>
      ) : null}
      {isOver ? <Found study={study} room={finding.room} /> : null}
    </section>
  );
}

function Found({ study, room }: { study: ReturnType<typeof useStudy<'ways'>>; room: string }) {
  if (study.failure !== null) return <p role="alert">{text.failed(study.failure)}</p>;
  const ways = study.value;
  if (ways === null) return <p class="soft">{text.working}</p>;
  const passing = ways.ways.filter((way): way is WayThatPasses => way.passes);
  const failing = ways.ways.filter((way): way is WayThatFails => !way.passes);
  const projects = passing.some((way) => way.lever === 'overhang' || way.lever === 'fins');
  return (
    <div class={study.isWorking ? 'being-redone' : ''}>
      {passing.length > 0 ? <p class="soft">{text.line}</p> : null}
      {ways.ways.length === 0 ? <p class="soft">{text.notForYear}</p> : null}
      <ul class="way-list">
        {passing.map((way) => (
          <Passing key={way.lever} way={way} ways={ways} room={room} />
        ))}
      </ul>
      {failing.length > 0 ? (
        <>
          <h4>{text.cannot}</h4>
          <ul class="way-list">
            {failing.map((way) => (
              <li key={way.lever} class="soft">
                {text.lever[way.lever]}: {way.reason}.
              </li>
            ))}
          </ul>
        </>
      ) : null}
      {ways.restsOn.map((rest) => (
        <p key={rest.on} class="soft">
          {text.restsOn[rest.on](
            `${fixed(rest.value, decimalsFor(rest.value))} ${ways.finding.unit}`,
            rest.verdict === null ? words.findings.noVerdict : words.findings.verdict[rest.verdict],
          )}
        </p>
      ))}
      {projects ? <p class="soft">{text.caution}</p> : null}
    </div>
  );
}

/** A change against what it was, or that there is none. */
const change = (then: number, now: number): string =>
  now > 0 && Math.abs(then / now - 1) >= 0.005 ? signedPercent(then / now - 1) : text.none;

function Passing({ way, ways, room }: { way: WayThatPasses; ways: Ways; room: string }) {
  const { value, unit, verdict } = way.after;
  const apply = (): void => {
    if (performEdit(way.edit, way.text).length === 0) applied.value = { room, text: way.text };
  };
  return (
    <li class="way">
      <span class="way-text">{way.text}</span>
      <Button label={text.applyLabel(way.text)} onPress={apply}>
        {text.apply}
      </Button>
      <span class="way-facts soft">
        <span class={`way-then ${verdict ?? 'none'}`}>
          <Disc verdict={verdict} /> {text.afterwards(`${fixed(value, decimalsFor(value))} ${unit}`)}
        </span>
        {way.decidedBy === null ? null : <span>{text.decidedBy(way.decidedBy.metricName)}</span>}
        <span>{text.winter(change(way.price.winter_Whm2, ways.price.winter_Whm2))}</span>
        <span>{text.daylight(change(way.price.daylight_m2, ways.price.daylight_m2))}</span>
      </span>
    </li>
  );
}
