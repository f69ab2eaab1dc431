/**
 * The leftmost eigenvalue of a matrix that is known by its products only, where it is real and simple: the eigenvalue is sought
 * in a growing space, and each residual, preconditioned, is the space's next direction.
 * Source: Davidson (1975) J. Comput. Phys. 17, 87; Morgan & Scott (1986) SIAM J. Sci. Stat. Comput. 7, 817 for any preconditioner.
 */
import { dot, length } from './vectors.ts';

export interface Eigenpair {
  readonly value: number;
  /** Of length 1. */
  readonly vector: Float64Array;
  readonly settled: boolean;
}

const largestSpace = 24;
const mostProducts = 120;
/** Of the residual, relative to the eigenvalue, whose own error is smaller still where the matrix is all but normal. */
const enough = 1e-6;

/**
 * `precondition`: all but the inverse of the matrix. Starts from the all-positive vector, as smooth as the preconditioner makes it.
 * Shape:  vectors (size,).
 * Errors: `settled` false where the space did not close in.
 */
export function leftmostEigenvalue(
  size: number,
  apply: (v: Float64Array) => Float64Array,
  precondition: (v: Float64Array) => Float64Array,
): Eigenpair {
  let vector: Float64Array = new Float64Array(size).fill(1);
  for (let round = 0; round < 3; round++) vector = unit(precondition(vector));
  let value = Number.NaN;
  let space = emptySpace();
  for (let products = 0; products < mostProducts; products++) {
    if (space.basis.length >= Math.min(size, largestSpace)) space = emptySpace();
    const next = space.basis.length === 0 ? vector : precondition(residualOf(space, value));
    if (!enlarge(space, next, apply)) return { value, vector, settled: space.basis.length === size };
    value = ritzValue(space);
    vector = combined(space.basis, space.weights);
    const left = length(residualOf(space, value));
    if (!Number.isFinite(value)) return { value, vector, settled: false };
    if (left <= enough * Math.abs(value)) return { value, vector, settled: true };
  }
  return { value, vector, settled: false };
}

interface Space {
  readonly basis: Float64Array[];
  readonly images: Float64Array[];
  /** projected[i][j] = basis[i] · images[j]. */
  readonly projected: number[][];
  /** The eigenvector sought, in the basis. */
  weights: number[];
}

const emptySpace = (): Space => ({ basis: [], images: [], projected: [], weights: [] });

/** False where the direction adds nothing. */
function enlarge(space: Space, direction: Float64Array, apply: (v: Float64Array) => Float64Array): boolean {
  const v = unit(direction.slice());
  for (let pass = 0; pass < 2; pass++) {
    for (const b of space.basis) {
      const along = dot(b, v);
      for (let i = 0; i < v.length; i++) v[i] -= along * b[i];
    }
    if (!(length(v) > 1e-10)) return false;
    unit(v);
  }
  const image = apply(v);
  space.basis.push(v);
  space.images.push(image);
  for (const [i, row] of space.projected.entries()) row.push(dot(space.basis[i], image));
  space.projected.push(space.images.map((one) => dot(v, one)));
  space.weights.push(space.basis.length === 1 ? 1 : 0);
  return true;
}

/** Of the projected matrix, by inverse iteration from below on the weights, which are replaced. */
function ritzValue({ projected, weights }: Space): number {
  const count = weights.length;
  if (count === 1) return projected[0][0];
  let value = quotient(projected, weights);
  for (let trial = 0; trial < 30; trial++) {
    const rest = projected.map((row, i) => row.reduce((sum, h, j) => sum + h * weights[j], -value * weights[i]));
    const off = Math.hypot(...rest);
    if (off <= 1e-13 * Math.abs(value)) break;
    const below = value - off;
    const solved = solveDense(
      projected.map((row, i) => row.map((h, j) => (i === j ? h - below : h))),
      weights,
    );
    const size = Math.hypot(...solved);
    if (!(size > 0 && size < Number.POSITIVE_INFINITY)) break;
    for (let i = 0; i < count; i++) weights[i] = solved[i] / size;
    value = quotient(projected, weights);
  }
  return value;
}

/** wᵀHw for |w| = 1. */
function quotient(matrix: readonly (readonly number[])[], w: readonly number[]): number {
  return matrix.reduce((sum, row, i) => sum + w[i] * row.reduce((inner, h, j) => inner + h * w[j], 0), 0);
}

function residualOf({ basis, images, weights }: Space, value: number): Float64Array {
  const out = combined(images, weights);
  const vector = combined(basis, weights);
  for (let i = 0; i < out.length; i++) out[i] -= value * vector[i];
  return out;
}

function combined(vectors: readonly Float64Array[], weights: readonly number[]): Float64Array {
  const out = new Float64Array(vectors[0].length);
  for (const [k, v] of vectors.entries()) for (let i = 0; i < out.length; i++) out[i] += weights[k] * v[i];
  return out;
}

/** Gauss elimination with partial pivoting; overwrites `rows`. For a handful of unknowns. */
function solveDense(rows: number[][], right: readonly number[]): number[] {
  const x = [...right];
  const count = x.length;
  for (let k = 0; k < count; k++) {
    let pivot = k;
    for (let i = k + 1; i < count; i++) if (Math.abs(rows[i][k]) > Math.abs(rows[pivot][k])) pivot = i;
    [rows[k], rows[pivot]] = [rows[pivot], rows[k]];
    [x[k], x[pivot]] = [x[pivot], x[k]];
    for (let i = k + 1; i < count; i++) {
      const factor = rows[i][k] / rows[k][k];
      for (let j = k; j < count; j++) rows[i][j] -= factor * rows[k][j];
      x[i] -= factor * x[k];
    }
  }
  for (let k = count - 1; k >= 0; k--) {
    for (let j = k + 1; j < count; j++) x[k] -= rows[k][j] * x[j];
    x[k] /= rows[k][k];
  }
  return x;
}

/** In place. */
function unit(v: Float64Array): Float64Array {
  const scale = 1 / length(v);
  for (let i = 0; i < v.length; i++) v[i] *= scale;
  return v;
}
