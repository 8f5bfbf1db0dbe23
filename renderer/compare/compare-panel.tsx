import { useState } from 'preact/hooks';
import type { Scheme } from '../../core/scheme/schema.ts';
import type { ComparedRow, Comparison } from '../../core/study/compare.ts';
import { hands } from '../jobs/hands.ts';
import { useStudy } from '../jobs/use-study.ts';
import { committed } from '../state/document.ts';
import { Button } from '../ui/button.tsx';
import { Disc } from '../ui/disc.tsx';
import { decimalsFor, fixed, signed } from '../ui/format.ts';
import { weatherAtHand } from '../state/weather-at-hand.ts';
import { words } from '../words/words.ts';
import { addFile, isFull, kept, keepNow, LONGEST_NAME, letGo, putOnDesk } from './compare-state.ts';
import './compare.css';

const text = words.compare;

/** Variants of the scheme beside the one on the desk: findings, and the shadow that each adds. */
export function ComparePanel() {
  const now = committed.value;
  if (now === null) return null;
  return (
    <div class="compare">
      <Keep />
      {kept.value.length === 0 ? <p class="soft">{text.line}</p> : <Side now={now} />}
    </div>
  );
}

function Keep() {
  const [name, setName] = useState('');
  const full = isFull.value;
  return (
    <div class="compare-tools">
      <input
        class="field"
        type="text"
        aria-label={text.name}
        placeholder={text.usual(kept.value.length + 1)}
        maxLength={LONGEST_NAME}
        value={name}
        onInput={(event) => setName(event.currentTarget.value)}
      />
      <Button
        off={full}
        tip={full ? text.full : undefined}
        onPress={() => {
          keepNow(name);
          setName('');
        }}
      >
        {text.keep}
      </Button>
      <Button off={full} tip={full ? text.full : undefined} onPress={() => void addFile()}>
        {text.add}
      </Button>
    </div>
  );
}

function Side({ now }: { now: Scheme }) {
  const all = kept.value;
  // The first kept is what the others, and at last the desk, are compared with.
  const variants = [...all, { name: text.now, scheme: now }];
  const key = JSON.stringify(all.map((variant) => variant.name));
  const study = useStudy(hands.compare, 'compare', { variants, weather: weatherAtHand.value }, now, key);
  if (study.failure !== null) return <p role="alert">{text.failed(study.failure)}</p>;
  const found = study.value;
  if (found === null || found.variants.length !== variants.length) return <p class="soft">{text.working}</p>;
  return (
    <div class={study.isWorking ? 'compare-scroller being-redone' : 'compare-scroller'}>
      <table>
        <Head found={found} />
        <Rows found={found} />
        <Shadows found={found} />
      </table>
      {found.notes.map((note) => (
        <p key={note} class="soft">
          {note}
        </p>
      ))}
    </div>
  );
}

function Head({ found }: { found: Comparison }) {
  return (
    <thead>
      <tr>
        <th scope="col">{text.room}</th>
        <th scope="col">{text.what}</th>
        {found.variants.map(({ name, counts }, i) => {
          const own = kept.value[i];
          return (
            <th key={name} scope="col" class="variant">
              <span class="variant-name">{name}</span>
              <span class="soft">{text.counts(counts.over, counts.close, counts.within)}</span>
              {own === undefined ? null : (
                <span class="variant-actions">
                  <button type="button" class="link" aria-label={text.back(name)} onClick={() => putOnDesk(own)}>
                    {text.put}
                  </button>
                  <button type="button" class="link" aria-label={text.remove(name)} onClick={() => letGo(name)}>
                    ×
                  </button>
                </span>
              )}
            </th>
          );
        })}
      </tr>
    </thead>
  );
}

/** Rows in which something is over anywhere, or differs. */
const isTelling = (row: ComparedRow): boolean =>
  row.verdicts.includes('over') || row.changes.some((change) => change === null || Math.abs(change) > 1e-9);

function Rows({ found }: { found: Comparison }) {
  const rows = found.rows.filter(isTelling);
  return (
    <tbody>
      {rows.length === 0 ? (
        <tr>
          <td colSpan={2 + found.variants.length}>{text.same}</td>
        </tr>
      ) : null}
      {rows.map((row) => (
        <tr key={`${row.room} ${row.limit}`}>
          <th scope="row">
            <strong>{row.room}</strong> {row.roomName}
          </th>
          <td class="soft">
            {row.metricName}, {row.unit}
          </td>
          {row.values.map((value, i) => (
            <Value
              key={found.variants[i]?.name}
              value={value}
              change={i === 0 ? null : (row.changes[i] ?? null)}
              verdict={row.verdicts[i] ?? null}
            />
          ))}
        </tr>
      ))}
    </tbody>
  );
}

type ValueProps = {
  readonly value: number | null;
  readonly change: number | null;
  readonly verdict: ComparedRow['verdicts'][number];
};

function Value({ value, change, verdict }: ValueProps) {
  if (value === null) return <td class="number soft">{text.none}</td>;
  const decimals = decimalsFor(value);
  return (
    <td class="number">
      {verdict === null ? null : (
        <span class={`disc-place ${verdict}`}>
          <Disc verdict={verdict} />
          <span class="unseen">{words.findings.verdict[verdict]}</span>
        </span>
      )}{' '}
      {fixed(value, decimals)}
      <span class="change soft">{change === null ? '' : signed(change, decimals)}</span>
    </td>
  );
}

function Shadows({ found }: { found: Comparison }) {
  return (
    <tbody class="shadows">
      {found.shadows.map((shadow) => (
        <tr key={shadow.text}>
          <th scope="row">{text.shadow}</th>
          <td class="soft">{shadow.text}</td>
          {shadow.added_m2.map((area, i) => (
            <Value
              key={found.variants[i]?.name}
              value={area}
              change={i === 0 || area === null || shadow.added_m2[0] == null ? null : area - shadow.added_m2[0]}
              verdict={null}
            />
          ))}
        </tr>
      ))}
    </tbody>
  );
}
