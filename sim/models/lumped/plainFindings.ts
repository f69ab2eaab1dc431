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
  placeOfLevel,
  type Turn,
  type Turns,
  turnInto,
  turnsInto,
} from '../../solve/periodicNodes.ts';
import { forcingPoint } from '../../solve/separable.ts';
import { smallCosine, smallSine } from '../../solve/smallAngle.ts';
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

/** Where the state of one call is kept. */
interface Scratch {
  readonly circle: ReturnType<typeof circleCache>;
  readonly forcing: ReturnType<typeof movableForcing>;
  readonly point: ReturnType<typeof forcingPoint>;
  readonly piece: ReturnType<typeof emptyPiece>;
  readonly turns: Turns;
  readonly highest: Turn;
  readonly lowest: Turn;
  readonly warming: Fastest;
  readonly cooling: Fastest;
  readonly evenWave: Wave;
  readonly oddWave: Wave;
  midpoints: Float64Array;
  /** Of the present mesh: cos(s/2) and sin(s/2) at its nodes. */
  size: number;
  halfCosines: Float64Array;
  halfSines: Float64Array;
  /** The present piece, −1 before one is loaded, and the place in it, 0 … 1. */
  index: number;
  x: number;
  world: World;
  state: PlainState;
  /** The balanced parameter. */
  b: number;
  mean: Kelvin;
  moving: boolean;
}

function newScratch(): Scratch {
  return {
    circle: circleCache(),
    forcing: movableForcing(),
    point: forcingPoint(),
    piece: emptyPiece(),
    turns: { maxima: 0, minima: 0, maximumIn: 0, minimumIn: 0 },
    highest: { index: 0, x: 0.5, position: 0.5, value: 0.5, curvature: 0.5 },
    lowest: { index: 0, x: 0.5, position: 0.5, value: 0.5, curvature: 0.5 },
    warming: { rate: 0.5, position: 0.5, value: 0.5 },
    cooling: { rate: 0.5, position: 0.5, value: 0.5 },
    evenWave: { cosine: 0.5, sine: 0.5 },
    oddWave: { cosine: 0.5, sine: 0.5 },
    midpoints: new Float64Array(0),
    size: 0,
    halfCosines: new Float64Array(0),
    halfSines: new Float64Array(0),
    index: -1,
    x: 0.5,
    b: 0.5,
    world: null as unknown as World,
    state: null as unknown as PlainState,
    mean: 0.5,
    moving: false,
  };
}

function begin(scratch: Scratch, world: World, state: PlainState): void {
  const { size } = state.solution;
  scratch.world = world;
  scratch.state = state;
  scratch.index = -1;
  scratch.forcing.moveTo(state.eccentricity);
  if (scratch.size === size) return;
  const { cosines, sines } = scratch.circle(2 * size);
  scratch.size = size;
  scratch.halfCosines = cosines;
  scratch.halfSines = sines;
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

/** Loads the piece that holds s in [0, 2π], and the forcing there. */
function goTo(scratch: Scratch, s: Radians): void {
  const { size } = scratch.state.solution;
  const place = (s * size) / turn;
  const index = Math.min(size - 1, Math.floor(place));
  goToPiece(scratch, index);
  scratch.x = place - index;
  lookAround(scratch);
}

function goToPiece(scratch: Scratch, index: number): void {
  if (scratch.index === index) return;
  scratch.index = index;
  loadNodePiece(scratch.state.solution, index, scratch.piece);
}

/** The forcing at the present place: the half-angle of the piece's left node is in the table of twice the size. */
function lookAround({ halfCosines, halfSines, index, x, piece, forcing, point }: Scratch): void {
  const further = 0.5 * x * piece.width;
  const sine = smallSine(further);
  const cosine = smallCosine(further);
  const s = halfSines[index];
  const c = halfCosines[index];
  forcing.atHalfAngle(s * cosine + c * sine, c * cosine - s * sine, point);
}

/** φ(a/r)² + 1 − φ − y⁴ at the present point. */
function heating({ state, point }: Scratch, y: number): number {
  const { share } = state;
  const squared = y * y;
  return (share * point.arrival) / point.clock + (1 - share) - squared * squared;
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
  const { state, evenWave, oddWave, b } = scratch;
  const { size, value } = state.solution;
  const mean = scratch.mean / state.scale;
  const squared = ((1 + b) / (1 - b)) ** 2;
  // Periapsis and apoapsis stand for themselves alone: e^{iM} = ±1, clock (1 ∓ b)²/(1 ± b)⁴.
  const periapsis = (value[0] - mean) / (squared * (1 + b) * (1 + b));
  const apoapsis = ((value[size / 2] - mean) * squared) / ((1 - b) * (1 - b));
  evenWave.cosine = periapsis - apoapsis;
  evenWave.sine = 0;
  oddWave.cosine = 0;
  oddWave.sine = 0;
  addPairs(scratch, value, size, 4, 4, evenWave);
  addPairs(scratch, value, size, 2, 4, oddWave);
}

/** The midpoints between the nodes into the odd wave. */
function addMidpoints(scratch: Scratch): void {
  const { state, oddWave } = scratch;
  const { solution } = state;
  const { size } = solution;
  if (scratch.midpoints.length < size) scratch.midpoints = new Float64Array(size);
  for (let i = 0; i < size; i++) scratch.midpoints[i] = midpointValue(solution, i);
  oddWave.cosine = 0;
  oddWave.sine = 0;
  addPairs(scratch, scratch.midpoints, size - 1, 1, 2, oddWave);
}

/**
 * Times s = πj/size, j = first, first + step … below size, with those mirrored in periapsis, which share cosine and clock;
 * ordinate j/2 stands there, and `mirror` − j/2 at the other. With z = e^{is}, e^{iE} = (z + b)/(1 + bz); the clock is D₋/D₊².
 */
function addPairs(
  scratch: Scratch,
  ordinate: Float64Array,
  mirror: number,
  first: number,
  step: number,
  wave: Wave,
): void {
  const { state, b, halfCosines, halfSines, size } = scratch;
  const { eccentricity } = state;
  const mean = scratch.mean / state.scale;
  const oneB2 = 1 + b * b;
  const oneMinusB2 = 1 - b * b;
  let cosineSum = wave.cosine;
  let sineSum = wave.sine;
  for (let j = first; j < size; j += step) {
    const i = j >> 1;
    const c = 2 * b * halfCosines[j];
    const inverse = 1 / (oneB2 + c);
    const sineE = oneMinusB2 * halfSines[j] * inverse;
    const cosineE = (oneB2 * halfCosines[j] + 2 * b) * inverse;
    // M = E − e sin E
    const sine = smallSine(eccentricity * sineE);
    const cosine = smallCosine(eccentricity * sineE);
    const clock = (oneB2 - c) * inverse * inverse;
    const there = ordinate[i] - mean;
    const back = ordinate[mirror - i] - mean;
    cosineSum += (there + back) * clock * (cosineE * cosine + sineE * sine);
    sineSum += (there - back) * clock * (sineE * cosine - cosineE * sine);
  }
  wave.cosine = cosineSum;
  wave.sine = sineSum;
}

/**
 * The rate is proportional to the heating N = y′/(κr), and extreme where y″r − y′r′ changes its sign. Of several such pieces
 * the best counts; without any, the curve is read.
 */
function enterFastestChanges(scratch: Scratch, sheet: Sheet): boolean {
  if (!scratch.moving) {
    enterNoChange(sheet, still);
    return true;
  }
  const { solution } = scratch.state;
  const { size, slope, curvature, forcing } = solution;
  const { r0, r1 } = forcing;
  const { warming, cooling } = scratch;
  warming.rate = 0;
  cooling.rate = 0;
  const last = size - 1;
  let before = curvature[last] * r0[last] - slope[last] * r1[last];
  for (let i = 0; i < size; i++) {
    const here = curvature[i] * r0[i] - slope[i] * r1[i];
    const isMaximum = before > 0 && here <= 0;
    if (isMaximum || (before < 0 && here >= 0)) {
      goToPiece(scratch, i === 0 ? last : i - 1);
      tryPiece(scratch, before, here, isMaximum ? 1 : -1, isMaximum ? warming : cooling);
    }
    before = here;
  }
  if (!(warming.rate > 0 && cooling.rate > 0)) return false;
  enterFastest(scratch, warming, 1, at.fastestWarming, sheet);
  enterFastest(scratch, cooling, -1, at.fastestCooling, sheet);
  return true;
}

interface Fastest {
  /** |N|, dimensionless. */
  rate: number;
  position: Radians;
  value: number;
}

function enterFastest(scratch: Scratch, fastest: Fastest, sign: 1 | -1, column: number, sheet: Sheet): void {
  const { world, state } = scratch;
  const { coefficient, scale, solution, eccentricity } = state;
  const { period } = world.orbit;
  const toKelvinPerSecond = (coefficient * fourthPower(scale)) / world.surface.heatCapacity;
  const shift = fourthPower(fastest.value) * (fourthPower(1 + solution.errorEstimate) - 1);
  enter(sheet, column, sign * fastest.rate * toKelvinPerSecond, shift * toKelvinPerSecond);
  enter(sheet, column + 1, (meanFromBalanced(fastest.position, eccentricity) * period) / turn);
}

function fourthPower(x: number): number {
  return x * x * (x * x);
}

/**
 * The extreme of N in the present piece, at whose ends its change is `left` and `right`, of two signs: regula falsi as
 * Anderson & Björck (1973, BIT 13, 253) mend it.
 */
function tryPiece(scratch: Scratch, left: number, right: number, sign: 1 | -1, fastest: Fastest): void {
  const { state, piece, point } = scratch;
  let a = 0;
  let fa = left;
  let b = 1;
  let fb = right;
  let x = left / (left - right);
  for (let trial = 0; trial < 60; trial++) {
    scratch.x = x;
    lookAround(scratch);
    const fx = changeOfRate(scratch);
    if (fx === 0) break;
    if (fx > 0 === fb > 0) {
      const rest = 1 - fx / fb;
      fa *= rest > 0 ? rest : 0.5;
    } else {
      a = b;
      fa = fb;
    }
    b = x;
    fb = fx;
    let next = b - (fb * (b - a)) / (fb - fa);
    if (!((next - a) * (next - b) < 0)) next = (a + b) / 2;
    const step = Math.abs(next - x);
    x = next;
    if (step < 1e-9) break;
  }
  scratch.x = x;
  lookAround(scratch);
  const y = pieceValue(piece, x);
  const rate = sign * (isSlow(scratch) ? heating(scratch, y) : pieceSlope(piece, x) / (state.rate * point.clock));
  if (rate > fastest.rate) {
    fastest.rate = rate;
    fastest.position = piece.left + x * piece.width;
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

/** κr² dN/ds = y″r − y′r′ at the present place. */
function changeOfRate(scratch: Scratch): number {
  const { state, point, piece, x } = scratch;
  const { clock } = point;
  if (!isSlow(scratch)) return pieceCurvature(piece, x) * clock - pieceSlope(piece, x) * point.clockSlope;
  const y = pieceValue(piece, x);
  const flux = (state.share * point.arrival) / clock;
  const fluxSlope = flux * (point.arrivalSlope / point.arrival - point.clockSlope / clock);
  const change = fluxSlope - 4 * y * y * y * state.rate * clock * heating(scratch, y);
  return state.rate * clock * clock * change;
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
function crossing(scratch: Scratch, from: Turn, to: Turn, level: number): Radians {
  const { solution } = scratch.state;
  const { size, value } = solution;
  const rises = to.value > from.value;
  let index = from.index;
  let next = index + 1 === size ? 0 : index + 1;
  while (index !== to.index && value[next] > level !== rises) {
    index = next;
    next = index + 1 === size ? 0 : index + 1;
  }
  goToPiece(scratch, index);
  const { piece } = scratch;
  const x = placeOfLevel(piece, level, index === from.index ? from.x : 0, index === to.index ? to.x : 1);
  return piece.left + x * piece.width;
}
