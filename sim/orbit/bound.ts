import { SimError } from '../error.ts';

/** Throws SimError unless 0 ≤ eccentricity < 1: everything in this room is about bound orbits. */
export function requireBoundOrbit(eccentricity: number): void {
  if (!(eccentricity >= 0 && eccentricity < 1)) {
    throw new SimError('orbit.eccentricity', `${eccentricity} is not a bound orbit`, 'Use 0 ≤ eccentricity < 1');
  }
}
