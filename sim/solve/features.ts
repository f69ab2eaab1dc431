/** What people read off a Curve: turning points, crossings, steepest stretches, integrals. */
import {
  type Curve,
  emptyPiece,
  loadPiece,
  type Piece,
  pieceAt,
  pieceCurvature,
  pieceSlope,
  pieceValue,
} from './curve.ts';
import { rootBetween } from './roots.ts';

export interface TurningPoint {
  readonly kind: 'maximum' | 'minimum';
  readonly position: number;
  readonly value: number;
  /** d²/ds² there. */
  readonly curvature: number;
}

/** Roots of the slope, found to rounding; two in one half of a piece escape, which no converged mesh has. */
export function turningPoints(curve: Curve): TurningPoint[] {
  const points: TurningPoint[] = [];
  const piece = emptyPiece();
  eachPiece(curve, piece, () => {
    for (const [from, to] of halves) {
      const left = pieceSlope(piece, from);
      const right = pieceSlope(piece, to);
      const isMaximum = left > 0 && right <= 0;
      if (!isMaximum && !(left < 0 && right >= 0)) continue;
      const x = rootBetween((at) => pieceSlope(piece, at), from, to);
      points.push({
        kind: isMaximum ? 'maximum' : 'minimum',
        position: piece.left + x * piece.width,
        value: pieceValue(piece, x),
        curvature: pieceCurvature(piece, x),
      });
    }
  });
  return points;
}

/** Highest and lowest ordinate among turning points, piece ends and the curve's own ends. */
export function extremes(curve: Curve): { readonly highest: TurningPoint; readonly lowest: TurningPoint } {
  let highest = endPoint(curve, 'maximum');
  let lowest = endPoint(curve, 'minimum');
  for (const point of turningPoints(curve)) {
    if (point.value > highest.value) highest = point;
    if (point.value < lowest.value) lowest = point;
  }
  return { highest, lowest };
}

/** The best node: what counts when a slope jumps or a run begins or ends at its extreme. */
function endPoint(curve: Curve, kind: 'maximum' | 'minimum'): TurningPoint {
  const sign = kind === 'maximum' ? 1 : -1;
  let best = 0;
  for (let end = 1; end < curve.value.length; end++) if (sign * (curve.value[end] - curve.value[best]) > 0) best = end;
  const position = curve.position[(best + 1) >> 1];
  return { kind, position, value: curve.value[best], curvature: curve.curvature[best] };
}

/** Positions where the curve passes `level`, increasing. */
export function crossings(curve: Curve, level: number): number[] {
  const found: number[] = [];
  const piece = emptyPiece();
  eachPiece(curve, piece, () => {
    for (const [from, to] of quarters) {
      const left = pieceValue(piece, from) - level;
      const right = pieceValue(piece, to) - level;
      if (left < 0 === right < 0) continue;
      found.push(piece.left + piece.width * rootBetween((x) => pieceValue(piece, x) - level, from, to));
    }
  });
  return found;
}

/**
 * Share of the clock's time during which low ≤ value ≤ high. `clock` is increasing in s; the share is of its rise over the
 * curve's span.
 */
export function shareBetween(curve: Curve, low: number, high: number, clock: (s: number) => number): number {
  const start = curve.position[0];
  const end = curve.position[curve.position.length - 1];
  const cuts = [start, ...crossings(curve, low), ...crossings(curve, high), end].sort((a, b) => a - b);
  const piece = emptyPiece();
  let inside = 0;
  for (let i = 0; i + 1 < cuts.length; i++) {
    const middle = (cuts[i] + cuts[i + 1]) / 2;
    loadPiece(curve, pieceAt(curve, middle), piece);
    const value = pieceValue(piece, (middle - piece.left) / piece.width);
    if (value >= low && value <= high) inside += clock(cuts[i + 1]) - clock(cuts[i]);
  }
  return Math.min(1, Math.max(0, inside / (clock(end) - clock(start))));
}

/** ∫ f(s, value) ds by five-point Gauss–Legendre on every piece. */
export function integrate(curve: Curve, f: (s: number, value: number) => number): number {
  const piece = emptyPiece();
  let total = 0;
  eachPiece(curve, piece, () => {
    total += gauss(
      (s) => f(s, pieceValue(piece, (s - piece.left) / piece.width)),
      piece.left,
      piece.left + piece.width,
    );
  });
  return total;
}

/** ∫ f ds from `from` to `to` by five-point Gauss–Legendre; never evaluates the ends. */
export function gauss(f: (s: number) => number, from: number, to: number): number {
  const width = to - from;
  let sum = 0;
  for (let k = 0; k < gaussNodes.length; k++) sum += gaussWeights[k] * f(from + gaussNodes[k] * width);
  return sum * width;
}

const halves = [
  [0, 0.5],
  [0.5, 1],
] as const;
const quarters = [
  [0, 0.25],
  [0.25, 0.5],
  [0.5, 0.75],
  [0.75, 1],
] as const;

// Abramowitz & Stegun (1964) table 25.4, n = 5, from the closed forms, moved to [0, 1].
const inner = Math.sqrt(5 - 2 * Math.sqrt(10 / 7)) / 3;
const outer = Math.sqrt(5 + 2 * Math.sqrt(10 / 7)) / 3;
export const gaussNodes: readonly number[] = [(1 - outer) / 2, (1 - inner) / 2, 0.5, (1 + inner) / 2, (1 + outer) / 2];
const innerWeight = (322 + 13 * Math.sqrt(70)) / 1800;
const outerWeight = (322 - 13 * Math.sqrt(70)) / 1800;
export const gaussWeights: readonly number[] = [outerWeight, innerWeight, 64 / 225, innerWeight, outerWeight];

function eachPiece(curve: Curve, piece: Piece, visit: () => void): void {
  for (let index = 0; index + 1 < curve.position.length; index++) {
    loadPiece(curve, index, piece);
    visit();
  }
}
