/**
 * Slopes for interpolating a stiff solution. Taken from y′ = f, the second derivative amplifies every error of y by ∂f/∂y;
 * the collocation polynomial through a step's own stages gives both derivatives without.
 */
import type { Curve } from './curve.ts';
import { stagePositions } from './radau.ts';

/** |∂f/∂y| × step above which a piece counts as stiff. */
export const stiffSteepness = 10;

/** First and second derivatives of the stage cubic at both ends of each stiff piece. */
export interface StiffEnds {
  readonly index: number[];
  readonly slope: number[];
  readonly curvature: number[];
}

const [c1, c2] = stagePositions;
// Newton's divided differences over the positions 0, c1, c2, 1.
const inverse01 = 1 / c1;
const inverse12 = 1 / (c2 - c1);
const inverse23 = 1 / (1 - c2);
const inverse02 = 1 / c2;
const inverse13 = 1 / (1 - c1);

/** Appends one piece: stage departures z_j = Y_j − y₀ over a step of `width`. */
export function pushStiffPiece(
  ends: StiffEnds,
  index: number,
  width: number,
  z1: number,
  z2: number,
  z3: number,
): void {
  const first = z1 * inverse01;
  const middle = (z2 - z1) * inverse12;
  const last = (z3 - z2) * inverse23;
  const second = (middle - first) * inverse02;
  const secondNext = (last - middle) * inverse13;
  const third = secondNext - second;
  // p(x) = y₀ + first x + second x (x − c1) + third x (x − c1)(x − c2)
  const slope0 = first - second * c1 + third * c1 * c2;
  const slope1 = first + second * (2 - c1) + third * (3 - 2 * (c1 + c2) + c1 * c2);
  const curvature0 = 2 * second - 2 * third * (c1 + c2);
  const curvature1 = 2 * second + third * (6 - 2 * (c1 + c2));
  ends.index.push(index);
  ends.slope.push(slope0 / width, slope1 / width);
  ends.curvature.push(curvature0 / width ** 2, curvature1 / width ** 2);
}

/**
 * Sets slope and curvature at both ends of every stiff piece. Between two stiff neighbours the slope is the left one's (its
 * last stage lies on the node) and the curvature the mean of the two, whose leading errors cancel.
 */
export function settleStiffPieces(curve: Curve, ends: StiffEnds): void {
  for (let i = 0; i < ends.index.length; i++) {
    const piece = ends.index[i];
    const joined = i > 0 && ends.index[i - 1] === piece - 1;
    const slope = joined ? ends.slope[2 * i - 1] : ends.slope[2 * i];
    const curvature = joined ? (ends.curvature[2 * i - 1] + ends.curvature[2 * i]) / 2 : ends.curvature[2 * i];
    curve.slope[2 * piece] = slope;
    curve.curvature[2 * piece] = curvature;
    if (joined) curve.curvature[2 * piece - 1] = curvature;
    curve.slope[2 * piece + 1] = ends.slope[2 * i + 1];
    curve.curvature[2 * piece + 1] = ends.curvature[2 * i + 1];
  }
}
