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
import { movableForcing } from '../../orbit/forcing.ts';
import type { Kelvin, Radians } from '../../si.ts';
import { circleCache } from '../../solve/circle.ts';
import { emptyPiece, pieceCurvature, pieceSlope, pieceValue } from '../../solve/curve.ts';
import {
  loadNodePiece,
  midpointValue,
  nodeValue,
  placeOfLevel,
  type Turn,
  type Turns,
  turnInto,
  turnsInto,
} from '../../solve/periodicNodes.ts';
import { rootBetween } from '../../solve/roots.ts';
import { forcingPoint } from '../../solve/separable.ts';
import type { Window, World } from '../../world.ts';
import { at, type Wanted } from './columns.ts';
import {
  enterDampingOf,
  enterInstellationWindow,
  enterLagOf,
  enterNoChange,
  enterNoLag,
  enterWorld,
  isMoving,
  largestTimeError,
  still,
  tooFlat,
} from './entries.ts';
import type { PlainState } from './plain.ts';
import { instellationAtAxis } from './problem.ts';

const turn = 2 * Math.PI;

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
    scratch.world = world;
    scratch.state = state;
    if (!findMean(scratch) || !findExtremes(scratch)) return false;
    if (wanted.harmonic && !enterHarmonicLag(scratch, sheet)) return false;
    if (wanted.fastest && !enterFastestChanges(scratch, sheet)) return false;
    if (wanted.world) enterWorld(world, scratch.mean, sheet);
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

/** Where the state of one call is kept. */
interface Scratch {
  readonly circle: ReturnType<typeof circleCache>;
  readonly forcing: ReturnType<typeof movableForcing>;
  readonly point: ReturnType<typeof forcingPoint>;
  readonly piece: ReturnType<typeof emptyPiece>;
  readonly turns: Turns;
  readonly highest: Turn;
  readonly lowest: Turn;
  readonly fastest: { rate: number; position: Radians; value: number };
  /** For `rootBetween`. */
  readonly changeOfRate: (s: Radians) => number;
  readonly evenWave: Wave;
  readonly oddWave: Wave;
  world: World;
  state: PlainState;
  /** The balanced parameter. */
  b: number;
  mean: Kelvin;
  moving: boolean;
}

function newScratch(): Scratch {
  const point = forcingPoint();
  const scratch: Scratch = {
    circle: circleCache(),
    forcing: movableForcing(),
    point,
    piece: emptyPiece(),
    turns: { maxima: 0, minima: 0, maximumIn: 0, minimumIn: 0 },
    highest: { index: 0, x: 0.5, position: 0.5, value: 0.5, curvature: 0.5 },
    lowest: { index: 0, x: 0.5, position: 0.5, value: 0.5, curvature: 0.5 },
    fastest: { rate: 0.5, position: 0.5, value: 0.5 },
    changeOfRate: (s) => changeOfRate(scratch, s),
    evenWave: { cosine: 0.5, sine: 0.5 },
    oddWave: { cosine: 0.5, sine: 0.5 },
    b: 0.5,
    world: null as unknown as World,
    state: null as unknown as PlainState,
    mean: 0.5,
    moving: false,
  };
  return scratch;
}

/** Whether two halves of a trapezoidal sum agree well enough for the error of the whole, the square of their difference. */
function isResolved(difference: number, size: number, tolerance: number): boolean {
  return Math.abs(difference) <= 0.1 * Math.sqrt(tolerance) * Math.abs(size);
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
  scratch.forcing.moveTo(eccentricity);
  turnsInto(solution, turns);
  if (turns.maxima === 1 && turns.minima === 1 && eccentricity > 0) {
    turnInto(solution, turns.maximumIn, piece, highest);
    turnInto(solution, turns.minimumIn, piece, lowest);
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
  const { world, state, forcing, point } = scratch;
  const { period, eccentricity } = world.orbit;
  if (!scratch.moving) {
    enterUndefined(sheet, column, still);
    return;
  }
  moveToRest(scratch, extreme);
  forcing.at(extreme.position, point);
  // An error δy shifts the balance f(y, s) = 0 by |∂f/∂y| δy / |y″| along s.
  const steepness = 4 * state.rate * point.clock * extreme.value ** 3;
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
  const { state, forcing, point, piece } = scratch;
  const { rate, solution } = state;
  const reach = 0.02;
  loadNodePiece(solution, extreme.index, piece);
  let { position } = extreme;
  for (let trial = 0; trial < 3; trial++) {
    forcing.at(position, point);
    const y = nodeValue(solution, position, piece);
    const next = position - (rate * point.clock * heating(scratch, y)) / extreme.curvature;
    if (!(Math.abs(next - extreme.position) < reach && next > 0 && next < turn)) return;
    position = next;
  }
  extreme.position = position;
}

/** φ(a/r)² + 1 − φ − y⁴ at the present point. */
function heating({ state, point }: Scratch, y: number): number {
  const { share } = state;
  const squared = y * y;
  return (share * point.arrival) / point.clock + (1 - share) - squared * squared;
}

/** After the time of the maximum has been entered. */
function enterLag(scratch: Scratch, sheet: Sheet): void {
  const reason = sheet.reason[at.timeOfMax];
  if (reason !== null) {
    enterNoLag(sheet, reason);
    return;
  }
  const { world, forcing, point, highest } = scratch;
  const { period } = world.orbit;
  const plusMinus = sheet.plusMinus[at.timeOfMax];
  forcing.at(highest.position, point);
  // A maximum that is late by less than its own error may seem to come before the periapsis that it follows.
  const reach = (plusMinus * turn) / (point.clock * period);
  const periapsis = Math.floor((highest.position + reach) / turn + 1e-12) * period;
  enterLagOf(world, Math.max(0, sheet.value[at.timeOfMax] - periapsis), plusMinus, sheet);
}

/**
 * Phase of ⟨(T − ⟨T⟩) e^{iM}⟩; that of the steady value, even in s, is 0. e^{iM} is steeper than T near apoapsis of a long
 * orbit: where the nodes do not resolve it, the midpoints between them are taken in.
 */
function enterHarmonicLag(scratch: Scratch, sheet: Sheet): boolean {
  const { world, state, moving, evenWave, oddWave } = scratch;
  if (!moving) {
    enterUndefined(sheet, at.lagOfFirstHarmonic, still);
    return true;
  }
  scratch.b = balancedParameter(state.eccentricity);
  addNodes(scratch);
  let isKnown = agree(evenWave, oddWave, state.tolerance);
  evenWave.cosine += oddWave.cosine;
  evenWave.sine += oddWave.sine;
  if (!isKnown) {
    addMidpoints(scratch);
    isKnown = agree(evenWave, oddWave, state.tolerance);
    evenWave.cosine += oddWave.cosine;
    evenWave.sine += oddWave.sine;
  }
  const phase = Math.atan2(evenWave.sine, evenWave.cosine);
  if (isKnown) enter(sheet, at.lagOfFirstHarmonic, (phase / turn) * world.orbit.period);
  return isKnown;
}

/** ∮ (y − ⟨y⟩) cos M dM and with sin M, up to a common factor. */
interface Wave {
  cosine: number;
  sine: number;
}

function agree(even: Wave, odd: Wave, tolerance: number): boolean {
  const difference = Math.abs(even.cosine - odd.cosine) + Math.abs(even.sine - odd.sine);
  return isResolved(difference, Math.abs(even.cosine + odd.cosine) + Math.abs(even.sine + odd.sine), tolerance);
}

/** The even nodes into one wave, the odd ones into the other. */
function addNodes(scratch: Scratch): void {
  const { state, circle, evenWave, oddWave } = scratch;
  const { size, value } = state.solution;
  const { cosines, sines } = circle(size);
  const mean = scratch.mean / state.scale;
  const half = size / 2;
  clear(evenWave);
  clear(oddWave);
  // Periapsis and apoapsis stand for themselves alone.
  addPair(scratch.b, state.eccentricity, 1, 0, value[0] - mean, 0, evenWave);
  addPair(scratch.b, state.eccentricity, -1, 0, value[half] - mean, 0, evenWave);
  for (let i = 1; i < half; i++) {
    const wave = (i & 1) === 0 ? evenWave : oddWave;
    addPair(scratch.b, state.eccentricity, cosines[i], sines[i], value[i] - mean, value[size - i] - mean, wave);
  }
}

/** The midpoints between the nodes into the odd wave. */
function addMidpoints(scratch: Scratch): void {
  const { state, circle, oddWave } = scratch;
  const { solution } = state;
  const { size } = solution;
  const { cosines, sines } = circle(2 * size);
  const mean = scratch.mean / state.scale;
  clear(oddWave);
  for (let i = 0; i < size / 2; i++) {
    const there = midpointValue(solution, i) - mean;
    const back = midpointValue(solution, size - 1 - i) - mean;
    addPair(scratch.b, state.eccentricity, cosines[2 * i + 1], sines[2 * i + 1], there, back, oddWave);
  }
}

function clear(wave: Wave): void {
  wave.cosine = 0;
  wave.sine = 0;
}

/** Two times mirrored in periapsis share cosine and clock. With z = e^{is}, e^{iE} = (z + b)/(1 + bz); the clock is D₋/D₊². */
function addPair(
  b: number,
  eccentricity: number,
  cosine: number,
  sine: number,
  there: number,
  back: number,
  wave: Wave,
): void {
  const inverse = 1 / (1 + b * b + 2 * b * cosine);
  const clock = (1 + b * b - 2 * b * cosine) * inverse * inverse;
  const sineE = (1 - b * b) * sine * inverse;
  const cosineE = ((1 + b * b) * cosine + 2 * b) * inverse;
  // M = E − e sin E
  const sineBehind = Math.sin(eccentricity * sineE);
  const cosineBehind = Math.cos(eccentricity * sineE);
  wave.cosine += (there + back) * clock * (cosineE * cosineBehind + sineE * sineBehind);
  wave.sine += (there - back) * clock * (sineE * cosineBehind - cosineE * sineBehind);
}

function enterFastestChanges(scratch: Scratch, sheet: Sheet): boolean {
  if (!scratch.moving) {
    enterNoChange(sheet, still);
    return true;
  }
  return (
    enterFastest(scratch, 1, at.fastestWarming, at.timeOfFastestWarming, sheet) &&
    enterFastest(scratch, -1, at.fastestCooling, at.timeOfFastestCooling, sheet)
  );
}

/**
 * The rate is proportional to the heating N = y′/(κr), and extreme where y″r − y′r′ changes its sign. Of several such pieces
 * the best counts; without any, the curve is read.
 */
function enterFastest(scratch: Scratch, sign: 1 | -1, rateColumn: number, timeColumn: number, sheet: Sheet): boolean {
  const { world, state, piece, fastest } = scratch;
  const { solution, coefficient, scale } = state;
  const { size, slope, curvature } = solution;
  const { r0, r1 } = solution.forcing;
  fastest.rate = 0;
  let before = sign * (curvature[size - 1] * r0[size - 1] - slope[size - 1] * r1[size - 1]);
  for (let i = 0; i < size; i++) {
    const here = sign * (curvature[i] * r0[i] - slope[i] * r1[i]);
    if (before > 0 && here <= 0) {
      loadNodePiece(solution, i === 0 ? size - 1 : i - 1, piece);
      tryPiece(scratch, sign);
    }
    before = here;
  }
  if (!(fastest.rate > 0)) return false;
  const toKelvinPerSecond = (coefficient * scale ** 4) / world.surface.heatCapacity;
  const shift = fastest.value ** 4 * ((1 + solution.errorEstimate) ** 4 - 1);
  enter(sheet, rateColumn, sign * fastest.rate * toKelvinPerSecond, shift * toKelvinPerSecond);
  enter(sheet, timeColumn, (meanFromBalanced(fastest.position, state.eccentricity) * world.orbit.period) / turn);
  return true;
}

/** Looks for the extreme of N in the present piece, at whose ends its change has two signs. */
function tryPiece(scratch: Scratch, sign: 1 | -1): void {
  const { state, piece, forcing, point, fastest, changeOfRate } = scratch;
  const s = rootBetween(changeOfRate, piece.left, piece.left + piece.width);
  const x = (s - piece.left) / piece.width;
  forcing.at(s, point);
  const y = pieceValue(piece, x);
  const rate = sign * (isSlow(scratch) ? heating(scratch, y) : pieceSlope(piece, x) / (state.rate * point.clock));
  if (rate > fastest.rate) {
    fastest.rate = rate;
    fastest.position = s;
    fastest.value = y;
  }
}

/**
 * A small difference of large fluxes, N knows the rate badly where κh is large: there an error of y counts κ times, and the
 * slope of the curve is better by orders. Where κh is small, N is better.
 */
function isSlow({ state }: Scratch): boolean {
  return (state.rate * turn) / state.solution.size < 0.1;
}

/** Of the sign of dN/ds on the present piece. */
function changeOfRate(scratch: Scratch, s: Radians): number {
  const { state, forcing, point, piece } = scratch;
  forcing.at(s, point);
  const x = (s - piece.left) / piece.width;
  if (!isSlow(scratch)) return pieceCurvature(piece, x) * point.clock - pieceSlope(piece, x) * point.clockSlope;
  const y = pieceValue(piece, x);
  const flux = (state.share * point.arrival) / point.clock;
  const fluxSlope = flux * (point.arrivalSlope / point.arrival - point.clockSlope / point.clock);
  return fluxSlope - 4 * y * y * y * state.rate * point.clock * heating(scratch, y);
}

function enterWindows(scratch: Scratch, windows: readonly Window[], sheet: Sheet): void {
  let column: number = at.windows;
  for (let i = 0; i < windows.length; i++) {
    const window = windows[i];
    if (window.of === 'instellation') {
      enterInstellationWindow(scratch.world, window, 0, turn, column, sheet);
      column += 2;
    } else enter(sheet, column++, shareWithin(scratch, window));
  }
}

function shareWithin(scratch: Scratch, { from, to }: Window): number {
  const { moving, mean, state } = scratch;
  if (!moving) return mean >= from && mean <= to ? 1 : 0;
  const time = timeAbove(scratch, from / state.scale) - timeAbove(scratch, to / state.scale);
  return Math.min(1, Math.max(0, time / turn));
}

/** Mean anomaly spent above a level: between the one crossing on the way up and the one on the way down. */
function timeAbove(scratch: Scratch, level: number): Radians {
  const { highest, lowest } = scratch;
  if (level <= lowest.value) return turn;
  if (level > highest.value) return 0;
  const down = crossing(scratch, highest, lowest, level);
  const up = crossing(scratch, lowest, highest, level);
  const { eccentricity } = scratch.state;
  const time = meanFromBalanced(down, eccentricity) - meanFromBalanced(up, eccentricity);
  return time < 0 ? time + turn : time;
}

/** Where the curve passes `level` on its way from one extreme to the next. */
function crossing({ state, piece }: Scratch, from: Turn, to: Turn, level: number): Radians {
  const { solution } = state;
  const { size, value } = solution;
  const rises = to.value > from.value;
  let index = from.index;
  let next = index + 1 === size ? 0 : index + 1;
  while (index !== to.index && value[next] > level !== rises) {
    index = next;
    next = index + 1 === size ? 0 : index + 1;
  }
  loadNodePiece(solution, index, piece);
  const x = placeOfLevel(piece, level, index === from.index ? from.x : 0, index === to.index ? to.x : 1);
  return piece.left + x * piece.width;
}
