import { useState } from 'preact/hooks';
import type { Scheme } from '../../core/scheme/schema.ts';
import { sizeEdit } from '../../core/sizing/size-edit.ts';
import type { Sweep, SweepPoint, Swept } from '../../core/sizing/sweep.ts';
import { hands } from '../jobs/hands.ts';
import { useStudy } from '../jobs/use-study.ts';
import { committed } from '../state/document.ts';
import { performEdit } from '../state/perform-edit.ts';
import { Button } from '../ui/button.tsx';
import { Choice } from '../ui/choice.tsx';
import { dayAndMonth, fixed, signedPercent } from '../ui/format.ts';
import { words } from '../words/words.ts';
import { SizingChart } from './sizing-chart.tsx';
import { picked, pointAt, pointNow, sizedWindows, swept, target_kWh } from './sizing-state.ts';
import { writeSizing } from './write-sizing.ts';
import './sizing.css';

const text = words.sizing;

/** How deep a window's overhang or fins must be, or how dark its glass: summer and winter side by side. */
export function SizingPanel() {
  const open = committed.value;
  const windows = sizedWindows.value;
  if (open === null || windows.length === 0) return <p class="empty-line soft">{text.none}</p>;
  return <Sizing scheme={open} windows={windows} />;
}

function Sizing({ scheme, windows }: { scheme: Scheme; windows: readonly string[] }) {
  const target = target_kWh.value;
  const ask = { windows, swept: swept.value, target_Wh: target === null ? null : target * 1000 };
  const study = useStudy(hands.sizing, 'sweep', ask, scheme, `${windows.join('\n')}\n${swept.value}\n${target}`);
  const sweep = study.value;
  const isFresh = sweep !== null && sweep.windows.join() === windows.join() && sweep.swept === swept.value;
  return (
    <div class="sizing-place">
      <div class="sizing">
        <div class="sizing-tools">
          <h3>{text.title(windows)}</h3>
          <Choice<Swept>
            label={text.swept}
            value={swept.value}
            options={(['overhang', 'fins', 'both', 'glass'] as const).map((kind) => ({
              value: kind,
              text: text.kinds[kind],
            }))}
            onChoose={(kind) => {
              swept.value = kind;
              picked.value = null;
            }}
          />
          <TargetField />
        </div>
        {isFresh ? <Reading sweep={sweep} scheme={scheme} /> : null}
        {study.failure === null ? null : <p role="alert">{text.failed(study.failure)}</p>}
        {isFresh ? (
          <SizingChart
            sweep={sweep}
            target_kWh={target}
            shown={shownOf(sweep)}
            onPick={(amount) => {
              picked.value = pointAt(sweep, amount).amount;
            }}
          />
        ) : (
          <p class="soft">{study.failure === null ? text.working : ''}</p>
        )}
      </div>
    </div>
  );
}

const shownOf = (sweep: Sweep): SweepPoint => (picked.value === null ? pointNow(sweep) : pointAt(sweep, picked.value));

function TargetField() {
  const [isBad, setBad] = useState(false);
  const take = (typed: string): void => {
    const value = typed.trim() === '' ? null : Number(typed.replace(',', '.'));
    const isGood = value === null || (Number.isFinite(value) && value > 0);
    setBad(!isGood);
    if (isGood) target_kWh.value = value;
  };
  return (
    <label class="sizing-target">
      <span>{text.target}</span>
      <span>
        <input
          class="field"
          type="text"
          inputMode="decimal"
          aria-invalid={isBad}
          title={isBad ? text.badTarget : undefined}
          value={target_kWh.value ?? ''}
          onChange={(event) => take(event.currentTarget.value)}
        />{' '}
        <span class="soft">{text.targetUnit}</span>
      </span>
    </label>
  );
}

const amountText = (sweep: Sweep, amount: number): string =>
  sweep.unit === '' ? text.g(fixed(amount, 3)) : text.depth(fixed(amount, 3).replace(/0$/, ''));

function enoughText(sweep: Sweep): string | null {
  if (sweep.swept === 'glass') return null;
  if (sweep.enough === null) return text.worthAll;
  return sweep.enough === 0 ? text.never : text.enough(amountText(sweep, sweep.enough));
}

const dayAndHour = (date: string, time: string): string => `${dayAndMonth(date)}, ${time}`;

/** What the picked setting brings against what the window has now, and the way to set it. */
function Reading({ sweep, scheme }: { sweep: Sweep; scheme: Scheme }) {
  const now = pointNow(sweep);
  const shown = shownOf(sweep);
  const isOff = shown.amount === 0;
  const what = isOff ? text.off : amountText(sweep, shown.amount);
  const kWh = (wh: number): string => fixed(wh / 1000, 2);
  const change = (then: number, before: number): string =>
    before > 0 && shown !== now ? signedPercent(then / before - 1) : text.unchanged;
  const edit = sizeEdit(scheme, sweep.windows, sweep.swept, shown.amount);
  const meets = sweep.meetsTarget;
  const enough = enoughText(sweep);
  return (
    <div class="sizing-result">
      <label class="sizing-amount">
        <span>{text.amount}</span>
        <input
          type="range"
          min="0"
          max={sweep.points.length - 1}
          step="1"
          value={sweep.points.indexOf(shown)}
          aria-valuetext={what}
          onInput={(event) => {
            picked.value = sweep.points[Number(event.currentTarget.value)]?.amount ?? null;
          }}
        />
      </label>
      <div class="sizing-reading" role="status">
        <div class="sizing-head">
          <strong>{what}</strong>
          <Button
            tone="primary"
            off={edit === null}
            tip={edit === null ? text.hasIt : undefined}
            onPress={() => {
              if (edit !== null) performEdit(edit);
            }}
          >
            {isOff ? text.takeOff : text.apply(what)}
          </Button>
        </div>
        <span>{text.summerAt(kWh(shown.summer_Wh), change(shown.summer_Wh, now.summer_Wh))}</span>
        <span>{text.winterAt(kWh(shown.winter_Wh), change(shown.winter_Wh, now.winter_Wh))}</span>
        <span>{text.peakAt(fixed(shown.summerPeak_W, 0))}</span>
        {sweep.swept === 'glass' ? null : (
          <span class="soft">
            {shown.keptOff === null
              ? text.keptOffNever
              : text.keptOff(
                  dayAndHour(shown.keptOff.from, shown.keptOff.fromTime),
                  dayAndHour(shown.keptOff.to, shown.keptOff.toTime),
                )}
          </span>
        )}
        {target_kWh.value === null ? null : (
          <span>{meets === null ? text.missed : text.meets(amountText(sweep, meets))}</span>
        )}
        {enough === null ? null : <span class="soft">{enough}</span>}
        <button type="button" class="link" onClick={() => void writeSizing(sweep, scheme)}>
          {text.sheet}
        </button>
      </div>
    </div>
  );
}
