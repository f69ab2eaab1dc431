import { gravitationalConstant } from '../constants.ts';
import type { Kilograms, Metres, Radians } from '../si.ts';
import { requireBoundOrbit } from './bound.ts';

/**
 * Distance from star to planet on a bound orbit.
 * Shape:  three numbers in, one out; allocates nothing.
 * Units:  semiMajorAxis m; eccentricity 1; trueAnomaly rad, 0 at periapsis → m.
 * Errors: SimError unless 0 ≤ eccentricity < 1; NaN elsewhere passes through.
 * Source: Meeus (1998) Astronomical Algorithms 2nd ed., eq. 25.5, p. 164; 1 + e cos ν written as two terms of one sign.
 */
export function starDistance(semiMajorAxis: Metres, eccentricity: number, trueAnomaly: Radians): Metres {
  requireBoundOrbit(eccentricity);
  const halfCosine = Math.cos(trueAnomaly / 2);
  const nearness = 1 - eccentricity;
  return (semiMajorAxis * nearness * (1 + eccentricity)) / (nearness + 2 * eccentricity * halfCosine * halfCosine);
}

/**
 * The same distance from the eccentric anomaly: a(1 − e cos E), written as a sum of positive terms.
 * Units:  semiMajorAxis m; eccentricity 1; eccentricAnomaly rad → m.
 * Errors: SimError unless 0 ≤ eccentricity < 1; NaN elsewhere passes through.
 * Source: Meeus (1998), ch. 30.
 */
export function distanceFromEccentric(semiMajorAxis: Metres, eccentricity: number, eccentricAnomaly: Radians): Metres {
  requireBoundOrbit(eccentricity);
  const halfSine = Math.sin(eccentricAnomaly / 2);
  return semiMajorAxis * (1 - eccentricity + 2 * eccentricity * halfSine * halfSine);
}

/**
 * Speed along the orbit relative to the star, by the vis-viva equation v² = GM(2/r − 1/a).
 * Units:  semiMajorAxis m; distance m, 0 < distance ≤ 2 semiMajorAxis; totalMass kg, star plus planet → m/s.
 * Errors: none; a distance that the orbit cannot reach gives NaN.
 * Source: e.g. Vallado (2013) Fundamentals of Astrodynamics 4th ed., ch. 1.
 */
export function orbitalSpeed(semiMajorAxis: Metres, distance: Metres, totalMass: Kilograms): number {
  return Math.sqrt((gravitationalConstant * totalMass * (2 * semiMajorAxis - distance)) / (semiMajorAxis * distance));
}
