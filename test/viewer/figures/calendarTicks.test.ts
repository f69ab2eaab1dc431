import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { calendarTicks } from '../../../viewer/figures/calendarTicks.ts';

const day = 86_400_000;
const labels = (from: string, to: string, atMost: number): string[] =>
  calendarTicks(Date.parse(from), Date.parse(to), atMost).map(({ label }) => label);

describe('calendar ticks', () => {
  test('hours, days, months and years, the year said once', () => {
    expect(labels('2026-03-03T20:00Z', '2026-03-04T13:00Z', 7)).toEqual([
      '2026 Mar 3, 21:00',
      'Mar 4, 00:00',
      '03:00',
      '06:00',
      '09:00',
      '12:00',
    ]);
    expect(labels('2026-12-30T00:00Z', '2027-01-03T00:00Z', 7)).toEqual([
      '2026 Dec 30',
      'Dec 31',
      '2027 Jan 1',
      'Jan 2',
      'Jan 3',
    ]);
    expect(labels('2026-11-15T00:00Z', '2027-03-02T00:00Z', 7)).toEqual(['2026 Dec', '2027 Jan', 'Feb', 'Mar']);
    expect(labels('2026-06-01T00:00Z', '2139-01-01T00:00Z', 7)).toEqual(['2040', '2060', '2080', '2100', '2120']);
  });

  test('years before 100 and before Christ are years of their own', () => {
    const at = (year: number): number => new Date(0).setUTCFullYear(year, 0, 1);
    expect(calendarTicks(at(-20), at(60), 5).map(({ label }) => label)).toEqual(['−20', '0', '20', '40', '60']);
  });

  test('none for an empty span or one that leaves the calendar', () => {
    expect(calendarTicks(0, 0, 5)).toEqual([]);
    expect(calendarTicks(Number.NaN, 1, 5)).toEqual([]);
    expect(calendarTicks(0, 9e15, 5)).toEqual([]);
  });

  test('for any span: inside it, increasing, few, and at least one where there is room', () => {
    const from = fc.integer({ min: Date.UTC(1600, 0), max: Date.UTC(2600, 0) });
    const span = fc.double({ min: Math.log(0.01 * day), max: Math.log(3000 * 365 * day), noNaN: true }).map(Math.exp);
    fc.assert(
      fc.property(from, span, fc.integer({ min: 3, max: 9 }), (start, length, atMost) => {
        const ticks = calendarTicks(start, start + length, atMost).map(({ utcMillis }) => utcMillis);
        expect(ticks.length).toBeLessThanOrEqual(atMost + 1);
        expect(ticks.length).toBeGreaterThan(0);
        expect(ticks.every((t, i) => t >= start && t <= start + length && (i === 0 || t > ticks[i - 1]!))).toBe(true);
      }),
      { seed: 20260304 },
    );
  });
});
