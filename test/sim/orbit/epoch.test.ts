import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { radiansPerDegree, secondsPerDay } from '../../../sim/constants.ts';
import { SimError } from '../../../sim/error.ts';
import { trueFromMean } from '../../../sim/orbit/anomaly.ts';
import {
  eclipseFromPeriapsis,
  periapsisFromMeanAnomaly,
  periapsisFromTransit,
  transitFromPeriapsis,
} from '../../../sim/orbit/epoch.ts';

const remainder = (x: number, period: number) => ((x % period) + period) % period;

/** Winn et al. (2009) ApJ 703, 2091: elements and times of HD 80606 b (seen). The orbit is so long that ω decides everything. */
describe('HD 80606 b', () => {
  const days = 111.4374;
  const clock = { period: days * secondsPerDay, eccentricity: 0.93286, argumentOfPeriapsis: 300.83 * radiansPerDegree };
  const transit = transitFromPeriapsis(0, clock) / secondsPerDay;
  const eclipse = eclipseFromPeriapsis(0, clock) / secondsPerDay;

  // Mid-times BJD 2454876.344 and 2454424.736, each to 0.5e-3 d or better, their difference ± 0.012 d as published.
  test('transit after eclipse, published times', () => {
    const published = remainder(2454876.344 - 2454424.736, days);
    expect(Math.abs(remainder(transit - eclipse, days) - published)).toBeLessThan(0.012);
  });

  // The published "about 3 hours before periapsis" (seen); 3.00632 h, 5.73177 d and 5.857035 d calculated from the same elements.
  test('eclipse before and transit after periapsis', () => {
    expect((days - eclipse) * 24).toBeCloseTo(3.00632, 4);
    expect(transit).toBeCloseTo(5.73177, 4);
    expect(remainder(transit - eclipse, days)).toBeCloseTo(5.857035, 5);
  });

  // Elements of two papers mixed (e = 0.933 with ω = 300.6°) give 5.926 d: e and ω must come from one fit.
  test('mixed elements miss by 0.07 d', () => {
    const mixed = { ...clock, eccentricity: 0.933, argumentOfPeriapsis: 300.6 * radiansPerDegree };
    const gap = (eclipseFromPeriapsis(0, mixed) - transitFromPeriapsis(0, mixed)) / secondsPerDay;
    expect(remainder(-gap, days)).toBeCloseTo(5.926, 2);
  });
});

/**
 * Eclipse behind transit in closed form for i = 90°: P/2 + (P/π){atan[e cos ω/√(1−e²)] + e cos ω √(1−e²)/(1 − e² sin²ω)}
 * (Sterne 1940; Winn 2010, arXiv:1001.2010; from memory). For P = 10, e = 0.1, ω = 30°: 5.5513268156 (calculated).
 */
test('eclipse behind transit, closed form', () => {
  const gapOf = (clock: { period: number; eccentricity: number; argumentOfPeriapsis: number }) =>
    remainder(eclipseFromPeriapsis(0, clock) - transitFromPeriapsis(0, clock), clock.period);
  expect(gapOf({ period: 10, eccentricity: 0.1, argumentOfPeriapsis: Math.PI / 6 })).toBeCloseTo(5.5513268156, 9);
  const e = fc.double({ min: 0, max: 0.98, noNaN: true });
  fc.assert(
    fc.property(e, fc.double({ min: 0, max: 6.28, noNaN: true }), (eccentricity, argumentOfPeriapsis) => {
      const along = eccentricity * Math.cos(argumentOfPeriapsis);
      const axisRatio = Math.sqrt(1 - eccentricity ** 2);
      const across = 1 - (eccentricity * Math.sin(argumentOfPeriapsis)) ** 2;
      const closed = 0.5 + (Math.atan(along / axisRatio) + (along * axisRatio) / across) / Math.PI;
      // compared on the circle: near 0 and 1 the two may fall on either side
      const apart = Math.abs(gapOf({ period: 1, eccentricity, argumentOfPeriapsis }) - closed);
      expect(Math.min(apart, Math.abs(1 - apart))).toBeLessThan(1e-12);
    }),
  );
});

test('at the transit the planet is where it should be: ν + ω = 90°', () => {
  const clock = { period: 77, eccentricity: 0.4, argumentOfPeriapsis: 2 };
  const mean = (2 * Math.PI * transitFromPeriapsis(0, clock)) / clock.period;
  expect(Math.cos(trueFromMean(mean, 0.4) + 2)).toBeCloseTo(0, 14);
});

test('periapsis and transit from one another; the nearest periapsis, the first transit', () => {
  const argument = fc.double({ min: -7, max: 7, noNaN: true });
  fc.assert(
    fc.property(fc.double({ min: 0, max: 0.99, noNaN: true }), argument, (eccentricity, argumentOfPeriapsis) => {
      const clock = { period: 1, eccentricity, argumentOfPeriapsis };
      const transit = transitFromPeriapsis(0, clock);
      expect(transit).toBeGreaterThanOrEqual(0);
      expect(transit).toBeLessThan(1);
      const periapsis = periapsisFromTransit(transit, clock);
      expect(Math.abs(periapsis - transit)).toBeLessThanOrEqual(0.5 + 1e-15);
      expect(Math.abs(periapsis - Math.round(periapsis))).toBeLessThan(1e-14);
    }),
  );
});

test('periapsis from an epoch and its mean anomaly', () => {
  expect(periapsisFromMeanAnomaly(100, Math.PI / 2, 8)).toBeCloseTo(98, 13);
  expect(periapsisFromMeanAnomaly(100, 1.5 * Math.PI, 8)).toBeCloseTo(102, 13);
  expect(periapsisFromMeanAnomaly(100, 0, 8)).toBe(100);
});

test('errors', () => {
  expect(() => transitFromPeriapsis(0, { period: 1, eccentricity: 1, argumentOfPeriapsis: 0 })).toThrow(SimError);
});
