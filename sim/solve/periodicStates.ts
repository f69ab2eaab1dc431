/**
 * Every periodic solution of a `Separable` equation between two bounds, stable or not.
 *
 * Solutions of a scalar equation never cross, so one period maps the first value to the last monotonically and its fixed
 * points are the roots of a scalar function: the change over a period. The function is scanned, its near-touches are probed,
 * and each root is polished on step ends of its own until two marches agree. An unstable state is marched backwards, where it
 * attracts.
 */
import { certify } from './certify.ts';
import type { Curve } from './curve.ts';
import { type March, march } from './march.ts';
import type { Separable } from './separable.ts';

export interface PeriodicState {
  readonly curve: Curve;
  readonly errorEstimate: number;
  readonly converged: boolean;
  /** ln of the multiplier of the period map, and the same with the gain held fixed. */
  readonly logMultiplier: number;
  readonly frozenLogMultiplier: number;
  readonly steps: number;
}

export interface PeriodicStates {
  /** Greatest first. */
  readonly states: readonly PeriodicState[];
  /** Roots seen by the scan that could not be polished. */
  readonly unresolved: number;
}

const period = 2 * Math.PI;
const scanPoints = 33;
const scanTolerance = 1e-5;

/**
 * Bounds must hold every periodic solution: the change over a period is ≥ 0 at `low` and ≤ 0 at `high`. `crowded` are
 * ordinates about which states may lie close together: the scan is denser there.
 */
export function periodicStates(
  problem: Separable,
  low: number,
  high: number,
  crowded: readonly number[],
  tolerance: number,
  maximumSteps: number,
): PeriodicStates {
  const brackets = findBrackets(problem, scanGrid(low, high, crowded));
  const states: PeriodicState[] = [];
  let unresolved = 0;
  for (const bracket of brackets) {
    const state = polish(problem, bracket, tolerance, maximumSteps);
    if (state === null) unresolved++;
    else states.push(state);
  }
  states.sort((a, b) => b.curve.value[0] - a.curve.value[0]);
  return { states, unresolved };
}

interface Bracket {
  readonly low: number;
  readonly high: number;
  /** Whether the change over a period rises through zero: an unstable state. */
  readonly rising: boolean;
}

function changeOver(problem: Separable, value: number): number {
  return march(problem, { from: 0, to: period, value, tolerance: scanTolerance, keep: false }).change;
}

function scanGrid(low: number, high: number, crowded: readonly number[]): number[] {
  const grid = new Set<number>();
  const add = (from: number, to: number, points: number): void => {
    for (let i = 0; i < points; i++) {
      const value = i + 1 === points ? to : from + ((to - from) * i) / (points - 1); // rounding must not lose an end
      if (value >= low && value <= high) grid.add(value);
    }
  };
  add(low, high, scanPoints);
  if (crowded.length > 0) {
    const first = crowded[0];
    const last = crowded[crowded.length - 1];
    const reach = 2 * (last - first) + 0.02 * last;
    add(first - reach, last + reach, scanPoints);
  }
  return [...grid].sort((a, b) => a - b);
}

function findBrackets(problem: Separable, values: number[]): Bracket[] {
  const changes = values.map((value) => changeOver(problem, value));
  probeTouches(problem, values, changes);
  const brackets: Bracket[] = [];
  for (let i = 0; i + 1 < values.length; i++) {
    if (changes[i] > 0 !== changes[i + 1] > 0) {
      brackets.push({ low: values[i], high: values[i + 1], rising: changes[i + 1] > 0 });
    }
  }
  return brackets;
}

/** Where the change comes near zero without passing it between two samples, looks closer and inserts what it finds. */
function probeTouches(problem: Separable, values: number[], changes: number[]): void {
  for (let i = values.length - 2; i > 0; i--) {
    const sign = Math.sign(changes[i]);
    const size = Math.abs(changes[i]);
    const turning = sign * changes[i - 1] >= size && sign * changes[i + 1] >= size;
    if (!turning) continue;
    const found = descend(problem, values[i - 1], values[i + 1], sign);
    if (found === null) continue;
    const at = found.value < values[i] ? i : i + 1;
    values.splice(at, 0, found.value);
    changes.splice(at, 0, found.change);
  }
}

/** Golden-section descent of sign × change; stops as soon as the sign flips. */
function descend(
  problem: Separable,
  low: number,
  high: number,
  sign: number,
): { value: number; change: number } | null {
  const golden = (Math.sqrt(5) - 1) / 2;
  let a = low;
  let b = high;
  for (let trial = 0; trial < 16; trial++) {
    const left = b - golden * (b - a);
    const right = a + golden * (b - a);
    const changeLeft = changeOver(problem, left);
    if (changeLeft * sign < 0) return { value: left, change: changeLeft };
    const changeRight = changeOver(problem, right);
    if (changeRight * sign < 0) return { value: right, change: changeRight };
    if (changeLeft * sign < changeRight * sign) b = right;
    else a = left;
  }
  return null;
}

function polish(problem: Separable, bracket: Bracket, tolerance: number, maximumSteps: number): PeriodicState | null {
  const first = settleAdaptively(problem, bracket);
  if (first === null) return null;
  const [from, to] = bracket.rising ? [period, 0] : [0, period];
  const solveOn = (boundaries: Float64Array, coarse: Polished | null): Polished | null =>
    settleOn(problem, boundaries, coarse?.value ?? first.value, tolerance, from, to);
  const certified = certify(solveOn, first.boundaries, tolerance, maximumSteps);
  if (certified === null) return null;
  const { result, errorEstimate, converged } = certified;
  const margin = 0.02 * (bracket.high - bracket.low) + 1e-6 * bracket.high;
  if (result.value < bracket.low - margin || result.value > bracket.high + margin) return null;
  const direction = bracket.rising ? -1 : 1;
  return {
    curve: result.curve,
    errorEstimate: errorEstimate + result.leftover,
    converged,
    logMultiplier: direction * result.run.logMultiplier,
    frozenLogMultiplier: direction * result.run.frozenLogMultiplier,
    steps: result.run.steps,
  };
}

/** Root of the change within the bracket by adaptive marches in the attracting direction: Newton kept inside by bisection. */
function settleAdaptively(problem: Separable, bracket: Bracket): { value: number; boundaries: Float64Array } | null {
  const [from, to] = bracket.rising ? [period, 0] : [0, period];
  let { low, high } = bracket;
  let value = (low + high) / 2;
  let run: March | null = null;
  for (let trial = 0; trial < 60; trial++) {
    run = march(problem, { from, to, value, tolerance: scanTolerance, keep: false });
    if (!run.completed) {
      // Backwards a start outside the basin runs away; the forward change still tells the side.
      const side = changeOver(problem, value) > 0 === bracket.rising;
      if (side) high = value;
      else low = value;
      value = (low + high) / 2;
      continue;
    }
    // In the attracting direction the change is positive below the state.
    if (run.change > 0) low = value;
    else high = value;
    const newton = value - run.change / Math.expm1(run.logMultiplier);
    const next = newton > low && newton < high ? newton : (low + high) / 2;
    if (Math.abs(next - value) < 1e-7 * value) return { value: next, boundaries: run.boundaries };
    value = next;
  }
  return run?.completed ? { value, boundaries: run.boundaries } : null;
}

interface Polished {
  readonly value: number;
  /** Newton's next change of the start, relative: small enough not to be made. */
  readonly leftover: number;
  readonly run: March;
  readonly curve: Curve;
}

/** Newton on the period map over fixed step ends. */
function settleOn(
  problem: Separable,
  boundaries: Float64Array,
  guess: number,
  tolerance: number,
  from: number,
  to: number,
): Polished | null {
  let value = guess;
  for (let trial = 0; trial < 12; trial++) {
    const run = march(problem, { from, to, value, tolerance, keep: true, boundaries });
    if (!run.completed || run.curve === null) return null;
    const correction = -run.change / Math.expm1(run.logMultiplier);
    const leftover = Math.abs(correction) / value;
    if (leftover < 1e-3 * tolerance) {
      return { value, leftover, run, curve: to > from ? run.curve : reversed(run.curve) };
    }
    if (!(leftover < 0.3)) return null;
    value += correction;
  }
  return null;
}

/** A curve marched from 2π down to 0, read upwards. */
function reversed(curve: Curve): Curve {
  const flip = (column: Float64Array): Float64Array => column.slice().reverse();
  return {
    position: flip(curve.position),
    value: flip(curve.value),
    slope: flip(curve.slope),
    curvature: flip(curve.curvature),
  };
}
