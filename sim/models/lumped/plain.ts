/**
 * The fast path: constant albedo and E = cT⁴, with any internal heat. With y = T/T₀, cT₀⁴ = f(1−A)S_a + H, φ the absorbed
 * share of that sum and κ = cT₀³P/(2πC),
 *
 *   dy/ds = κ (φ (a/r)² dM/ds + (1−φ) dM/ds − y⁴ dM/ds):
 *
 * every such world is a point in (e, κ, φ).
 */
import { type ForcingTable, forcingInto } from '../../orbit/forcing.ts';
import { type QuarticForcing, quarticCurve, quarticSolver } from '../../solve/periodicQuartic.ts';
import type { World } from '../../world.ts';
import { firstMeshSize, instellationAtAxis, pacing } from './problem.ts';
import type { Trajectory } from './trajectory.ts';

/** T₀, φ and κ of a plain world with emission coefficient `c`. */
function plainNumbers(world: World, c: number): { scale: number; share: number; rate: number } {
  const { albedo, absorbingFraction, internalHeat } = world.surface;
  const absorbed = absorbingFraction * (1 - albedo.warm) * instellationAtAxis(world);
  const scale = ((absorbed + internalHeat) / c) ** 0.25;
  return { scale, share: absorbed / (absorbed + internalHeat), rate: c * scale ** 3 * pacing(world) };
}

/** A solver with its own buffers. */
export function plainSolver(): (world: World, quarticCoefficient: number, tolerance: number) => Trajectory {
  const solve = quarticSolver();
  return (world, quarticCoefficient, tolerance) => {
    const { eccentricity } = world.orbit;
    const { scale, share, rate } = plainNumbers(world, quarticCoefficient);
    const forcingOf = (cosines: Float64Array, sines: Float64Array, size: number, into: QuarticForcing): void => {
      forcingInto(eccentricity, cosines, sines, size, asTable(into));
      if (share < 1) mixHeat(into, share, size);
    };
    const firstSize = firstMeshSize(eccentricity);
    const solution = solve({ rate, forcingInto: forcingOf, tolerance, firstSize });
    return {
      curve: quarticCurve(solution, scale),
      errorEstimate: solution.errorEstimate,
      converged: solution.converged,
      logMultiplier: solution.logMultiplier,
      frozenLogMultiplier: solution.logMultiplier,
      effort: solution.sweeps,
    };
  };
}

/** The solver's columns under the orbit's names: p from what arrives, r from the clock. */
function asTable({ p0, p1, p2, r0, r1, r2 }: QuarticForcing): ForcingTable {
  return { arrival: p0, arrivalSlope: p1, arrivalCurvature: p2, clock: r0, clockSlope: r1, clockCurvature: r2 };
}

/** Internal heat arrives evenly in time. */
function mixHeat({ p0, p1, p2, r0, r1, r2 }: QuarticForcing, share: number, size: number): void {
  const even = 1 - share;
  for (let i = 0; i < size; i++) {
    p0[i] = share * p0[i] + even * r0[i];
    p1[i] = share * p1[i] + even * r1[i];
    p2[i] = share * p2[i] + even * r2[i];
  }
}
