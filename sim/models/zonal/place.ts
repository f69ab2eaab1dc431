/** Where a planet is at a time. */
import { instellation } from '../../instellation/instellation.ts';
import { balancedFromMean, distanceRatioFromBalanced, trueFromBalanced } from '../../orbit/balanced.ts';
import type { Flux, Radians, Seconds } from '../../si.ts';
import type { World } from '../../world.ts';

/** True anomaly and instellation at a time after periapsis. */
export function placeAt(world: World, time: Seconds): { trueAnomaly: Radians; instellation: Flux } {
  const { orbit, star } = world;
  const s = balancedFromMean((2 * Math.PI * time) / orbit.period, orbit.eccentricity);
  const distance = orbit.semiMajorAxis * distanceRatioFromBalanced(s, orbit.eccentricity);
  return {
    trueAnomaly: trueFromBalanced(s, orbit.eccentricity),
    instellation: instellation(star.luminosity, distance),
  };
}
