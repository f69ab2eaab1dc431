/**
 * Band matrices: factor once, solve many times. No pivoting: for the diagonally dominant matrices of implicit steps.
 * Width 1 is eliminated from both ends (twisted factorisation: Parlett & Dhillon 1997, Linear Algebra Appl. 267, 247); wider ones
 * are plain band elimination (Golub & Van Loan 2013, §4.3).
 */
export interface Banded {
  readonly size: number;
  /** Diagonals on either side of the main one. */
  readonly width: number;
  /** diagonals[width + k][i] is the entry in row i, column i + k; entries outside the matrix are not used. */
  readonly diagonals: readonly Float64Array[];
}

export function banded(size: number, width: number): Banded {
  const store = new Float64Array((2 * width + 1) * size); // side by side: one allocation, and near in memory
  const diagonals = Array.from({ length: 2 * width + 1 }, (_, k) => store.subarray(k * size, (k + 1) * size));
  return { size, width, diagonals };
}

/** Overwrites a matrix by its factors, for `solveBanded`. Returns false when a pivot vanishes or is not finite. */
export function factorBanded(matrix: Banded): boolean {
  return matrix.width === 1 ? factorTridiagonal(matrix) : factorWide(matrix);
}

/** Overwrites `b` by the solution, given the factors. */
export function solveBanded(matrix: Banded, b: Float64Array): void {
  if (matrix.width === 1) solveTridiagonal(matrix, b);
  else solveWide(matrix, b);
}

/**
 * From both ends to the middle (twisted factorisation): the two halves do not wait for each other, and a processor takes them
 * side by side. Rows above the middle hold what a top-down elimination leaves, rows below it what a bottom-up one does.
 */
function factorTridiagonal({ size, diagonals: [lower, diagonal, upper] }: Banded): boolean {
  const middle = size >> 1;
  let above = 0;
  for (let i = 0; i < middle; i++) {
    const pivot = 1 / (diagonal[i] - lower[i] * above);
    if (!Number.isFinite(pivot)) return false;
    diagonal[i] = pivot;
    lower[i] *= pivot;
    above = upper[i] * pivot;
    upper[i] = above;
  }
  let below = 0;
  for (let i = size - 1; i > middle; i--) {
    const pivot = 1 / (diagonal[i] - upper[i] * below);
    if (!Number.isFinite(pivot)) return false;
    diagonal[i] = pivot;
    upper[i] *= pivot;
    below = lower[i] * pivot;
    lower[i] = below;
  }
  const pivot = 1 / (diagonal[middle] - lower[middle] * above - upper[middle] * below);
  diagonal[middle] = pivot;
  lower[middle] *= pivot;
  upper[middle] *= pivot;
  return Number.isFinite(pivot);
}

function solveTridiagonal({ size, diagonals: [lower, diagonal, upper] }: Banded, b: Float64Array): void {
  const middle = size >> 1;
  const last = size - 1;
  const pairs = last - middle;
  let fromAbove = 0;
  let fromBelow = 0;
  for (let i = 0; i < pairs; i++) {
    const j = last - i;
    fromAbove = b[i] * diagonal[i] - lower[i] * fromAbove;
    fromBelow = b[j] * diagonal[j] - upper[j] * fromBelow;
    b[i] = fromAbove;
    b[j] = fromBelow;
  }
  if (pairs < middle) {
    // An even size has one row more above the middle.
    fromAbove = b[pairs] * diagonal[pairs] - lower[pairs] * fromAbove;
    b[pairs] = fromAbove;
  }
  let up = b[middle] * diagonal[middle] - lower[middle] * fromAbove - upper[middle] * fromBelow;
  let down = up;
  b[middle] = up;
  for (let k = 1; k <= pairs; k++) {
    const i = middle - k;
    const j = middle + k;
    up = b[i] - upper[i] * up;
    down = b[j] - lower[j] * down;
    b[i] = up;
    b[j] = down;
  }
  if (pairs < middle) b[0] -= upper[0] * up;
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
