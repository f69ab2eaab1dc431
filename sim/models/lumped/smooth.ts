/** The general path: any emission law under a constant albedo, all steps of the orbit at once. */

import { steadyAtAlbedo } from '../../findings/steadyState.ts';
import { forcingInto } from '../../orbit/forcing.ts';
import {
  type LawTable,
  type PeriodicSolution,
  periodicSeparable,
  type SeparableTable,
} from '../../solve/periodicSeparable.ts';
import type { World } from '../../world.ts';
import { firstMeshSize, instellationAtAxis, pacing } from './problem.ts';
import type { Trajectory } from './trajectory.ts';

/** A solver with its own buffers, for worlds whose albedo does not change with temperature. */
export function smoothSolver(): (world: World, tolerance: number) => Trajectory {
  const solve = periodicSeparable();
  let unused: Float64Array = new Float64Array(256);
  return (world, tolerance) => {
    const { eccentricity } = world.orbit;
    const tableInto = (cosines: Float64Array, sines: Float64Array, count: number, into: SeparableTable): void => {
      if (unused.length < count) unused = new Float64Array(2 * count);
      const { arrival, arrivalSlope, clock, clockSlope } = into;
      const table = { arrival, arrivalSlope, arrivalCurvature: unused, clock, clockSlope, clockCurvature: unused };
      forcingInto(eccentricity, cosines, sines, count, table);
    };
    const solution: PeriodicSolution = solve({
      rate: pacing(world),
      floor: 0,
      lawsInto: lawsOf(world),
      tableInto,
      tolerance,
      firstSize: firstMeshSize(eccentricity),
      guess: blendedGuess(world),
    });
    return {
      curve: solution.curve,
      errorEstimate: solution.errorEstimate,
      converged: solution.converged,
      logMultiplier: solution.logMultiplier,
      frozenLogMultiplier: solution.logMultiplier,
      effort: solution.sweeps,
    };
  };
}

/** Absorbed at distance a and emitted less internal heat, W m⁻², with their slopes. */
function lawsOf(world: World): (temperature: Float64Array, count: number, into: LawTable) => void {
  const { albedo, emission, internalHeat, absorbingFraction } = world.surface;
  const absorbed = absorbingFraction * instellationAtAxis(world) * (1 - albedo.warm);
  return (temperature, count, { gain, gainSlope, loss, lossSlope }) => {
    gain.fill(absorbed, 0, count);
    gainSlope.fill(0, 0, count);
    for (let i = 0; i < count; i++) {
      loss[i] = emission.at(temperature[i]) - internalHeat;
      lossSlope[i] = emission.slopeAt(temperature[i]);
    }
  };
}

/** Between the instantaneous balance (fast worlds) and that of the orbit-mean flux (slow ones). */
function blendedGuess(world: World): (arrival: number, clock: number) => number {
  const { surface, orbit } = world;
  const atAxis = instellationAtAxis(world);
  const meanRatio = 1 / Math.sqrt((1 - orbit.eccentricity) * (1 + orbit.eccentricity));
  const mean = steadyAtAlbedo(surface, atAxis * meanRatio, surface.albedo.warm);
  const speed = pacing(world) * surface.emission.slopeAt(mean);
  const w = speed / (1 + speed);
  return (arrival, clock) => {
    const ratio = (w * arrival) / clock + (1 - w) * meanRatio;
    return steadyAtAlbedo(surface, atAxis * ratio, surface.albedo.warm);
  };
}
