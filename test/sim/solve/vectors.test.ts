import { expect, test } from 'vitest';
import { dot, largest, length } from '../../../sim/solve/vectors.ts';

test('sums and sizes', () => {
  expect(dot(Float64Array.of(1, 2, 3), Float64Array.of(4, -5, 6))).toBe(12);
  expect(length(Float64Array.of(3, -4))).toBe(5);
  expect(largest(Float64Array.of(2, -7, 5))).toBe(7);
  expect(largest(new Float64Array(0))).toBe(0);
  expect(largest(Float64Array.of(1, Number.NaN, 3))).toBeNaN();
});
