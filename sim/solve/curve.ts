/**
 * A function of one variable as quintic Hermite pieces: what every one-temperature solver hands over.
 * Plain data. Piece i spans [position[i], position[i+1]] and carries value, slope and curvature at both of its ends, so a
 * slope may jump from piece to piece (a stepped albedo) while the value does not.
 */
export interface Curve {
  /** Increasing, length pieces + 1. A periodic curve spans exactly one period. */
  readonly position: Float64Array;
  /** At the left end of each piece (index 2i) and at its right end (2i + 1): length 2 × pieces. */
  readonly value: Float64Array;
  readonly slope: Float64Array;
  readonly curvature: Float64Array;
}

/** Power-basis coefficients of one piece in x = (s − left)/width ∈ [0, 1]; overwritten by `loadPiece`. */
export interface Piece {
  left: number;
  width: number;
  c0: number;
  c1: number;
  c2: number;
  c3: number;
  c4: number;
  c5: number;
}

export function emptyPiece(): Piece {
  return { left: 0, width: 1, c0: 0, c1: 0, c2: 0, c3: 0, c4: 0, c5: 0 };
}

export function loadPiece(curve: Curve, index: number, piece: Piece): void {
  const { position, value, slope, curvature } = curve;
  const left = position[index];
  const a = 2 * index;
  const b = a + 1;
  const h = position[index + 1] - left;
  setPiece(piece, left, h, value[a], value[b], slope[a], slope[b], curvature[a], curvature[b]);
}

/** Quintic Hermite interpolation: matches value, slope and curvature at both ends of [left, left + h]. */
export function setPiece(
  piece: Piece,
  left: number,
  h: number,
  value0: number,
  value1: number,
  slope0: number,
  slope1: number,
  curvature0: number,
  curvature1: number,
): void {
  const rise = value1 - value0;
  const v0 = slope0 * h;
  const v1 = slope1 * h;
  const w0 = curvature0 * h * h;
  const w1 = curvature1 * h * h;
  piece.left = left;
  piece.width = h;
  piece.c0 = value0;
  piece.c1 = v0;
  piece.c2 = 0.5 * w0;
  piece.c3 = 10 * rise - 6 * v0 - 4 * v1 - 1.5 * w0 + 0.5 * w1;
  piece.c4 = -15 * rise + 8 * v0 + 7 * v1 + 1.5 * w0 - w1;
  piece.c5 = 6 * rise - 3 * (v0 + v1) - 0.5 * (w0 - w1);
}

export function pieceValue(p: Piece, x: number): number {
  return p.c0 + x * (p.c1 + x * (p.c2 + x * (p.c3 + x * (p.c4 + x * p.c5))));
}

/** d/ds, not d/dx. */
export function pieceSlope(p: Piece, x: number): number {
  return (p.c1 + x * (2 * p.c2 + x * (3 * p.c3 + x * (4 * p.c4 + x * 5 * p.c5)))) / p.width;
}

/** d²/ds². */
export function pieceCurvature(p: Piece, x: number): number {
  return (2 * p.c2 + x * (6 * p.c3 + x * (12 * p.c4 + x * 20 * p.c5))) / (p.width * p.width);
}

/** Index of the piece that holds `s`; the ends belong to the first and last piece. */
export function pieceAt(curve: Curve, s: number): number {
  let low = 0;
  let high = curve.position.length - 2;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (curve.position[middle] <= s) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** Value at one point of the curve's span. */
export function curveValue(curve: Curve, s: number): number {
  const piece = emptyPiece();
  loadPiece(curve, pieceAt(curve, s), piece);
  return pieceValue(piece, (s - piece.left) / piece.width);
}

/** Values at increasing positions, into `values`. The coefficients stay in locals: this is the inner loop of all output. */
export function curveValuesInto(curve: Curve, positions: Float64Array, values: Float64Array): void {
  const { position, value, slope, curvature } = curve;
  const last = position.length - 2;
  const count = positions.length;
  let index = count > 0 ? pieceAt(curve, positions[0]) : 0;
  for (let i = 0; i < count; ) {
    while (index < last && positions[i] >= position[index + 1]) index++;
    const a = 2 * index;
    const b = a + 1;
    const left = position[index];
    const h = position[index + 1] - left;
    const inverse = 1 / h;
    const end = index < last ? position[index + 1] : Number.POSITIVE_INFINITY;
    const c0 = value[a];
    const rise = value[b] - c0;
    const v0 = slope[a] * h;
    const v1 = slope[b] * h;
    const w0 = curvature[a] * h * h;
    const w1 = curvature[b] * h * h;
    const c2 = 0.5 * w0;
    const c3 = 10 * rise - 6 * v0 - 4 * v1 - 1.5 * w0 + 0.5 * w1;
    const c4 = -15 * rise + 8 * v0 + 7 * v1 + 1.5 * w0 - w1;
    const c5 = 6 * rise - 3 * (v0 + v1) - 0.5 * (w0 - w1);
    do {
      const x = (positions[i] - left) * inverse;
      values[i] = c0 + x * (v0 + x * (c2 + x * (c3 + x * (c4 + x * c5))));
      i++;
    } while (i < count && positions[i] < end);
  }
}

/** Copies nodes of a uniform periodic mesh on [0, 2π) into a Curve; `scale` multiplies the ordinates. */
export function periodicCurve(
  size: number,
  value: Float64Array,
  slope: Float64Array,
  curvature: Float64Array,
  scale: number,
): Curve {
  // One allocation for all columns: cheaper than one each.
  const store = new Float64Array(7 * size + 1);
  const ends = {
    value: store.subarray(0, 2 * size),
    slope: store.subarray(2 * size, 4 * size),
    curvature: store.subarray(4 * size, 6 * size),
  };
  const position = store.subarray(6 * size);
  for (let i = 0; i < size; i++) {
    const next = i + 1 === size ? 0 : i + 1;
    position[i] = (2 * Math.PI * i) / size;
    ends.value[2 * i] = scale * value[i];
    ends.value[2 * i + 1] = scale * value[next];
    ends.slope[2 * i] = scale * slope[i];
    ends.slope[2 * i + 1] = scale * slope[next];
    ends.curvature[2 * i] = scale * curvature[i];
    ends.curvature[2 * i + 1] = scale * curvature[next];
  }
  position[size] = 2 * Math.PI;
  return { position, ...ends };
}
