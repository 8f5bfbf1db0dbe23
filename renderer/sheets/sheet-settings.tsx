import { useId, useState } from 'preact/hooks';
import type { Scheme, SheetSet } from '../../core/scheme/schema.ts';
import { standardScales } from '../../core/sheet/scale.ts';
import { scaleWords } from '../../core/sheet/sheet-units.ts';
import { needsWindow, SHEET_KINDS, type SheetKind } from '../../core/study/sheet-kinds.ts';
import { seasonDates, USUAL_TIMES, usualDates } from '../../core/study/sheet-document.ts';
import { isDate } from '../../core/sun/civil.ts';
import { words } from '../words/words.ts';
import { change, changeKind, draft } from './sheet-state.ts';

const text = words.sheets;

/** Which settings a kind of sheet has. */
const HAS: {
  readonly [K in SheetKind]: readonly (
    | 'dates'
    | 'times'
    | 'scale'
    | 'paper'
    | 'units'
    | 'window'
    | 'block'
    | 'trees'
  )[];
} = {
  'shadow-study': ['dates', 'times', 'scale', 'paper', 'units'],
  'sun-path': ['paper', 'window'],
  facades: ['dates', 'scale', 'paper', 'units', 'block'],
  'exposure-plan': ['dates', 'scale', 'paper', 'units'],
  section: ['scale', 'paper', 'units', 'window'],
  light: ['dates', 'trees'],
  findings: [],
};

/** Everything that can be chosen for the sheet that is drawn. */
export function SheetSettings({ scheme }: { scheme: Scheme }) {
  const set = draft.value;
  const has = HAS[set.kind as SheetKind] ?? [];
  return (
    <form class="sheet-settings" onSubmit={(event) => event.preventDefault()}>
      <Select
        label={text.kind}
        value={set.kind}
        options={SHEET_KINDS.map((kind) => [kind, text.kinds[kind]])}
        onChoose={(kind) => changeKind(scheme, kind as SheetKind)}
      />
      {has.includes('window') ? <WindowChoice scheme={scheme} set={set} /> : null}
      {has.includes('block') ? <BlockChoice scheme={scheme} set={set} /> : null}
      {has.includes('dates') ? <Dates scheme={scheme} set={set} /> : null}
      {has.includes('trees') && scheme.trees.length > 0 ? <TreesChoice set={set} /> : null}
      {has.includes('times') ? <Times set={set} /> : null}
      {has.includes('scale') ? <ScaleChoice set={set} /> : null}
      {has.includes('paper') ? <PaperChoice set={set} /> : null}
      {has.includes('units') ? <UnitsChoice set={set} /> : null}
      {set.kind === 'shadow-study' ? <PerPage set={set} /> : null}
      <label class="setting">
        <span>{text.number}</span>
        <input
          class="field"
          type="text"
          maxLength={60}
          value={set.number ?? ''}
          onChange={(event) => change({ number: event.currentTarget.value.trim() || undefined })}
        />
      </label>
      <label class="setting">
        <span>{text.name}</span>
        <input
          class="field"
          type="text"
          maxLength={120}
          placeholder={text.kinds[set.kind as SheetKind] ?? ''}
          value={set.name}
          onChange={(event) => change({ name: event.currentTarget.value.trim() })}
        />
      </label>
    </form>
  );
}

type SelectProps = {
  readonly label: string;
  readonly value: string;
  readonly options: readonly (readonly [value: string, text: string])[];
  readonly onChoose: (value: string) => void;
};

function Select({ label, value, options, onChoose }: SelectProps) {
  const id = useId();
  return (
    <div class="setting">
      <label for={id}>{label}</label>
      <select id={id} class="field" value={value} onChange={(event) => onChoose(event.currentTarget.value)}>
        {options.map(([option, name]) => (
          <option key={option} value={option}>
            {name}
          </option>
        ))}
      </select>
    </div>
  );
}

type SetProps = { readonly set: SheetSet };

function WindowChoice({ scheme, set }: SetProps & { scheme: Scheme }) {
  const none: [string, string][] =
    needsWindow(set.kind as SheetKind) && set.window !== undefined ? [] : [['', text.noWindow]];
  return (
    <Select
      label={text.window}
      value={set.window ?? ''}
      options={[...none, ...scheme.windows.map((w): [string, string] => [w.id, `${w.id}, ${w.room}`])]}
      onChoose={(id) => change({ window: id || undefined })}
    />
  );
}

const BlockChoice = ({ scheme, set }: SetProps & { scheme: Scheme }) => (
  <Select
    label={text.block}
    value={set.block ?? ''}
    options={[
      ['', text.everyBlock],
      ...scheme.blocks
        .filter((b) => b.standing !== 'context')
        .map((b): [string, string] => [b.id, `${b.id} ${b.name}`]),
    ]}
    onChoose={(id) => change({ block: id || undefined })}
  />
);

const listed = (typed: string): readonly string[] =>
  typed
    .split(/[,;\s]+/)
    .map((part) => part.trim())
    .filter((part) => part !== '');

function Dates({ scheme, set }: SetProps & { scheme: Scheme }) {
  const given = set.dates.length > 0 ? set.dates : usualDates(scheme);
  return (
    <ListField
      label={text.dates}
      hint={text.datesHint}
      bad={text.badDates}
      values={given}
      isGood={isDate}
      onList={(dates) => change({ dates: [...dates] })}
      presets={[
        [text.usual, usualDates(scheme)],
        [text.seasons, seasonDates(scheme)],
      ]}
    />
  );
}

const HOURLY = Array.from({ length: 9 }, (_, i) => `${String(9 + i).padStart(2, '0')}:00`);

const Times = ({ set }: SetProps) => (
  <ListField
    label={text.times}
    hint={text.timesHint}
    bad={text.badTimes}
    values={set.times.length > 0 ? set.times : USUAL_TIMES}
    isGood={(time) => /^([01]\d|2[0-3]):[0-5]\d$/.test(time)}
    onList={(times) => change({ times: [...times] })}
    presets={[
      [text.three, USUAL_TIMES],
      [text.hourly, HOURLY],
    ]}
  />
);

type ListProps = {
  readonly label: string;
  readonly hint: string;
  readonly bad: string;
  readonly values: readonly string[];
  readonly isGood: (value: string) => boolean;
  readonly onList: (values: readonly string[]) => void;
  readonly presets: readonly (readonly [name: string, values: readonly string[]])[];
};

/** As many as the scheme's file holds in one set. */
const MOST = 60;

function ListField({ label, hint, bad, values, isGood, onList, presets }: ListProps) {
  const [isBad, setBad] = useState(false);
  const take = (typed: string): void => {
    const parts = listed(typed);
    const good = parts.length > 0 && parts.length <= MOST && parts.every(isGood);
    setBad(!good);
    if (good) onList(parts);
  };
  return (
    <div class="setting">
      <label>
        <span>{label}</span>
        <input
          class="field"
          type="text"
          placeholder={hint}
          aria-invalid={isBad}
          title={isBad ? bad : undefined}
          value={values.join(', ')}
          onChange={(event) => take(event.currentTarget.value)}
        />
      </label>
      {isBad ? (
        <span class="bad" role="alert">
          {bad}
        </span>
      ) : null}
      <span class="presets">
        {presets.map(([name, list]) => (
          <button
            key={name}
            type="button"
            class="link"
            aria-pressed={list.join() === values.join()}
            onClick={() => {
              setBad(false);
              onList(list);
            }}
          >
            {name}
          </button>
        ))}
      </span>
    </div>
  );
}

function ScaleChoice({ set }: SetProps) {
  const units = set.units ?? 'metric';
  const scales = standardScales(units);
  const own = set.scale !== undefined && !scales.includes(set.scale) ? [set.scale] : [];
  return (
    <Select
      label={text.scale}
      value={String(set.scale ?? '')}
      options={[
        ['', text.bestFit],
        ...[...own, ...scales].map((scale): [string, string] => [String(scale), scaleWords(scale, units)]),
      ]}
      onChoose={(scale) => change({ scale: scale === '' ? undefined : Number(scale) })}
    />
  );
}

const TreesChoice = ({ set }: SetProps) => (
  <Select
    label={text.trees}
    value={set.trees === true ? 'counted' : ''}
    options={[
      ['', text.treesLeftOut],
      ['counted', text.treesCounted],
    ]}
    onChoose={(trees) => change({ trees: trees === 'counted' ? true : undefined })}
  />
);

const PAPERS = ['A4', 'A3', 'A2', 'A1'] as const;

function PaperChoice({ set }: SetProps) {
  const value = `${set.paper} ${set.landscape ? 'lying' : 'upright'}`;
  return (
    <Select
      label={text.paper}
      value={value}
      options={PAPERS.flatMap((paper): [string, string][] => [
        [`${paper} lying`, `${paper}, ${text.lying}`],
        [`${paper} upright`, `${paper}, ${text.upright}`],
      ])}
      onChoose={(chosen) => {
        const [paper, way] = chosen.split(' ') as [SheetSet['paper'], string];
        change({ paper, landscape: way === 'lying' });
      }}
    />
  );
}

const UnitsChoice = ({ set }: SetProps) => (
  <Select
    label={text.units}
    value={set.units ?? 'metric'}
    options={[
      ['metric', text.metric],
      ['imperial', text.imperial],
    ]}
    // A ratio of one rule is hardly ever one of the other's.
    onChoose={(units) => change({ units: units === 'imperial' ? 'imperial' : undefined, scale: undefined })}
  />
);

const PerPage = ({ set }: SetProps) => (
  <Select
    label={text.perPage}
    value={String(set.perPage ?? '')}
    options={[['', text.asFit], ...[1, 2, 3, 4, 6, 9, 12].map((n): [string, string] => [String(n), String(n)])]}
    onChoose={(n) => change({ perPage: n === '' ? undefined : Number(n) })}
  />
);
