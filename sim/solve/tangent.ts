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

export type JacobianAt = (step: number, y: Float64Array, matrix: Banded) => void;

export function tangentOf(
  jacobianAt: JacobianAt,
  { size, width }: { readonly size: number; readonly width: number },
  widths: Float64Array,
  history: StageHistory,
): Tangent | null {
  const meanJacobian = banded(size, width);
  const factors: Banded[] = [];
  const period = widths.reduce((sum, width) => sum + width, 0);
  let start = jacobianRow(jacobianAt, size, width, 0, history);
  for (let step = 0; step < widths.length; step++) {
    // The Jacobian at the step's end is that of the next start; a period closes on itself.
    const end = jacobianRow(jacobianAt, size, width, (step + 1) % widths.length, history);
    const matrix = banded(size, width);
    const share = widths[step] / (2 * period);
    for (let k = 0; k <= 2 * width; k++) {
      const [a, b, mean, target] = [start, end, meanJacobian, matrix].map(({ diagonals }) => diagonals[k]);
      const scale = (-gamma * widths[step]) / 2;
      for (let i = 0; i < size; i++) {
        const sum = a[i] + b[i];
        mean[i] += share * sum;
        target[i] = scale * sum;
      }
    }
    for (let i = 0; i < size; i++) matrix.diagonals[width][i] += 1;
    if (!factorBanded(matrix)) return null;
    factors.push(matrix);
    start = end;
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

/** Scales v to length 1; gives the length that it had. */
function unit(v: Float64Array): number {
  let square = 0;
  for (const value of v) square += value * value;
  const length = Math.sqrt(square);
  for (let i = 0; i < v.length; i++) v[i] /= length;
  return length;
}

function jacobianRow(jacobianAt: JacobianAt, size: number, width: number, step: number, history: StageHistory): Banded {
  const row = banded(size, width);
  jacobianAt(step, history.value.subarray(step * size, (step + 1) * size), row);
  return row;
}
