/**
 * Periodic states of a large stiff system by its year map y → Φ(y), and how stable they are.
 *
 * From a start the state follows the flow dy/dθ = Φ(y) − y by implicit steps that lengthen as it settles (pseudo-transient
 * continuation; Kelley & Keyes 1998, SIAM J. Numer. Anal. 35, 508): short ones are like waiting year by year and keep the
 * basin of attraction, long ones are Newton's method. The linear systems are solved by GMRES with products of the linearised
 * year; the preconditioner is what a year of the time-mean Jacobian would do, so that slow and fast systems cost the same.
 */

import { type Banded, factorBanded, solveBanded } from './banded.ts';
import { leftmostEigenvalue } from './davidson.ts';
import { gmres } from './gmres.ts';
import type { StageHistory } from './rodas4.ts';
import type { Tangent } from './tangent.ts';
import { largest } from './vectors.ts';

export interface YearMap<T extends Tangent = Tangent> {
  readonly size: number;
  /** One period in place; false when it fails. Leaves its history behind. */
  year(y: Float64Array): boolean;
  readonly history: StageHistory;
  /** Along the last history; valid until the next one is taken. */
  tangent(): T | null;
}

export interface SettleOptions {
  /** Absolute error asked of the state. */
  readonly tolerance: number;
  /** Largest change of any value in one implicit step. */
  readonly largestStep: number;
  /** First pseudo-step, in years; Infinity starts with Newton. */
  readonly firstStep: number;
  readonly maximumYears: number;
  /** What a full Newton step is known to leave of an error, from a coarser mesh; 1 where nothing is known. */
  readonly contraction: number;
}

export interface Settled<T extends Tangent = Tangent> {
  readonly state: Float64Array;
  readonly converged: boolean;
  /** Marches taken. */
  readonly years: number;
  /** The last change, Newton's where `converged`: the map's history is that of the state before it. */
  readonly change: Float64Array;
  /** Along that history; null where it failed. */
  readonly tangent: T | null;
  /** The last move over the one before; as asked where there was but one. */
  readonly contraction: number;
}

/** Pseudo-steps in years: from here on a step is Newton's, and the longest that are taken. */
const fullNewton = 1e7;
const longestStep = 1e12;
const vectorLimit = 40;

/** Newton is not trusted to gain more than this, nor to gain all that it gained before. */
const bestContraction = 1e-3;
const doubt = 10;

export function settlePeriodic<T extends Tangent>(
  map: YearMap<T>,
  start: Float64Array,
  options: SettleOptions,
): Settled<T> {
  const { tolerance, maximumYears } = options;
  const y = start.slice();
  const end = new Float64Array(map.size);
  let step = options.firstStep;
  let previousResidual = Number.POSITIVE_INFINITY;
  let previousMove = Number.POSITIVE_INFINITY;
  let { contraction } = options;
  let change: Float64Array = new Float64Array(map.size);
  for (let years = 1; years <= maximumYears; years++) {
    end.set(y);
    const tangent = map.year(end) ? map.tangent() : null;
    if (tangent === null) return { state: y, converged: false, years, change, tangent, contraction };
    const residual = end.map((value, i) => value - y[i]);
    const size = largest(residual);
    // A residual that grows under long steps means that the way led uphill: back to short ones. A small one is left to Newton.
    if (size <= tolerance) step = Number.POSITIVE_INFINITY;
    else if (size > 1.5 * previousResidual) step = Math.min(step, 1);
    previousResidual = size;
    const move = implicitStep(tangent, residual, step, options.largestStep);
    change = move.change;
    for (let i = 0; i < y.length; i++) y[i] += change[i];
    const isFull = move.step >= fullNewton;
    // A step that was not quite Newton's leaves more: its ratio errs on the safe side.
    if (previousMove < Number.POSITIVE_INFINITY) contraction = move.largest / previousMove;
    previousMove = move.largest;
    const left = move.largest * Math.min(1, doubt * Math.max(bestContraction, contraction));
    if (isFull && left <= tolerance) return { state: y, converged: true, years, change, tangent, contraction };
    step = Math.min(longestStep, move.step * growth(move.largest / options.largestStep));
  }
  return { state: y, converged: false, years: maximumYears, change, tangent: null, contraction };
}

/** How much longer the next step may be after one that moved by this share of the most. */
function growth(share: number): number {
  return share < 0.25 ? 32 : share < 0.5 ? 8 : 1;
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
 * ln of the dominant multiplier μ of a linearised year, by the gap 1 − μ, which is known to full precision also where μ is all but
 * 1. The map preserves order, so that its dominant vector is the one of a single sign: where another is found, the search starts
 * again from further down. Fast systems, whose μ is small, take power iteration on its logarithm.
 */
export function logDominantMultiplier(tangent: Tangent): number {
  const { size } = tangent.meanJacobian;
  const gapOf = (v: Float64Array): Float64Array => {
    const end = tangent.apply(v);
    for (let i = 0; i < size; i++) end[i] = v[i] - end[i];
    return end;
  };
  let shift = 1e-9;
  for (let trial = 0; trial < 8; trial++) {
    const { value, vector, settled } = leftmostEigenvalue(size, gapOf, meanYearPreconditioner(tangent, shift));
    if (settled && ofOneSign(vector)) return value < 0.5 ? Math.log1p(-value) : logByPowers(tangent, vector);
    shift = trial === 0 ? Math.max(1e-6, 1.5 * Math.abs(value)) : 3 * shift;
  }
  return logByPowers(tangent, new Float64Array(size).fill(1));
}

/** Up to what iteration leaves of other vectors. */
function ofOneSign(vector: Float64Array): boolean {
  const most = vector.reduce((a, b) => Math.max(a, b));
  const least = vector.reduce((a, b) => Math.min(a, b));
  return Math.min(most, -least) < 1e-3 * Math.max(most, -least);
}

function logByPowers(tangent: Tangent, start: Float64Array): number {
  const v = start.slice();
  let log = Number.NaN;
  for (let trial = 0; trial < 60; trial++) {
    const next = tangent.grow(v);
    const settled = Math.abs(next - log) <= 1e-7 * Math.abs(next);
    log = next;
    if (settled) break;
  }
  return log;
}
