import { z } from 'zod';

/** A calendar day in a site's own time zone, `YYYY-MM-DD`. */
export const workDate = z.iso.date('Use a date like 2026-12-01.');
/** A wall-clock time at a site, `HH:MM`. */
export const wallTime = z.iso.time({ precision: -1, message: 'Use a time like 06:45.' });
const [firstInstant, lastInstant] = [0, Date.UTC(9999, 11, 31, 23, 59, 59, 999)];

/**
 * A moment, ISO 8601 with offset, as the wire carries it, from 1970 to 9999: no working clock is earlier, and the years before 100 come
 * back from the database as others, which would make a record look altered.
 */
export const instant = z.iso.datetime({ offset: true }).refine((at) => {
  const moment = Date.parse(at);
  return moment >= firstInstant && moment <= lastInstant;
}, 'This clock shows a year that can’t be kept. Set the clock of this device and try again.');

/** The calendar day of an instant in a time zone (IANA name). */
export function workDateOf(at: Date, timeZone: string): string {
  return new Intl.DateTimeFormat('en-CA', {
    timeZone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
  }).format(at);
}

/** "Tue 1 Dec 2026, 06:14" in the site's own time zone. */
export function formatInstant(at: string | Date, timeZone: string): string {
  return `${formatDay(workDateOf(new Date(at), timeZone))}, ${formatTime(at, timeZone)}`;
}

/** "06:14" in the site's own time zone. */
export function formatTime(at: string | Date, timeZone: string): string {
  return new Intl.DateTimeFormat('en-GB', {
    timeZone,
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
  }).format(new Date(at));
}

/** "Tue 1 Dec 2026" for a calendar day, which has no zone. */
export function formatDay(day: string): string {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone: 'UTC',
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    year: 'numeric',
  })
    .formatToParts(new Date(`${day}T00:00:00Z`))
    .filter(({ type }) => type !== 'literal');
  return parts.map(({ value }) => value).join(' ');
}

/** Whether the runtime knows an IANA time zone name. */
export function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name });
    return true;
  } catch {
    return false;
  }
}
