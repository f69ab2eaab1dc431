/** Calendar dates for readers in UTC. Pure. */
import { formatInstantUtc } from '../../sim/quantity/instant.ts';
import { j2000Milliseconds, tdbMinusTt, utcFromTtRounded } from '../../sim/quantity/timeScale.ts';
import type { TdbSeconds } from '../../sim/si.ts';

/** UTC as `Date` counts it, to the nearest second. */
export function utcMillis(tdb: TdbSeconds): number {
  return utcFromTtRounded(tdb - tdbMinusTt(tdb)).utc * 1000 + j2000Milliseconds;
}

/** `2026-03-04 05:00 UTC`; to the minute, which is finer than any orbit outside the solar system is known. */
export function dateText(tdb: TdbSeconds): string {
  const [day, clock] = formatInstantUtc(tdb).split('T') as [string, string];
  return `${day} ${clock.slice(0, 5)} UTC`;
}
