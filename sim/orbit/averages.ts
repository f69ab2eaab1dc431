/**
 * Means over one orbit in closed form: equal weight to equal times. Each is a ratio to the circular orbit of the same axis.
 * Units:  eccentricity 1 → 1.
 * Errors: SimError unless 0 ≤ eccentricity < 1.
 * Source: Méndez & Rivera-Valentín (2017) ApJL 837, L1. Their elliptic integral takes the modulus k = √(2e/(1+e));
 *         ours takes the parameter m = k².
 */
import { requireBoundOrbit } from './bound.ts';
import { completeEllipticE } from './elliptic.ts';

/** ⟨(a/r)²⟩ = 1/√(1−e²): mean instellation over the instellation at distance a. */
export function orbitMeanInverseSquare(eccentricity: number): number {
  requireBoundOrbit(eccentricity);
  return 1 / Math.sqrt((1 - eccentricity) * (1 + eccentricity));
}

/** ⟨r⟩/a = 1 + e²/2. */
export function timeMeanDistanceRatio(eccentricity: number): number {
  requireBoundOrbit(eccentricity);
  return 1 + (eccentricity * eccentricity) / 2;
}

/**
 * ⟨√(a/r)⟩ = (2√(1+e)/π) E(2e/(1+e)): mean of the instantaneous steady temperature over the steady temperature at distance a.
 * Holds for constant albedo, emission ∝ T⁴ and no internal heat. Falls from 1 to 2√2/π = 0.9003 as e → 1.
 */
export function timeMeanSteadyRatio(eccentricity: number): number {
  requireBoundOrbit(eccentricity);
  const parameter = (2 * eccentricity) / (1 + eccentricity);
  return (2 / Math.PI) * Math.sqrt(1 + eccentricity) * completeEllipticE(parameter);
}

/** (1−e²)^(−1/8): steady temperature for the orbit-mean flux (an endless heat store) over that at distance a. Same conditions. */
export function fluxMeanTemperatureRatio(eccentricity: number): number {
  return orbitMeanInverseSquare(eccentricity) ** 0.25;
}
