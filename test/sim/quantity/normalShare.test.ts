import fc from 'fast-check';
import { expect, test } from 'vitest';
import { halfNormalQuantile, halfNormalShare, normalQuantile, normalShare } from '../../../sim/quantity/index.ts';
import { relativeError } from '../relative.ts';

// The first four by the continued fraction in 60 decimal digits (Python's decimal; scipy's ndtr loses 1e-13 at −37 by rounding x/√2),
// the rest scipy 1.10.1, scipy.special.ndtr. 1e-14 is what ours claims.
test.each([
  [-37, 5.725571222524577e-300],
  [-20, 2.7536241186062337e-89],
  [-8, 6.220960574271784e-16],
  [-3, 0.0013498980316300946],
  [-1.06, 0.1445722996639096],
  [-1.0600001, 0.14457227691694763],
  [-0.5, 0.3085375387259869],
  [-1e-9, 0.49999999960105773],
  [0, 0.5],
  [0.3, 0.6179114221889526],
  [1, 0.8413447460685429],
  [1.5, 0.9331927987311419],
  [2.5, 0.9937903346742238],
  [6, 0.9999999990134123],
])('normalShare(%f)', (x, expected) => {
  expect(relativeError(normalShare(x), expected)).toBeLessThan(1e-14);
});

// scipy 1.10.1, scipy.special.erf(x/√2); for the smallest x the closed limit √(2/π)·x says the same.
test.each([
  [0, 0],
  [1e-12, 7.978845608028652e-13],
  [0.001, 0.0007978844278221252],
  [0.5, 0.3829249225480261],
  [1.06, 0.7108554006721808],
  [1.2, 0.7698606595565834],
  [3, 0.9973002039367398],
])('halfNormalShare(%f)', (x, expected) => {
  expect(relativeError(halfNormalShare(x), expected)).toBeLessThan(1e-14);
});

// scipy 1.10.1, √2·erfinv(p); at 1e-12 the closed limit √(π/2)·p, which scipy meets to all digits.
test.each([
  [1e-12, 1.2533141373155004e-12],
  [0.001, 0.0012533144654325546],
  [0.3, 0.3853204664075676],
  [0.85, 1.439531470938456],
  [0.8500001, 1.4395318241570887],
  [0.99, 2.5758293035489004],
])('halfNormalQuantile(%f)', (share, expected) => {
  expect(relativeError(halfNormalQuantile(share), expected)).toBeLessThan(1e-14);
});

test('ends and outside', () => {
  expect(normalShare(Number.NEGATIVE_INFINITY)).toBe(0);
  expect(normalShare(Number.POSITIVE_INFINITY)).toBe(1);
  expect(halfNormalShare(Number.POSITIVE_INFINITY)).toBe(1);
  expect(halfNormalQuantile(1)).toBe(Number.POSITIVE_INFINITY);
  expect(halfNormalQuantile(-0.1)).toBeNaN();
  expect(halfNormalQuantile(1.1)).toBeNaN();
});

test('quantile and share undo one another, far into the tail', () => {
  // A share changes by x² times the relative change of x, and normalQuantile has the roundings of its Horner sums: 1e-15.
  fc.assert(
    fc.property(fc.double({ min: 1e-290, max: 0.5, noNaN: true }), (share) => {
      const x = normalQuantile(share);
      return relativeError(normalShare(x), share) < 1e-14 + 1e-15 * x * x;
    }),
    { seed: 1 },
  );
});
