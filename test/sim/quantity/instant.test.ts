import { DeltaT_EspenakMeeus } from 'astronomy-engine';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { type Distribution, formatInstantUtc, julianDateTdb, parseInstant } from '../../../sim/quantity/index.ts';
import { tdbMinusTt } from '../../../sim/quantity/timeScale.ts';
import { deltaT, julianDates, leapSeconds, sofaExample } from '../../published/timeScales.ts';

const seconds = (text: string) => parseInstant(text).tdbSeconds;
/** TDB − UTC at a UTC text that ends in Z, by reading the same clock face in both scales. */
const tdbMinusUtc = (utc: string) => seconds(utc) - seconds(`${utc.replace(/Z$/, '')} TDB`);

describe('published values', () => {
  test.each(julianDates.rows)('Meeus ch. 7: %s is JD %f', (calendar, julianDate) => {
    expect(julianDateTdb(seconds(`${calendar} TDB`))).toBeCloseTo(julianDate, 8); // below a double's 4e-10 d and the printed 0.01 d
    expect(seconds(`${julianDate} TDB`)).toBeCloseTo(seconds(`${calendar} TDB`), 4);
  });

  // IERS: TT − UTC = 32.184 s + (TAI − UTC). TDB − TT is at most 1.7 ms, hence 2 ms.
  test.each(leapSeconds.rows)('from %s on TAI − UTC is %i s', (day, taiMinusUtc) => {
    expect(Math.abs(tdbMinusUtc(`${day}T00:00:00Z`) - 32.184 - taiMinusUtc)).toBeLessThan(0.002);
    expect(Math.abs(tdbMinusUtc(`${day}T12:00:00Z`) - 32.184 - taiMinusUtc)).toBeLessThan(0.002);
  });

  test.each(leapSeconds.rows.slice(1))('the second before %s is a leap second', (day) => {
    const before = formatInstantUtc(seconds(`${day}T00:00:00Z`) - 1);
    expect(before).toMatch(/T23:59:60Z$/);
    expect(seconds(before) + 1).toBeCloseTo(seconds(day), 5);
    expect(seconds(before.replace(':60Z', ':59Z')) + 2).toBeCloseTo(seconds(day), 5);
  });

  test('TT − UTC is 69.184 s from 2017 on, for every later date', () => {
    for (const year of [2017, 2026, 2034, 2036, 2100]) {
      expect(Math.abs(tdbMinusUtc(`${year}-03-04T05:00Z`) - 69.184)).toBeLessThan(0.002);
    }
  });

  test('SOFA worked example: UTC → TT → TDB', () => {
    const { utc, tt, tdbMinusTt: published } = sofaExample;
    const onTtClock = seconds(`${tt} TDB`); // the same clock face, read without a change of scale
    // Two terms leave out the planets (0.022 ms and smaller) and the observer's place (0.002 ms): 0.05 ms in all.
    expect(Math.abs(seconds(utc) - onTtClock - published)).toBeLessThan(5e-5);
  });

  test('TDB − TT against the seven terms of Kaplan (2005) USNO Circular 179, eq. 2.6 (from memory)', () => {
    for (let tt = -1.5e9; tt < 2.5e9; tt += 1.234e6) {
      expect(Math.abs(tdbMinusTt(tt) - kaplan(tt / 86400 / 36525))).toBeLessThan(5e-5); // the terms that two leave out
    }
  });

  test.each(deltaT.rows)('Espenak & Meeus (2006): TT − UT at %s is %i s', (day, published, tolerance) => {
    expect(Math.abs(tdbMinusUtc(`${day}T00:00Z`) - published)).toBeLessThan(tolerance); // printed to 1 s (year 1000: 10 s), ± its own error
  });

  test('the joint at 1972: polynomial and table differ by less than 0.1 s', () => {
    const joint = (Date.UTC(1972, 0, 1) - Date.UTC(2000, 0, 1, 12)) / 86400_000;
    expect(Math.abs(DeltaT_EspenakMeeus(joint) - 42.184)).toBeLessThan(0.1);
  });
});

function kaplan(t: number): number {
  return (
    0.001657 * Math.sin(628.3076 * t + 6.2401) +
    0.000022 * Math.sin(575.3385 * t + 4.297) +
    0.000014 * Math.sin(1256.6152 * t + 6.1969) +
    0.000005 * Math.sin(606.9777 * t + 4.0212) +
    0.000005 * Math.sin(52.9691 * t + 0.4444) +
    0.000002 * Math.sin(21.3299 * t + 5.5431) +
    0.00001 * t * Math.sin(628.3076 * t + 4.249)
  );
}

describe('forms', () => {
  const five = seconds('2026-03-04T05:00Z');
  test.each([
    ['2026-03-04T05:00:00Z', five],
    ['2026-03-04 05:00Z', five],
    ['2026-03-04T05:00 UTC', five],
    ['2026-03-04t05:00z', five],
    ['2026-03-04T06:00+01:00', five],
    ['2026-03-04T06:00+01', five],
    ['2026-03-04T00:30−04:30', five],
    ['2026-03-03T20:00-0900', five],
    ['2026-03-04T05:00:12.25Z', five + 12.25],
    ['2026-03-04', five - 5 * 3600],
    ['2016-12-31T23:59:60.25Z', seconds('2017-01-01') - 0.75],
    ['2017-01-01T00:59:60+01:00', seconds('2017-01-01') - 1],
  ])('%s', (text, expected) => {
    expect(parseInstant(text)).toMatchObject({ text, scale: 'UTC', distribution: { form: 'exact' } });
    expect(seconds(text)).toBeCloseTo(expected, 5);
  });

  const sixteen = (2461103.71 - 2451545) * 86400;
  const split: Distribution = { form: 'splitNormal', up: 259.2, down: 172.8 };
  test.each([
    ['2461103.71 TDB', { form: 'exact' }],
    ['2461103.71 tdb', { form: 'exact' }],
    ['JD 2461103.71 TDB', { form: 'exact' }],
    ['BJD 2461103.71 TDB', { form: 'exact' }],
    ['BJD_TDB 2461103.71', { form: 'exact' }],
    ['BJD(TDB) 2461103.71', { form: 'exact' }],
    ['2461103.71 BJD_TDB', { form: 'exact' }],
    ['2461103.71 BJD(TDB)', { form: 'exact' }],
    ['2461103.71 BJD TDB', { form: 'exact' }],
    ['2461103.71 ± 0.002 d BJD_TDB', { form: 'normal', sigma: 172.8 }],
    ['2461103.71 ± 0.002 d TDB', { form: 'normal', sigma: 172.8 }],
    ['2461103.71 TDB ± 0.002 d', { form: 'normal', sigma: 172.8 }],
    ['BJD_TDB 2461103.71 +/- 172.8 s', { form: 'normal', sigma: 172.8 }],
    ['2461103.71 TDB +0.003 -0.002 d', split],
    ['2461103.71 +0.003 −0.002 d TDB', split],
    ['2461103.71 TDB +259.2 s -0.002 d', split],
  ] as [string, Distribution][])('%s', (text, distribution) => {
    const instant = parseInstant(text);
    expect(instant).toMatchObject({ text, scale: 'TDB', tdbSeconds: sixteen });
    const close = Object.entries(distribution).map(([key, entry]) => [
      key,
      typeof entry === 'number' ? expect.closeTo(entry, 9) : entry,
    ]);
    expect(instant.distribution).toEqual(Object.fromEntries(close));
  });

  test('a Julian date in UTC', () => {
    const instant = parseInstant('2461103.71 UTC');
    expect(instant.scale).toBe('UTC');
    expect(instant.tdbSeconds).toBeCloseTo(seconds('2026-03-04T05:02:24Z'), 3);
  });

  test('a date with a spread, and a range of dates', () => {
    expect(parseInstant('2026-03-04T05:00Z ± 10 min').distribution).toEqual({ form: 'normal', sigma: 600 });
    const low = seconds('2026-03-04T05:00Z');
    const high = seconds('2026-03-05T05:00Z');
    expect(parseInstant('2026-03-04T05:00Z to 2026-03-05T05:00Z')).toMatchObject({
      tdbSeconds: (low + high) / 2,
      distribution: { form: 'uniform', low, high },
    });
    expect(parseInstant('2461103.5 to 2461104.5 TDB')).toMatchObject({
      tdbSeconds: (2461104 - 2451545) * 86400,
      scale: 'TDB',
    });
  });
});

describe('round trips', () => {
  test('a UTC text to the second comes back, for the years 0 to 9999', () => {
    const date = fc.date({
      min: new Date('0000-01-02T00:00:00Z'),
      max: new Date('9999-12-30T00:00:00Z'),
      noInvalidDate: true,
    });
    fc.assert(
      fc.property(date, (day) => {
        const text = day.toISOString().replace(/\.\d+Z$/, 'Z');
        expect(formatInstantUtc(seconds(text))).toBe(text);
      }),
      { seed: 1, numRuns: 1000 },
    );
  });

  test('later on the UTC clock is later in TDB, also across leap seconds', () => {
    const around = leapSeconds.rows.slice(1).flatMap(([day]) => {
      const midnight = seconds(day);
      return [-2, -1, 0, 1].map((step) => midnight + step);
    });
    const texts = around.map(formatInstantUtc);
    expect([...texts].sort()).toEqual(texts);
    expect(new Set(texts).size).toBe(texts.length);
  });

  test('random text gives a finite instant or a SimError, nothing else', () => {
    const scraps = fc.constantFrom(
      '2461103.71',
      ' TDB',
      ' UTC',
      '2026-03-04',
      'T05:00',
      'Z',
      '+01:00',
      ' ± ',
      '0.002 d',
      ' to ',
      ' +1 -2 d',
      'JD ',
      'BJD_TDB ',
      '-',
      ' ',
      '9',
    );
    const text = fc.oneof(
      fc.string({ maxLength: 30 }),
      fc.array(scraps, { maxLength: 7 }).map((parts) => parts.join('')),
    );
    fc.assert(
      fc.property(text, (input) => {
        try {
          return Number.isFinite(seconds(input));
        } catch (error) {
          return error instanceof SimError;
        }
      }),
      { seed: 1, numRuns: 5000 },
    );
  });

  test('what is not finite is never printed', () => {
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY, 1e16])
      expect(() => formatInstantUtc(value)).toThrow(RangeError);
  });
});

describe('bad dates', () => {
  const form = 'Write e.g. `2026-03-04T05:00Z` or `2461103.71 TDB`';
  const noTime = 'Write e.g. `2026-03-04T05:00Z`';
  const twice = 'Write TDB or UTC once';
  const full = 'Write the full Julian date, e.g. `2461103.71 TDB`';
  const duration = 'the spread of a date is a duration';
  test.each([
    ['', '`` is not a date', form],
    ['4 March 2026', '`4 March 2026` is not a date', form],
    ['2026/03/04', '`2026/03/04` is not a date', form],
    ['2026-3-4', '`2026-3-4` is not a date', form],
    ['MJD 61103.21 UTC', '`MJD 61103.21` is a Julian date less 2400000.5', 'Add 2400000.5 and write `2461103.71 UTC`'],
    [
      '61103.2 MJD',
      '`61103.2 MJD` is a Julian date less 2400000.5',
      'Add 2400000.5 and write `2461103.7 TDB` or `2461103.7 UTC`',
    ],
    ['MJD_TDB 61103', '`MJD_TDB 61103` is a Julian date less 2400000.5', 'Add 2400000.5 and write `2461103.5 TDB`'],
    ['BTJD 4103.71', '`BTJD 4103.71` is a Julian date less 2457000', 'Add 2457000 and write `2461103.71 TDB`'],
    ['BKJD 6270.71', '`BKJD 6270.71` is a Julian date less 2454833', 'Add 2454833 and write `2461103.71 TDB`'],
    [
      'HJD 2461103.71 UTC',
      '`HJD 2461103.71` is heliocentric: light travel, up to 8.3 minutes, is taken out to the Sun; most are in UTC',
      'Convert it to BJD_TDB, or write `2461103.71 UTC`, which is within 4 s of it where the clock is right',
    ],
    [
      '2461103.71 HJD',
      '`2461103.71 HJD` is heliocentric: light travel, up to 8.3 minutes, is taken out to the Sun; most are in UTC',
      'Convert it to BJD_TDB, or write `2461103.71 TDB` or `2461103.71 UTC`, which is within 4 s of it where the clock is right',
    ],
    ['2461103.71 TT', 'the time scale TT is not used here', 'Write `2461103.71 TDB`, which differs by less than 2 ms'],
    [
      '2461103.71 BJD_TT',
      'the time scale TT is not used here',
      'Write `2461103.71 TDB`, which differs by less than 2 ms',
    ],
    [
      '2461103.71 BJD',
      '`2461103.71 BJD` has no time scale',
      'Write `2461103.71 TDB` or `2461103.71 UTC`; papers on planets mostly mean TDB',
    ],
    ['2026-03-04T05:00', '`2026-03-04T05:00` has no time zone', 'Add Z for UTC: `2026-03-04T05:00Z`'],
    ['2461103.71', '`2461103.71` has no time scale', 'Write `2461103.71 TDB` or `2461103.71 UTC`'],
    ['JD 2461103.71', '`JD 2461103.71` has no time scale', 'Write `2461103.71 TDB` or `2461103.71 UTC`'],
    ['2461103.71 TDB UTC', '`2461103.71 TDB UTC` names two time scales', twice],
    ['BJD_TDB 2461103.71 UTC', '`BJD_TDB 2461103.71 UTC` names two time scales', twice],
    ['2026-03-04T05:00Z TDB', '`2026-03-04T05:00Z TDB` names two time scales', 'Drop TDB, or the zone'],
    ['61103.21 TDB', '`61103.21` is outside the years 0000 to 9999', full],
    ['9999999 TDB', '`9999999` is outside the years 0000 to 9999', full],
    ['2026-02-29', '`2026-02-29` names a day that does not exist', 'Write year-month-day, e.g. `2026-03-04`'],
    ['2026-13-01', '`2026-13-01` names a day that does not exist', 'Write year-month-day, e.g. `2026-03-04`'],
    ['2026-03-04T24:00Z', '`2026-03-04T24:00Z` names a time that does not exist', noTime],
    ['2026-03-04T05:60Z', '`2026-03-04T05:60Z` names a time that does not exist', noTime],
    ['2026-03-04T05:00+24:00', '`2026-03-04T05:00+24:00` names a time that does not exist', noTime],
    ['2015-12-31T23:59:60Z', '`2015-12-31T23:59:60Z` is not a leap second', 'Write seconds below 60'],
    ['2016-12-31T23:59:60 TDB', '`2016-12-31T23:59:60` is not a leap second', 'Write seconds below 60'],
    ['1971-12-31T23:59:60Z', '`1971-12-31T23:59:60Z` is not a leap second', 'Write seconds below 60'],
    ['2461103.71 ± 0.002 TDB', 'the spread `± 0.002` of a date has no unit', 'Write e.g. `2461103.71 ± 0.002 d TDB`'],
    [
      '2461103.71 +0.003 -0.002 BJD_TDB',
      'the spread `+0.003 -0.002` of a date has no unit',
      'Write e.g. `2461103.71 +0.003 -0.002 d TDB`',
    ],
    ['2461103.71 TDB ± 2 km', `${duration}: \`2 km\` is a length, not a time`, 'Write e.g. `2 d`'],
    ['2461103.71 TDB ± 0 d', `${duration}: \`0 d\` is out of bounds`, 'Keep it above 0 d'],
    [
      '2461103.71 TDB ± 1 d ± 2 d',
      '`2461103.71 TDB ± 1 d ± 2 d` has more than one spread',
      'Write one, e.g. `± 0.002 d`',
    ],
    ['2026-03-05 to 2026-03-04', '`2026-03-05 to 2026-03-04` does not rise', 'Write the earlier date first'],
    [
      '2026-03-05 to 2026-03-06 to 2026-03-07',
      '`2026-03-05 to 2026-03-06 to 2026-03-07` has more than two ends',
      'Write one range',
    ],
    ['1'.repeat(201), 'the text is 201 characters long', form],
  ])('%s', (text, what, mend) => {
    let thrown: unknown;
    try {
      parseInstant(text);
    } catch (error) {
      thrown = error;
    }
    expect(thrown).toBeInstanceOf(SimError);
    expect(thrown).toMatchObject({ where: 'date', what, mend });
  });
});
