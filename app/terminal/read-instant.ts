import { InvalidArgumentError } from 'commander';
import { date } from './option-values.ts';
import { Refusal } from './refusal.ts';

const FORM = /^(\d{4}-\d\d-\d\d)[T ](\d\d):(\d\d)(?::(\d\d)(\.\d{1,9})?)?(Z|[+-]\d\d:?\d\d)?$/i;
const HOUR_ms = 3_600_000;
/** No civil clock has ever been further from UTC than 16 hours. */
const MOST_OFFSET_ms = 16 * HOUR_ms;

const bad = (text: string, why: string): Refusal =>
  new Refusal(`--at ${text}: ${why}; write it like 2025-06-21T12:00Z, or without the Z for the clock of the zone.`);

function offset_ms(text: string): number {
  if (/^z$/i.test(text)) return 0;
  const [hours, minutes] = [Number(text.slice(1, 3)), Number(text.slice(-2))];
  return (text.startsWith('-') ? -1 : 1) * (hours * HOUR_ms + minutes * 60_000);
}

/**
 * An instant as the user wrote it: with Z or an offset it stands by itself, without one it is a time of the zone's clock, and
 * one that a clock change skips or repeats is resolved by the house rule and noted.
 * @throws {Refusal} when it is no instant from 1900 to 2100
 */
export async function readInstant(text: string, zone: string, note: (text: string) => void): Promise<number> {
  const [, day, hours, minutes, seconds = '0', fraction = '', offset] = FORM.exec(text) ?? [];
  if (day === undefined || hours === undefined || minutes === undefined) throw bad(text, 'this is not an instant');
  try {
    date(day);
  } catch (error) {
    if (error instanceof InvalidArgumentError)
      throw bad(text, 'its date does not exist, or lies outside the years 1900 to 2100');
    throw error;
  }
  if (Number(hours) > 23 || Number(minutes) > 59 || Number(seconds) > 59)
    throw bad(text, 'there is no such time of day');
  const within_ms = Number(seconds) * 1000 + (fraction === '' ? 0 : Number(fraction) * 1000);
  if (offset !== undefined) {
    const ahead_ms = offset_ms(offset);
    if (Math.abs(ahead_ms) > MOST_OFFSET_ms || Number(offset.slice(-2)) > 59)
      throw bad(text, `no clock is ${offset} from UTC`);
    return Date.parse(`${day}T${hours}:${minutes}:00Z`) + within_ms - ahead_ms;
  }
  const { resolveCivil } = await import('../../core/sun/civil.ts');
  const civil = resolveCivil(day, `${hours}:${minutes}`, zone);
  if (civil.note !== null) note(`--at ${text}: ${civil.note}`);
  return civil.instant_ms + within_ms;
}
