/** Sidereal rotation period from any of its forms. */
import type { Radians, Seconds } from '../../si.ts';
import type { RotationPeriod } from '../schema/planet.ts';

/**
 * Units:  period s, eccentricity 1 → s.
 * Source: pseudo-synchronous rotation: Hut (1981) A&A 99, 126, eq. 42.
 */
export function siderealPeriod(rotation: RotationPeriod, orbit: { period: Seconds; eccentricity: number }): Seconds {
  switch (rotation.form) {
    case 'period':
      return rotation.period.value;
    case 'synchronous':
      return orbit.period;
    case 'resonance':
      return (orbit.period * rotation.orbits) / rotation.turns;
    case 'pseudoSynchronous':
      return orbit.period / pseudoSynchronousRate(orbit.eccentricity);
  }
}

/**
 * Time from noon to noon, over the year; Infinity for a planet that keeps one face to its star. An obliquity above 90° is
 * retrograde: the star then comes up against the orbit's own turn, and the day is shorter than the rotation.
 */
export function solarDay(sidereal: Seconds, orbitalPeriod: Seconds, obliquity: Radians = 0): Seconds {
  const turns = 1 / sidereal;
  const orbits = 1 / orbitalPeriod;
  return 1 / Math.abs(obliquity > Math.PI / 2 ? turns + orbits : turns - orbits);
}

/** Turns an orbit at which tides no longer change the spin of a planet on a fixed eccentric orbit. */
function pseudoSynchronousRate(eccentricity: number): number {
  const e2 = eccentricity * eccentricity;
  const above = 1 + e2 * (15 / 2 + e2 * (45 / 8 + e2 * (5 / 16)));
  const below = (1 + e2 * (3 + e2 * (3 / 8))) * (1 - e2) ** 1.5;
  return above / below;
}
