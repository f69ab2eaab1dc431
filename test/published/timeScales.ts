/** Time scales and calendars: what others have printed. */
import type { Provenance } from './provenance.ts';

/**
 * First UTC day (0 h) and TAI − UTC in seconds.
 * IERS leap-seconds.list, updated 2025-07-07, valid to 2026-06-28, as Debian's tzdata ships it; copied by a script.
 */
export const leapSeconds: { readonly provenance: Provenance; readonly rows: readonly (readonly [string, number])[] } = {
  provenance: 'seen',
  rows: [
    ['1972-01-01', 10],
    ['1972-07-01', 11],
    ['1973-01-01', 12],
    ['1974-01-01', 13],
    ['1975-01-01', 14],
    ['1976-01-01', 15],
    ['1977-01-01', 16],
    ['1978-01-01', 17],
    ['1979-01-01', 18],
    ['1980-01-01', 19],
    ['1981-07-01', 20],
    ['1982-07-01', 21],
    ['1983-07-01', 22],
    ['1985-07-01', 23],
    ['1988-01-01', 24],
    ['1990-01-01', 25],
    ['1991-01-01', 26],
    ['1992-07-01', 27],
    ['1993-07-01', 28],
    ['1994-07-01', 29],
    ['1996-01-01', 30],
    ['1997-07-01', 31],
    ['1999-01-01', 32],
    ['2006-01-01', 33],
    ['2009-01-01', 34],
    ['2012-07-01', 35],
    ['2015-07-01', 36],
    ['2017-01-01', 37],
  ],
};

/**
 * Julian dates of calendar days. Meeus (1998) Astronomical Algorithms 2nd ed., ch. 7: example 7.a and the table of that
 * chapter, Gregorian entries. The calendar text is the same day and fraction written as a clock time.
 */
export const julianDates: { readonly provenance: Provenance; readonly rows: readonly (readonly [string, number])[] } = {
  provenance: 'memory',
  rows: [
    ['1957-10-04T19:26:24', 2436116.31], // October 4.81
    ['2000-01-01T12:00', 2451545],
    ['1999-01-01', 2451179.5],
    ['1987-01-27', 2446822.5],
    ['1987-06-19T12:00', 2446966],
    ['1988-01-27', 2447187.5],
    ['1988-06-19T12:00', 2447332],
    ['1900-01-01', 2415020.5],
    ['1600-01-01', 2305447.5],
    ['1600-12-31', 2305812.5],
  ],
};

/**
 * One moment on several clocks: SOFA Time Scale and Calendar Tools (IAU SOFA Board), worked example for an observer:
 * UTC 2006 January 15 21:24:37.5, TT 21:25:42.684, TDB 21:25:42.684373.
 */
export const sofaExample = {
  provenance: 'memory' as Provenance,
  utc: '2006-01-15T21:24:37.5Z',
  tt: '2006-01-15T21:25:42.684',
  tdbMinusTt: 0.000373,
};

/** TT − UT before atomic time, s: Espenak & Meeus (2006) NASA/TP-2006-214141, table of ΔT with its printed rounding. */
export const deltaT: {
  readonly provenance: Provenance;
  readonly rows: readonly (readonly [string, number, number])[];
} = {
  provenance: 'memory',
  rows: [
    ['1000-01-01', 1570, 50],
    ['1700-01-01', 9, 2],
    ['1800-01-01', 14, 1],
    ['1900-01-01', -3, 1],
    ['1950-01-01', 29, 1],
  ],
};
