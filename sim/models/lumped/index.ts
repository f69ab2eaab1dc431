/** `model: lumped`: one temperature for the whole globe, one heat store. */
import { SimError } from '../../error.ts';
import { balancedFromTrue } from '../../orbit/balanced.ts';
import { forward } from '../../solve/forward.ts';
import type { ForwardStart, SolveOptions, Window, World } from '../../world.ts';
import type { Model, Solution, State } from '../model.ts';
import { findClimates } from './climates.ts';
import { orbitClock } from './clock.ts';
import { forwardDataset, periodicDataset } from './dataset.ts';
import { energyBalance } from './energy.ts';
import { lumpedFindings } from './findings.ts';
import { plainSolver } from './plain.ts';
import { lumpedEquation, requireSomeHeat } from './problem.ts';
import { smoothSolver } from './smooth.ts';
import type { Trajectory } from './trajectory.ts';
import { lumpedWarnings } from './warnings.ts';

/** Steps of a run from a start, after halving; about a gigabyte of curve. */
const maximumForwardSteps = 8_000_000;

export function lumpedModel(): Model {
  const plain = plainSolver();
  const smooth = smoothSolver();

  function periodicTrajectories(world: World, tolerance: number): { all: readonly Trajectory[]; unresolved: number } {
    const { albedo, emission } = world.surface;
    if (albedo.ramp !== null) {
      const { trajectories, unresolved } = findClimates(world, tolerance);
      return { all: trajectories, unresolved };
    }
    const { quarticCoefficient } = emission;
    const only = quarticCoefficient === null ? smooth(world, tolerance) : plain(world, quarticCoefficient, tolerance);
    return { all: [only], unresolved: 0 };
  }

  function solvePeriodic(world: World, options: SolveOptions, windows: readonly Window[]): Solution {
    const clock = orbitClock(world);
    const { all, unresolved } = periodicTrajectories(world, options.tolerance);
    if (all.length === 0 || all.some(({ errorEstimate }) => !Number.isFinite(errorEstimate))) {
      throw new SimError(
        'solve',
        'no periodic state could be computed',
        'Look for a number that is far out of proportion, or run forward with solve.start',
      );
    }
    const states = all.map((trajectory, index) => ({
      ...periodicLabel(trajectory, index, all.length),
      errorEstimate: trajectory.errorEstimate,
      converged: trajectory.converged,
      dataset: periodicDataset(world, trajectory.curve, clock, options),
      findings: lumpedFindings(world, trajectory, clock, windows),
      energyBalance: energyBalance(world, trajectory.curve, clock),
    }));
    return {
      states,
      warnings: lumpedWarnings(world, all, unresolved),
      iterations: all.reduce((sum, { effort }) => sum + effort, 0),
    };
  }

  function solveForward(
    world: World,
    options: SolveOptions,
    start: ForwardStart,
    windows: readonly Window[],
  ): Solution {
    const clock = orbitClock(world);
    const trajectory = runForward(world, options.tolerance, start);
    const state: State = {
      label: 'forward',
      stable: null,
      multiplier: null,
      stabilityMargin: null,
      errorEstimate: trajectory.errorEstimate,
      converged: trajectory.converged,
      dataset: forwardDataset(world, trajectory.curve, clock, options, start.orbits),
      findings: lumpedFindings(world, trajectory, clock, windows),
      energyBalance: energyBalance(world, trajectory.curve, clock),
    };
    return { states: [state], warnings: lumpedWarnings(world, [trajectory], 0), iterations: trajectory.effort };
  }

  return {
    name: 'lumped',
    asks: { absorbingFraction: true, globe: false, start: true },
    keys: {},
    solve(world, options, windows) {
      requireSomeHeat(world);
      return options.start === 'periodic'
        ? solvePeriodic(world, options, windows)
        : solveForward(world, options, options.start, windows);
    },
  };
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

/** Multipliers beyond a double's range are shown at its edge. */
const largestLog = 700;

function periodicLabel(trajectory: Trajectory, index: number, count: number) {
  const log = trajectory.logMultiplier ?? 0;
  const frozen = trajectory.frozenLogMultiplier ?? 0;
  // More than three are numbered, so that every state of a case has a name of its own.
  const between = count > 3 ? `middle ${index}` : 'middle';
  const label = count === 1 ? 'only' : index === 0 ? 'warm' : index === count - 1 ? 'cold' : between;
  return {
    label,
    stable: log < 0,
    multiplier: Math.exp(Math.min(largestLog, log)),
    stabilityMargin: log / frozen,
  };
}
