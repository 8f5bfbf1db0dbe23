// The implementation and not the package's main entry: that one hands over to the host's own Temporal where there is one,
// and the hosts would no longer be sure to agree.
import { Temporal } from 'temporal-polyfill/implementation';

const MINUTE_ms = 60_000;
const DAY_min = 1440;
/** A name of the time zone database: letters first, so that a bare offset such as +01:00 is none. */
const ZONE_NAME = /^[A-Za-z][A-Za-z0-9_+-]*(\/[A-Za-z0-9_+-]+)*$/;
// Names are written out here and not asked of the host, whose language data differ from host to host.
const MONTHS = 'January February March April May June July August September October November December'.split(' ');

/** How wall times that a clock change leaves out or brings twice are read; sheets and reports print it. */
export const CLOCK_CHANGE_RULE =
  'A wall time that occurs twice is taken as the first of the two; one that a clock change leaves out is moved on by as much as the clocks are.';

/** Whether a text names a zone of the time zone database, such as Europe/London or Etc/GMT+7. A bare offset is none. */
export function isZone(zone: string): boolean {
  if (!ZONE_NAME.test(zone)) return false;
  try {
    new Temporal.ZonedDateTime(0n, zone);
    return true;
  } catch {
    return false;
  }
}

/** Whether a text is a date of the calendar, written YYYY-MM-DD. */
export function isDate(date: string): boolean {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(date)) return false;
  const [year, month, day] = date.split('-').map(Number) as [number, number, number];
  const d = new Date(Date.UTC(year, month - 1, day));
  return year >= 100 && d.getUTCMonth() === month - 1 && d.getUTCDate() === day;
}

/** The civil date some days on. @param date YYYY-MM-DD @param days any whole number @throws {RangeError} on no such date */
export const addDays = (date: string, days: number): string => plainDate(date).add({ days }).toString();

/**
 * First instant of a civil day and first of the next [UTC ms]: 23, 24 or 25 hours apart, or half hours between. A day that
 * starts with a clock change starts at 01:00; a day that a zone left out (it crossed the date line) has no length.
 * @throws {RangeError} on no such date or zone
 */
export function dayBounds(date: string, zone: string): { readonly start_ms: number; readonly end_ms: number } {
  const day = plainDate(date);
  const start_ms = day.toZonedDateTime(zone).epochMilliseconds;
  return { start_ms, end_ms: day.add({ days: 1 }).toZonedDateTime(zone).epochMilliseconds };
}

/** Clock time less UTC. @param instant_ms UTC @returns minutes, east positive @throws {RangeError} on no such zone */
export const offset_min = (instant_ms: number, zone: string): number =>
  zoned(instant_ms, zone).offsetNanoseconds / 60e9;

/** A change of the clocks: the first instant of the new offset, and by how much clocks differ from UTC before and after. */
export type ClockChange = { readonly instant_ms: number; readonly before_min: number; readonly after_min: number };

/** The changes of the clocks from one instant (exclusive) to another (exclusive), in order. @throws {RangeError} on no such zone */
export function clockChanges(from_ms: number, until_ms: number, zone: string): ClockChange[] {
  const changes: ClockChange[] = [];
  let at = zoned(from_ms, zone);
  for (;;) {
    const next = at.getTimeZoneTransition('next');
    if (next === null || next.epochMilliseconds >= until_ms) return changes;
    const instant_ms = next.epochMilliseconds;
    const before_min = offset_min(instant_ms - 1, zone);
    const after_min = next.offsetNanoseconds / 60e9;
    // Some zone data hold changes of the name alone.
    if (before_min !== after_min) changes.push({ instant_ms, before_min, after_min });
    at = next;
  }
}

/**
 * The middles of the steps of a whole civil day.
 * @param date     YYYY-MM-DD
 * @param zone     of the time zone database
 * @param step_min more than 0. Where the day is no whole number of steps, the last is the rest, sampled at its own middle
 * @returns UTC ms, and the minutes that the clock on the wall shows since midnight: they jump where the clocks do
 * @throws {RangeError} on no such date, zone or step
 */
export function daySamples(
  date: string,
  zone: string,
  step_min: number,
): { instant_ms: Float64Array; clock_min: Float64Array } {
  if (!(step_min > 0)) throw new RangeError(`a step must be more than 0 minutes, got ${step_min}`);
  const { start_ms, end_ms } = dayBounds(date, zone);
  const step_ms = step_min * MINUTE_ms;
  const count = Math.ceil((end_ms - start_ms) / step_ms);
  const instant_ms = new Float64Array(count);
  const clock_min = new Float64Array(count);
  const changes = count === 0 ? [] : clockChanges(start_ms, end_ms, zone);
  let offset = offset_min(start_ms, zone);
  let next = 0;
  for (let i = 0; i < count; i++) {
    const from = start_ms + i * step_ms;
    const t = (from + Math.min(from + step_ms, end_ms)) / 2;
    for (let c = changes[next]; c !== undefined && t >= c.instant_ms; c = changes[++next]) offset = c.after_min;
    instant_ms[i] = t;
    const clock = (t / MINUTE_ms + offset) % DAY_min;
    clock_min[i] = clock < 0 ? clock + DAY_min : clock;
  }
  return { instant_ms, clock_min };
}

/** A wall time made an instant. `note` says, in a sentence for the user, what was done where the wall time is not plain. */
export type CivilInstant = {
  readonly instant_ms: number;
  readonly kind: 'plain' | 'skipped' | 'repeated';
  readonly note: string | null;
};

/**
 * The instant of a wall time, by `CLOCK_CHANGE_RULE`.
 * @param date YYYY-MM-DD
 * @param time HH:MM (HH:MM:SS is read too)
 * @throws {RangeError} on no such date, time or zone
 */
export function resolveCivil(date: string, time: string, zone: string): CivilInstant {
  if (!isDate(date) || !/^\d{2}:\d{2}(:\d{2})?$/.test(time)) throw new RangeError(`no such wall time: ${date} ${time}`);
  const wall = Temporal.PlainDateTime.from(`${date}T${time}`, { overflow: 'reject' });
  const taken = wall.toZonedDateTime(zone, { disambiguation: 'compatible' });
  const instant_ms = taken.epochMilliseconds;
  const last = wall.toZonedDateTime(zone, { disambiguation: 'later' });
  const first = wall.toZonedDateTime(zone, { disambiguation: 'earlier' });
  if (first.epochMilliseconds === last.epochMilliseconds) return { instant_ms, kind: 'plain', note: null };
  const asked = `${time} on ${dateText(date)}`;
  const used = civilOf(instant_ms, zone).text;
  if (taken.toPlainDateTime().equals(wall))
    return { instant_ms, kind: 'repeated', note: `${asked} occurs twice in ${zone}; the first is used: ${used}` };
  const note = `${asked} does not occur in ${zone}, where the clocks go forward over it; ${used} is used`;
  return { instant_ms, kind: 'skipped', note };
}

/** An instant as the clock of a zone shows it. */
export type CivilTime = {
  /** YYYY-MM-DD */
  readonly date: string;
  /** HH:MM, cut and not rounded, as clocks do. */
  readonly time: string;
  /** Seconds of the minute, with their fraction, 0 to 60. */
  readonly seconds: number;
  /** +01:00; with seconds where a zone once counted them. */
  readonly offset: string;
  /** 21 June 2025, 15:00 (UTC+01:00) */
  readonly text: string;
};

/** The clock at an instant. @param instant_ms UTC, cut to the millisecond @throws {RangeError} on no such zone */
export function civilOf(instant_ms: number, zone: string): CivilTime {
  const at = zoned(instant_ms, zone);
  const date = at.toPlainDate().toString();
  const time = `${twoDigits(at.hour)}:${twoDigits(at.minute)}`;
  const { offset } = at;
  return {
    date,
    time,
    seconds: at.second + at.millisecond / 1000,
    offset,
    text: `${dateText(date)}, ${time} (UTC${offset})`,
  };
}

/** A civil date in words: 21 June 2025. @param date YYYY-MM-DD */
export function dateText(date: string): string {
  const [year, month, day] = date.split('-').map(Number) as [number, number, number];
  return `${day} ${MONTHS[month - 1]} ${year}`;
}

const twoDigits = (n: number): string => String(n).padStart(2, '0');

const plainDate = (date: string): Temporal.PlainDate => {
  if (!isDate(date)) throw new RangeError(`no such date: ${date}`);
  return Temporal.PlainDate.from(date);
};

const zoned = (instant_ms: number, zone: string): Temporal.ZonedDateTime =>
  new Temporal.ZonedDateTime(BigInt(Math.floor(instant_ms)) * 1_000_000n, zone);
