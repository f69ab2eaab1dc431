/**
 * The findings of a plain world straight off the nodes of its periodic state: no curve, no rows, no garbage. What is
 * particular to plain worlds is used here:
 *
 *   - the flux falls on the way out and rises on the way in, and y″ has the sign of its change wherever y′ = 0: so the
 *     temperature has one maximum, outbound, and one minimum, inbound;
 *   - the steady value is (flux/c)^¼: its extremes lie at the apsides, its first harmonic at periapsis, and without internal
 *     heat its mean is an elliptic integral;
 *   - means over a period are trapezoidal sums, whose error falls like e^(−size): it is the square of the difference between
 *     the sums over even and over odd nodes. Where that does not keep the tolerance, and where rounding makes more turning
 *     points than two, the curve is read instead (`findings.ts`).
 *
 * Source of the rule: Trefethen & Weideman (2014) SIAM Rev. 56, 385, Theorem 3.2.
 */
import { stefanBoltzmann } from '../../constants.ts';
import { enter, enterUndefined, type Sheet } from '../../findings/sheet.ts';
import { steadyAtAlbedo } from '../../findings/steadyState.ts';
import { timeMeanSteadyRatio } from '../../orbit/averages.ts';
import { balancedParameter, meanFromBalanced } from '../../orbit/balanced.ts';
import type { Kelvin } from '../../si.ts';
import { pieceValue } from '../../solve/curve.ts';
import { type Turn, turnInto, turnsInto } from '../../solve/periodicNodes.ts';
import type { Window, World } from '../../world.ts';
import { at, type Wanted } from './columns.ts';
import {
  enterDampingOf,
  enterLagOf,
  enterNoLag,
  enterWorld,
  isMoving,
  largestTimeError,
  still,
  tooFlat,
} from './entries.ts';
import type { PlainState } from './plain.ts';
import { enterFastestChanges } from './plainFastest.ts';
import { enterHarmonicLag } from './plainHarmonic.ts';
import { begin, goTo, heating, isResolved, newScratch, type Scratch, turn } from './plainScratch.ts';
import { enterWindows } from './plainWindows.ts';
import { instellationAtAxis } from './problem.ts';

/** Fills a sheet's wanted columns; false, and nothing promised, where the curve must be read instead. */
export type PlainFindings = (
  world: World,
  state: PlainState,
  windows: readonly Window[],
  wanted: Wanted,
  sheet: Sheet,
) => boolean;

/** With its own scratch; one per thread. */
export function plainFindings(): PlainFindings {
  const scratch = newScratch();
  return (world, state, windows, wanted, sheet) => {
    begin(scratch, world, state);
    if (!findMean(scratch) || !findExtremes(scratch)) return false;
    if (wanted.harmonic && !enterHarmonicLag(scratch, sheet)) return false;
    if (wanted.fastest && !enterFastestChanges(scratch, sheet)) return false;
    if (wanted.world) enterWorld(world, scratch.mean, true, sheet);
    enterTemperatures(scratch, sheet);
    if (wanted.steady) enterSteady(scratch, sheet);
    if (wanted.steadyMean) enter(sheet, at.steadyTemperatureMean, steadyMean(scratch), 0);
    if (wanted.timeOfMin) enterTime(scratch, at.timeOfMin, scratch.lowest, sheet);
    if (wanted.timeOfMax) {
      enterTime(scratch, at.timeOfMax, scratch.highest, sheet);
      enterLag(scratch, sheet);
    }
    if (wanted.windows) enterWindows(scratch, windows, sheet);
    return true;
  };
}

/** Time mean over the orbit. */
function findMean(scratch: Scratch): boolean {
  const { solution, scale, tolerance } = scratch.state;
  const { size, value, forcing } = solution;
  const { r0 } = forcing;
  let even = 0;
  let odd = 0;
  let evenTime = 0;
  let oddTime = 0;
  for (let i = 0; i < size; i += 2) {
    even += value[i] * r0[i];
    evenTime += r0[i];
    odd += value[i + 1] * r0[i + 1];
    oddTime += r0[i + 1];
  }
  const mean = (even + odd) / (evenTime + oddTime);
  scratch.mean = scale * mean;
  return isResolved(even / evenTime - odd / oddTime, mean, tolerance);
}

function findExtremes(scratch: Scratch): boolean {
  const { state, highest, lowest, turns, piece } = scratch;
  const { solution, eccentricity, scale } = state;
  turnsInto(solution, turns);
  if (turns.maxima === 1 && turns.minima === 1 && eccentricity > 0) {
    turnInto(solution, turns.maximumIn, piece, highest);
    turnInto(solution, turns.minimumIn, piece, lowest);
    scratch.index = turns.minimumIn;
    scratch.moving = isMoving(scale * (highest.value - lowest.value), scratch.mean);
    return true;
  }
  extremeNodesInto(solution.value, solution.size, highest, lowest);
  scratch.moving = isMoving(scale * (highest.value - lowest.value), scratch.mean);
  return !scratch.moving;
}

/** What is left of extremes where nothing moves. */
function extremeNodesInto(value: Float64Array, size: number, highest: Turn, lowest: Turn): void {
  highest.value = value[0];
  lowest.value = value[0];
  for (let i = 1; i < size; i++) {
    if (value[i] > highest.value) highest.value = value[i];
    if (value[i] < lowest.value) lowest.value = value[i];
  }
}

function enterTemperatures({ state, highest, lowest, mean }: Scratch, sheet: Sheet): void {
  const { scale, solution, coefficient } = state;
  const { errorEstimate } = solution;
  enter(sheet, at.temperatureMax, scale * highest.value, errorEstimate * scale * highest.value);
  enter(sheet, at.temperatureMin, scale * lowest.value, errorEstimate * scale * lowest.value);
  enter(sheet, at.temperatureMean, mean, errorEstimate * mean);
  // (E/σ)^¼ = (c/σ)^¼ T
  const emission = Math.sqrt(Math.sqrt(coefficient / stefanBoltzmann)) * mean;
  enter(sheet, at.emissionTemperatureMean, emission, errorEstimate * emission);
}

function enterSteady({ world, state, highest, lowest }: Scratch, sheet: Sheet): void {
  const { surface } = world;
  const { eccentricity, scale, solution } = state;
  const atAxis = instellationAtAxis(world);
  const { warm } = surface.albedo;
  const nearest = steadyAtAlbedo(surface, atAxis / (1 - eccentricity) ** 2, warm);
  const farthest = steadyAtAlbedo(surface, atAxis / (1 + eccentricity) ** 2, warm);
  enter(sheet, at.steadyTemperatureMax, nearest, 0);
  enter(sheet, at.steadyTemperatureMin, farthest, 0);
  const swing = scale * (highest.value - lowest.value);
  const error = solution.errorEstimate * scale * (highest.value + lowest.value);
  enterDampingOf(swing, nearest, farthest, error, sheet);
}

function steadyMean(scratch: Scratch): Kelvin {
  const { eccentricity, scale, share } = scratch.state;
  if (eccentricity === 0) return scale;
  return scale * (share === 1 ? timeMeanSteadyRatio(eccentricity) : steadyMeanBySum(scratch));
}

/**
 * Mean of (φ(a/r)² + 1 − φ)^¼: the nearest singularities lie at ± i ln(1/b), so that the sum over n nodes errs by bⁿ;
 * 40 e-foldings are below rounding. Even in s: half of the circle is enough.
 */
function steadyMeanBySum({ state, circle }: Scratch): number {
  const { eccentricity, share } = state;
  const b = balancedParameter(eccentricity);
  let size = 16;
  while (size * -Math.log(b) < 40 && size < 65_536) size *= 2;
  const { cosines } = circle(size);
  const squared = 1 / ((1 - eccentricity) * (1 + eccentricity));
  let sum = 0;
  let time = 0;
  for (let i = 0; i <= size / 2; i++) {
    const minus = 1 + b * b - 2 * b * cosines[i];
    const plus = 1 + b * b + 2 * b * cosines[i];
    const weight = (i === 0 || i === size / 2 ? 0.5 : 1) * (minus / (plus * plus));
    const nearness = plus / minus;
    sum += weight * Math.sqrt(Math.sqrt(share * squared * nearness * nearness + 1 - share));
    time += weight;
  }
  return sum / time;
}

function enterTime(scratch: Scratch, column: number, extreme: Turn, sheet: Sheet): void {
  const { world, state, point } = scratch;
  const { period, eccentricity } = world.orbit;
  if (!scratch.moving) {
    enterUndefined(sheet, column, still);
    return;
  }
  moveToRest(scratch, extreme);
  goTo(scratch, extreme.position);
  // An error δy shifts the balance f(y, s) = 0 by |∂f/∂y| δy / |y″| along s.
  const steepness = 4 * state.rate * point.clock * extreme.value * extreme.value * extreme.value;
  const shift = (steepness * state.solution.errorEstimate * extreme.value) / Math.abs(extreme.curvature);
  const plusMinus = (shift * point.clock * period) / turn;
  if (!(plusMinus <= largestTimeError * period)) enterUndefined(sheet, column, tooFlat);
  else enter(sheet, column, (meanFromBalanced(extreme.position, eccentricity) * period) / turn, plusMinus);
}

/**
 * Moves an extreme to the root of the heating itself, where φ(a/r)² + 1 − φ = y⁴: where the temperature hardly varies, this
 * keeps digits that differences of temperature have lost. Newton with d/ds = y″/(κ dM/ds). Near the ends of the orbit it stays.
 */
function moveToRest(scratch: Scratch, extreme: Turn): void {
  const { state, point } = scratch;
  const reach = 0.02;
  let { position } = extreme;
  for (let trial = 0; trial < 3; trial++) {
    goTo(scratch, position);
    const y = pieceValue(scratch.piece, scratch.x);
    const next = position - (state.rate * point.clock * heating(scratch, y)) / extreme.curvature;
    if (!(Math.abs(next - extreme.position) < reach && next > 0 && next < turn)) return;
    const step = Math.abs(next - position);
    position = next;
    if (step < 1e-11) break; // the next one would be smaller by the relative error of y″
  }
  extreme.position = position;
}

/** Right after the time of the maximum has been entered, with the present point still there. */
function enterLag(scratch: Scratch, sheet: Sheet): void {
  const reason = sheet.reason[at.timeOfMax];
  if (reason !== null) {
    enterNoLag(sheet, reason);
    return;
  }
  const { world, point, highest } = scratch;
  const { period } = world.orbit;
  const plusMinus = sheet.plusMinus[at.timeOfMax];
  // A maximum that is late by less than its own error may seem to come before the periapsis that it follows.
  const reach = (plusMinus * turn) / (point.clock * period);
  const periapsis = Math.floor((highest.position + reach) / turn + 1e-12) * period;
  enterLagOf(world, Math.max(0, sheet.value[at.timeOfMax] - periapsis), plusMinus, sheet);
}
