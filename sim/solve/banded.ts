/**
 * Band matrices: factor once, solve many times. No pivoting: for the diagonally dominant matrices of implicit steps.
 * Width 1 is the Thomas algorithm; wider ones are plain band elimination (Golub & Van Loan 2013, §4.3).
 */
export interface Banded {
  readonly size: number;
  /** Diagonals on either side of the main one. */
  readonly width: number;
  /** diagonals[width + k][i] is the entry in row i, column i + k; entries outside the matrix are not used. */
  readonly diagonals: readonly Float64Array[];
}

export function banded(size: number, width: number): Banded {
  return { size, width, diagonals: Array.from({ length: 2 * width + 1 }, () => new Float64Array(size)) };
}

/**
 * Overwrites a matrix by its factors: the main diagonal by reciprocal pivots, the lower ones by multipliers, the upper ones by
 * the eliminated rows. Returns false when a pivot vanishes or is not finite.
 */
export function factorBanded(matrix: Banded): boolean {
  return matrix.width === 1 ? factorTridiagonal(matrix) : factorWide(matrix);
}

/** Overwrites `b` by the solution, given the factors. */
export function solveBanded(matrix: Banded, b: Float64Array): void {
  if (matrix.width === 1) solveTridiagonal(matrix, b);
  else solveWide(matrix, b);
}

function factorTridiagonal({ size, diagonals: [lower, diagonal, upper] }: Banded): boolean {
  let eliminated = 0;
  for (let i = 0; i < size; i++) {
    const pivot = 1 / (diagonal[i] - lower[i] * eliminated);
    if (!Number.isFinite(pivot)) return false;
    diagonal[i] = pivot;
    lower[i] *= pivot;
    eliminated = upper[i] * pivot;
    upper[i] = eliminated;
  }
  return true;
}

function solveTridiagonal({ size, diagonals: [lower, diagonal, upper] }: Banded, b: Float64Array): void {
  let carried = 0;
  for (let i = 0; i < size; i++) {
    carried = b[i] * diagonal[i] - lower[i] * carried;
    b[i] = carried;
  }
  for (let i = size - 2; i >= 0; i--) {
    carried = b[i] - upper[i] * carried;
    b[i] = carried;
  }
}

function factorWide({ size, width, diagonals }: Banded): boolean {
  for (let i = 0; i < size; i++) {
    const pivot = 1 / diagonals[width][i];
    if (!Number.isFinite(pivot)) return false;
    diagonals[width][i] = pivot;
    for (let below = 1; below <= width && i + below < size; below++) {
      const row = i + below;
      const multiplier = diagonals[width - below][row] * pivot;
      diagonals[width - below][row] = multiplier;
      if (multiplier === 0) continue;
      for (let k = 1; k <= width; k++) diagonals[width - below + k][row] -= multiplier * diagonals[width + k][i];
    }
  }
  return true;
}

function solveWide({ size, width, diagonals }: Banded, b: Float64Array): void {
  for (let i = 0; i < size; i++) {
    let sum = b[i];
    for (let k = 1; k <= width && k <= i; k++) sum -= diagonals[width - k][i] * b[i - k];
    b[i] = sum;
  }
  for (let i = size - 1; i >= 0; i--) {
    let sum = b[i];
    for (let k = 1; k <= width && i + k < size; k++) sum -= diagonals[width + k][i] * b[i + k];
    b[i] = sum * diagonals[width][i];
  }
}

/** out = A x, for a matrix that is not factored. */
export function multiplyBanded({ size, width, diagonals }: Banded, x: Float64Array, out: Float64Array): void {
  out.fill(0);
  for (let k = -width; k <= width; k++) {
    const diagonal = diagonals[width + k];
    const first = Math.max(0, -k);
    const last = Math.min(size, size - k);
    for (let i = first; i < last; i++) out[i] += diagonal[i] * x[i + k];
  }
}
