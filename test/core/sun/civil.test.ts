import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  addDays,
  civilOf,
  clockChanges,
  dayBounds,
  daySamples,
  isDate,
  isZone,
  offset_min,
  resolveCivil,
} from '../../../core/sun/civil.ts';
import { positionCases } from './reference.ts';

const utc = (text: string): number => Date.parse(text);
const HOUR_ms = 3_600_000;

describe('wall time of the sixty reference instants', () => {
  test.each(positionCases())('$id $inputs.zone $inputs.local', ({ inputs: i, tags }) => {
    const at = utc(i.utc);
    const civil = civilOf(at, i.zone);
    expect(`${civil.date}T${civil.time}:${String(civil.seconds).padStart(2, '0')}`).toBe(i.local);
    expect(offset_min(at, i.zone)).toBe(i.utc_offset_min);
    const back = resolveCivil(i.local.slice(0, 10), i.local.slice(11), i.zone);
    // The second pass of a repeated wall time is the one thing that a wall time cannot say.
    const passes = tags.includes('clocks-back') && back.kind === 'repeated' ? [at, at - HOUR_ms] : [at];
    expect(passes).toContain(back.instant_ms);
  });
});

describe('clock changes', () => {
  // UK: Summer Time Order 2002, forward at 01:00 GMT on the last Sunday of March, back at 01:00 GMT on that of October.
  test('a wall time left out is moved on by the length of the gap, with a note', () => {
    const r = resolveCivil('2025-03-30', '01:30', 'Europe/London');
    expect(r.kind).toBe('skipped');
    expect(r.instant_ms).toBe(utc('2025-03-30T01:30:00Z'));
    expect(civilOf(r.instant_ms, 'Europe/London').time).toBe('02:30');
    expect(r.note).toBe(
      '01:30 on 30 March 2025 does not occur in Europe/London, where the clocks go forward over it; 30 March 2025, 02:30 (UTC+01:00) is used',
    );
  });

  test('a wall time that comes twice is the first of the two, with a note', () => {
    const r = resolveCivil('2025-10-26', '01:30', 'Europe/London');
    expect(r.kind).toBe('repeated');
    expect(r.instant_ms).toBe(utc('2025-10-26T00:30:00Z'));
    expect(r.note).toBe(
      '01:30 on 26 October 2025 occurs twice in Europe/London; the first is used: 26 October 2025, 01:30 (UTC+01:00)',
    );
  });

  test('the edges of gap and overlap', () => {
    expect(resolveCivil('2025-03-30', '00:59', 'Europe/London').kind).toBe('plain');
    expect(resolveCivil('2025-03-30', '01:00', 'Europe/London').kind).toBe('skipped');
    expect(resolveCivil('2025-03-30', '02:00', 'Europe/London')).toEqual({
      instant_ms: utc('2025-03-30T01:00:00Z'),
      kind: 'plain',
      note: null,
    });
    expect(resolveCivil('2025-10-26', '00:59', 'Europe/London').kind).toBe('plain');
    expect(resolveCivil('2025-10-26', '01:59', 'Europe/London').kind).toBe('repeated');
    expect(resolveCivil('2025-10-26', '02:00', 'Europe/London').kind).toBe('plain');
  });

  test('Lord Howe changes by half an hour (UTC+10:30 and +11:00)', () => {
    expect(resolveCivil('2025-10-05', '02:15', 'Australia/Lord_Howe').kind).toBe('skipped');
    const { start_ms, end_ms } = dayBounds('2025-10-05', 'Australia/Lord_Howe');
    expect((end_ms - start_ms) / HOUR_ms).toBe(23.5);
    expect(clockChanges(start_ms, end_ms, 'Australia/Lord_Howe')).toEqual([
      { instant_ms: utc('2025-10-04T15:30:00Z'), before_min: 630, after_min: 660 },
    ]);
  });

  test('midnight itself can be left out: São Paulo, 4 November 2018, starts at 01:00', () => {
    const { start_ms, end_ms } = dayBounds('2018-11-04', 'America/Sao_Paulo');
    expect(civilOf(start_ms, 'America/Sao_Paulo').time).toBe('01:00');
    expect((end_ms - start_ms) / HOUR_ms).toBe(23);
    expect(daySamples('2018-11-04', 'America/Sao_Paulo', 60).clock_min[0]).toBe(90);
  });

  test('Samoa had no 30 December 2011: the day has no length and no samples', () => {
    const { start_ms, end_ms } = dayBounds('2011-12-30', 'Pacific/Apia');
    expect(end_ms).toBe(start_ms);
    expect(daySamples('2011-12-30', 'Pacific/Apia', 60).instant_ms).toHaveLength(0);
    const noon = resolveCivil('2011-12-30', '12:00', 'Pacific/Apia');
    expect(noon.kind).toBe('skipped');
    expect(civilOf(noon.instant_ms, 'Pacific/Apia').text).toBe('31 December 2011, 12:00 (UTC+14:00)');
  });

  test('rules of their time: the United States moved its dates in 2007 (Energy Policy Act of 2005, section 110)', () => {
    const march20 = (year: number) => offset_min(Date.UTC(year, 2, 20, 12), 'America/New_York');
    expect(march20(2006)).toBe(-300);
    expect(march20(2007)).toBe(-240);
  });

  test('Moscow ended its changes: +03:00 in winter 2010, +04:00 in 2012, +03:00 since October 2014', () => {
    expect(offset_min(utc('2010-12-01T00:00:00Z'), 'Europe/Moscow')).toBe(180);
    expect(offset_min(utc('2012-12-01T00:00:00Z'), 'Europe/Moscow')).toBe(240);
    expect(offset_min(utc('2015-07-01T00:00:00Z'), 'Europe/Moscow')).toBe(180);
    expect(clockChanges(utc('2015-01-01T00:00:00Z'), utc('2016-01-01T00:00:00Z'), 'Europe/Moscow')).toEqual([]);
  });

  test('a year of London has its two changes, a year of Kathmandu none', () => {
    const year = [utc('2025-01-01T00:00:00Z'), utc('2026-01-01T00:00:00Z')] as const;
    expect(clockChanges(...year, 'Europe/London')).toEqual([
      { instant_ms: utc('2025-03-30T01:00:00Z'), before_min: 0, after_min: 60 },
      { instant_ms: utc('2025-10-26T01:00:00Z'), before_min: 60, after_min: 0 },
    ]);
    expect(clockChanges(...year, 'Asia/Kathmandu')).toEqual([]);
  });
});

describe('offsets of 30 and 45 minutes (time zone database)', () => {
  test.each([
    ['Asia/Kathmandu', '+05:45'],
    ['Asia/Kolkata', '+05:30'],
    ['Australia/Eucla', '+08:45'],
    ['Pacific/Chatham', '+12:45'],
    ['America/St_Johns', '-02:30'],
    ['Pacific/Marquesas', '-09:30'],
  ])('%s on 21 June 2025 at 15:00 is %s', (zone, offset) => {
    const { instant_ms } = resolveCivil('2025-06-21', '15:00', zone);
    expect(civilOf(instant_ms, zone)).toEqual({
      date: '2025-06-21',
      time: '15:00',
      seconds: 0,
      offset,
      text: `21 June 2025, 15:00 (UTC${offset})`,
    });
  });
});

describe('samples of a day', () => {
  test.each([
    ['2025-06-21', 24],
    ['2025-03-30', 23],
    ['2025-10-26', 25],
  ])('London, %s: %i hours, whole and evenly spaced', (date, hours) => {
    const { instant_ms, clock_min } = daySamples(date, 'Europe/London', 5);
    const { start_ms, end_ms } = dayBounds(date, 'Europe/London');
    expect(instant_ms).toHaveLength(hours * 12);
    expect(instant_ms[0]).toBe(start_ms + 150_000);
    expect(instant_ms.at(-1)).toBe(end_ms - 150_000);
    for (let i = 1; i < instant_ms.length; i++) expect(instant_ms[i]! - instant_ms[i - 1]!).toBe(300_000);
    expect(clock_min[0]).toBe(2.5);
    expect(clock_min.at(-1)).toBe(1437.5);
  });

  test('the clock jumps with the change: 00:57:30 is followed by 02:02:30, 01:57:30 by 01:02:30', () => {
    const forward = daySamples('2025-03-30', 'Europe/London', 5).clock_min;
    expect([...forward.slice(11, 13)]).toEqual([57.5, 122.5]);
    const back = daySamples('2025-10-26', 'Europe/London', 5).clock_min;
    expect([...back.slice(23, 25)]).toEqual([117.5, 62.5]);
  });

  test('a step that does not divide the day leaves a shorter last one, sampled at its middle', () => {
    const { instant_ms } = daySamples('2025-06-21', 'Etc/UTC', 1000);
    const start = utc('2025-06-21T00:00:00Z');
    expect([...instant_ms]).toEqual([start + 500 * 60_000, start + 1220 * 60_000]);
  });

  test('property: samples of following days join without gap or overlap, in every zone tried', () => {
    const zones = ['Europe/London', 'America/New_York', 'Australia/Lord_Howe', 'Asia/Kathmandu', 'Africa/Casablanca'];
    fc.assert(
      fc.property(fc.constantFrom(...zones), fc.integer({ min: 0, max: 60_000 }), (zone, n) => {
        const date = addDays('1940-01-01', n);
        const today = daySamples(date, zone, 30);
        const tomorrow = daySamples(addDays(date, 1), zone, 30);
        expect(tomorrow.instant_ms[0]! - today.instant_ms.at(-1)!).toBeGreaterThan(0);
        expect(tomorrow.instant_ms[0]! - today.instant_ms.at(-1)!).toBeLessThanOrEqual(1_800_000);
        for (const i of [0, today.instant_ms.length - 1]) {
          const c = civilOf(today.instant_ms[i]!, zone);
          expect(c.date).toBe(date);
          const clock = Number(c.time.slice(0, 2)) * 60 + Number(c.time.slice(3)) + c.seconds / 60;
          expect(today.clock_min[i]).toBeCloseTo(clock, 9);
        }
      }),
      { numRuns: 200 },
    );
  });
});

describe('what is refused', () => {
  test('zones are names of the database, never bare offsets', () => {
    for (const zone of ['Europe/London', 'Etc/GMT+7', 'America/Argentina/Buenos_Aires', 'UTC'])
      expect(isZone(zone)).toBe(true);
    for (const zone of ['', '+01:00', '-0800', 'Mars/Base', 'Europe/London ', '2025-01-01T00:00Z', 'Europe/'])
      expect(isZone(zone)).toBe(false);
  });

  test('dates and times are of the calendar', () => {
    expect(isDate('2024-02-29')).toBe(true);
    for (const date of ['2025-02-29', '2025-13-01', '2025-6-1', '', '21 June 2025', '2025-06-31'])
      expect(isDate(date)).toBe(false);
    expect(() => resolveCivil('2025-02-29', '12:00', 'Etc/UTC')).toThrow(RangeError);
    expect(() => resolveCivil('2025-02-28', '25:00', 'Etc/UTC')).toThrow(RangeError);
    expect(() => resolveCivil('2025-02-28', 'noon', 'Etc/UTC')).toThrow(RangeError);
    expect(() => daySamples('2025-02-28', 'Nowhere/Land', 5)).toThrow(RangeError);
    expect(() => daySamples('2025-02-28', 'Etc/UTC', 0)).toThrow(RangeError);
    expect(() => daySamples('2025-02-28', 'Etc/UTC', Number.NaN)).toThrow(RangeError);
  });
});
