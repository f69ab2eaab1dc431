import { execFileSync } from 'node:child_process';
import { describe, expect, test } from 'vitest';
import { sobolCoordinate, sobolDraws } from '../../../../sim/studies/spread/sobol.ts';
import { sobolDimensions } from '../../../../sim/studies/spread/sobolTable.ts';
import type { UniformDraws } from '../../../../sim/studies/spread/uniformDraws.ts';
import { sobolReference } from '../../../published/sobolPoints.ts';
import { requireTool, toolPath } from '../../../support/require.ts';

const allDimensions = Array.from({ length: sobolDimensions }, (_, dimension) => dimension);

// Bits: no tolerance.
test.each(sobolReference.points)('point $point of the plain sequence', ({ point, coordinates, sumOfAll128 }) => {
  const asWhole = (dimension: number) => sobolCoordinate(point, dimension) * 2 ** 32;
  expect(sobolReference.dimensions.map(asWhole)).toEqual(coordinates);
  expect(allDimensions.map(asWhole).reduce((sum, coordinate) => sum + coordinate, 0)).toBe(sumOfAll128);
});

describe.skipIf(!requireTool('scipy'))('live reference', () => {
  test('the first 256 points in 128 dimensions are those of scipy', () => {
    const script = `
from scipy.stats import qmc
points = qmc.Sobol(${sobolDimensions}, scramble=False).random_base2(8)
print(points.ravel().tolist())`;
    const printed = execFileSync(toolPath('scipy')!, ['-c', script], { maxBuffer: 2 ** 24 });
    const ours = Array.from({ length: 256 }, (_, point) => allDimensions.map((d) => sobolCoordinate(point, d)));
    expect(ours.flat()).toEqual(JSON.parse(printed.toString()));
  });
});

test.each([1, 2, 2 ** 40])('seed %d: 2^m scrambled draws stand once in each of 2^m equal intervals', (seed) => {
  const draws = sobolDraws(seed);
  for (const dimension of [0, 1, 5, 63, 127]) {
    for (const m of [0, 3, 8, 12]) {
      // Any block of 2^m that begins at a multiple of 2^m is such a net, not the first alone.
      for (const first of [0, 5 * 2 ** m]) {
        const column = new Float64Array(2 ** m);
        draws.fillInto(dimension, first, column);
        expect(new Set(column.map((u) => Math.floor(u * 2 ** m))).size).toBe(2 ** m);
      }
    }
  }
});

test('two dimensions: a scrambled sequence stays a (0, m, 2)-net', () => {
  const m = 10;
  const [x, y] = columns(sobolDraws(3), 2, 2 ** m);
  for (let cut = 0; cut <= m; cut++) {
    const boxes = x.map((u, j) => Math.floor(u * 2 ** cut) * 2 ** (m - cut) + Math.floor(y[j] * 2 ** (m - cut)));
    expect(new Set(boxes).size).toBe(2 ** m);
  }
});

test('a draw depends on its number, its dimension and the seed alone', () => {
  const draws = sobolDraws(7);
  for (const [dimension, first] of [
    [0, 0],
    [3, 12345],
    [127, 2 ** 24 - 9],
    [40, 2 ** 32 - 20],
    [200, 77],
  ]) {
    const column = new Float64Array(20);
    draws.fillInto(dimension, first, column);
    expect(column).toEqual(column.map((_, j) => sobolDraws(7).at(first + j, dimension)));
  }
  expect(new Set([draws.at(5, 3), draws.at(5, 4), draws.at(6, 3), sobolDraws(8).at(5, 3)]).size).toBe(4);
});

test('draws never reach 0 or 1', () => {
  const lowest = 2 ** -33;
  for (const dimension of [0, 1, 200]) {
    const column = new Float64Array(2 ** 12);
    sobolDraws(1).fillInto(dimension, 0, column);
    expect(Math.min(...column)).toBeGreaterThanOrEqual(lowest);
    expect(Math.max(...column)).toBeLessThanOrEqual(1 - lowest);
  }
});

/** Square root of the mean square error over seeds of the mean of Π exp(cᵢxᵢ), relative to Π (e^cᵢ − 1)/cᵢ. */
function integrationError(source: (seed: number) => UniformDraws, count: number): number {
  const rates = [1, 0.8, 0.6, 0.5, 0.4, 0.3];
  const truth = rates.reduce((product, c) => product * (Math.expm1(c) / c), 1);
  const squares = Array.from({ length: 16 }, (_, seed) => {
    const x = columns(source(seed), rates.length, count);
    let sum = 0;
    for (let j = 0; j < count; j++) sum += Math.exp(rates.reduce((total, c, d) => total + c * x[d][j], 0));
    return (sum / count / truth - 1) ** 2;
  });
  return Math.sqrt(squares.reduce((sum, square) => sum + square, 0) / squares.length);
}

function columns(draws: UniformDraws, dimensions: number, count: number): Float64Array[] {
  return Array.from({ length: dimensions }, (_, dimension) => {
    const column = new Float64Array(count);
    draws.fillInto(dimension, 0, column);
    return column;
  });
}

test('a smooth integral in six dimensions converges faster than n^-0.9', () => {
  const powers = [6, 7, 8, 9, 10, 11, 12, 13, 14];
  const logs = powers.map((m) => Math.log2(integrationError(sobolDraws, 2 ** m)));
  const middle = powers.reduce((sum, m) => sum + m, 0) / powers.length;
  const slope =
    logs.reduce((sum, log, i) => sum + (powers[i] - middle) * log, 0) /
    powers.reduce((sum, m) => sum + (m - middle) ** 2, 0);
  expect(slope).toBeLessThan(-0.9);
  // Theory for a smooth integrand: between −1 and −1.5, whatever the seed.
  expect(slope).toBeGreaterThan(-1.7);
});
