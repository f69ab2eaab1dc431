/** Ice–albedo worlds: every periodic state that one orbit allows, from the warmest to the coldest, stable or not. */

import { steadyAtAlbedo } from '../../findings/steadyState.ts';
import { periodicStates } from '../../solve/periodicStates.ts';
import type { World } from '../../world.ts';
import { instellationAtAxis, lumpedEquation } from './problem.ts';
import type { Trajectory } from './trajectory.ts';

const maximumSteps = 400_000;

export interface Climates {
  /** Warmest first. */
  readonly all: readonly Trajectory[];
  /** States that were seen but could not be followed to the tolerance's mesh. */
  readonly unresolved: number;
}

export function findClimates(world: World, tolerance: number): Climates {
  const { surface, orbit } = world;
  const { albedo } = surface;
  const atAxis = instellationAtAxis(world);
  const nearest = atAxis / (1 - orbit.eccentricity) ** 2;
  const farthest = atAxis / (1 + orbit.eccentricity) ** 2;
  const darkest = Math.min(albedo.warm, albedo.ice);
  const brightest = Math.max(albedo.warm, albedo.ice);
  // Every periodic state lies between the coldest and the warmest instantaneous balance.
  const low = 0.999 * steadyAtAlbedo(surface, farthest, brightest);
  const high = 1.001 * steadyAtAlbedo(surface, nearest, darkest);
  const { states, unresolved } = periodicStates(
    lumpedEquation(world),
    low,
    high,
    albedo.breaks,
    tolerance,
    maximumSteps,
  );
  const all = states.map((state) => ({ ...state, effort: state.steps }));
  return { all, unresolved };
}
