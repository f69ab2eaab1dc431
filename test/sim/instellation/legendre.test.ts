import fc from 'fast-check';
import { expect, test } from 'vitest';
import { legendre, legendreSeries, legendreSeriesBandsInto } from '../../../sim/instellation/legendre.ts';

const inside = fc.double({ min: -1, max: 1, noNaN: true });

// Abramowitz & Stegun (1964) table 22.9: coefficients of P₂ to P₆, from memory.
const polynomials: Record<number, (x: number) => number> = {
  0: () => 1,
  1: (x) => x,
  2: (x) => (3 * x ** 2 - 1) / 2,
  3: (x) => (5 * x ** 3 - 3 * x) / 2,
  4: (x) => (35 * x ** 4 - 30 * x ** 2 + 3) / 8,
  5: (x) => (63 * x ** 5 - 70 * x ** 3 + 15 * x) / 8,
  6: (x) => (231 * x ** 6 - 315 * x ** 4 + 105 * x ** 2 - 5) / 16,
};

test('written out', () => {
  fc.assert(
    fc.property(inside, (x) => {
      for (const [order, polynomial] of Object.entries(polynomials)) {
        // the sums of powers cancel to a thirtieth
        expect(Math.abs(legendre(Number(order), x) - polynomial(x))).toBeLessThan(1e-14);
      }
    }),
  );
});

test('1 at x = 1 and ± 1 at −1, within ± 1 between, at any order', () => {
  for (const order of [0, 1, 2, 9, 50, 400]) {
    expect(legendre(order, 1)).toBe(1);
    expect(legendre(order, -1)).toBe(order % 2 === 0 ? 1 : -1);
  }
  fc.assert(fc.property(inside, fc.nat({ max: 400 }), (x, order) => Math.abs(legendre(order, x)) <= 1 + 1e-13));
});

test('a series is the sum of its terms; none is 0', () => {
  fc.assert(
    fc.property(fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { maxLength: 12 }), inside, (coefficients, x) => {
      const sum = coefficients.reduce((total, coefficient, n) => total + coefficient * legendre(n, x), 0);
      expect(legendreSeries(coefficients, x)).toBeCloseTo(sum, 14);
    }),
  );
  expect(legendreSeries([], 0.3)).toBe(0);
  expect(legendreSeries([1, 0, -0.5], 0.5)).toBe(1 + 0.5 / 8);
});

test('means over bands: exact, and the globe keeps its mean', () => {
  const edges = Float64Array.of(-1, -0.3, 0.5, 1);
  const bands = new Float64Array(3);
  legendreSeriesBandsInto([0.7, 0.2, -0.48, 0, 0.1], edges, bands);
  // ∫P₂ = (x³ − x)/2, ∫P₄ = (7x⁵ − 10x³ + 3x)/8
  const southOf = (x: number) =>
    0.7 * x + 0.1 * x ** 2 - 0.24 * (x ** 3 - x) + (0.1 / 8) * (7 * x ** 5 - 10 * x ** 3 + 3 * x);
  bands.forEach((mean, i) => {
    expect(mean).toBeCloseTo((southOf(edges[i + 1]!) - southOf(edges[i]!)) / (edges[i + 1]! - edges[i]!), 14);
  });
  const globe = bands.reduce((sum, mean, i) => sum + (mean * (edges[i + 1]! - edges[i]!)) / 2, 0);
  expect(globe).toBeCloseTo(0.7, 15);
  legendreSeriesBandsInto([], edges, bands);
  expect([...bands]).toEqual([0, 0, 0]);
});
