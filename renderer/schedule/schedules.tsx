import { computed } from '@preact/signals';
import { scheme } from '../state/document.ts';
import type { Kind } from '../state/selection.ts';
import { model, moment } from '../state/studies.ts';
import { words } from '../words/words.ts';
import { blockSchedule, roomSchedule, windowSchedule } from './building-columns.ts';
import { deviceSchedule, glassSchedule } from './stock-columns.ts';
import { ScheduleTable } from './schedule-table.tsx';
import './schedule.css';

/** All schedules of the scheme on the desk; null until its shapes are known. */
const schedules = computed(() => {
  const source = scheme.value;
  const shapes = model.value?.value;
  if (source === null || shapes === undefined) return null;
  const sunlit = new Map(moment.value?.value.windows.map((w) => [w.window, w.sunlit]));
  return {
    block: blockSchedule(source, shapes),
    room: roomSchedule(source, shapes),
    window: windowSchedule(source, shapes, sunlit),
    glass: glassSchedule(source),
    device: deviceSchedule(source),
  };
});

/** The schedule of one kind of thing. */
export function ScheduleOf({ kind }: { kind: Kind }) {
  const all = schedules.value;
  if (all === null) return null;
  const label = words.schedule.tabs[kind];
  // Each kind has rows of its own type, so each is a table of its own.
  if (kind === 'block') return <ScheduleTable key={kind} label={label} schedule={all.block} />;
  if (kind === 'room') return <ScheduleTable key={kind} label={label} schedule={all.room} />;
  if (kind === 'window') return <ScheduleTable key={kind} label={label} schedule={all.window} />;
  if (kind === 'glass') return <ScheduleTable key={kind} label={label} schedule={all.glass} />;
  return <ScheduleTable key={kind} label={label} schedule={all.device} />;
}

export const KINDS: readonly Kind[] = ['block', 'room', 'window', 'glass', 'device'];

export const countOf = (kind: Kind): number => {
  const source = scheme.value;
  if (source === null) return 0;
  const lists = {
    block: source.blocks,
    room: source.rooms,
    window: source.windows,
    glass: source.glass,
    device: source.devices,
  };
  return lists[kind].length;
};
