/** Findings of an instellation window: the share of the time inside, in closed form, and whether the orbit mean is. */
import { instellation } from '../instellation/instellation.ts';
import { meanFromEccentric } from '../orbit/anomaly.ts';
import type { Flux, Radians } from '../si.ts';
import type { Window, World } from '../world.ts';
import type { Finding } from './finding.ts';
import { orbitMeanClosedForm } from './orbitMean.ts';

/** Between two mean anomalies: 0 and 2π for a whole orbit. */
export function instellationWindowFindings(world: World, window: Window, start: Radians, end: Radians): Finding[] {
  const share = {
    name: `fractionInWindow.${window.name}`,
    unit: '1',
    label: `Time in “${window.name}” (instantaneous instellation)`,
  };
  const mean = {
    name: `orbitMeanInWindow.${window.name}`,
    unit: '1',
    label: `Orbit-mean instellation in “${window.name}” (1 yes, 0 no)`,
  };
  if (window.unavailable !== undefined) {
    const reason = window.unavailable;
    return [
      { ...share, value: null, reason },
      { ...mean, value: null, reason },
    ];
  }
  const meanFlux = orbitMeanClosedForm(world);
  return [
    { ...share, value: instellationShare(world, window, start, end) },
    { ...mean, value: meanFlux >= window.from && meanFlux <= window.to ? 1 : 0 },
  ];
}

/**
 * The instellation falls from periapsis to apoapsis, so that it
 * exceeds a bound during the share M(E)/π of each half orbit, with 1 − e cos E = √(S_a/bound).
 */
function instellationShare(world: World, window: Window, start: Radians, end: Radians): number {
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
  const ratio = Math.sqrt(instellation(world.star.luminosity, world.orbit.semiMajorAxis) / bound);
  if (ratio >= 1 + eccentricity) return Math.PI;
  if (ratio <= 1 - eccentricity) return 0;
  return meanFromEccentric(Math.acos((1 - ratio) / eccentricity), eccentricity);
}
