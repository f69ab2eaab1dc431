import fc from 'fast-check';
import { expect, test } from 'vitest';
import { bandMeanFactorInto } from '../../../sim/instellation/bandMean.ts';
import { integrate } from './integrate.ts';
import { declination, factor } from './support.ts';

const equalArea = (bands: number) => Float64Array.from({ length: bands + 1 }, (_, i) => (2 * i - bands) / bands);

function bandMeans(edges: Float64Array, delta: number): Float64Array {
  const into = new Float64Array(edges.length - 1).fill(Number.NaN);
  bandMeanFactorInto(edges, Math.sin(delta), into);
  return into;
}

function bandSlopes(edges: Float64Array, delta: number): Float64Array {
  const [into, slope] = [bandMeans(edges, delta), new Float64Array(edges.length - 1).fill(Number.NaN)];
  bandMeanFactorInto(edges, Math.sin(delta), into, slope);
  return slope;
}

test('the mean of the daily means over each band, whatever crosses it', () => {
  fc.assert(
    fc.property(declination, fc.constantFrom(1, 2, 7, 18, 90), (delta, bands) => {
      const edges = equalArea(bands);
      const circle = Math.cos(delta);
      bandMeans(edges, delta).forEach((mean, band) => {
        const light = integrate((x) => factor(Math.asin(x), delta), edges[band]!, edges[band + 1]!, [-circle, circle]);
        expect(Math.abs(mean - (light * bands) / 2)).toBeLessThan(1e-13); // 2e-16 over the band's width, and the quadrature
      });
    }),
    { numRuns: 30 },
  );
});

test('the globe receives a quarter, to rounding, in bands of any number', () => {
  fc.assert(
    fc.property(declination, fc.integer({ min: 1, max: 720 }), (delta, bands) => {
      const means = bandMeans(equalArea(bands), delta);
      expect(means.reduce((sum, mean) => sum + mean, 0) / bands).toBeCloseTo(0.25, 14);
      expect(Math.min(...means)).toBeGreaterThanOrEqual(0);
      expect(Math.max(...means)).toBeLessThanOrEqual(1);
    }),
  );
});

test('the middle of a band differs by the square of its width', () => {
  const error = (bands: number) => {
    const middle = 0.25 + 1 / bands; // the band that begins at x = ¼
    const band = (1.25 * bands) / 2;
    return Math.abs(bandMeans(equalArea(bands), 0.4)[band]! - factor(Math.asin(middle), 0.4));
  };
  expect(Math.log2(error(16) / error(32))).toBeCloseTo(2, 1);
  expect(Math.log2(error(32) / error(64))).toBeCloseTo(2, 1);
});

test('night is 0 exactly; day is the mean of sin φ sin δ', () => {
  const edges = equalArea(90);
  const delta = 0.5;
  const means = bandMeans(edges, delta);
  means.forEach((mean, band) => {
    if (edges[band + 1]! < -Math.cos(delta)) expect(mean).toBe(0);
    const middle = (edges[band]! + edges[band + 1]!) / 2;
    if (edges[band]! > Math.cos(delta)) expect(mean).toBeCloseTo(middle * Math.sin(delta), 14);
  });
  expect(means.filter((mean) => mean === 0).length).toBe(5); // 1 − cos ½ is 5.5 bands
});

test('a star at the pole; mirror', () => {
  const means = bandMeans(Float64Array.of(-1, -0.5, 0, 0.5, 1), Math.PI / 2);
  expect([...means]).toEqual([0, 0, 0.25, 0.75]);
  fc.assert(
    fc.property(declination, (delta) => {
      const north = bandMeans(equalArea(12), delta);
      const south = bandMeans(equalArea(12), -delta).reverse();
      for (let band = 0; band < 12; band++) expect(north[band]).toBeCloseTo(south[band]!, 14);
    }),
  );
});

test('the slope is the derivative', () => {
  const edges = equalArea(9);
  const circles = [...edges].flatMap((x) => [Math.acos(Math.abs(x)), -Math.acos(Math.abs(x))]);
  fc.assert(
    fc.property(declination, declination, (one, other) => {
      const from = Math.min(one, other);
      const to = Math.max(one, other);
      const before = bandMeans(edges, from);
      const after = bandMeans(edges, to);
      for (let band = 0; band < before.length; band++) {
        const slope = (delta: number) => bandSlopes(edges, delta)[band]!;
        expect(Math.abs(after[band]! - before[band]! - integrate(slope, from, to, circles))).toBeLessThan(1e-13);
      }
    }),
    { numRuns: 20 },
  );
});
