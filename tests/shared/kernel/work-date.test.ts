import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  formatDay,
  formatInstant,
  isTimeZone,
  wallTime,
  workDate,
  workDateOf,
} from '#shared/kernel/work-date.ts';

describe('the day of an instant is the site’s own', () => {
  test.each([
    ['2026-12-01T13:29:59Z', 'Australia/Adelaide', '2026-12-01'],
    ['2026-12-01T13:30:00Z', 'Australia/Adelaide', '2026-12-02'],
    ['2026-12-01T12:59:59Z', 'Australia/Sydney', '2026-12-01'],
    ['2026-12-01T13:00:00Z', 'Australia/Sydney', '2026-12-02'],
    ['2026-12-01T15:59:59Z', 'Australia/Perth', '2026-12-01'],
    // Daylight saving ends at 3 in the morning of the first Sunday in April: the day has 25 hours (IANA tz rules, from memory).
    ['2026-04-05T13:59:59Z', 'Australia/Sydney', '2026-04-05'],
    ['2026-04-05T14:00:00Z', 'Australia/Sydney', '2026-04-06'],
    ['2026-12-31T23:30:00Z', 'Pacific/Auckland', '2027-01-01'],
  ])('%s in %s is %s', (at, zone, day) => {
    expect(workDateOf(new Date(at), zone)).toBe(day);
  });

  test('whatever the instant and the zone, it is a date that the wire takes', () => {
    const zones = [
      'Australia/Adelaide',
      'Australia/Lord_Howe',
      'Pacific/Kiritimati',
      'America/St_Johns',
      'UTC',
    ];
    fc.assert(
      fc.property(
        fc.date({ min: new Date('1970-01-02'), max: new Date('2100-01-01'), noInvalidDate: true }),
        fc.constantFrom(...zones),
        (at, zone) => {
          const day = workDateOf(at, zone);
          expect(workDate.safeParse(day).success).toBe(true);
          expect(Math.abs(Date.parse(`${day}T12:00:00Z`) - at.getTime())).toBeLessThan(27 * 3_600_000);
        },
      ),
    );
  });
});

test('a day and a time are shown as people on site say them, whatever the reader’s own zone', () => {
  expect(formatDay('2026-12-01')).toBe('Tue 1 Dec 2026');
  expect(formatInstant('2026-11-30T19:44:00Z', 'Australia/Adelaide')).toBe('Tue 1 Dec 2026, 06:14');
});

test.each(['2026-02-29', '2026-13-01', '1 Dec 2026', ''])('“%s” is not a date', (day) => {
  expect(workDate.safeParse(day).success).toBe(false);
});

test.each(['24:00', '6:45', '06:45:00', ''])('“%s” is not a time of day', (time) => {
  expect(wallTime.safeParse(time).success).toBe(false);
});

test('a zone that nobody knows is told from one that exists', () => {
  expect([isTimeZone('Australia/Adelaide'), isTimeZone('Australia/Nowhere'), isTimeZone('')]).toEqual([
    true,
    false,
    false,
  ]);
});
