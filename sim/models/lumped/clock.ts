/** Between the balanced anomaly that the lumped model works in and what people read: time, mean anomaly, instellation. */
import {
  balancedFromMean,
  distanceRatioFromBalanced,
  meanFromBalanced,
  trueFromBalanced,
} from '../../orbit/balanced.ts';
import { forcingAt } from '../../orbit/forcing.ts';
import type { Flux, Metres, Radians, Seconds } from '../../si.ts';
import { forcingPoint } from '../../solve/separable.ts';
import type { World } from '../../world.ts';
import { instellationAtAxis } from './problem.ts';
import type { Trajectory } from './trajectory.ts';

export interface OrbitClock {
  /** Mean anomaly at s, rad; increasing, through any number of orbits. */
  mean(s: Radians): Radians;
  /** d(mean anomaly)/ds. */
  pace(s: Radians): number;
  /** Seconds per radian of mean anomaly. */
  readonly secondsPerRadian: Seconds;
  true(s: Radians): Radians;
  distance(s: Radians): Metres;
  instellation(s: Radians): Flux;
  /** s at a mean anomaly. */
  fromMean(mean: Radians): Radians;
}

export function orbitClock(world: World): OrbitClock {
  const { eccentricity, semiMajorAxis, period } = world.orbit;
  const atAxis = instellationAtAxis(world);
  const point = forcingPoint();
  const forcing = forcingAt(eccentricity);
  return {
    mean: (s) => meanFromBalanced(s, eccentricity),
    pace(s) {
      forcing(s, point);
      return point.clock;
    },
    secondsPerRadian: period / (2 * Math.PI),
    true: (s) => trueFromBalanced(s, eccentricity),
    distance: (s) => semiMajorAxis * distanceRatioFromBalanced(s, eccentricity),
    instellation: (s) => atAxis / distanceRatioFromBalanced(s, eccentricity) ** 2,
    fromMean: (mean) => balancedFromMean(mean, eccentricity),
  };
}

/** Seconds after periapsis within the orbit, or after the start of a forward run. */
export function timeAt(trajectory: Trajectory, clock: OrbitClock, s: Radians): Seconds {
  const since = clock.mean(s) - clock.mean(trajectory.curve.position[0]);
  const turn = 2 * Math.PI;
  const folded = trajectory.logMultiplier === null ? since : since - turn * Math.floor(since / turn);
  return folded * clock.secondsPerRadian;
}
