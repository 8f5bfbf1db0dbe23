import { useMemo, useState } from 'preact/hooks';
import type { Unit } from '../../core/sky/weather/mapping.ts';
import type { Quantity } from '../../core/sky/weather/weather-year.ts';
import { scheme } from '../state/document.ts';
import { Button } from '../ui/button.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { words } from '../words/words.ts';
import { Pick, TextField } from './mapping-fields.tsx';
import {
  formOfGuess,
  formOfMapping,
  type MappingForm,
  QUANTITIES,
  readMappingForm,
  sampleOf,
  unitsOf,
} from './mapping-form.ts';
import { readFile, type WeatherReading } from './weather-state.ts';

type Props = { readonly reading: WeatherReading; readonly onClose: () => void };
type Change = (part: Partial<MappingForm>) => void;

/** Hours ahead of UTC by the sun: a first value for the clock of a file from the site. */
const meanOffset = (): number => Math.round((scheme.peek()?.site.longitude ?? 0) / 15);

function startForm({ mapping, guess, file }: WeatherReading): MappingForm {
  if (mapping !== null) return formOfMapping(mapping);
  const name = file.name.replace(/\.[^.]*$/, '');
  const empty = {
    delimiter: ',' as const,
    decimal: '.' as const,
    headLine: 1,
    heads: [],
    sample: [],
    time: { columns: [], form: words.weather.mapping.formHint },
    columns: [],
  };
  return formOfGuess(guess ?? empty, name, meanOffset());
}

/** Which column of a table is what. */
export function MappingDialog({ reading, onClose }: Props) {
  const [form, setForm] = useState<MappingForm>(() => startForm(reading));
  const change: Change = (part) => setForm((now) => ({ ...now, ...part }));
  const read = readMappingForm(form);
  const bad = 'columns' in read ? [] : read;
  const w = words.weather.mapping;
  const go = (): void => {
    if (!('columns' in read)) return;
    onClose();
    void readFile(reading.file, read);
  };
  return (
    <Dialog
      title={w.title(reading.file.name)}
      onClose={onClose}
      actions={
        <>
          <Button onPress={onClose}>{w.cancel}</Button>
          <Button tone="primary" off={bad.length > 0} onPress={go}>
            {w.read}
          </Button>
        </>
      }
    >
      <div class="mapping">
        <Sample bytes={reading.file.bytes} form={form} />
        <CellFields form={form} change={change} bad={bad} />
        <TimeFields form={form} change={change} bad={bad} />
        <ColumnFields bytes={reading.file.bytes} form={form} change={change} />
        <PlaceFields form={form} change={change} bad={bad} />
      </div>
    </Dialog>
  );
}

type PartProps = { readonly form: MappingForm; readonly change: Change; readonly bad: readonly string[] };

/** How lines come apart into cells. */
function CellFields({ form, change, bad }: PartProps) {
  const w = words.weather.mapping;
  return (
    <div class="mapping-row">
      <Pick
        label={w.delimiter}
        value={form.delimiter}
        options={[
          [',', w.delimiters[',']],
          [';', w.delimiters[';']],
          ['\t', w.delimiters['\t']],
        ]}
        onChoose={(delimiter) => change({ delimiter })}
      />
      <Pick
        label={w.decimal}
        value={form.decimal}
        options={[
          ['.', w.decimals['.']],
          [',', w.decimals[',']],
        ]}
        onChoose={(decimal) => change({ decimal })}
      />
      <TextField
        label={w.headLine}
        value={form.headLine}
        isBad={bad.includes('headLine')}
        onInput={(headLine) => change({ headLine })}
      />
      <TextField label={w.missing} value={form.missing} wide onInput={(missing) => change({ missing })} />
    </div>
  );
}

/** Which instant a row stands for. */
function TimeFields({ form, change, bad }: PartProps) {
  const w = words.weather.mapping;
  return (
    <fieldset>
      <legend>{w.time}</legend>
      <div class="mapping-row">
        <TextField
          label={w.timeColumns}
          value={form.timeColumns}
          wide
          onInput={(timeColumns) => change({ timeColumns })}
        />
        <TextField label={w.form} value={form.form} onInput={(value) => change({ form: value })} />
        <TextField label={w.year} value={form.year} isBad={bad.includes('year')} onInput={(year) => change({ year })} />
        <TextField
          label={w.offset}
          value={form.offset}
          isBad={bad.includes('offset')}
          onInput={(offset) => change({ offset })}
        />
        <Pick
          label={w.rowTime}
          value={form.label}
          options={[
            ['start', w.labels.start],
            ['middle', w.labels.middle],
            ['end', w.labels.end],
            ['instant', w.labels.instant],
          ]}
          onChoose={(label) => change({ label })}
        />
        <TextField
          label={w.shift}
          value={form.shift}
          isBad={bad.includes('shift')}
          onInput={(shift) => change({ shift })}
        />
        <Pick
          label={w.air}
          value={form.air}
          options={[
            ['mean', w.airs.mean],
            ['at-label', w.airs['at-label']],
          ]}
          onChoose={(air) => change({ air })}
        />
      </div>
    </fieldset>
  );
}

type ColumnProps = { readonly bytes: Uint8Array; readonly form: MappingForm; readonly change: Change };

const useSample = (bytes: Uint8Array, { delimiter, headLine }: MappingForm) =>
  useMemo(() => sampleOf(bytes, delimiter, Math.max(1, Number(headLine) || 1)), [bytes, delimiter, headLine]);

/** What each quantity's column is called and which unit it comes in. */
function ColumnFields({ bytes, form, change }: ColumnProps) {
  const w = words.weather.mapping;
  const { heads } = useSample(bytes, form);
  const set = (quantity: Quantity, part: { column?: string; unit?: Unit }): void =>
    change({ columns: { ...form.columns, [quantity]: { ...form.columns[quantity], ...part } } });
  return (
    <fieldset>
      <legend>{w.columns}</legend>
      <div class="mapping-columns">
        {QUANTITIES.map((quantity) => {
          const name = words.weather.quantity[quantity];
          const { column, unit } = form.columns[quantity];
          const known = column === '' || heads.includes(column) ? heads : [column, ...heads];
          return (
            <div key={quantity} class="mapping-column">
              <span>{name}</span>
              <Pick
                label={`${name}, ${w.column}`}
                isLabelUnseen
                value={column}
                options={[['', w.unused], ...known.map((head) => [head, head] as const)]}
                onChoose={(value) => set(quantity, { column: value })}
              />
              <Pick
                label={`${name}, ${w.unit}`}
                isLabelUnseen
                value={unit}
                options={unitsOf(quantity).map((u) => [u, UNIT_TEXT[u] ?? u] as const)}
                onChoose={(value) => set(quantity, { unit: value })}
              />
            </div>
          );
        })}
      </div>
    </fieldset>
  );
}

/** Units as they are written for people. */
const UNIT_TEXT: { readonly [U in Unit]?: string } = {
  'W/m2': 'W/m²',
  'kW/m2': 'kW/m²',
  'Wh/m2': 'Wh/m²',
  'kWh/m2': 'kWh/m²',
  'kJ/m2': 'kJ/m²',
  'MJ/m2': 'MJ/m²',
  C: '°C',
  F: '°F',
  share: '0 to 1',
};

/** Where the file was taken, as far as is known. */
function PlaceFields({ form, change, bad }: PartProps) {
  const w = words.weather.mapping;
  return (
    <fieldset>
      <legend>{w.place}</legend>
      <div class="mapping-row">
        <TextField label={w.name} value={form.name} wide onInput={(name) => change({ name })} />
        {(['latitude', 'longitude', 'elevation'] as const).map((field) => (
          <TextField
            key={field}
            label={`${w[field]} ${field === 'elevation' ? 'm' : '°'}`}
            value={form[field]}
            isBad={bad.includes(field)}
            onInput={(value) => change({ [field]: value })}
          />
        ))}
      </div>
    </fieldset>
  );
}

/** The first rows, so that the columns can be told by what stands in them. */
function Sample({ bytes, form }: Omit<ColumnProps, 'change'>) {
  const { heads, rows } = useSample(bytes, form);
  return (
    <div class="mapping-sample">
      <table>
        <caption class="unseen">{words.weather.mapping.sample}</caption>
        <thead>
          <tr>
            {heads.map((head, i) => (
              // Heads may repeat.
              <th key={`${i} ${head}`} scope="col">
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.join()}>
              {heads.map((head, i) => (
                <td key={`${i} ${head}`}>{row[i]}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
