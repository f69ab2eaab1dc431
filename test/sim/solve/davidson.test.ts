import { expect, test } from 'vitest';
import { banded, factorBanded, multiplyBanded, solveBanded } from '../../../sim/solve/banded.ts';
import { leftmostEigenvalue } from '../../../sim/solve/davidson.ts';

const size = 60;

/** Second difference, shifted: eigenvalues 2 − 2 cos(kπ/(n + 1)) + shift, vectors sin(ikπ/(n + 1)) (Strang 1999, SIAM Rev. 41, 135). */
function secondDifference(shift: number, skew = 0) {
  const matrix = banded(size, 1);
  const [lower, diagonal, upper] = matrix.diagonals;
  lower.fill(-1 - skew);
  diagonal.fill(2 + shift);
  upper.fill(-1 + skew);
  return matrix;
}

function leftmost(shift: number, nearness: number, skew = 0) {
  const matrix = secondDifference(shift, skew);
  // All but the inverse: of a matrix that is off on its diagonal.
  const near = secondDifference(shift + nearness, skew);
  expect(factorBanded(near)).toBe(true);
  const apply = (v: Float64Array) => {
    const out = new Float64Array(size);
    multiplyBanded(matrix, v, out);
    return out;
  };
  const precondition = (v: Float64Array) => {
    const out = v.slice();
    solveBanded(near, out);
    return out;
  };
  return leftmostEigenvalue(size, apply, precondition);
}

test('closed form of the second difference, with its vector', () => {
  const { value, vector, settled } = leftmost(0, 0.01);
  expect(settled).toBe(true);
  // a residual of 1e-6 of the value leaves its square, over the distance to the next one, in the value
  expect(Math.abs(value / (2 - 2 * Math.cos(Math.PI / (size + 1))) - 1)).toBeLessThan(1e-9);
  const sine = vector.map((_, i) => Math.sin(((i + 1) * Math.PI) / (size + 1)));
  const along = vector.reduce((sum, v, i) => sum + v * sine[i], 0) / Math.hypot(...sine);
  expect(Math.abs(along)).toBeCloseTo(1, 9);
});

test('a negative one, beyond a preconditioner that is positive', () => {
  const { value, settled } = leftmost(-0.02, 0.03);
  expect(settled).toBe(true);
  expect(Math.abs(value / (2 - 2 * Math.cos(Math.PI / (size + 1)) - 0.02) - 1)).toBeLessThan(1e-9);
});

test('a matrix that is not symmetric: 2 − 2√(1 − s²) cos θ', () => {
  const skew = 0.05;
  const { value, settled } = leftmost(0, 0.01, skew);
  expect(settled).toBe(true);
  const exact = 2 - 2 * Math.sqrt(1 - skew * skew) * Math.cos(Math.PI / (size + 1));
  expect(Math.abs(value / exact - 1)).toBeLessThan(1e-4); // first order in the residual, times the condition of the eigenvalue
});

test('a single unknown', () => {
  const one = leftmostEigenvalue(
    1,
    (v) => v.map((value) => 0.3 * value),
    (v) => v.slice(),
  );
  expect(one).toMatchObject({ settled: true, value: 0.3 });
});
