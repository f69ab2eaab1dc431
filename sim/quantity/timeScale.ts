/**
 * UTC, TT and TDB, all as seconds since noon of 2000 January 1 on their own clock (UTC counts 86400 s for every day).
 *
 * From 1972 on: TT = UTC + 32.184 s + (TAI − UTC), the last from the table below. Its last line holds for every later
 * date: the list of July 2025 excludes a leap second before 28 June 2026, and the 27th CGPM (2022, Resolution 4) means to
 * keep UTC without a jump for at least a century from 2035 or earlier. A date in the future is wrong by the leap seconds
 * that may still come, a second or so. A prediction of the Earth's rotation would be worse: it jumps by 12 s at 2035.
 * Before 1972, "UTC" is Universal Time, and TT − UT is the polynomial of Espenak & Meeus (2006, NASA/TP-2006-214141) as
 * astronomy-engine has it. At the joint, 1972 January 1, the two differ by 0.07 s.
 */
import { DeltaT_EspenakMeeus } from 'astronomy-engine';
import { radiansPerDegree, secondsPerDay } from '../constants.ts';
import type { Seconds, TdbSeconds } from '../si.ts';

/** TT − TAI, s, exact. IAU 1991 Resolution A4. */
const ttMinusTai = 32.184;
/** J2000.0 on a UTC clock, as `Date` counts. */
export const j2000Milliseconds = Date.UTC(2000, 0, 1, 12);

/** Year, month and TAI − UTC (s) from 0 h of its first day. IERS, leap-seconds.list of July 2025. */
const leapTable: readonly (readonly [year: number, month: 1 | 7, taiMinusUtc: number])[] = [
  [1972, 1, 10],
  [1972, 7, 11],
  [1973, 1, 12],
  [1974, 1, 13],
  [1975, 1, 14],
  [1976, 1, 15],
  [1977, 1, 16],
  [1978, 1, 17],
  [1979, 1, 18],
  [1980, 1, 19],
  [1981, 7, 20],
  [1982, 7, 21],
  [1983, 7, 22],
  [1985, 7, 23],
  [1988, 1, 24],
  [1990, 1, 25],
  [1991, 1, 26],
  [1992, 7, 27],
  [1993, 7, 28],
  [1994, 7, 29],
  [1996, 1, 30],
  [1997, 7, 31],
  [1999, 1, 32],
  [2006, 1, 33],
  [2009, 1, 34],
  [2012, 7, 35],
  [2015, 7, 36],
  [2017, 1, 37],
];

/** Latest first: the present is asked for most. */
const leaps = leapTable
  .map(([year, month, taiMinusUtc]) => ({
    utc: (Date.UTC(year, month - 1, 1) - j2000Milliseconds) / 1000,
    taiMinusUtc,
  }))
  .reverse();

/** A UTC clock reading: during a leap second `utc` stands at the midnight to come and `isLeapSecond` is true. */
export interface UtcReading {
  readonly utc: Seconds;
  readonly isLeapSecond: boolean;
}

/** TT from UTC. Units: s → s. */
export function ttFromUtc(utc: Seconds): Seconds {
  const leap = leaps.find((entry) => utc >= entry.utc);
  return leap ? utc + ttMinusTai + leap.taiMinusUtc : utc + DeltaT_EspenakMeeus(utc / secondsPerDay);
}

/** True when the second before this midnight was a leap second, 23:59:60. */
export function endsLeapSecond(utc: Seconds): boolean {
  const index = leaps.findIndex((entry) => entry.utc === utc);
  return index >= 0 && index < leaps.length - 1; // the first line starts the table, it is no leap second
}

/** UTC to the nearest second from TT. */
export function utcFromTtRounded(tt: Seconds): UtcReading {
  const tai = Math.round(tt - ttMinusTai);
  for (const { utc, taiMinusUtc } of leaps) {
    if (tai >= utc + taiMinusUtc) return { utc: tai - taiMinusUtc, isLeapSecond: false };
    if (tai === utc + taiMinusUtc - 1 && endsLeapSecond(utc)) return { utc, isLeapSecond: true };
  }
  return { utc: Math.round(universalFromTt(tt)), isLeapSecond: false };
}

/** Universal Time before 1972. TT − UT changes by at most 1e-6 of the time gone by, so three rounds leave nothing. */
function universalFromTt(tt: Seconds): Seconds {
  let ut = tt;
  for (let round = 0; round < 3; round++) ut = tt - DeltaT_EspenakMeeus(ut / secondsPerDay);
  return ut;
}

/**
 * TDB − TT, at most 1.7 ms; two terms, right to some 0.03 ms.
 * Units:  TT (or TDB) seconds since J2000.0 → s.
 * Source: The Astronomical Almanac, section B (time scales), from memory.
 */
export function tdbMinusTt(tt: Seconds): Seconds {
  const meanAnomaly = (357.53 + (0.985_600_3 * tt) / secondsPerDay) * radiansPerDegree;
  return 0.001_658 * Math.sin(meanAnomaly) + 0.000_014 * Math.sin(2 * meanAnomaly);
}

/** TDB from TT. Units: s → s. */
export function tdbFromTt(tt: Seconds): TdbSeconds {
  return tt + tdbMinusTt(tt);
}
