import { computed, signal } from '@preact/signals';
import { resolveCivil } from '../../core/sun/civil.ts';
import { scheme } from './document.ts';

/** The moment as the site's clock and calendar say it: `YYYY-MM-DD` and `HH:MM`. */
export type Civil = { readonly date: string; readonly time: string };

export const civil = signal<Civil>({ date: '2025-06-21', time: '15:00' });

/** The instant that the clock means, with a note where it was put forward or back; null without a scheme. */
export const instant = computed(() => {
  const zone = scheme.value?.site.zone;
  if (zone === undefined) return null;
  return resolveCivil(civil.value.date, civil.value.time, zone);
});

export const minutesOf = (time: string): number => Number(time.slice(0, 2)) * 60 + Number(time.slice(3, 5));

/** @param minutes since midnight, brought into the day */
export function timeOf(minutes: number): string {
  const m = Math.min(1439, Math.max(0, Math.round(minutes)));
  return `${String(Math.floor(m / 60)).padStart(2, '0')}:${String(m % 60).padStart(2, '0')}`;
}

const DATE = /^\d{4}-\d\d-\d\d$/;
const TIME = /^(\d{1,2}):(\d\d)$/;

export function setDate(date: string): void {
  if (DATE.test(date) && !Number.isNaN(Date.parse(date))) civil.value = { ...civil.value, date };
}

/** @returns whether the text was a time of day */
export function setTime(text: string): boolean {
  const parts = TIME.exec(text.trim());
  if (parts === null || Number(parts[1]) > 23 || Number(parts[2]) > 59) return false;
  civil.value = { ...civil.value, time: timeOf(Number(parts[1]) * 60 + Number(parts[2])) };
  return true;
}

/** Moves the clock, on into the next day or back into the last. */
export function moveMinutes(by: number): void {
  const { date, time } = civil.value;
  const t = Date.parse(`${date}T${time}:00Z`) + by * 60_000;
  const text = new Date(t).toISOString();
  civil.value = { date: text.slice(0, 10), time: text.slice(11, 16) };
}

export const moveDays = (by: number): void => moveMinutes(by * 1440);
