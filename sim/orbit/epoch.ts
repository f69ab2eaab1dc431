/**
 * When: periapsis, transit and eclipse, each from the other.
 * Units:  times and period s (one clock throughout, e.g. TDB); anomalies and argumentOfPeriapsis rad.
 * Errors: SimError unless 0 ≤ eccentricity < 1; NaN elsewhere passes through.
 * Convention: ω of the star's orbit, as radial-velocity papers give it, so that the planet is nearest to the observer
 *         (inferior conjunction, transit) at ν = π/2 − ω and behind the star (eclipse) at ν = 3π/2 − ω. Light travel time
 *         is left out. Unless seen edge-on, an eccentric orbit is deepest in transit a little off conjunction.
 * Source: Winn (2010) in Exoplanets, ed. Seager, ch. 3 (arXiv:1001.2010), §2.
 */
import type { Radians, Seconds } from '../si.ts';
import { meanFromTrue } from './anomaly.ts';
import { turn } from './revolution.ts';

export interface OrbitClock {
  readonly period: Seconds;
  readonly eccentricity: number;
  readonly argumentOfPeriapsis: Radians;
}

/** The periapsis nearest to a transit (inferior conjunction). */
export function periapsisFromTransit(transitTime: Seconds, clock: OrbitClock): Seconds {
  return periapsisFromMeanAnomaly(transitTime, meanAtTransit(clock), clock.period);
}

/** The periapsis nearest to an epoch at which the mean anomaly is known. */
export function periapsisFromMeanAnomaly(epoch: Seconds, meanAnomaly: Radians, period: Seconds): Seconds {
  const orbits = meanAnomaly / turn;
  return epoch - (orbits - Math.round(orbits)) * period;
}

/** First transit (inferior conjunction) at or after a periapsis. */
export function transitFromPeriapsis(periapsisTime: Seconds, clock: OrbitClock): Seconds {
  return periapsisTime + fractionOfOrbit(meanAtTransit(clock)) * clock.period;
}

/** First eclipse (superior conjunction) at or after a periapsis. */
export function eclipseFromPeriapsis(periapsisTime: Seconds, clock: OrbitClock): Seconds {
  const mean = meanFromTrue(1.5 * Math.PI - clock.argumentOfPeriapsis, clock.eccentricity);
  return periapsisTime + fractionOfOrbit(mean) * clock.period;
}

function meanAtTransit({ eccentricity, argumentOfPeriapsis }: OrbitClock): Radians {
  return meanFromTrue(0.5 * Math.PI - argumentOfPeriapsis, eccentricity);
}

function fractionOfOrbit(meanAnomaly: Radians): number {
  const orbits = meanAnomaly / turn;
  const fraction = orbits - Math.floor(orbits);
  return fraction < 1 ? fraction : 0;
}
