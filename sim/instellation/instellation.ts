/** What arrives from the star on a surface that faces it. Units: luminosity W; distances m → W m⁻². */
import { requirePositive } from '../error.ts';
import { orbitMeanInverseSquare } from '../orbit/averages.ts';
import type { Flux, Metres, Watts } from '../si.ts';

/** L/(4πr²). A kernel: checks nothing. */
export function instellation(luminosity: Watts, distance: Metres): Flux {
  return luminosity / (4 * Math.PI * distance * distance);
}

/**
 * Time mean over an orbit, L/(4πa²√(1−e²)).
 * Errors: SimError unless 0 ≤ eccentricity < 1 and the others are finite and above zero.
 * Source: Williams & Pollard (2002) Int. J. Astrobiology 1, 61.
 */
export function orbitMeanInstellation(luminosity: Watts, semiMajorAxis: Metres, eccentricity: number): Flux {
  requirePositive('star.luminosity', luminosity, 'W');
  requirePositive('orbit.semiMajorAxis', semiMajorAxis, 'm');
  return instellation(luminosity, semiMajorAxis) * orbitMeanInverseSquare(eccentricity);
}

/**
 * Distance at which the star gives this instellation.
 * Errors: SimError unless both are finite and above zero.
 */
export function distanceFromInstellation(luminosity: Watts, flux: Flux): Metres {
  requirePositive('star.luminosity', luminosity, 'W');
  requirePositive('orbit.instellation', flux, 'W/m2');
  return Math.sqrt(luminosity / (4 * Math.PI * flux));
}
