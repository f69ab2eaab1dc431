import fc from 'fast-check';
import { expect, test } from 'vitest';
import { banded, factorBanded, multiplyBanded, solveBanded } from '../../../sim/solve/banded.ts';

// Any diagonally dominant band matrix: A x = b is undone to rounding.
test.each([1, 2, 3])('factor and solve undo a product, width %i', (width) => {
  const entry = fc.double({ min: -1, max: 1, noNaN: true });
  fc.assert(
    fc.property(
      fc.array(entry, { minLength: 7 * 12, maxLength: 7 * 12 }),
      fc.array(entry, { minLength: 12, maxLength: 12 }),
      (entries, x) => {
        const matrix = banded(12, width);
        matrix.diagonals.forEach((diagonal, k) => {
          for (let i = 0; i < 12; i++) diagonal[i] = entries[k * 12 + i];
        });
        for (let i = 0; i < 12; i++) matrix.diagonals[width][i] += 2 * width + 1;
        const b = new Float64Array(12);
        multiplyBanded(matrix, Float64Array.from(x), b);
        expect(factorBanded(matrix)).toBe(true);
        solveBanded(matrix, b);
        for (let i = 0; i < 12; i++) expect(Math.abs(b[i] - x[i])).toBeLessThan(1e-13);
      },
    ),
    { seed: 3, numRuns: 200 },
  );
});

test('a singular matrix is refused', () => {
  const matrix = banded(3, 1);
  expect(factorBanded(matrix)).toBe(false);
});
