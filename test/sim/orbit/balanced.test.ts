import fc from 'fast-check';
import { expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { eccentricFromMean, trueFromEccentric } from '../../../sim/orbit/anomaly.ts';
import {
  balancedFromEccentric,
  balancedFromMean,
  balancedFromTrue,
  balancedParameter,
  distanceRatioFromBalanced,
  eccentricFromBalanced,
  meanFromBalanced,
  trueFromBalanced,
} from '../../../sim/orbit/balanced.ts';
import { distanceFromEccentric } from '../../../sim/orbit/distance.ts';
import { hardCases } from '../../published/kepler.ts';
import { relativeError } from '../relative.ts';
import { angle, eccentricity, halfTurn } from './arbitrary.ts';

const conversions = {
  balancedFromEccentric,
  balancedFromMean,
  balancedFromTrue,
  eccentricFromBalanced,
  meanFromBalanced,
  trueFromBalanced,
};

test('hard cases, 17 digits', () => {
  for (const { eccentricity: e, mean, eccentric, balanced, trueAnomaly, distanceRatio } of hardCases) {
    // A few units of 2⁻⁵³ for each step; M is up to three times as sensitive as E (relative).
    expect(relativeError(balancedFromMean(mean, e), balanced)).toBeLessThan(1e-15);
    expect(relativeError(balancedFromEccentric(eccentric, e), balanced)).toBeLessThan(1e-15);
    expect(relativeError(trueFromBalanced(balanced, e), trueAnomaly)).toBeLessThan(1e-15);
    expect(relativeError(distanceRatioFromBalanced(balancedFromMean(mean, e), e), distanceRatio)).toBeLessThan(3e-15);
    // Backwards an ulp of s is more than one of E where s runs faster: dE/ds ≤ ((1+e)/(1−e))^¼ = 38 at e = 0.999999.
    const stretch = ((1 + e) / (1 - e)) ** 0.25;
    expect(Math.abs(eccentricFromBalanced(balanced, e) - eccentric)).toBeLessThan(
      1e-15 * (eccentric + balanced * stretch),
    );
  }
});

// b from its definition in 60-digit arithmetic (mpmath), of the doubles as written.
test('balancedParameter keeps its digits at both ends', () => {
  const reference = [
    [1e-12, 2.5e-13],
    [1e-4, 2.5000000078125e-5],
    [0.1, 0.02507857734916605],
    [0.5, 0.1364697376616072],
    [0.95, 0.42840801849796134],
    [0.9999, 0.8448640999380729],
    [0.999999, 0.9481946163510041],
  ] as const;
  for (const [e, b] of reference) expect(relativeError(balancedParameter(e), b)).toBeLessThan(4e-16); // two ulps
  expect(balancedParameter(0)).toBe(0);
});

test('the stated relation to the eccentric anomaly: E = s − 2 atan2(b sin s, 1 + b cos s)', () => {
  fc.assert(
    fc.property(fc.double({ min: -3.14, max: 3.14, noNaN: true }), eccentricity, (s, e) => {
      const b = balancedParameter(e);
      const eccentric = s - 2 * Math.atan2(b * Math.sin(s), 1 + b * Math.cos(s));
      // The formula subtracts angles of up to 2π, each good to an ulp; near s = π it also loses 1 + b cos s ≥ 1 − b.
      expect(Math.abs(eccentricFromBalanced(s, e) - eccentric)).toBeLessThan(2e-15 / (1 - b));
    }),
  );
});

test('halfway: from eccentric to balanced to true is the way from eccentric to true', () => {
  fc.assert(
    fc.property(halfTurn, eccentricity, (x, e) => {
      expect(relativeError(trueFromBalanced(balancedFromEccentric(x, e), e), trueFromEccentric(x, e))).toBeLessThan(
        2e-15,
      );
    }),
  );
});

test('distance: the rational form is the distance at the eccentric anomaly', () => {
  fc.assert(
    fc.property(halfTurn, eccentricity, (x, e) => {
      const s = balancedFromEccentric(x, e);
      // s as a double places the planet no better than an ulp of s, times d ln r/ds ≤ 2b/(1−b²) · 2.
      const b = balancedParameter(e);
      const tolerance = 3e-15 + (4e-16 * s * 4 * b) / (1 - b * b);
      expect(relativeError(distanceRatioFromBalanced(s, e), distanceFromEccentric(1, e, x))).toBeLessThan(tolerance);
    }),
  );
});

test('the rational form that solvers use: r/a = w D−/D+ and dM/ds = w (1 − b²) D−/D+²', () => {
  const e = 0.9;
  const b = balancedParameter(e);
  const w = Math.sqrt(1 - e * e);
  const steps = 400;
  let clock = 0; // periodic trapezoid of dM/ds: spectral, so 400 points give 1e-14 at ln(1/b) = 1.01
  for (let i = 0; i < steps; i++) {
    const s = (2 * Math.PI * i) / steps;
    const minus = 1 + b * b - 2 * b * Math.cos(s);
    const plus = 1 + b * b + 2 * b * Math.cos(s);
    expect(relativeError(distanceRatioFromBalanced(s, e), (w * minus) / plus)).toBeLessThan(1e-14);
    clock += ((w * (1 - b * b) * minus) / plus ** 2) * ((2 * Math.PI) / steps);
    const h = 1e-5; // central difference: error h² · third derivative / 6
    const slope = (meanFromBalanced(s + h, e) - meanFromBalanced(s - h, e)) / (2 * h);
    expect(Math.abs(slope - (w * (1 - b * b) * minus) / plus ** 2)).toBeLessThan(1e-8);
  }
  expect(relativeError(clock, 2 * Math.PI)).toBeLessThan(1e-13);
});

test('oddness to the last bit, whole turns carried', () => {
  for (const convert of Object.values(conversions)) {
    fc.assert(fc.property(angle, eccentricity, (x, e) => convert(-x, e) === -convert(x, e)));
    fc.assert(
      fc.property(
        halfTurn,
        fc.double({ min: 0, max: 0.95, noNaN: true }),
        fc.integer({ min: -500, max: 500 }),
        (x, e, k) => {
          const shifted = x + 2 * Math.PI * k;
          const stretch = Math.sqrt(1 + e) / (1 - e) ** 1.5; // the steepest of the maps
          const tolerance = 2.3e-16 * (Math.abs(shifted) + Math.abs(2 * Math.PI * k) + 7) * (1 + stretch);
          return Math.abs(convert(shifted, e) - (convert(x, e) + 2 * Math.PI * k)) <= tolerance;
        },
      ),
    );
  }
});

test('round trips to a few units of the last bit', () => {
  fc.assert(
    fc.property(halfTurn, eccentricity, (s, e) => {
      // E, ν and M of s and back: what is lost is an ulp of the middle value, times its slope.
      const stretch = ((1 + e) / (1 - e)) ** 0.25;
      expect(relativeError(balancedFromEccentric(eccentricFromBalanced(s, e), e), s)).toBeLessThan(2e-15);
      expect(Math.abs(balancedFromTrue(trueFromBalanced(s, e), e) - s)).toBeLessThan(2e-15 * (s + Math.PI * stretch));
      expect(relativeError(balancedFromMean(meanFromBalanced(s, e), e), s)).toBeLessThan(5e-15);
    }),
  );
});

test('M ≤ E ≤ s ≤ ν in the first half of the orbit', () => {
  fc.assert(
    fc.property(halfTurn, eccentricity, (mean, e) => {
      const eccentric = eccentricFromMean(mean, e);
      const balanced = balancedFromMean(mean, e);
      expect(balanced).toBeGreaterThanOrEqual(eccentric * (1 - 1e-15));
      expect(trueFromBalanced(balanced, e)).toBeGreaterThanOrEqual(balanced * (1 - 1e-15));
    }),
  );
});

test('an unbound orbit is refused, NaN passes through', () => {
  for (const convert of [...Object.values(conversions), distanceRatioFromBalanced]) {
    expect(() => convert(1, 1)).toThrow(SimError);
    expect(convert(Number.NaN, 0.5)).toBeNaN();
  }
  expect(() => balancedParameter(-0.1)).toThrow(SimError);
});
