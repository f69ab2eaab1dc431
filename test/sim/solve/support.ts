/** Problems with known solutions for the solvers. */
import type { QuarticForcing } from '../../../sim/solve/periodicQuartic.ts';
import type { Separable } from '../../../sim/solve/separable.ts';

/**
 * y′ = κ(p − r y⁴) made to have the periodic solution y = exp(a sin s): choose r = 1 and p = y⁴ + y′/κ.
 * Returns the forcing and the solution.
 */
export function manufactured(rate: number, a: number) {
  const solution = (s: number) => Math.exp(a * Math.sin(s));
  return {
    solution,
    forcingInto(cosines: Float64Array, sines: Float64Array, size: number, into: QuarticForcing): void {
      for (let i = 0; i < size; i++) {
        const c = cosines[i];
        const s = sines[i];
        const y = Math.exp(a * s);
        const y1 = a * c * y; // y′, y″, y‴ by hand
        const y2 = (a * a * c * c - a * s) * y;
        const y3 = (a ** 3 * c ** 3 - 3 * a * a * c * s - a * c) * y;
        into.p0[i] = y ** 4 + y1 / rate;
        into.p1[i] = 4 * y ** 3 * y1 + y2 / rate;
        into.p2[i] = 12 * y * y * y1 * y1 + 4 * y ** 3 * y2 + y3 / rate;
        into.r0[i] = 1;
        into.r1[i] = 0;
        into.r2[i] = 0;
      }
    },
  };
}

/** y′ = k (p(s) − r y⁴) with constant p, r: for marches. */
export function steadyQuartic(rate: number): Separable {
  return {
    rate,
    drive(_, into) {
      into.arrival = 1;
      into.arrivalSlope = 0;
      into.clock = 1;
      into.clockSlope = 0;
    },
    breaks: [],
    gain: () => 1,
    gainSlope: () => 0,
    loss: (y) => y ** 4,
    lossSlope: (y) => 4 * y ** 3,
    floor: 0,
  };
}

/** y′ = −k y + k (a cos s + b sin s + c): linear, with the solution in closed form. */
export function linearEquation(rate: number): Separable & { exact(s: number, start: number): number } {
  const forced = (s: number) => 3 + (rate * (rate * Math.cos(s) + Math.sin(s))) / (1 + rate * rate);
  return {
    rate,
    drive(s, into) {
      into.arrival = 3 + Math.cos(s);
      into.arrivalSlope = -Math.sin(s);
      into.clock = 1;
      into.clockSlope = 0;
    },
    breaks: [],
    gain: () => 1,
    gainSlope: () => 0,
    loss: (y) => y,
    lossSlope: () => 1,
    floor: Number.NEGATIVE_INFINITY,
    exact: (s, start) => forced(s) + (start - forced(0)) * Math.exp(-rate * s),
  };
}
