/** Worlds to their trajectories and findings: the one way that a single run and a batch of many share. */
import { SimError } from '../../error.ts';
import { emptySheet, type Sheet } from '../../findings/sheet.ts';
import { balancedFromTrue } from '../../orbit/balanced.ts';
import { forward } from '../../solve/forward.ts';
import type { ForwardStart, SolveOptions, Window, World } from '../../world.ts';
import { findClimates } from './climates.ts';
import { orbitClock } from './clock.ts';
import { everything, lumpedColumns, type Wanted } from './columns.ts';
import { lumpedFindingsInto } from './findings.ts';
import { type PlainState, plainStates, plainTrajectory } from './plain.ts';
import { plainFindings } from './plainFindings.ts';
import { lumpedEquation, requireSomeHeat } from './problem.ts';
import { smoothSolver } from './smooth.ts';
import type { Trajectory } from './trajectory.ts';

/** Steps of a run from a start, after halving; about a gigabyte of curve. */
const maximumForwardSteps = 8_000_000;

export interface LumpedSolver {
  /** Every state, the warm one first, with all its findings. */
  states(world: World, options: SolveOptions, windows: readonly Window[]): FoundStates;
  /** The wanted findings of the warm state into `sheet`; returns whether it kept the tolerance. */
  findingsInto(world: World, options: SolveOptions, windows: readonly Window[], wanted: Wanted, sheet: Sheet): boolean;
  /** The warm state without its findings. */
  warm(world: World, options: SolveOptions): Trajectory;
}

export interface FoundStates {
  readonly found: readonly { readonly trajectory: Trajectory; readonly sheet: Sheet }[];
  /** States that were seen but could not be followed. */
  readonly unresolved: number;
}

/** With its own buffers; one per thread. */
export function lumpedSolver(): LumpedSolver {
  const plainStateOf = plainStates();
  const plainFindingsInto = plainFindings();
  const smooth = smoothSolver();

  function plainState(world: World, quarticCoefficient: number, tolerance: number): PlainState {
    const state = plainStateOf(world, quarticCoefficient, tolerance);
    requireState(state.solution.errorEstimate);
    return state;
  }

  function plainInto(world: World, state: PlainState, windows: readonly Window[], wanted: Wanted, sheet: Sheet): void {
    if (plainFindingsInto(world, state, windows, wanted, sheet)) return;
    lumpedFindingsInto(world, plainTrajectory(state), orbitClock(world), windows, sheet);
  }

  function trajectories(world: World, options: SolveOptions): { all: readonly Trajectory[]; unresolved: number } {
    if (options.start !== 'periodic') {
      return { all: [runForward(world, options.tolerance, options.start)], unresolved: 0 };
    }
    const { all, unresolved } =
      world.surface.albedo.ramp === null
        ? { all: [smooth(world, options.tolerance)], unresolved: 0 }
        : findClimates(world, options.tolerance);
    if (all.length === 0) requireState(Number.NaN);
    for (const { errorEstimate } of all) requireState(errorEstimate);
    return { all, unresolved };
  }

  return {
    warm(world, options) {
      requireSomeHeat(world);
      const coefficient = plainCoefficient(world, options);
      if (coefficient !== null) return plainTrajectory(plainState(world, coefficient, options.tolerance));
      return trajectories(world, options).all[0];
    },
    states(world, options, windows) {
      requireSomeHeat(world);
      const columns = lumpedColumns(options.start, windows).length;
      const coefficient = plainCoefficient(world, options);
      if (coefficient !== null) {
        const state = plainState(world, coefficient, options.tolerance);
        const sheet = emptySheet(columns);
        plainInto(world, state, windows, everything, sheet);
        return { found: [{ trajectory: plainTrajectory(state), sheet }], unresolved: 0 };
      }
      const clock = orbitClock(world);
      const { all, unresolved } = trajectories(world, options);
      const found = all.map((trajectory) => {
        const sheet = emptySheet(columns);
        lumpedFindingsInto(world, trajectory, clock, windows, sheet);
        return { trajectory, sheet };
      });
      return { found, unresolved };
    },
    findingsInto(world, options, windows, wanted, sheet) {
      requireSomeHeat(world);
      const coefficient = plainCoefficient(world, options);
      if (coefficient !== null) {
        const state = plainState(world, coefficient, options.tolerance);
        plainInto(world, state, windows, wanted, sheet);
        return state.solution.converged;
      }
      const [warm] = trajectories(world, options).all;
      lumpedFindingsInto(world, warm, orbitClock(world), windows, sheet);
      return warm.converged;
    },
  };
}

/** c of E = cT⁴ where the periodic state of a plain world is asked for; null otherwise. */
function plainCoefficient({ surface }: World, { start }: SolveOptions): number | null {
  return start === 'periodic' && surface.albedo.ramp === null ? surface.emission.quarticCoefficient : null;
}

function requireState(errorEstimate: number): void {
  if (Number.isFinite(errorEstimate)) return;
  throw new SimError(
    'solve',
    'no periodic state could be computed',
    'Look for a number that is far out of proportion, or run forward with solve.start',
  );
}

function runForward(world: World, tolerance: number, start: ForwardStart): Trajectory {
  const from = balancedFromTrue(start.at, world.orbit.eccentricity);
  const to = from + 2 * Math.PI * start.orbits;
  const few = 8; // steps that even the smoothest orbit takes
  const possible = start.orbits * few <= maximumForwardSteps;
  const run = possible
    ? forward(lumpedEquation(world), from, to, start.temperature, tolerance, maximumForwardSteps)
    : null;
  if (run === null) {
    throw new SimError(
      'solve.start',
      `${start.orbits} orbits need more than ${maximumForwardSteps} steps`,
      'Ask for fewer orbits or a larger tolerance',
    );
  }
  const { curve, errorEstimate, converged, steps } = run;
  return { curve, errorEstimate, converged, logMultiplier: null, frozenLogMultiplier: null, effort: steps };
}
