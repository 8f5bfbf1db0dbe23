import { CHECK_DAYS } from '../../core/gain/check-days.ts';
import type { Limit } from '../../core/limits/limit-set.ts';
import { METRIC_IDS, METRICS } from '../../core/limits/metric.ts';
import type { MetricId } from '../../core/limits/metric-id.ts';
import { decimalsFor, fixed } from '../ui/format.ts';
import { words } from '../words/words.ts';
import { DateField, SelectField, TextField } from './limit-fields.tsx';
import { LimitValues } from './limit-values.tsx';
import { changeLimit, removeLimit } from './limits-state.ts';

const text = words.limits;
const USES = Object.keys(words.schedule.uses) as (keyof typeof words.schedule.uses)[];

type Props = { readonly limit: Limit; readonly isOwn: boolean };

const allowed = ({ value, byBearing, byGlazing }: Limit): string => {
  if (byGlazing !== undefined) return text.byGlazing;
  return byBearing === undefined ? fixed(value, decimalsFor(value)) : text.byBearing;
};

const summaryOf = (limit: Limit): string =>
  text.line(limit.name, limit.comparison === 'at-most' ? '≤' : '≥', allowed(limit), limit.unit);

/** One limit: in a line, and opened with everything that it says. */
export function LimitForm({ limit, isOwn }: Props) {
  return (
    <li class="limit">
      <details>
        <summary>{summaryOf(limit)}</summary>
        <div class="limit-fields">
          <What limit={limit} isOwn={isOwn} />
          <LimitValues limit={limit} isOwn={isOwn} />
          <When limit={limit} isOwn={isOwn} />
          <Uses limit={limit} isOwn={isOwn} />
          <Where limit={limit} isOwn={isOwn} />
        </div>
      </details>
      {isOwn ? (
        <button
          type="button"
          class="link"
          aria-label={text.removeLabel(limit.name)}
          onClick={() => removeLimit(limit.id)}
        >
          {text.remove}
        </button>
      ) : null}
    </li>
  );
}

function What({ limit, isOwn }: Props) {
  return (
    <>
      <TextField
        label={text.fields.name}
        value={limit.name}
        off={!isOwn}
        wide
        onText={(name) => changeLimit(limit.id, { name })}
      />
      <SelectField<MetricId>
        label={text.fields.metric}
        value={limit.metric}
        off={!isOwn}
        options={METRIC_IDS.map((id) => [id, METRICS[id].name])}
        onChoose={(metric) => changeLimit(limit.id, { metric })}
      />
    </>
  );
}

function When({ limit, isOwn }: Props) {
  const days = limit.days ?? ['hottest'];
  const { clock } = limit;
  return (
    <>
      {METRICS[limit.metric].byDay ? (
        <Ticks
          label={text.fields.days}
          isOwn={isOwn}
          options={CHECK_DAYS.map((day) => [day.key, day.name])}
          ticked={days}
          onTicked={(ticked) => changeLimit(limit.id, { days: ticked.length === 0 ? undefined : ticked })}
        />
      ) : null}
      {clock === undefined
        ? null
        : ([0, 1] as const).map((end) => (
            <TextField
              key={end}
              label={end === 0 ? text.fields.from : text.fields.to}
              value={clock[end]}
              off={!isOwn}
              onText={(time) => changeLimit(limit.id, { clock: end === 0 ? [time, clock[1]] : [clock[0], time] })}
            />
          ))}
    </>
  );
}

const Uses = ({ limit, isOwn }: Props) => (
  <Ticks
    label={limit.uses === undefined ? `${text.fields.uses}: ${text.allUses}` : text.fields.uses}
    isOwn={isOwn}
    options={USES.map((use) => [use, words.schedule.uses[use]])}
    ticked={limit.uses ?? []}
    onTicked={(uses) => changeLimit(limit.id, { uses: uses.length === 0 ? undefined : uses })}
  />
);

function Where({ limit, isOwn }: Props) {
  return (
    <>
      <TextField
        label={text.fields.source}
        value={limit.source}
        off={!isOwn}
        wide
        onText={(source) => changeLimit(limit.id, { source })}
      />
      {isOwn ? (
        <DateField
          label={text.fields.checked}
          value={limit.checked}
          onDate={(checked) => changeLimit(limit.id, { checked })}
        />
      ) : (
        <TextField
          label={text.fields.checked}
          value={limit.checked ?? text.neverChecked}
          off
          onText={() => undefined}
        />
      )}
    </>
  );
}

type TicksProps = {
  readonly label: string;
  readonly isOwn: boolean;
  readonly options: readonly (readonly [value: string, name: string])[];
  readonly ticked: readonly string[];
  readonly onTicked: (ticked: readonly string[]) => void;
};

const Ticks = ({ label, isOwn, options, ticked, onTicked }: TicksProps) => (
  <fieldset class="ticks wide">
    <legend>{label}</legend>
    {options.map(([value, name]) => (
      <label key={value} class="tick">
        <input
          type="checkbox"
          disabled={!isOwn}
          checked={ticked.includes(value)}
          onChange={(event) =>
            onTicked(event.currentTarget.checked ? [...ticked, value] : ticked.filter((other) => other !== value))
          }
        />
        {name}
      </label>
    ))}
  </fieldset>
);
