/**
 * Kepler's third law, 4π²a³ = GM P², solved for each of its three quantities.
 * Units:  semiMajorAxis m; period s; mass kg, star plus planet: the error of leaving the planet out is its mass over the star's.
 * Errors: SimError unless both inputs are finite and above zero.
 * Source: Murray & Dermott (1999) Solar System Dynamics, §2.3. G is CODATA 2018; masses made from mass parameters
 *         (`solarMass` = GM☉/G) give back the better-known product GM to the last bit or two.
 */
import { gravitationalConstant } from '../constants.ts';
import { requirePositive } from '../error.ts';
import type { Kilograms, Metres, Seconds } from '../si.ts';
import { turn } from './revolution.ts';

export function periodFromAxis(semiMajorAxis: Metres, totalMass: Kilograms): Seconds {
  requirePositive('orbit.semiMajorAxis', semiMajorAxis, 'm');
  requirePositive('star.mass', totalMass, 'kg');
  return turn * semiMajorAxis * Math.sqrt(semiMajorAxis / (gravitationalConstant * totalMass));
}

export function axisFromPeriod(period: Seconds, totalMass: Kilograms): Metres {
  requirePositive('orbit.period', period, 's');
  requirePositive('star.mass', totalMass, 'kg');
  const meanMotion = turn / period;
  return Math.cbrt((gravitationalConstant * totalMass) / (meanMotion * meanMotion));
}

export function massFromBoth(semiMajorAxis: Metres, period: Seconds): Kilograms {
  requirePositive('orbit.semiMajorAxis', semiMajorAxis, 'm');
  requirePositive('orbit.period', period, 's');
  const speed = (turn * semiMajorAxis) / period;
  return (speed * speed * semiMajorAxis) / gravitationalConstant;
}
