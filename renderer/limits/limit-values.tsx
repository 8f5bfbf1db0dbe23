import type { Limit } from '../../core/limits/limit-set.ts';
import { words } from '../words/words.ts';
import { NumberField, SelectField } from './limit-fields.tsx';
import { changeLimit } from './limits-state.ts';

const text = words.limits;
const SIDES = ['N', 'E', 'S', 'W'] as const;
/** How far a new step stands above the one before it [% of the floor]. */
const STEP_PERCENT = 10;

type Props = { readonly limit: Limit; readonly isOwn: boolean };
type Step = NonNullable<Limit['byGlazing']>[number];

/** What a limit allows: its value, the threshold of what counts hours, other values by side and by openings. */
export function LimitValues({ limit, isOwn }: Props) {
  return (
    <>
      <SelectField<Limit['comparison']>
        label={text.fields.comparison}
        value={limit.comparison}
        off={!isOwn}
        options={[
          ['at-most', text.comparisons['at-most']],
          ['at-least', text.comparisons['at-least']],
        ]}
        onChoose={(comparison) => changeLimit(limit.id, { comparison })}
      />
      <NumberField
        label={text.fields.value}
        unit={limit.unit}
        value={limit.value}
        off={!isOwn}
        onNumber={(value) => changeLimit(limit.id, { value })}
      />
      {limit.metric === 'hours-above' ? (
        <NumberField
          label={text.fields.above}
          unit="W/m²"
          value={limit.above ?? null}
          off={!isOwn}
          onNumber={(above) => changeLimit(limit.id, { above })}
        />
      ) : null}
      <Sides of={limit} unit={limit.unit} isOwn={isOwn} onSides={(byBearing) => changeLimit(limit.id, { byBearing })} />
      <Steps limit={limit} isOwn={isOwn} />
    </>
  );
}

type SidesProps = {
  readonly of: { readonly value: number; readonly byBearing?: Limit['byBearing'] };
  readonly unit: string;
  readonly isOwn: boolean;
  readonly onSides: (byBearing: Limit['byBearing'] | undefined) => void;
};

/** A value for each side that most glass faces, or none. */
function Sides({ of: { value, byBearing }, unit, isOwn, onSides }: SidesProps) {
  return (
    <>
      <label class="tick wide">
        <input
          type="checkbox"
          disabled={!isOwn}
          checked={byBearing !== undefined}
          onChange={(event) =>
            onSides(event.currentTarget.checked ? { N: value, E: value, S: value, W: value } : undefined)
          }
        />
        {text.sides}
      </label>
      {byBearing === undefined
        ? null
        : SIDES.map((side) => (
            <NumberField
              key={side}
              label={text.fields[side]}
              unit={unit}
              value={byBearing[side]}
              off={!isOwn}
              onNumber={(other) => onSides({ ...byBearing, [side]: other })}
            />
          ))}
    </>
  );
}

/** The values by openings, smallest step first, and a further one. Nothing at all on a limit that has none and is not ours. */
function Steps({ limit, isOwn }: Props) {
  const steps = limit.byGlazing ?? [];
  const put = (next: readonly Step[]): void =>
    changeLimit(limit.id, { byGlazing: next.length === 0 ? undefined : next });
  const add = (): void => put([...steps, { upTo: (steps.at(-1)?.upTo ?? 0) + STEP_PERCENT, value: limit.value }]);
  return (
    <>
      {steps.length === 0 ? null : <p class="wide soft">{text.steps}</p>}
      {steps.map((step, k) => (
        <StepFields
          key={k}
          step={step}
          name={text.stepName(k + 1)}
          unit={limit.unit}
          isOwn={isOwn}
          removeLabel={text.removeStep(k + 1)}
          onStep={(next) => put(next === null ? steps.toSpliced(k, 1) : steps.with(k, next))}
        />
      ))}
      {isOwn ? (
        <button type="button" class="link wide" onClick={add}>
          {text.addStep}
        </button>
      ) : null}
    </>
  );
}

type StepProps = {
  readonly step: Step;
  readonly name: string;
  readonly unit: string;
  readonly isOwn: boolean;
  readonly removeLabel: string;
  /** The step as it is to be; null: taken out. */
  readonly onStep: (step: Step | null) => void;
};

function StepFields({ step, name, unit, isOwn, removeLabel, onStep }: StepProps) {
  const sides = (byBearing: Limit['byBearing'] | undefined): void => {
    const { byBearing: before, ...rest } = step;
    onStep(byBearing === undefined ? rest : { ...rest, byBearing });
  };
  return (
    <fieldset class="limit-fields limit-step wide">
      <legend>{name}</legend>
      <NumberField
        label={text.upTo}
        unit={text.upToUnit}
        value={step.upTo}
        off={!isOwn}
        onNumber={(upTo) => onStep({ ...step, upTo })}
      />
      <NumberField
        label={text.fields.value}
        unit={unit}
        value={step.value}
        off={!isOwn}
        onNumber={(value) => onStep({ ...step, value })}
      />
      <Sides of={step} unit={unit} isOwn={isOwn} onSides={sides} />
      {isOwn ? (
        <button type="button" class="link wide" onClick={() => onStep(null)}>
          {removeLabel}
        </button>
      ) : null}
    </fieldset>
  );
}
