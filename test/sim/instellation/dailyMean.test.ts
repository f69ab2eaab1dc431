import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { radiansPerDegree } from '../../../sim/constants.ts';
import { legendre } from '../../../sim/instellation/legendre.ts';
import { solarLongitude, trueAnomalyAt } from '../../../sim/instellation/season.ts';
import { meanFromTrue, trueFromMean } from '../../../sim/orbit/anomaly.ts';
import {
  circular,
  equinoxDay,
  midMonths,
  monthDays,
  monthlyElements,
  monthlyMeans,
  polarEdges,
  seasonalElements,
  seasonalMeans,
} from '../../published/insolation.ts';
import { relativeError } from '../relative.ts';
import { integrate } from './integrate.ts';
import { dailyMean, declination, factor, factorSlope, latitude, periapsisLongitude } from './support.ts';

describe('monthly means of Bonfils et al. (1998)', () => {
  const { eccentricity } = monthlyElements;
  const periapsis = periapsisLongitude(monthlyElements);
  const meanAtEquinox = meanFromTrue(trueAnomalyAt(0, periapsis), eccentricity);

  /** Solar longitude in degrees on every day of the year; `shift` in days. */
  const longitudesDeg = (shift: number) =>
    Array.from({ length: 365 }, (_, i) => {
      const mean = meanAtEquinox + (2 * Math.PI * (i + 1 + shift - equinoxDay)) / 365;
      return solarLongitude(trueFromMean(mean, eccentricity), periapsis) / radiansPerDegree;
    });

  function worst(shift: number): number {
    const longitudes = longitudesDeg(shift);
    let largest = 0;
    for (const { latitudeDeg, months } of monthlyMeans) {
      let day = 0;
      monthDays.forEach((days, month) => {
        let sum = 0;
        for (const end = day + days; day < end; day++) sum += dailyMean(monthlyElements, latitudeDeg, longitudes[day]!);
        largest = Math.max(largest, Math.abs(sum / days - months[month]!));
      });
    }
    return largest;
  }

  // Half a unit of the last digit is 0.005; the last digits of the elements move a value by up to 0.006 (obliquity ± 0.0005° alone
  // by 0.004 at the poles). Measured: 0.008.
  test('all 228 values', () => {
    expect(monthlyMeans.flatMap(({ months }) => months)).toHaveLength(228);
    expect(worst(0)).toBeLessThan(0.011);
  });

  test('half a day off shows', () => {
    expect(worst(0.5)).toBeGreaterThan(2);
  });
});

describe('mid-month values of Berger & Loutre (1991)', () => {
  for (const row of midMonths) {
    test(`${row.latitudeDeg}° at Ls ${row.solarLongitudeDeg}°, e ${row.eccentricity}`, () => {
      expect(Math.abs(dailyMean(row, row.latitudeDeg, row.solarLongitudeDeg) - row.expected)).toBeLessThan(row.within);
    });
  }

  test('a perihelion 180° off shows', () => {
    const row = midMonths[0]!;
    const slipped = { ...row, perihelionDeg: row.perihelionDeg + 180 };
    expect(Math.abs(dailyMean(slipped, row.latitudeDeg, row.solarLongitudeDeg) - row.expected)).toBeGreaterThan(10);
  });
});

test('the Earth at equinoxes and solstices', () => {
  for (const [latitudeDeg, ...expected] of seasonalMeans) {
    for (let quarter = 0; quarter < 4; quarter++) {
      const actual = dailyMean(seasonalElements, latitudeDeg, 90 * quarter);
      expect(Math.abs(actual - expected[quarter]!)).toBeLessThan(5.1e-4); // half a unit of the last digit
    }
  }
});

describe('closed forms on a circle', () => {
  const circle = { irradiance: 1361, eccentricity: 0, obliquityDeg: 23.44, perihelionDeg: 0 };
  for (const { name, latitudeDeg, solarLongitudeDeg, expected } of circular) {
    test(name, () => {
      // ten digits are stored: half a unit of the last is 1.7e-10 of the smallest
      expect(relativeError(dailyMean(circle, latitudeDeg, solarLongitudeDeg), expected)).toBeLessThan(2e-10);
    });
  }
});

test('by the polar circles, against 40 digits', () => {
  for (const { latitude: phi, declination: delta, expected } of polarEdges) {
    // f falls as h₀³ and its rounding as h₀, the cube root of f; cos δ is taken from sin δ: 1e-16/cos δ by the poles
    const rounding = 5e-16 * Math.cbrt(expected) + (delta > 1.5 ? 1e-16 / Math.cos(delta) : 0);
    expect(Math.abs(factor(phi, delta) - expected)).toBeLessThan(rounding);
  }
});

test('polar day is sin φ sin δ and polar night 0, exactly', () => {
  fc.assert(
    fc.property(latitude, declination, (phi, delta) => {
      const beyond = Math.abs(phi) + Math.abs(delta) - Math.PI / 2;
      fc.pre(beyond > 1e-12 && delta !== 0);
      const height = Math.sin(phi) * Math.sin(delta);
      expect(factor(phi, delta)).toBe(Math.max(0, height));
      const slope = height > 0 ? Math.sin(phi) * Math.cos(delta) : 0;
      // cos δ is taken from sin δ: 1e-16/cos δ
      expect(Math.abs(factorSlope(phi, delta) - slope)).toBeLessThan(1e-15 + 1e-16 / Math.cos(delta));
    }),
  );
});

test('the corners: poles at the equinox, equator under a star at the pole', () => {
  const quarter = Math.PI / 2;
  expect(factor(quarter, 0)).toBeLessThan(1e-16);
  expect(factor(quarter, quarter)).toBe(1);
  expect(factor(-quarter, quarter)).toBe(0);
  expect(factor(0, quarter)).toBe(0);
  expect(factor(0, -quarter)).toBe(0);
  expect(factorSlope(quarter, 0)).toBe(0.5); // between night, 0, and day, 1
  expect(factorSlope(0, quarter)).toBeCloseTo(-1 / Math.PI, 15); // f is cos δ/π, and δ goes no further
});

test('between 0 and 1, and finite with its slope', () => {
  fc.assert(
    fc.property(latitude, declination, (phi, delta) => {
      const share = factor(phi, delta);
      expect(share).toBeGreaterThanOrEqual(0);
      expect(share).toBeLessThanOrEqual(1);
      expect(Math.abs(factorSlope(phi, delta))).toBeLessThanOrEqual(1);
    }),
  );
});

test('never below 0, up to the very edge of night', () => {
  for (let phi = 0.1; phi < 1.5; phi += 0.1) {
    for (let exponent = -17; exponent < -5; exponent += 0.5) {
      const share = factor(phi, phi - Math.PI / 2 + 10 ** exponent);
      expect(share).toBeGreaterThanOrEqual(0);
      expect(share).toBeLessThan((10 ** exponent + 1e-15) ** 1.5); // some roundings past the edge
    }
  }
});

test('mirror: south in December is north in June', () => {
  fc.assert(
    fc.property(latitude, declination, (phi, delta) => {
      expect(factor(-phi, -delta)).toBe(factor(phi, delta));
      expect(Math.abs(factorSlope(-phi, -delta) + factorSlope(phi, delta))).toBe(0);
    }),
  );
});

test('the globe receives a quarter at any declination', () => {
  fc.assert(
    fc.property(declination, (delta) => {
      const edge = Math.cos(delta);
      const globe = integrate((x) => factor(Math.asin(x), delta), -1, 1, [-edge, edge]) / 2;
      expect(Math.abs(globe - 0.25)).toBeLessThan(1e-14);
    }),
  );
});

/**
 * Addition theorem: f is ¼ Σ a_n P_n(sin φ) P_n(sin δ), with a_n the coefficients of 4 max(0, cos γ): 1, 2, 5/4, 0, −3/8, 0, 13/64 …
 * Coefficients a_n = −2(2n+1)P_n(0)/((n−1)(n+2)) but a₁ = 2 (e.g. Courant & Hilbert 1953, ch. VII, from memory).
 */
test('sum of zonal harmonics', () => {
  const coefficient = (n: number) => (n === 1 ? 2 : (-2 * (2 * n + 1) * legendre(n, 0)) / ((n - 1) * (n + 2)));
  expect([0, 1, 2, 3, 4, 5, 6].map(coefficient)).toEqual([1, 2, 5 / 4, 0, -3 / 8, -0, 13 / 64]);
  for (const [phi, delta] of [
    [0.3, 0.4],
    [1.1, -0.2],
    [-0.7, 1.2],
    [1.3, 0.5],
  ] as const) {
    let sum = 0;
    for (let n = 0; n <= 400; n++) {
      sum += (coefficient(n) * legendre(n, Math.sin(phi)) * legendre(n, Math.sin(delta))) / 4;
    }
    // terms fall as n^(−5/2) and change sign: 400 terms leave below 1e-6
    expect(Math.abs(factor(phi, delta) - sum)).toBeLessThan(1e-6);
  }
});

test('the slope is the derivative, across both polar circles', () => {
  // 1e-4 from ±90° the rounding of cos δ, 1e-16/cos δ, is 1e-12; the quadrature's error is below 1e-13
  const clear = fc.double({ min: -Math.PI / 2 + 1e-4, max: Math.PI / 2 - 1e-4, noNaN: true });
  fc.assert(
    fc.property(latitude, clear, clear, (phi, one, other) => {
      const from = Math.min(one, other);
      const to = Math.max(one, other);
      const circle = Math.PI / 2 - Math.abs(phi);
      const change = integrate((delta) => factorSlope(phi, delta), from, to, [-circle, circle]);
      expect(Math.abs(factor(phi, to) - factor(phi, from) - change)).toBeLessThan(2e-12);
    }),
  );
});
