import type { LimitSet } from '../../core/limits/limit-set.ts';
import { shippedLimits } from '../jobs/limit-set.ts';
import { committed } from '../state/document.ts';
import { Button } from '../ui/button.tsx';
import { fixed } from '../ui/format.ts';
import { words } from '../words/words.ts';
import { LimitForm } from './limit-form.tsx';
import { addLimit, beginOwn, changeSet, choose, chosen, copyChosen, limitFaults } from './limits-state.ts';
import { NumberField, TextField } from './limit-fields.tsx';
import './limits.css';

const text = words.limits;

/** Which limits rooms are judged by; those of the scheme's own set can be changed. */
export function LimitsPanel() {
  if (committed.value === null) return null;
  const now = chosen.value;
  return (
    <div class="limits-panel">
      <Choose />
      {now === null ? null : (
        <>
          {now.set.example ? <p class="example">{text.example}</p> : null}
          {now.isOwn ? <OwnHead set={now.set} /> : <p class="soft">{now.set.note}</p>}
          <Faults />
          <ul class="limit-list">
            {now.set.limits.map((limit) => (
              <LimitForm key={limit.id} limit={limit} isOwn={now.isOwn} />
            ))}
          </ul>
          {now.isOwn ? <Button onPress={addLimit}>{text.add}</Button> : null}
        </>
      )}
    </div>
  );
}

function Choose() {
  const now = chosen.value;
  const own = now?.isOwn ? now.set : null;
  return (
    <div class="limits-choose">
      <select
        class="field"
        aria-label={text.set}
        value={own === null ? (now?.set.id ?? '') : '\u0000own'}
        onChange={(event) => choose(event.currentTarget.value)}
      >
        <option value="">{text.none}</option>
        {shippedLimits().map((set) => (
          <option key={set.id} value={set.id}>
            {set.name}
          </option>
        ))}
        {own === null ? null : <option value={'\u0000own'}>{text.own(own.name)}</option>}
      </select>
      {now === null ? <Button onPress={beginOwn}>{text.begin}</Button> : null}
      {now !== null && own === null ? <Button onPress={copyChosen}>{text.copy}</Button> : null}
    </div>
  );
}

function OwnHead({ set }: { set: LimitSet }) {
  return (
    <div class="limit-fields">
      <TextField label={text.name} value={set.name} onText={(name) => changeSet({ name })} />
      <NumberField
        label={text.close}
        unit={text.closeUnit}
        value={Number(fixed(set.close * 100, 2).replace(',', '.'))}
        onNumber={(percent) => changeSet({ close: percent / 100 })}
      />
      <TextField label={text.note} value={set.note} wide onText={(note) => changeSet({ note })} />
    </div>
  );
}

function Faults() {
  const faults = limitFaults.value;
  if (faults.length === 0) return null;
  return (
    <div class="notice" role="alert">
      <p>{text.refused}</p>
      {faults.map((fault) => (
        <p key={`${fault.place} ${fault.message}`}>
          <code>{fault.place}</code> {fault.message}; {fault.cure}.
        </p>
      ))}
    </div>
  );
}
