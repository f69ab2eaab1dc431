/** Findings of an instellation window: the share of the time inside, in closed form, and whether the orbit mean is. */
import { instellation } from '../instellation/instellation.ts';
import { meanFromEccentric } from '../orbit/anomaly.ts';
import type { Flux, Radians } from '../si.ts';
import type { Window, World } from '../world.ts';
import type { Finding, FindingColumn } from './finding.ts';
import { orbitMeanClosedForm } from './orbitMean.ts';

export function instellationWindowColumns({ name }: Window): readonly [FindingColumn, FindingColumn] {
  return [
    {
      name: `fractionInWindow.${name}`,
      unit: '1',
      label: `Time in “${name}” (instantaneous instellation)`,
    },
    {
      name: `orbitMeanInWindow.${name}`,
      unit: '1',
      label: `Orbit-mean instellation in “${name}” (1 yes, 0 no)`,
    },
  ];
}

/** Between two mean anomalies: 0 and 2π for a whole orbit. */
export function instellationWindowFindings(world: World, window: Window, start: Radians, end: Radians): Finding[] {
  const [share, mean] = instellationWindowColumns(window);
  if (window.unavailable !== undefined) {
    const reason = window.unavailable;
    return [
      { ...share, value: null, reason },
      { ...mean, value: null, reason },
    ];
  }
  return [
    { ...share, value: instellationShare(world, window, start, end) },
    { ...mean, value: orbitMeanInside(world, window) },
  ];
}

/** 1 when the orbit-mean instellation is inside, otherwise 0. */
export function orbitMeanInside(world: World, window: Window): 0 | 1 {
  const meanFlux = orbitMeanClosedForm(world);
  return meanFlux >= window.from && meanFlux <= window.to ? 1 : 0;
}

/**
 * Share of the time between two mean anomalies. The instellation falls from periapsis to apoapsis, so that it exceeds a bound
 * during the share M(E)/π of each half orbit, with 1 − e cos E = √(S_a/bound).
 */
export function instellationShare(world: World, window: Window, start: Radians, end: Radians): number {
  const outer = meanAnomalyAt(world, window.from);
  const inner = meanAnomalyAt(world, window.to);
  const aboveOuter = timeWithin(outer, end) - timeWithin(outer, start);
  const aboveInner = timeWithin(inner, end) - timeWithin(inner, start);
  return Math.min(1, Math.max(0, (aboveOuter - aboveInner) / (end - start)));
}

/** Time up to `mean` that lies within `half` of a periapsis. */
function timeWithin(half: Radians, mean: Radians): Radians {
  const turn = 2 * Math.PI;
  const orbits = Math.round(mean / turn);
  const rest = mean - orbits * turn;
  return 2 * half * orbits + Math.min(half, Math.max(-half, rest));
}

/** Mean anomaly in [0, π] at which the outbound planet's instellation falls to `bound`: π when it never does, 0 when it is never above. */
function meanAnomalyAt(world: World, bound: Flux): number {
  const { eccentricity } = world.orbit;
  const ratio = Math.sqrt(instellation(world.star.luminosity, world.orbit.semiMajorAxis) / bound);
  if (ratio >= 1 + eccentricity) return Math.PI;
  if (ratio <= 1 - eccentricity) return 0;
  return meanFromEccentric(Math.acos((1 - ratio) / eccentricity), eccentricity);
}
