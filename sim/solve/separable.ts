/**
 * The equation that every general one-temperature world obeys, in the abstract:
 *
 *   y′ = k (p(s) u(y) − r(s) v(y)),   p and r 2π-periodic in s, r > 0, v increasing.
 *
 * u may be piecewise: `breaks` are the ordinates where one smooth piece ends and the next begins (a ramp's ends, a step's
 * place). Piece i holds between breaks[i−1] and breaks[i]; its functions must continue smoothly a little beyond both, since
 * steppers evaluate a piece to its very end and find the crossing there.
 */
export interface Separable {
  /** k > 0. */
  readonly rate: number;
  readonly drive: Forcing;
  readonly breaks: readonly number[];
  /** u and u′ of piece `piece`. */
  readonly gain: (y: number, piece: number) => number;
  readonly gainSlope: (y: number, piece: number) => number;
  /** v and v′. */
  readonly loss: (y: number) => number;
  readonly lossSlope: (y: number) => number;
  /** Iterates below this are a failed step: laws need not be defined there. */
  readonly floor: number;
}

/** p, r and their slopes at one s. */
export interface ForcingPoint {
  arrival: number;
  arrivalSlope: number;
  clock: number;
  clockSlope: number;
}

export type Forcing = (s: number, into: ForcingPoint) => void;

export function forcingPoint(): ForcingPoint {
  return { arrival: 0, arrivalSlope: 0, clock: 0, clockSlope: 0 };
}

/** The piece that `y` lies in; on a break itself, the upper one. */
export function pieceOf(breaks: readonly number[], y: number): number {
  let piece = 0;
  while (piece < breaks.length && y >= breaks[piece]) piece++;
  return piece;
}

/** y′ and the parts that steppers and interpolation need at one point. */
export interface Rates {
  /** y′ */
  rate: number;
  /** ∂y′/∂s */
  drift: number;
  /** ∂y′/∂y */
  slope: number;
}

/** Overwrites `into` with y′, ∂y′/∂s and ∂y′/∂y at a forcing point already loaded for that s. */
export function ratesInto(problem: Separable, point: ForcingPoint, y: number, piece: number, into: Rates): void {
  const { rate } = problem;
  const gain = problem.gain(y, piece);
  const loss = problem.loss(y);
  into.rate = rate * (point.arrival * gain - point.clock * loss);
  into.drift = rate * (point.arrivalSlope * gain - point.clockSlope * loss);
  into.slope = rate * (point.arrival * problem.gainSlope(y, piece) - point.clock * problem.lossSlope(y));
}
