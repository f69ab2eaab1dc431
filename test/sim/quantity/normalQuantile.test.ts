import fc from 'fast-check';
import { expect, test } from 'vitest';
import { normalQuantile } from '../../../sim/quantity/index.ts';

// scipy 1.17.1, scipy.stats.norm.ppf (another algorithm: Cephes ndtri). Both claim about 1e-15; 4e-15 is their sum and a rounding.
test.each([
  [1e-300, -37.0470962993612],
  [1e-20, -9.262340089798409],
  [1e-10, -6.361340902404056],
  [0.001, -3.090232306167813],
  [0.025, -1.9599639845400545],
  [0.16, -0.994457883209753],
  [0.3, -0.5244005127080409],
  [0.75, 0.6744897501960817],
  [0.9, 1.2815515655446004],
  [0.975, 1.959963984540054],
  [0.9987, 3.011453758499792],
])('normalQuantile(%f)', (probability, expected) => {
  expect(Math.abs(normalQuantile(probability) / expected - 1)).toBeLessThan(4e-15);
});

test('normalQuantile: ends and outside', () => {
  expect(normalQuantile(0.5)).toBe(0);
  expect(normalQuantile(0)).toBe(Number.NEGATIVE_INFINITY);
  expect(normalQuantile(1)).toBe(Number.POSITIVE_INFINITY);
  expect(normalQuantile(1.1)).toBeNaN();
  expect(normalQuantile(-0.1)).toBeNaN();
});

test('normalQuantile: rises, also across the seams of its three ranges', () => {
  const probability = fc.double({ min: 1e-300, max: 1 - 1e-12, noNaN: true });
  const seams = [0.075, 0.925, Math.exp(-25)].map((seam) => [seam * (1 - 1e-9), seam * (1 + 1e-9)] as const);
  for (const [below, above] of seams) expect(normalQuantile(above)).toBeGreaterThan(normalQuantile(below));
  fc.assert(
    fc.property(probability, probability, (a, b) => normalQuantile(Math.min(a, b)) <= normalQuantile(Math.max(a, b))),
    { seed: 1 },
  );
});
