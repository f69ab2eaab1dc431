/** Whole turns and what is left of them, so that every anomaly is continuous over any number of orbits. */
import type { Radians } from '../si.ts';

export const turn: Radians = 2 * Math.PI;

/** 2π in two parts: the first has 30 bits, so that a product with fewer than 2²³ turns is exact (Cody & Waite 1980). */
const turnHigh = 6.283185303211212;
const turnLow = 3.968374318722162e-9;

/** Nearest number of whole turns in an angle ≥ 0. */
export function wholeTurns(angle: Radians): number {
  return angle <= Math.PI ? 0 : Math.round(angle / turn);
}

/** Angle − 2π·turns, with the true 2π: what is left keeps the last bit of `angle`. */
export function withoutTurns(angle: Radians, turns: number): Radians {
  return turns === 0 ? angle : angle - turns * turnHigh - turns * turnLow;
}

/**
 * The angle y with tan(y/2) = (sineScale / cosineScale) · tan(x/2), on the same turn as x: how eccentric, balanced and
 * true anomaly follow from one another. Odd in x to the last bit; no loss at any x, π included.
 */
export function scaledHalfTangent(x: Radians, sineScale: number, cosineScale: number): Radians {
  if (x < 0) return -scaledHalfTangent(-x, sineScale, cosineScale);
  const turns = wholeTurns(x);
  const half = 0.5 * withoutTurns(x, turns);
  return turns * turn + 2 * Math.atan2(sineScale * Math.sin(half), cosineScale * Math.cos(half));
}
