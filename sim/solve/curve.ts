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

/** Quintic Hermite interpolation: matches value, slope and curvature at both ends. */
export function loadPiece(curve: Curve, index: number, piece: Piece): void {
  const left = curve.position[index];
  const h = curve.position[index + 1] - left;
  const a = 2 * index;
  const b = a + 1;
  const rise = curve.value[b] - curve.value[a];
  const v0 = curve.slope[a] * h;
  const v1 = curve.slope[b] * h;
  const w0 = curve.curvature[a] * h * h;
  const w1 = curve.curvature[b] * h * h;
  piece.left = left;
  piece.width = h;
  piece.c0 = curve.value[a];
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

/** Values at increasing positions, into `values`. */
export function curveValuesInto(curve: Curve, positions: Float64Array, values: Float64Array): void {
  const piece = emptyPiece();
  const last = curve.position.length - 2;
  let index = positions.length > 0 ? pieceAt(curve, positions[0]) : 0;
  let loaded = -1;
  for (let i = 0; i < positions.length; i++) {
    while (index < last && positions[i] >= curve.position[index + 1]) index++;
    if (index !== loaded) {
      loadPiece(curve, index, piece);
      loaded = index;
    }
    values[i] = pieceValue(piece, (positions[i] - piece.left) / piece.width);
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
  const position = new Float64Array(size + 1);
  const ends = {
    value: new Float64Array(2 * size),
    slope: new Float64Array(2 * size),
    curvature: new Float64Array(2 * size),
  };
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
