/**
 * What is read off a periodic function on a uniform mesh of [0, 2π), as quintic Hermite pieces between its nodes: the same
 * curve that `periodicCurve` copies out, without the copy and without garbage.
 */
import { type Piece, pieceCurvature, pieceValue, setPiece } from './curve.ts';

/** Value, slope and curvature at s = 2πi/size: the first `size` entries. */
export interface Nodes {
  readonly size: number;
  readonly value: Float64Array;
  readonly slope: Float64Array;
  readonly curvature: Float64Array;
}

/** The piece from node `index` to the next. */
export function loadNodePiece({ size, value, slope, curvature }: Nodes, index: number, piece: Piece): void {
  const next = index + 1 === size ? 0 : index + 1;
  const h = (2 * Math.PI) / size;
  setPiece(
    piece,
    h * index,
    h,
    value[index],
    value[next],
    slope[index],
    slope[next],
    curvature[index],
    curvature[next],
  );
}

/** Value half-way from node `index` to the next. */
export function midpointValue({ size, value, slope, curvature }: Nodes, index: number): number {
  const next = index + 1 === size ? 0 : index + 1;
  const h = (2 * Math.PI) / size;
  const lift = ((5 * h) / 32) * (slope[index] - slope[next]) + ((h * h) / 64) * (curvature[index] + curvature[next]);
  return 0.5 * (value[index] + value[next]) + lift;
}

/** The pieces in which the slope changes sign. */
export interface Turns {
  maxima: number;
  minima: number;
  /** Piece of the last one found. */
  maximumIn: number;
  minimumIn: number;
}

export function turnsInto({ size, slope }: Nodes, turns: Turns): void {
  let maxima = 0;
  let minima = 0;
  let maximumIn = -1;
  let minimumIn = -1;
  let before = slope[size - 1];
  for (let i = 0; i < size; i++) {
    const here = slope[i];
    if (before > 0) {
      if (here <= 0) {
        maxima++;
        maximumIn = i - 1;
      }
    } else if (before < 0 && here >= 0) {
      minima++;
      minimumIn = i - 1;
    }
    before = here;
  }
  turns.maxima = maxima;
  turns.minima = minima;
  turns.maximumIn = maximumIn < 0 ? size - 1 : maximumIn;
  turns.minimumIn = minimumIn < 0 ? size - 1 : minimumIn;
}

/** A turning point, and the place in its piece. */
export interface Turn {
  index: number;
  /** 0 … 1 */
  x: number;
  position: number;
  value: number;
  /** d²/ds² there. */
  curvature: number;
}

/** The root of the slope in piece `index`, at whose ends the slope's signs differ: Newton, kept between them. */
export function turnInto(nodes: Nodes, index: number, piece: Piece, turn: Turn): void {
  loadNodePiece(nodes, index, piece);
  const { c1, c2, c3, c4, c5 } = piece;
  const last = c1 + 2 * c2 + 3 * c3 + 4 * c4 + 5 * c5;
  let low = 0;
  let high = 1;
  let x = c1 / (c1 - last);
  if (!(x >= 0 && x <= 1)) x = 0.5; // slopes of rounding alone may give 0/0
  for (let trial = 0; trial < 60; trial++) {
    const slope = c1 + x * (2 * c2 + x * (3 * c3 + x * (4 * c4 + x * 5 * c5)));
    if (slope > 0 === c1 > 0) low = x;
    else high = x;
    let next = x - slope / (2 * c2 + x * (6 * c3 + x * (12 * c4 + x * 20 * c5)));
    if (!(next >= low && next <= high)) next = (low + high) / 2;
    const step = Math.abs(next - x);
    x = next;
    if (step < lastStep) break;
  }
  turn.index = index;
  turn.x = x;
  turn.position = piece.left + x * piece.width;
  turn.value = pieceValue(piece, x);
  turn.curvature = pieceCurvature(piece, x);
}

/** Place in (low, high) of a piece where its value passes `level`; the values at both must lie on different sides of it. */
export function placeOfLevel(piece: Piece, level: number, low: number, high: number): number {
  const { c1, c2, c3, c4, c5 } = piece;
  const rises = pieceValue(piece, high) > pieceValue(piece, low);
  let a = low;
  let b = high;
  let x = (a + b) / 2;
  for (let trial = 0; trial < 80; trial++) {
    const excess = pieceValue(piece, x) - level;
    if (excess > 0 === rises) b = x;
    else a = x;
    let next = x - excess / (c1 + x * (2 * c2 + x * (3 * c3 + x * (4 * c4 + x * 5 * c5))));
    if (!(next >= a && next <= b)) next = (a + b) / 2;
    const step = Math.abs(next - x);
    x = next;
    if (step < lastStep) break;
  }
  return x;
}

/** Newton's steps square: what is left after one below this is rounding. */
const lastStep = 1e-8;
