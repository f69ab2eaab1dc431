/**
 * The linearised year: how a small difference at the start of a period ends. Along a stored march each step is the L-stable
 * two-stage SDIRK of order 2 with the Jacobian averaged over the step; its matrices are factored once, so that a product
 * costs two band solves a step, a small part of a march.
 * Stability function R(z) = (1 + (1−2γ)z)/(1−γz)², γ = 1 − √½: Alexander (1977) SIAM J. Numer. Anal. 14, 1006.
 */

import { type Banded, banded, factorBanded, solveBanded } from './banded.ts';
import type { StageHistory } from './rodas4.ts';

const gamma = 1 - Math.SQRT1_2;

export interface Tangent {
  /** M v: the difference after the period. */
  apply(v: Float64Array): Float64Array;
  /** Turns v into M v of length 1 and gives ln |M v|/|v|: also where M v itself would vanish to rounding. */
  grow(v: Float64Array): number;
  /** Time mean of the Jacobian, not factored. */
  readonly meanJacobian: Banded;
  readonly period: number;
}

/** A tangent that keeps its steps. */
export interface SteppedTangent extends Tangent {
  /** Adds the difference that starts as v to the rows of a march, (steps + 1) × size. */
  addAlong(v: Float64Array, rows: Float64Array): void;
}

export type JacobianAt = (step: number, y: Float64Array, matrix: Banded) => void;

/** Room for the factors of every step: large, so made once for a mesh. What it holds is a tangent's until the next one takes it. */
export interface TangentStore {
  readonly factors: readonly Banded[];
  readonly ends: readonly [Banded, Banded];
  readonly mean: Banded;
}

export function tangentStore(steps: number, size: number, width: number): TangentStore {
  const matrix = () => banded(size, width);
  return { factors: Array.from({ length: steps }, matrix), ends: [matrix(), matrix()], mean: matrix() };
}

/** Null where a step's matrix cannot be factored. */
export function tangentOf(
  jacobianAt: JacobianAt,
  { size, width }: { readonly size: number; readonly width: number },
  widths: Float64Array,
  history: StageHistory,
  { factors, ends, mean: meanJacobian }: TangentStore = tangentStore(widths.length, size, width),
): SteppedTangent | null {
  const period = widths.reduce((sum, width) => sum + width, 0);
  let [start, end] = ends;
  for (const diagonal of meanJacobian.diagonals) diagonal.fill(0);
  jacobianAt(0, history.value.subarray(0, size), start);
  for (let step = 0; step < widths.length; step++) {
    // The Jacobian at the step's end is that of the next start; a period closes on itself.
    const next = (step + 1) % widths.length;
    jacobianAt(next, history.value.subarray(next * size, (next + 1) * size), end);
    const share = widths[step] / (2 * period);
    const scale = (-gamma * widths[step]) / 2;
    for (let k = 0; k <= 2 * width; k++) {
      const target = factors[step].diagonals[k];
      addSum(start.diagonals[k], end.diagonals[k], share, meanJacobian.diagonals[k], scale, target);
      if (k === width) for (let i = 0; i < size; i++) target[i] += 1;
    }
    if (!factorBanded(factors[step])) return null;
    [start, end] = [end, start];
  }
  const once = new Float64Array(size);
  const stepInto = (factor: Banded, v: Float64Array): void => {
    once.set(v);
    solveBanded(factor, once);
    for (let i = 0; i < size; i++) v[i] = (1 + Math.SQRT2) * once[i] - Math.SQRT2 * v[i];
    solveBanded(factor, v);
  };
  return {
    meanJacobian,
    period,
    apply(v) {
      const out = v.slice();
      for (const factor of factors) stepInto(factor, out);
      return out;
    },
    addAlong(v, rows) {
      const moved = v.slice();
      for (const [step, factor] of factors.entries()) {
        addTo(rows, step * size, moved);
        stepInto(factor, moved);
      }
      addTo(rows, factors.length * size, moved);
    },
    grow(v) {
      unit(v);
      let log = 0;
      for (const factor of factors) {
        stepInto(factor, v);
        log += Math.log(unit(v));
      }
      return log;
    },
  };
}

function addTo(rows: Float64Array, offset: number, v: Float64Array): void {
  for (let i = 0; i < v.length; i++) rows[offset + i] += v[i];
}

/** Scales v to length 1; gives the length that it had. */
function unit(v: Float64Array): number {
  let square = 0;
  for (const value of v) square += value * value;
  const length = Math.sqrt(square);
  for (let i = 0; i < v.length; i++) v[i] /= length;
  return length;
}

/** mean += share (a + b); target = scale (a + b). */
function addSum(
  a: Float64Array,
  b: Float64Array,
  share: number,
  mean: Float64Array,
  scale: number,
  target: Float64Array,
): void {
  for (let i = 0; i < a.length; i++) {
    const sum = a[i] + b[i];
    mean[i] += share * sum;
    target[i] = scale * sum;
  }
}
