/**
 * Where the year stands: solar longitude λ (Ls), declination δ of the star, and the time between seasons.
 *
 *     λ = ν + λ_periapsis,   sin δ = sin ε sin λ
 *
 * λ = 0 is the northern spring equinox, π/2 the northern summer solstice. North is the pole of right-handed spin, so an
 * obliquity ε above π/2 is retrograde rotation and needs no other formula.
 * Shape:  numbers in, a number out; allocates nothing but the four of `seasonLengths`.
 * Units:  angles rad, any number of turns: λ and ν run on with the anomalies of `orbit/anomaly.ts`; durations in orbits.
 * Errors: SimError unless 0 ≤ eccentricity < 1, where an eccentricity is asked for; NaN elsewhere passes through.
 * Pitfall: tables of the Earth often give the heliocentric longitude of perihelion (ϖ = 102.9°); the star stands opposite,
 *         so λ_periapsis = ϖ + 180° (282.9°).
 * Source: Berger (1978) J. Atmos. Sci. 35, 2362.
 */
import { meanFromTrue } from '../orbit/anomaly.ts';
import { turn } from '../orbit/revolution.ts';
import type { Radians } from '../si.ts';

export function solarLongitude(trueAnomaly: Radians, solarLongitudeOfPeriapsis: Radians): Radians {
  return trueAnomaly + solarLongitudeOfPeriapsis;
}

export function trueAnomalyAt(longitude: Radians, solarLongitudeOfPeriapsis: Radians): Radians {
  return longitude - solarLongitudeOfPeriapsis;
}

/** sin δ, never beyond ±1. */
export function sinDeclination(longitude: Radians, obliquity: Radians): number {
  return Math.sin(obliquity) * Math.sin(longitude);
}

/**
 * dδ/dλ = sin ε cos λ / cos δ, never beyond ±1. At ε = π/2 it is the sign of cos λ: there the star turns back at the pole,
 * and the rate has no value at the solstice itself.
 */
export function declinationRate(longitude: Radians, obliquity: Radians): number {
  const cosine = Math.cos(longitude);
  const lifted = Math.cos(obliquity) * Math.sin(longitude);
  return (Math.sin(obliquity) * cosine) / Math.sqrt(cosine * cosine + lifted * lifted);
}

/** Orbits that pass from one solar longitude to another: 1 for a whole turn, below 0 when `to` lies before `from`. */
export function orbitsBetween(
  from: Radians,
  to: Radians,
  eccentricity: number,
  solarLongitudeOfPeriapsis: Radians,
): number {
  const meanAt = (longitude: Radians) =>
    meanFromTrue(trueAnomalyAt(longitude, solarLongitudeOfPeriapsis), eccentricity);
  return (meanAt(to) - meanAt(from)) / turn;
}

/** Northern spring, summer, autumn and winter, in orbits. The sum is 1. */
export function seasonLengths(
  eccentricity: number,
  solarLongitudeOfPeriapsis: Radians,
): readonly [number, number, number, number] {
  const from = (quarter: number) =>
    orbitsBetween((quarter * turn) / 4, ((quarter + 1) * turn) / 4, eccentricity, solarLongitudeOfPeriapsis);
  return [from(0), from(1), from(2), from(3)];
}
