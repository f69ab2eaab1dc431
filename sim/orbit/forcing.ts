/**
 * The orbit as a forcing on the balanced anomaly s (see `balanced.ts`): with M the mean anomaly,
 *
 *   arrival(s) = (a/r)² dM/ds    what arrives per unit s, relative to a circular orbit of radius a
 *   clock(s)   = dM/ds           the time that passes per unit s
 *
 * Both are rational in cos s and sin s: with b the balanced parameter, w = √(1−e²) and D± = 1 + b² ± 2b cos s,
 *
 *   arrival = (1 − b²) / (w D−),   clock = w (1 − b²) D− / D+².
 *
 * So a periapsis passage at e = 0.99 is as smooth as a circle on a uniform mesh in s, and no Kepler equation is
 * solved inside a solver. Derivation: E = s − 2 atan2(b sin s, 1 + b cos s) gives r/a = w D−/D+ and dE/ds = (1−b²)/D+;
 * dM/ds = (r/a) dE/ds. Dimensionless throughout.
 */
import { balancedParameter } from './balanced.ts';

/** Values and the first two derivatives in s, on nodes of a mesh. */
export interface ForcingTable {
  readonly arrival: Float64Array;
  readonly arrivalSlope: Float64Array;
  readonly arrivalCurvature: Float64Array;
  readonly clock: Float64Array;
  readonly clockSlope: Float64Array;
  readonly clockCurvature: Float64Array;
}

/**
 * Fills `table` on the uniform mesh s = 2πi/size, size even: one half from its cosines and sines, the other by symmetry
 * (arrival and clock are even in s, their slopes odd).
 */
export function circleForcingInto(
  eccentricity: number,
  cosines: Float64Array,
  sines: Float64Array,
  size: number,
  table: ForcingTable,
): void {
  const half = size >> 1;
  forcingInto(eccentricity, cosines, sines, half + 1, table);
  const { arrival, arrivalSlope, arrivalCurvature, clock, clockSlope, clockCurvature } = table;
  for (let i = 1; i < half; i++) {
    const mirrored = size - i;
    arrival[mirrored] = arrival[i];
    arrivalSlope[mirrored] = -arrivalSlope[i];
    arrivalCurvature[mirrored] = arrivalCurvature[i];
    clock[mirrored] = clock[i];
    clockSlope[mirrored] = -clockSlope[i];
    clockCurvature[mirrored] = clockCurvature[i];
  }
}

/** Fills `table` at s = s_i for the given cos s_i and sin s_i, i < count. */
export function forcingInto(
  eccentricity: number,
  cosines: Float64Array,
  sines: Float64Array,
  count: number,
  table: ForcingTable,
): void {
  const { arrival, arrivalSlope, arrivalCurvature, clock, clockSlope, clockCurvature } = table;
  const w = Math.sqrt((1 - eccentricity) * (1 + eccentricity));
  const b = balancedParameter(eccentricity);
  const oneMinusB2 = (1 - b) * (1 + b);
  const middle = 1 + b * b;
  for (let i = 0; i < count; i++) {
    const c = 2 * b * cosines[i];
    const s = 2 * b * sines[i];
    const inverseMinus = 1 / (middle - c);
    const inversePlus = 1 / (middle + c);
    const x = s * inverseMinus; // D−′/D−
    const y = s * inversePlus; // −D+′/D+
    const q = (oneMinusB2 / w) * inverseMinus;
    arrival[i] = q;
    arrivalSlope[i] = -q * x;
    arrivalCurvature[i] = q * (2 * x * x - c * inverseMinus);
    const m = oneMinusB2 * w * (middle - c) * inversePlus * inversePlus;
    const u = x + 2 * y; // (ln m)′
    clock[i] = m;
    clockSlope[i] = m * u;
    clockCurvature[i] = m * (u * u + c * inverseMinus - x * x + 2 * c * inversePlus + 2 * y * y);
  }
}

/** One point of the forcing, for steppers that choose their own nodes. Reused by its owner; overwritten at each call. */
export interface ForcingPoint {
  arrival: number;
  arrivalSlope: number;
  clock: number;
  clockSlope: number;
}

/** Returns a function that fills a `ForcingPoint` at any s. */
export function forcingAt(eccentricity: number): (s: number, into: ForcingPoint) => void {
  const orbit = movableForcing();
  orbit.moveTo(eccentricity);
  return (s, into) => orbit.at(s, into);
}

/** The forcing of one orbit after another, for those who see many: neither call leaves garbage. */
export interface MovableForcing {
  moveTo(eccentricity: number): void;
  at(s: number, into: ForcingPoint): void;
  /** For those who have sin(s/2) and cos(s/2) already. */
  atHalfAngle(halfSine: number, halfCosine: number, into: ForcingPoint): void;
}

export function movableForcing(): MovableForcing {
  const orbit = { b: 0.5, w: 0.5, oneMinusB2: 0.5 };
  const atHalfAngle: MovableForcing['atHalfAngle'] = (halfSine, halfCosine, into) => {
    const { b, w, oneMinusB2 } = orbit;
    // D∓ = (1 ∓ b)² ± 4b sin²(s/2), without cancellation where D− is small
    const minus = (1 - b) * (1 - b) + 4 * b * halfSine * halfSine;
    const plus = (1 - b) * (1 - b) + 4 * b * halfCosine * halfCosine;
    const slope = 4 * b * halfSine * halfCosine;
    const q = oneMinusB2 / (w * minus);
    const m = (oneMinusB2 * w * minus) / (plus * plus);
    into.arrival = q;
    into.arrivalSlope = (-q * slope) / minus;
    into.clock = m;
    into.clockSlope = m * (slope / minus + (2 * slope) / plus);
  };
  return {
    moveTo(eccentricity) {
      const b = balancedParameter(eccentricity);
      orbit.b = b;
      orbit.w = Math.sqrt((1 - eccentricity) * (1 + eccentricity));
      orbit.oneMinusB2 = (1 - b) * (1 + b);
    },
    at: (s, into) => atHalfAngle(Math.sin(s / 2), Math.cos(s / 2), into),
    atHalfAngle,
  };
}
