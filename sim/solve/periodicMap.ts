/**
 * Periodic states of a large stiff system by its year map y → Φ(y), and how stable they are.
 *
 * From a start the state follows the flow dy/dθ = Φ(y) − y by implicit steps that lengthen as it settles (pseudo-transient
 * continuation; Kelley & Keyes 1998, SIAM J. Numer. Anal. 35, 508): short ones are like waiting year by year and keep the
 * basin of attraction, long ones are Newton's method. The linear systems are solved by GMRES with products of the linearised
 * year; the preconditioner is what a year of the time-mean Jacobian would do, so that slow and fast systems cost the same.
 */

import { type Banded, factorBanded, solveBanded } from './banded.ts';
import { gmres } from './gmres.ts';
import type { StageHistory } from './rodas4.ts';
import type { Tangent } from './tangent.ts';

export interface YearMap {
  readonly size: number;
  /** One period in place; false when it fails. Leaves its history behind. */
  year(y: Float64Array): boolean;
  readonly history: StageHistory;
  /** Along the last history. */
  tangent(): Tangent | null;
}

export interface SettleOptions {
  /** Absolute error asked of the state. */
  readonly tolerance: number;
  /** Largest change of any value in one implicit step. */
  readonly largestStep: number;
  /** First pseudo-step, in years; Infinity starts with Newton. */
  readonly firstStep: number;
  readonly maximumYears: number;
}

export interface Settled {
  readonly state: Float64Array;
  readonly converged: boolean;
  /** Marches taken. */
  readonly years: number;
  /** Largest change that the last Newton step made or would make. */
  readonly lastChange: number;
}

/** Pseudo-steps in years: from here on a step is Newton's, and the longest that are taken. */
const fullNewton = 1e7;
const longestStep = 1e12;
const vectorLimit = 40;

export function settlePeriodic(map: YearMap, start: Float64Array, options: SettleOptions): Settled {
  const y = start.slice();
  const end = new Float64Array(map.size);
  let step = options.firstStep;
  let previousResidual = Number.POSITIVE_INFINITY;
  let lastChange = Number.POSITIVE_INFINITY;
  for (let years = 1; years <= options.maximumYears; years++) {
    end.set(y);
    if (!map.year(end)) return { state: y, converged: false, years, lastChange };
    const residual = end.map((value, i) => value - y[i]);
    const size = largest(residual);
    const tangent = map.tangent();
    if (tangent === null) return { state: y, converged: false, years, lastChange };
    // A residual that grows under long steps means that the way led uphill: back to short ones. A small one is left to Newton.
    if (size <= options.tolerance) step = Number.POSITIVE_INFINITY;
    else if (size > 1.5 * previousResidual) step = Math.min(step, 1);
    previousResidual = size;
    const move = implicitStep(tangent, residual, step, options.largestStep);
    for (let i = 0; i < y.length; i++) y[i] += move.change[i];
    lastChange = move.largest;
    if (move.step >= fullNewton && move.largest <= options.tolerance) {
      return { state: y, converged: true, years, lastChange };
    }
    step = move.largest < 0.5 * options.largestStep ? Math.min(longestStep, move.step * 8) : move.step;
  }
  return { state: y, converged: false, years: options.maximumYears, lastChange };
}

/** The longest implicit step, up to `step`, that moves no value by more than `most`; a plain year where none does. */
function implicitStep(tangent: Tangent, residual: Float64Array, step: number, most: number) {
  for (let trial = Math.min(step, longestStep); trial > 0.2; trial /= 6) {
    const change = shiftedSolve(tangent, residual, 1 / trial, 1e-4);
    const moved = largest(change);
    if (moved <= most) return { change, largest: moved, step: trial };
  }
  return { change: residual, largest: largest(residual), step: 1 };
}

/** Solves (σ + 1 − M) x = b. */
function shiftedSolve(tangent: Tangent, b: Float64Array, shift: number, tolerance: number): Float64Array {
  const precondition = meanYearPreconditioner(tangent, shift);
  const apply = (v: Float64Array): Float64Array => {
    const end = tangent.apply(v);
    for (let i = 0; i < end.length; i++) end[i] = (1 + shift) * v[i] - end[i];
    return end;
  };
  return gmres(apply, precondition, b, vectorLimit, tolerance).x;
}

/**
 * Inverse of σ + 1 − (1 − P J̄)⁻¹, a year of implicit Euler with the mean Jacobian J̄: with a = −P J̄ and σ′ = σ/(1+σ) it is
 * [1 + (1 − σ′)(σ′ + a)⁻¹]/(1 + σ).
 */
export function meanYearPreconditioner(tangent: Tangent, shift: number): (v: Float64Array) => Float64Array {
  const ratio = shift / (1 + shift);
  const { size, width, diagonals } = tangent.meanJacobian;
  const scaled = diagonals.map((column) => column.map((value) => -tangent.period * value));
  const matrix: Banded = { size, width, diagonals: scaled };
  for (let i = 0; i < size; i++) scaled[width][i] += ratio;
  if (!factorBanded(matrix)) return (v) => v.slice();
  return (v) => {
    const out = v.slice();
    solveBanded(matrix, out);
    for (let i = 0; i < out.length; i++) out[i] = (v[i] + (1 - ratio) * out[i]) / (1 + shift);
    return out;
  };
}

/**
 * ln of the dominant multiplier μ of a linearised year. The map preserves order, so that its dominant vector is the one of a
 * single sign: inverse iteration on 1 − M, which knows 1 − μ to full precision, is shifted until it finds that one; fast
 * systems, whose μ is small, take power iteration on its logarithm.
 */
export function logDominantMultiplier(tangent: Tangent): number {
  let shift = 0;
  for (let trial = 0; trial < 8; trial++) {
    const { gap, vector, settled } = nearestGap(tangent, shift);
    if (settled && ofOneSign(vector)) return gap < 0.5 ? Math.log1p(-gap) : logByPowers(tangent);
    // The dominant gap lies below: look from further down.
    shift = shift === 0 ? Math.max(1e-6, 1.5 * Math.abs(gap)) : 3 * shift;
  }
  return logByPowers(tangent);
}

/** Eigenvalue of 1 − M nearest to −shift, by inverse iteration. */
function nearestGap(tangent: Tangent, shift: number) {
  let vector = normalised(new Float64Array(tangent.meanJacobian.size).fill(1));
  let gap = Number.NaN;
  let settled = false;
  for (let trial = 0; trial < 40 && !settled; trial++) {
    const z = shiftedSolve(tangent, vector, shift, 1e-6);
    let along = 0;
    let square = 0;
    for (let i = 0; i < z.length; i++) {
      along += vector[i] * z[i];
      square += z[i] * z[i];
    }
    const next = along / square - shift;
    vector = normalised(z);
    settled = Math.abs(next - gap) <= 1e-7 * (Math.abs(next) + shift);
    gap = next;
  }
  return { gap, vector, settled };
}

/** Up to what iteration leaves of other vectors. */
function ofOneSign(vector: Float64Array): boolean {
  const most = vector.reduce((a, b) => Math.max(a, b));
  const least = vector.reduce((a, b) => Math.min(a, b));
  return Math.min(most, -least) < 1e-3 * Math.max(most, -least);
}

function logByPowers(tangent: Tangent): number {
  const v = new Float64Array(tangent.meanJacobian.size).fill(1);
  let log = Number.NaN;
  for (let trial = 0; trial < 60; trial++) {
    const next = tangent.grow(v);
    const settled = Math.abs(next - log) <= 1e-7 * Math.abs(next);
    log = next;
    if (settled) break;
  }
  return log;
}

function normalised(v: Float64Array): Float64Array {
  let square = 0;
  for (const value of v) square += value * value;
  const scale = 1 / Math.sqrt(square);
  return v.map((value) => value * scale);
}

function largest(values: Float64Array): number {
  return values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
}
