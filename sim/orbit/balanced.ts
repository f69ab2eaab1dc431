/**
 * The balanced anomaly s, halfway between eccentric and true anomaly:
 *
 *     tan(s/2) = q tan(E/2),   tan(ν/2) = q tan(s/2),   q = ((1+e)/(1−e))^¼;   E = s − 2 atan2(b sin s, 1 + b cos s).
 *
 * In s both the arriving flux and the clock are rational in cos s and sin s with their poles as far from the real line as
 * they can be (at ± i ln(1/b)), so that a uniform mesh in s resolves a periapsis passage of any eccentricity:
 *
 *     r/a = √(1−e²) D₋/D₊,   dM/ds = √(1−e²) (1−b²) D₋/D₊²,   D± = 1 + b² ± 2b cos s.
 *
 * Shape:  an anomaly and the eccentricity in, one number out; allocates nothing.
 * Units:  rad, 0 at periapsis; any real number of turns: x + 2πk gives y + 2πk, and −x gives −y to the last bit.
 * Errors: SimError unless 0 ≤ eccentricity < 1; NaN and infinite anomalies give NaN.
 * Source: own derivation from the half-angle relation in Meeus (1998), ch. 30.
 */
import type { Radians } from '../si.ts';
import { eccentricFromMean, meanFromEccentric } from './anomaly.ts';
import { requireBoundOrbit } from './bound.ts';
import { scaledHalfTangent } from './revolution.ts';

/** b of the equations above, 0 ≤ b < 1: β/(1+√(1−β²)) with β = e/(1+√(1−e²)); e/4 for a nearly circular orbit. Full precision at both ends. */
export function balancedParameter(eccentricity: number): number {
  requireBoundOrbit(eccentricity);
  const axisRatio = Math.sqrt((1 - eccentricity) * (1 + eccentricity));
  const beta = eccentricity / (1 + axisRatio);
  return beta / (1 + Math.sqrt((2 * axisRatio) / (1 + axisRatio)));
}

/** Distance over semi-major axis: √(1−e²) D₋/D₊, written as sums of positive terms. */
export function distanceRatioFromBalanced(balancedAnomaly: Radians, eccentricity: number): number {
  requireBoundOrbit(eccentricity);
  const nearer = Math.sqrt(1 - eccentricity);
  const farther = Math.sqrt(1 + eccentricity);
  const sineSquared = Math.sin(balancedAnomaly / 2) ** 2;
  const cosineSquared = Math.cos(balancedAnomaly / 2) ** 2;
  const ratio = (nearer * cosineSquared + farther * sineSquared) / (farther * cosineSquared + nearer * sineSquared);
  return nearer * farther * ratio;
}

export function balancedFromEccentric(eccentricAnomaly: Radians, eccentricity: number): Radians {
  return towardsTrue(eccentricAnomaly, eccentricity);
}

export function trueFromBalanced(balancedAnomaly: Radians, eccentricity: number): Radians {
  return towardsTrue(balancedAnomaly, eccentricity);
}

export function eccentricFromBalanced(balancedAnomaly: Radians, eccentricity: number): Radians {
  return towardsEccentric(balancedAnomaly, eccentricity);
}

export function balancedFromTrue(trueAnomaly: Radians, eccentricity: number): Radians {
  return towardsEccentric(trueAnomaly, eccentricity);
}

/** The clock: no cancellation, however near to periapsis. */
export function meanFromBalanced(balancedAnomaly: Radians, eccentricity: number): Radians {
  return meanFromEccentric(eccentricFromBalanced(balancedAnomaly, eccentricity), eccentricity);
}

/** Needs one solution of Kepler's equation. */
export function balancedFromMean(meanAnomaly: Radians, eccentricity: number): Radians {
  return balancedFromEccentric(eccentricFromMean(meanAnomaly, eccentricity), eccentricity);
}

/** tan(y/2) = q tan(x/2): half of the way from eccentric to true anomaly. */
function towardsTrue(anomaly: Radians, eccentricity: number): Radians {
  requireBoundOrbit(eccentricity);
  return scaledHalfTangent(anomaly, fourthRoot(1 + eccentricity), fourthRoot(1 - eccentricity));
}

/** tan(y/2) = tan(x/2) / q: half of the way from true to eccentric anomaly. */
function towardsEccentric(anomaly: Radians, eccentricity: number): Radians {
  requireBoundOrbit(eccentricity);
  return scaledHalfTangent(anomaly, fourthRoot(1 - eccentricity), fourthRoot(1 + eccentricity));
}

function fourthRoot(x: number): number {
  return Math.sqrt(Math.sqrt(x));
}
