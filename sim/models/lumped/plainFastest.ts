/** When the temperature of a plain world changes fastest, off the nodes. */
import { enter, type Sheet } from '../../findings/sheet.ts';
import { meanFromBalanced } from '../../orbit/balanced.ts';
import { pieceCurvature, pieceSlope, pieceValue } from '../../solve/curve.ts';
import { at } from './columns.ts';
import { enterNoChange, still } from './entries.ts';
import { type Fastest, goToPiece, heating, lookAround, type Scratch, turn } from './plainScratch.ts';

/**
 * The rate is proportional to the heating N = y′/(κr), and extreme where y″r − y′r′ changes its sign. Of several such pieces
 * the best counts; without any, the curve is read.
 */
export function enterFastestChanges(scratch: Scratch, sheet: Sheet): boolean {
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

function enterFastest(scratch: Scratch, fastest: Fastest, sign: 1 | -1, column: number, sheet: Sheet): void {
  const { world, state } = scratch;
  const { coefficient, scale, solution, eccentricity } = state;
  const { period } = world.orbit;
  const toKelvinPerSecond = (coefficient * fourthPower(scale)) / world.surface.heatCapacity;
  const shift = fourthPower(fastest.value) * (fourthPower(1 + solution.errorEstimate) - 1);
  enter(sheet, column, sign * fastest.rate * toKelvinPerSecond, (shift + fastest.apart) * toKelvinPerSecond);
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
  const balance = heating(scratch, y);
  const known = isSlow(scratch) ? balance : pieceSlope(piece, x) / (state.rate * point.clock);
  if (sign * known > fastest.rate) {
    fastest.rate = sign * known;
    fastest.apart = Math.abs(balance - known);
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
