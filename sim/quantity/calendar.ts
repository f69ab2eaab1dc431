/** Calendar dates of the proleptic Gregorian calendar, as ISO 8601 has them, and seconds since noon of 2000 January 1. */
import { SimError } from '../error.ts';
import type { Seconds } from '../si.ts';
import { j2000Milliseconds, type UtcReading } from './timeScale.ts';

const isoPattern = /^(\d{4})-(\d\d)-(\d\d)(?:[T ](\d\d):(\d\d)(?::(\d\d)(\.\d+)?)?)? ?(Z|[+-]\d\d(?::?\d\d)?)?$/i;

export interface CalendarDate {
  /** The second that is written, on a clock without leap seconds; 23:59:60 stands as the midnight that follows. */
  readonly seconds: Seconds;
  /** Behind the whole second, 0 ≤ fraction < 1. */
  readonly fraction: Seconds;
  readonly isLeapSecond: boolean;
  readonly hasTime: boolean;
  readonly hasZone: boolean;
}

/** Reads an ISO 8601 date, with or without time and zone; null for text of another form. Errors: SimError for a day or time that does not exist. */
export function readCalendarDate(text: string): CalendarDate | null {
  const match = isoPattern.exec(text);
  if (!match) return null;
  const [, year, month, day, hour, minute, second = '0', fraction = '0', zone] = match;
  const midnight = new Date(0);
  midnight.setUTCFullYear(Number(year), Number(month) - 1, Number(day));
  if (midnight.getUTCMonth() !== Number(month) - 1 || midnight.getUTCDate() !== Number(day)) {
    throw new SimError(
      'date',
      `\`${text}\` names a day that does not exist`,
      'Write year-month-day, e.g. `2026-03-04`',
    );
  }
  const [hours, minutes, seconds] = [Number(hour ?? 0), Number(minute ?? 0), Number(second)];
  const offset = zoneMinutes(zone);
  if (hours > 23 || minutes > 59 || seconds > 60 || Math.abs(offset) >= 24 * 60) {
    throw new SimError('date', `\`${text}\` names a time that does not exist`, 'Write e.g. `2026-03-04T05:00Z`');
  }
  return {
    seconds: (midnight.getTime() - j2000Milliseconds) / 1000 + hours * 3600 + (minutes - offset) * 60 + seconds,
    fraction: Number(fraction),
    isLeapSecond: seconds === 60,
    hasTime: hour !== undefined,
    hasZone: zone !== undefined,
  };
}

function zoneMinutes(zone: string | undefined): number {
  if (zone === undefined || zone.toUpperCase() === 'Z') return 0;
  const digits = zone.slice(1).replace(':', '');
  const size = Number(digits.slice(0, 2)) * 60 + Number(digits.slice(2) || 0);
  return zone.startsWith('-') ? -size : size;
}

/** `2026-03-04T05:00:00Z`; years outside 0…9999 with sign and six digits. Errors: RangeError beyond some 270 000 years. */
export function isoText({ utc, isLeapSecond }: UtcReading): string {
  const shown = isLeapSecond ? utc - 1 : utc;
  const text = new Date(j2000Milliseconds + shown * 1000).toISOString().replace('.000Z', 'Z');
  return isLeapSecond ? text.replace(':59Z', ':60Z') : text;
}
