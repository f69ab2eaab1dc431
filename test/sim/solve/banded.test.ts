import fc from 'fast-check';
import { expect, test } from 'vitest';
import { banded, factorBanded, multiplyBanded, solveBanded } from '../../../sim/solve/banded.ts';

// Any diagonally dominant band matrix, of an even or odd number of rows: A x = b is undone to rounding.
test.each([1, 2, 3])('factor and solve undo a product, width %i', (width) => {
  const entry = fc.double({ min: -1, max: 1, noNaN: true });
  const column = (length: number) => fc.array(entry, { minLength: length, maxLength: length });
  const system = fc
    .integer({ min: 1, max: 13 })
    .chain((size) => fc.tuple(column((2 * width + 1) * size), column(size)));
  fc.assert(
    fc.property(system, ([entries, x]) => {
      const size = x.length;
      const matrix = banded(size, width);
      matrix.diagonals.forEach((diagonal, k) => {
        for (let i = 0; i < size; i++) diagonal[i] = entries[k * size + i];
      });
      for (let i = 0; i < size; i++) matrix.diagonals[width][i] += 2 * width + 1;
      const b = new Float64Array(size);
      multiplyBanded(matrix, Float64Array.from(x), b);
      expect(factorBanded(matrix)).toBe(true);
      solveBanded(matrix, b);
      for (let i = 0; i < size; i++) expect(Math.abs(b[i] - x[i])).toBeLessThan(1e-13);
    }),
    { seed: 3, numRuns: 300 },
  );
});

test('a singular matrix is refused', () => {
  const matrix = banded(3, 1);
  expect(factorBanded(matrix)).toBe(false);
});
