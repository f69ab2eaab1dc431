/**
 * Eccentricity and argument of periapsis from the pairs that fits are made in.
 * Units:  components 1 → eccentricity 1, argumentOfPeriapsis rad in [0, 2π); 0 for a circle, where it has no meaning.
 * Errors: SimError when the pair is not a bound orbit.
 * Source: definition; √e cos ω and √e sin ω: Eastman, Gaudi & Agol (2013) PASP 125, 83, §2.
 */
import type { Radians } from '../si.ts';
import { requireBoundOrbit } from './bound.ts';
import { turn } from './revolution.ts';

export interface OrbitShape {
  readonly eccentricity: number;
  readonly argumentOfPeriapsis: Radians;
}

/** From e cos ω and e sin ω. */
export function shapeFromComponents(eCosOmega: number, eSinOmega: number): OrbitShape {
  const eccentricity = Math.hypot(eCosOmega, eSinOmega);
  requireBoundOrbit(eccentricity);
  return { eccentricity, argumentOfPeriapsis: direction(eCosOmega, eSinOmega) };
}

/** From √e cos ω and √e sin ω. */
export function shapeFromRootComponents(sqrtECosOmega: number, sqrtESinOmega: number): OrbitShape {
  const eccentricity = sqrtECosOmega * sqrtECosOmega + sqrtESinOmega * sqrtESinOmega;
  requireBoundOrbit(eccentricity);
  return { eccentricity, argumentOfPeriapsis: direction(sqrtECosOmega, sqrtESinOmega) };
}

function direction(cosine: number, sine: number): Radians {
  const angle = Math.atan2(sine, cosine);
  return angle < 0 ? (angle + turn) % turn : angle;
}
