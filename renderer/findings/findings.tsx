import { computed, signal } from '@preact/signals';
import { useLayoutEffect, useRef } from 'preact/hooks';
import type { CheckResult } from '../../core/study/check-result.ts';
import type { Finding } from '../../core/limits/finding.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { leadOf, select } from '../state/selection.ts';
import { check, checkJob, isCheckSlow, isCheckStale, runCheck, stopCheck } from '../state/studies.ts';
import { Button } from '../ui/button.tsx';
import { Choice } from '../ui/choice.tsx';
import { Disc } from '../ui/disc.tsx';
import { decimalsFor, fixed, percent, signed } from '../ui/format.ts';
import { Progress } from '../ui/progress.tsx';
import { words } from '../words/words.ts';
import { byRoom, type Group, inGroup, type RoomFindings } from './by-room.ts';
import { FilterBar } from './filter-bar.tsx';
import { ANY, narrowed, type RoomFilter, type RoomTraits, traitsOf } from './room-filter.ts';
import { RoomDetail } from './room-detail.tsx';
import './findings.css';

/** Where the limit stands on every bar: one place, so that the marks line up down the list [share of its width]. */
const MOST_LIMIT_AT = 0.64;
const LEAST_LIMIT_AT = 0.3;

const group = signal<Group>('all');
/** The room that is open; null: none. */
const open = signal<string | null>(null);

const rooms = computed(() => byRoom(check.value?.value.findings ?? []));

const filter = signal<RoomFilter>(ANY);
const traits = computed(() => {
  const found = check.value;
  return found === null ? new Map<string, RoomTraits>() : traitsOf(found.value, found.scheme);
});

/** As far right as the highest value allows. */
const limitAt = computed(() => {
  const ratios = rooms.value.map(({ worst }) => (worst.limitValue ? worst.value / worst.limitValue : 0));
  return Math.max(LEAST_LIMIT_AT, Math.min(MOST_LIMIT_AT, 1 / Math.max(1, ...ratios)));
});

/** The rooms, worst first, each with its working behind it. */
export function Findings() {
  const found = check.value;
  return (
    <section class={isCheckStale.value ? 'findings stale' : 'findings'} aria-label={words.findings.label}>
      <header>
        <h2>{words.findings.label}</h2>
        {found === null ? null : <Counts result={found.value} />}
      </header>
      <JobLine />
      {found === null ? <Empty /> : <RoomList result={found.value} scheme={found.scheme} />}
    </section>
  );
}

function Counts({ result }: { result: CheckResult }) {
  const { over, close, within } = result.counts;
  if (result.limitSet === null) return null;
  const option = (value: Group, text: string, tip: string) => ({ value, text, tip });
  const name = words.findings.verdict;
  return (
    <Choice<Group>
      label={words.findings.filter}
      value={group.value}
      options={[
        option('all', words.findings.all, words.findings.counts(over, close, within)),
        option('over', `${over} ${name.over}`, `${over} ${name.over}`),
        option('close', `${close} ${name.close}`, `${close} ${name.close}`),
        option('within', `${within} ${name.within}`, `${within} ${name.within}`),
      ]}
      onChoose={(value) => {
        group.value = value;
      }}
    />
  );
}

/** What the check is doing, and what became of it. */
function JobLine() {
  const job = checkJob.value;
  if (job.kind === 'working') {
    if (!isCheckSlow.value) return null;
    return <Progress text={words.findings.working} done={job.done} total={job.total} onStop={stopCheck} />;
  }
  if (job.kind === 'failed') {
    return (
      <div class="notice failure" role="alert">
        <strong>{words.findings.failed}</strong>
        <p>{job.message}</p>
        <p>{words.findings.failedCure}</p>
        <Button onPress={() => void runCheck()}>{words.findings.again}</Button>
      </div>
    );
  }
  if (job.kind === 'stopped') {
    return (
      <div class="notice row" role="status">
        <span>{isCheckStale.value ? words.findings.stale : words.findings.stopped}</span>
        <Button onPress={() => void runCheck()}>{words.findings.again}</Button>
      </div>
    );
  }
  return null;
}

function Empty() {
  if (checkJob.value.kind !== 'idle') return null;
  return (
    <div class="findings-empty">
      <p>
        <strong>{words.findings.none}</strong>
      </p>
      <p class="soft">{words.findings.noneLine}</p>
    </div>
  );
}

/** How many of the rooms that are shown are not over: those that no limit applies to are not counted. */
function ShareLine({ of }: { of: readonly RoomFindings[] }) {
  const judged = of.filter((room) => room.worst.verdict !== null);
  if (judged.length === 0) return null;
  const good = judged.filter((room) => room.worst.verdict !== 'over').length;
  return <p class="share-line soft">{words.findings.share(good, judged.length, percent(good / judged.length))}</p>;
}

function RoomList({ result, scheme }: { result: CheckResult; scheme: Scheme }) {
  const known = traits.value;
  const some = narrowed(rooms.value, known, filter.value);
  const shown = inGroup(some, group.value);
  return (
    <div class="findings-scroller">
      <FilterBar
        traits={known}
        filter={filter.value}
        onFilter={(next) => {
          filter.value = next;
        }}
      />
      <ShareLine of={some} />
      {result.findings.length === 0 ? <p class="empty-line soft">{words.findings.noRooms}</p> : null}
      {result.findings.length > 0 && shown.length === 0 ? (
        <p class="empty-line soft">{words.findings.noneLeft}</p>
      ) : null}
      <ol>
        {shown.map((room) => (
          <RoomItem key={room.room} of={room} result={result} scheme={scheme} />
        ))}
      </ol>
      <SetLine result={result} />
    </div>
  );
}

/** Which limits were used, and that examples are examples. */
function SetLine({ result }: { result: CheckResult }) {
  const set = result.limitSet;
  return (
    <p class="set-line soft">
      {set === null ? words.findings.noSet : `${set.name}. ${set.example ? words.findings.exampleSet : ''}`}
    </p>
  );
}

function RoomItem({ of, result, scheme }: { of: RoomFindings; result: CheckResult; scheme: Scheme }) {
  const isOpen = open.value === of.room;
  const { worst } = of;
  const isChosen = leadOf('room') === of.room;
  const head = useRef<HTMLButtonElement>(null);
  useLayoutEffect(() => {
    // A change moves the room down the list; its reader goes with it.
    if (isOpen) head.current?.scrollIntoView({ block: 'nearest' });
  }, [worst.value]);
  const press = (): void => {
    open.value = isOpen ? null : of.room;
    if (!isOpen) select('room', of.room);
  };
  return (
    <li class={['room', worst.verdict ?? 'none', isOpen ? 'open' : '', isChosen ? 'chosen' : ''].join(' ')}>
      <button ref={head} type="button" class="room-head" aria-expanded={isOpen} onClick={press}>
        <Disc verdict={worst.verdict} />
        <span class="room-name" title={`${of.room} ${of.name}`}>
          <span class="room-id">{of.room}</span> {of.name}
        </span>
        <Value finding={worst} />
        <Bar finding={worst} />
      </button>
      {isOpen ? <RoomDetail of={of} result={result} scheme={scheme} /> : null}
    </li>
  );
}

function Value({ finding }: { finding: Finding }) {
  const { verdict, margin } = finding;
  const decimals = decimalsFor(finding.limitValue ?? finding.value);
  return (
    <>
      <span class="value number">
        {fixed(finding.value, decimals)} <span class="unit">{finding.unit}</span>
      </span>
      <span class="margin number">
        {margin === null ? '' : signed(margin, decimals)}
        <span class="unseen">{verdict === null ? words.findings.noVerdict : words.findings.verdict[verdict]}</span>
      </span>
    </>
  );
}

function Bar({ finding }: { finding: Finding }) {
  const { value, limitValue } = finding;
  if (limitValue === null || limitValue <= 0) return null;
  const wide = Math.min(1, (value / limitValue) * limitAt.value);
  return (
    <svg class="bar" width="100%" height="8" aria-hidden="true">
      <rect class="track" y="2" width="100%" height="4" />
      <rect class="fill" y="2" width={`${wide * 100}%`} height="4" />
      <rect class="mark" x={`${limitAt.value * 100}%`} width="1.5" height="8" />
    </svg>
  );
}
