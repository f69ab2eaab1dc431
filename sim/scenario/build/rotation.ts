/** Sidereal rotation period from any of its forms. */
import type { Seconds } from '../../si.ts';
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

/** Time from noon to noon at low obliquity; Infinity for a planet that keeps one face to its star. */
export function solarDay(sidereal: Seconds, orbitalPeriod: Seconds): Seconds {
  return 1 / Math.abs(1 / sidereal - 1 / orbitalPeriod);
}

/** Turns an orbit at which tides no longer change the spin of a planet on a fixed eccentric orbit. */
function pseudoSynchronousRate(eccentricity: number): number {
  const e2 = eccentricity * eccentricity;
  const above = 1 + e2 * (15 / 2 + e2 * (45 / 8 + e2 * (5 / 16)));
  const below = (1 + e2 * (3 + e2 * (3 / 8))) * (1 - e2) ** 1.5;
  return above / below;
}
