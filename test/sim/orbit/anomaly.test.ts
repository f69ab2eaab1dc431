import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { radiansPerDegree } from '../../../sim/constants.ts';
import { SimError } from '../../../sim/error.ts';
import {
  eccentricFromMean,
  eccentricFromTrue,
  meanFromEccentric,
  meanFromTrue,
  trueFromEccentric,
  trueFromMean,
} from '../../../sim/orbit/anomaly.ts';
import { distanceFromEccentric } from '../../../sim/orbit/distance.ts';
import { hardCases, workedExamples } from '../../published/kepler.ts';
import { relativeError } from '../relative.ts';
import { angle, eccentricity, halfTurn } from './arbitrary.ts';

const conversions = {
  eccentricFromMean,
  meanFromEccentric,
  trueFromEccentric,
  eccentricFromTrue,
  trueFromMean,
  meanFromTrue,
};

describe("Kepler's equation against print", () => {
  for (const example of workedExamples) {
    test(`${example.source}: e ${example.eccentricity}, M ${example.meanDeg}°`, () => {
      const eccentric = eccentricFromMean(example.meanDeg * radiansPerDegree, example.eccentricity) / radiansPerDegree;
      // Half a unit of the last printed digit (Vallado: a whole one, for that book truncates).
      expect(Math.abs(eccentric - example.printedDeg)).toBeLessThanOrEqual(example.printedTo);
      // 15 digits are stored: half a unit of the last is at most 5e-15 relative; degrees cost another ulp or two.
      expect(relativeError(eccentric, example.eccentricDeg)).toBeLessThan(6e-15);
      const trueDeg = trueFromMean(example.meanDeg * radiansPerDegree, example.eccentricity) / radiansPerDegree;
      expect(relativeError(trueDeg, example.trueDeg)).toBeLessThan(6e-15);
    });
  }

  // Meeus (1998) ch. 30, example 30.a goes on to the true anomaly: ν = 6.139762° (seen), half a unit of its last digit.
  test('Meeus example 30.a: true anomaly', () => {
    expect(trueFromMean(5 * radiansPerDegree, 0.1) / radiansPerDegree).toBeCloseTo(6.139762, 6);
  });

  // Curtis (2014) example 3.1 prints θ = 193.2° (from memory): half a unit of its last digit.
  test('Curtis example 3.1: true anomaly', () => {
    expect(Math.abs(trueFromMean(3.6029, 0.37255) / radiansPerDegree - 193.2)).toBeLessThan(0.05);
  });
});

describe('hard cases, 17 digits', () => {
  for (const { eccentricity: e, mean, eccentric, trueAnomaly, distanceRatio } of hardCases) {
    test(`e ${e}, M ${mean}`, () => {
      // E: the equation is well conditioned relatively, so a few units of 2⁻⁵³. What follows from E adds a few of its own.
      expect(relativeError(eccentricFromMean(mean, e), eccentric)).toBeLessThan(5e-16);
      expect(relativeError(meanFromEccentric(eccentric, e), mean)).toBeLessThan(1e-15);
      expect(relativeError(trueFromMean(mean, e), trueAnomaly)).toBeLessThan(1e-15);
      expect(relativeError(distanceFromEccentric(1, e, eccentricFromMean(mean, e)), distanceRatio)).toBeLessThan(2e-15);
    });
  }

  test('at periapsis and apoapsis every anomaly is the same, at any eccentricity', () => {
    for (const e of [0, 0.1, 0.9, 0.9999, 1 - 2 ** -53]) {
      for (const convert of Object.values(conversions)) {
        expect(convert(0, e)).toBe(0);
        // π as a double is 1.2e-16 short of π; at apoapsis E moves √((1+e)/(1−e)) times as much as ν, so ν alone says less.
        const spread = convert === eccentricFromTrue || convert === meanFromTrue ? Math.sqrt((1 + e) / (1 - e)) * 2 : 1;
        expect(Math.abs(convert(Math.PI, e) - Math.PI)).toBeLessThan(4e-16 * (1 + spread));
      }
    }
  });

  test('true anomaly keeps its digits near π', () => {
    // π − ν = 2 atan((π − E)/2 · √((1−e)/(1+e))) for E near π; the reference below uses the small angle itself.
    const e = 0.9;
    for (const gap of [1e-3, 1e-6, 1e-9]) {
      const eccentric = Math.PI - gap;
      const short = 2 * Math.atan(Math.tan((Math.PI - eccentric) / 2) * Math.sqrt((1 - e) / (1 + e)));
      expect(Math.abs(Math.PI - trueFromEccentric(eccentric, e) - short)).toBeLessThan(5e-16); // one ulp of π
    }
  });
});

describe('properties', () => {
  test('oddness, to the last bit', () => {
    for (const convert of Object.values(conversions)) {
      fc.assert(fc.property(angle, eccentricity, (x, e) => convert(-x, e) === -convert(x, e)));
    }
  });

  test('x + 2πk gives y + 2πk', () => {
    const turns = fc.integer({ min: -1000, max: 1000 });
    for (const convert of Object.values(conversions)) {
      fc.assert(
        fc.property(halfTurn, fc.double({ min: 0, max: 0.95, noNaN: true }), turns, (x, e, k) => {
          const shifted = x + 2 * Math.PI * k;
          // The shifted argument is rounded by 2⁻⁵³ of itself, and any of the maps stretches by at most (1+e)^½/(1−e)^(3/2).
          const stretch = Math.sqrt(1 + e) / (1 - e) ** 1.5;
          const tolerance = 2.3e-16 * (Math.abs(shifted) + Math.abs(2 * Math.PI * k) + 7) * (1 + stretch);
          return Math.abs(convert(shifted, e) - (convert(x, e) + 2 * Math.PI * k)) <= tolerance;
        }),
      );
    }
  });

  test('round trips to a few units of the last bit', () => {
    fc.assert(
      fc.property(halfTurn, eccentricity, (x, e) => {
        // M is up to three times as sensitive to E as E to M (relative), hence the two bounds.
        expect(relativeError(eccentricFromMean(meanFromEccentric(x, e), e), x)).toBeLessThan(1e-15);
        expect(relativeError(meanFromEccentric(eccentricFromMean(x, e), e), x)).toBeLessThan(2e-15);
        // Near apoapsis ν holds less than E: an ulp of ν is √((1+e)/(1−e)) ulps of E there, dE/dν = r/(a√(1−e²)).
        const nu = trueFromEccentric(x, e);
        const slope = distanceFromEccentric(1, e, x) / Math.sqrt(1 - e * e);
        expect(Math.abs(eccentricFromTrue(nu, e) - x)).toBeLessThan(1e-15 * (x + nu * slope));
        expect(relativeError(trueFromEccentric(eccentricFromTrue(x, e), e), x)).toBeLessThan(2e-15);
      }),
    );
  });

  test('each is an increasing function, and mean ≤ eccentric ≤ true in the first half', () => {
    fc.assert(
      fc.property(halfTurn, halfTurn, eccentricity, (x, y, e) => {
        const [low, high] = x < y ? [x, y] : [y, x];
        for (const convert of Object.values(conversions)) {
          expect(convert(high, e)).toBeGreaterThanOrEqual(convert(low, e) * (1 - 2e-15));
        }
        expect(eccentricFromMean(x, e)).toBeGreaterThanOrEqual(x * (1 - 1e-15));
        expect(trueFromEccentric(x, e)).toBeGreaterThanOrEqual(x * (1 - 1e-15));
      }),
    );
  });

  test('a circle leaves anomalies as they are', () => {
    const same = (x: number, y: number) => Math.abs(y - x) <= 1e-15 * Math.abs(x) + 2 * Number.MIN_VALUE;
    fc.assert(fc.property(angle, (x) => Object.values(conversions).every((convert) => same(x, convert(x, 0)))));
  });
});

test('an unbound orbit is refused, NaN passes through', () => {
  for (const convert of Object.values(conversions)) {
    for (const e of [-0.1, 1, 1.5, Number.NaN]) expect(() => convert(1, e)).toThrow(SimError);
    expect(convert(Number.NaN, 0.5)).toBeNaN();
    expect(convert(Number.POSITIVE_INFINITY, 0.5)).toBeNaN();
  }
  expect(() => trueFromMean(1, 1.2)).toThrow('orbit.eccentricity: 1.2 is not a bound orbit. Use 0 ≤ eccentricity < 1.');
});
