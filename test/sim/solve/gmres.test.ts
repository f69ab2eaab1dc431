import { expect, test } from 'vitest';
import { gmres } from '../../../sim/solve/gmres.ts';

const matrix = [
  [4, 1, 0.2],
  [0.5, 3, 1],
  [0.1, 0.7, 5],
];
const apply = (v: Float64Array) => Float64Array.from(matrix, (row) => row.reduce((sum, a, j) => sum + a * v[j], 0));

test('solves a small system in as many vectors as it has rows', () => {
  const exact = Float64Array.of(1, -2, 3);
  const { x, residual, vectors } = gmres(apply, (v) => v.slice(), apply(exact), 10, 1e-14);
  expect(vectors).toBeLessThanOrEqual(3);
  expect(residual).toBeLessThan(1e-12);
  for (let i = 0; i < 3; i++) expect(x[i]).toBeCloseTo(exact[i], 12);
});

test('a good preconditioner needs one vector', () => {
  const exact = Float64Array.of(1, -2, 3);
  const diagonal = (v: Float64Array) => Float64Array.from(v, (value, i) => value / matrix[i][i]);
  const scaled = (v: Float64Array) => Float64Array.from(v, (value, i) => value * matrix[i][i]);
  expect(gmres(scaled, diagonal, scaled(exact), 10, 1e-12).vectors).toBe(1);
});

test('nothing asked, nothing done', () => {
  expect(gmres(apply, (v) => v, new Float64Array(3), 10, 1e-12)).toEqual({
    x: new Float64Array(3),
    residual: 0,
    vectors: 0,
  });
});
