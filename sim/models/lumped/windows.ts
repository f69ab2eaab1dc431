/** Share of the time with the instellation inside a window, in closed form. */
import { meanFromEccentric } from '../../orbit/anomaly.ts';
import type { Flux } from '../../si.ts';
import type { Curve } from '../../solve/curve.ts';
import type { Window, World } from '../../world.ts';
import type { OrbitClock } from './clock.ts';
import { instellationAtAxis } from './problem.ts';

/**
 * Over whole orbits: the instellation falls from periapsis to apoapsis, so that it exceeds a bound during the share M(E)/π of
 * each half orbit, with 1 − e cos E = √(S_a/bound). Over a span that is no whole number of orbits (a run from a start) the
 * same crossings are laid along the span.
 */
export function instellationShare(world: World, curve: Curve, clock: OrbitClock, window: Window): number {
  const start = clock.mean(curve.position[0]);
  const end = clock.mean(curve.position[curve.position.length - 1]);
  const outer = meanAnomalyAt(world, window.from);
  const inner = meanAnomalyAt(world, window.to);
  const timeWithin = (half: number, mean: number): number => {
    // Time up to `mean` that lies within `half` of a periapsis.
    const turn = 2 * Math.PI;
    const orbits = Math.round(mean / turn);
    const rest = mean - orbits * turn;
    return 2 * half * orbits + Math.min(half, Math.max(-half, rest));
  };
  const above = (half: number) => timeWithin(half, end) - timeWithin(half, start);
  return Math.min(1, Math.max(0, (above(outer) - above(inner)) / (end - start)));
}

/** Mean anomaly in [0, π] at which the outbound planet's instellation falls to `bound`: π when it never does, 0 when it is never above. */
function meanAnomalyAt(world: World, bound: Flux): number {
  const { eccentricity } = world.orbit;
  const ratio = Math.sqrt(instellationAtAxis(world) / bound);
  if (ratio >= 1 + eccentricity) return Math.PI;
  if (ratio <= 1 - eccentricity) return 0;
  return meanFromEccentric(Math.acos((1 - ratio) / eccentricity), eccentricity);
}
