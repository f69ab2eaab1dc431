import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { highestPeak, peakTimes, type Rows, timeSince } from '../../../viewer/figures/rowPeaks.ts';

/** Rows at uneven times: equal steps of s, time = s − 0.4 sin s, as on an eccentric orbit. */
function rows(count: number, value: (time: number) => number): Rows {
  const time = Float64Array.from({ length: count }, (_, row) => {
    const s = (2 * Math.PI * row) / count;
    return s - 0.4 * Math.sin(s);
  });
  return { time, period: 2 * Math.PI, at: (row) => value(time[row]!) };
}

const apart = (a: number, b: number): number => Math.abs(((a - b + 3 * Math.PI) % (2 * Math.PI)) - Math.PI);

describe('maxima of rows', () => {
  test('the parabola finds a peak between rows, across the turn of the orbit too; its error falls with the square of the step', () => {
    const miss = (count: number, peak: number): number =>
      apart(peakTimes(rows(count, (t) => Math.cos(t - peak)))[0]!, peak);
    for (const peak of [0.001, 1.7, 3.14, 6.27]) {
      expect(miss(180, peak)).toBeLessThan(1e-3);
    }
    const worst = (count: number): number =>
      Math.max(...Array.from({ length: 40 }, (_, k) => miss(count, (2 * Math.PI * (k + 0.3)) / 40)));
    expect(worst(90) / worst(180)).toBeGreaterThan(3); // second order: 4
  });

  test('every local maximum is found, and the greatest told from the others', () => {
    const twice = rows(240, (t) => Math.cos(2 * (t - 1)) + 0.2 * Math.cos(t - 1));
    expect(peakTimes(twice)).toHaveLength(2);
    expect(apart(highestPeak(twice)!, 1)).toBeLessThan(1e-3);
  });

  test('what does not vary has no maximum', () => {
    expect(peakTimes(rows(60, () => 3))).toEqual([]);
    expect(highestPeak(rows(60, () => 3))).toBeNull();
  });

  test('polar night, flat at zero, is none; a plateau counts once', () => {
    expect(peakTimes(rows(120, (t) => Math.max(0, Math.cos(t - 2))))).toHaveLength(1);
    expect(peakTimes(rows(120, (t) => Math.min(0.5, Math.cos(t - 2))))).toHaveLength(1);
  });
});

describe('timeSince', () => {
  test('counts from the nearest before, round the orbit', () => {
    expect(timeSince([10, 60], 70, 100)).toBeCloseTo(10, 9);
    expect(timeSince([10, 60], 5, 100)).toBeCloseTo(45, 9);
    expect(timeSince([], 5, 100)).toBeNull();
  });

  test('a moment that rounding puts before its own maximum is no whole orbit late', () => {
    expect(timeSince([50], 50 - 1e-9, 100)).toBe(0);
  });

  test('is within the orbit, whatever the times', () => {
    const time = fc.double({ min: 0, max: 99.999, noNaN: true });
    fc.assert(
      fc.property(fc.array(time, { minLength: 1 }), time, (times, moment) => {
        const since = timeSince(times, moment, 100)!;
        return since >= 0 && since <= 100;
      }),
    );
  });
});
