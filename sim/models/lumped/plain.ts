/**
 * The fast path: constant albedo and E = cT⁴, with any internal heat. With y = T/T₀, cT₀⁴ = f(1−A)S_a + H, φ the absorbed
 * share of that sum and κ = cT₀³P/(2πC),
 *
 *   dy/ds = κ (φ (a/r)² dM/ds + (1−φ) dM/ds − y⁴ dM/ds):
 *
 * every such world is a point in (e, κ, φ).
 */
import { circleForcingInto, type ForcingTable } from '../../orbit/forcing.ts';
import { type QuarticForcing, type QuarticSolution, quarticCurve, quarticSolver } from '../../solve/periodicQuartic.ts';
import type { World } from '../../world.ts';
import { firstMeshSize, instellationAtAxis, pacing } from './problem.ts';
import type { Trajectory } from './trajectory.ts';

/** The numbers of one plain world, and the periodic state in them. */
export interface PlainState {
  eccentricity: number;
  /** c, W m⁻² K⁻⁴ */
  coefficient: number;
  /** T₀, K */
  scale: number;
  /** φ */
  share: number;
  /** κ */
  rate: number;
  tolerance: number;
  /** y on the balanced anomaly; belongs to the solver. */
  solution: QuarticSolution;
}

/** A solver with its own buffers, which its next call overwrites; it leaves no garbage. */
export function plainStates(): (world: World, quarticCoefficient: number, tolerance: number) => PlainState {
  const solve = quarticSolver();
  let table: ForcingTable | null = null;
  let known: QuarticForcing | null = null;
  const forcingInto = (cosines: Float64Array, sines: Float64Array, size: number, into: QuarticForcing): void => {
    if (table === null || known !== into) table = asTable(into);
    known = into;
    circleForcingInto(state.eccentricity, cosines, sines, size, table);
    if (state.share < 1) mixHeat(into, state.share, size);
  };
  const problem = { rate: 0.5, forcingInto, tolerance: 0.5, firstSize: 16 };
  const state: Omit<PlainState, 'solution'> & { solution: QuarticSolution | null } = {
    eccentricity: 0.5,
    coefficient: 0.5,
    scale: 0.5,
    share: 0.5,
    rate: 0.5,
    tolerance: 0.5,
    solution: null,
  };
  return (world, c, tolerance) => {
    const { albedo, absorbingFraction, internalHeat } = world.surface;
    const absorbed = absorbingFraction * (1 - albedo.warm) * instellationAtAxis(world);
    const scale = Math.sqrt(Math.sqrt((absorbed + internalHeat) / c));
    const rate = c * scale * scale * scale * pacing(world);
    state.eccentricity = world.orbit.eccentricity;
    state.coefficient = c;
    state.scale = scale;
    state.share = absorbed / (absorbed + internalHeat);
    state.rate = rate;
    state.tolerance = tolerance;
    problem.rate = rate;
    problem.tolerance = tolerance;
    problem.firstSize = firstMeshSize(state.eccentricity);
    state.solution = solve(problem);
    return state as PlainState;
  };
}

/** A copy that outlives the next solve. */
export function plainTrajectory({ solution, scale }: PlainState): Trajectory {
  return {
    curve: quarticCurve(solution, scale),
    errorEstimate: solution.errorEstimate,
    converged: solution.converged,
    logMultiplier: solution.logMultiplier,
    frozenLogMultiplier: solution.logMultiplier,
    effort: solution.sweeps,
  };
}

/** A solver with its own buffers. */
export function plainSolver(): (world: World, quarticCoefficient: number, tolerance: number) => Trajectory {
  const stateOf = plainStates();
  return (world, quarticCoefficient, tolerance) => plainTrajectory(stateOf(world, quarticCoefficient, tolerance));
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
