/**
 * Restart-free GMRES with a right preconditioner: A P⁻¹ u = b, x = P⁻¹ u. For small numbers of vectors.
 * Source: Saad & Schultz (1986) SIAM J. Sci. Stat. Comput. 7, 856; Givens rotations as in Kelley (1995), §3.
 */
import { dot, length } from './vectors.ts';

export interface LinearSolve {
  readonly x: Float64Array;
  /** |b − A x| / |b|, as the recurrence has it. */
  readonly residual: number;
  readonly vectors: number;
}

export function gmres(
  apply: (v: Float64Array) => Float64Array,
  precondition: (v: Float64Array) => Float64Array,
  b: Float64Array,
  maximumVectors: number,
  tolerance: number,
): LinearSolve {
  const size = b.length;
  const norm = length(b);
  if (norm === 0) return { x: new Float64Array(size), residual: 0, vectors: 0 };
  const basis = [b.map((value) => value / norm)];
  const directions: Float64Array[] = [];
  const columns: Float64Array[] = [];
  const cosines: number[] = [];
  const sines: number[] = [];
  const right = [norm];
  let count = 0;
  while (count < maximumVectors) {
    const direction = precondition(basis[count]);
    const w = apply(direction);
    directions.push(direction);
    const column = new Float64Array(count + 2);
    for (let k = 0; k <= count; k++) {
      column[k] = dot(basis[k], w);
      subtract(w, basis[k], column[k]);
    }
    const rest = length(w);
    column[count + 1] = rest;
    for (let k = 0; k < count; k++) rotate(column, k, cosines[k], sines[k]);
    const radius = Math.hypot(column[count], column[count + 1]);
    cosines.push(column[count] / radius);
    sines.push(column[count + 1] / radius);
    rotate(column, count, cosines[count], sines[count]);
    columns.push(column);
    right.push(-sines[count] * right[count]);
    right[count] *= cosines[count];
    count++;
    if (Math.abs(right[count]) <= tolerance * norm || rest <= 1e-300) break;
    basis.push(w.map((value) => value / rest));
  }
  const x = new Float64Array(size);
  const weights = new Float64Array(count);
  for (let k = count - 1; k >= 0; k--) {
    let sum = right[k];
    for (let j = k + 1; j < count; j++) sum -= columns[j][k] * weights[j];
    weights[k] = sum / columns[k][k];
    subtract(x, directions[k], -weights[k]);
  }
  return { x, residual: Math.abs(right[count]) / norm, vectors: count };
}

function rotate(column: Float64Array, k: number, cosine: number, sine: number): void {
  const upper = column[k];
  const lower = column[k + 1];
  column[k] = cosine * upper + sine * lower;
  column[k + 1] = cosine * lower - sine * upper;
}

/** a −= factor × b. */
function subtract(a: Float64Array, b: Float64Array, factor: number): void {
  for (let i = 0; i < a.length; i++) a[i] -= factor * b[i];
}
