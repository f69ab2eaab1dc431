/**
 * Error by comparison: a march over given step ends and one over their halves, compared at the ends and middles of the finer
 * steps. The finer one is kept: its error is a part of the difference, a thirtieth where the solution is smooth.
 */
import { type Curve, curveValuesInto } from './curve.ts';

/** The finer of a pair is 2⁵ times better where smooth, but hardly 3 times just behind a kink of a fast surface. */
const safety = 3;
const rounding = 1e-13;

export interface Certified<T> {
  readonly result: T;
  /** Upper bound of the relative error anywhere on the curve. */
  readonly errorEstimate: number;
  readonly converged: boolean;
}

/** Halves the steps until two marches agree to `tolerance`, at most `maximumSteps`. `solveOn` returns null when it fails. */
export function certify<T extends { readonly curve: Curve }>(
  solveOn: (boundaries: Float64Array, from: T | null) => T | null,
  boundaries: Float64Array,
  tolerance: number,
  maximumSteps: number,
): Certified<T> | null {
  let ends = boundaries;
  let coarse = solveOn(ends, null);
  while (coarse !== null) {
    ends = halved(ends);
    const fine = solveOn(ends, coarse);
    if (fine === null) return null;
    const difference = largestDifference(coarse.curve, fine.curve, halved(ends));
    const converged = difference < safety * tolerance;
    if (converged || 2 * ends.length > maximumSteps) {
      return { result: fine, errorEstimate: difference / safety + rounding, converged };
    }
    coarse = fine;
  }
  return null;
}

/** Every step in two. */
export function halved(boundaries: Float64Array): Float64Array {
  const finer = new Float64Array(2 * boundaries.length - 1);
  for (let i = 0; i < boundaries.length; i++) {
    finer[2 * i] = boundaries[i];
    if (i + 1 < boundaries.length) finer[2 * i + 1] = (boundaries[i] + boundaries[i + 1]) / 2;
  }
  return finer;
}

function largestDifference(a: Curve, b: Curve, at: Float64Array): number {
  const positions = at[at.length - 1] >= at[0] ? at : at.slice().reverse();
  const valueA = new Float64Array(positions.length);
  const valueB = new Float64Array(positions.length);
  curveValuesInto(a, positions, valueA);
  curveValuesInto(b, positions, valueB);
  let largest = 0;
  for (let i = 0; i < positions.length; i++) {
    const difference = Math.abs(valueA[i] - valueB[i]) / Math.abs(valueB[i]);
    if (!(difference <= largest)) largest = difference;
  }
  return largest;
}
