/** `model: lumped`: one temperature for the whole globe, one heat store. */
import { findingsOf } from '../../findings/sheet.ts';
import { curveValuesInto } from '../../solve/curve.ts';
import type { SolveOptions, World } from '../../world.ts';
import type { Model, State } from '../model.ts';
import { lumpedBatch } from './batch.ts';
import { orbitClock } from './clock.ts';
import { lumpedColumns } from './columns.ts';
import { forwardDataset, periodicDataset } from './dataset.ts';
import { energyBalance } from './energy.ts';
import { lumpedSolver } from './solver.ts';
import type { Trajectory } from './trajectory.ts';
import { lumpedWarnings } from './warnings.ts';

export function lumpedModel(): Model {
  const solver = lumpedSolver();
  return {
    name: 'lumped',
    asks: { absorbingFraction: true, globe: false, start: true },
    keys: {},
    solve(world, options, windows) {
      const clock = orbitClock(world);
      const { found, unresolved } = solver.states(world, options, windows);
      const columns = lumpedColumns(options.start, windows);
      const trajectories = found.map(({ trajectory }) => trajectory);
      const states = found.map(
        ({ trajectory, sheet }, index): State => ({
          ...labelOf(trajectory, index, found.length),
          errorEstimate: trajectory.errorEstimate,
          converged: trajectory.converged,
          dataset: datasetOf(world, trajectory, options),
          findings: findingsOf(sheet, columns),
          energyBalance: energyBalance(world, trajectory.curve, clock),
        }),
      );
      return {
        states,
        warnings: lumpedWarnings(world, trajectories, unresolved),
        iterations: trajectories.reduce((sum, { effort }) => sum + effort, 0),
      };
    },
    batch: lumpedBatch,
    orbitInto(world, options, positions, into) {
      const { curve, converged } = solver.warm(world, options);
      curveValuesInto(curve, positions, into);
      return converged;
    },
  };
}

function datasetOf(world: World, { curve }: Trajectory, options: SolveOptions): State['dataset'] {
  const clock = orbitClock(world);
  return options.start === 'periodic'
    ? periodicDataset(world, curve, clock, options)
    : forwardDataset(world, curve, clock, options, options.start.orbits);
}

/** What the trajectory is called, and how it answers a push. */
function labelOf(trajectory: Trajectory, index: number, count: number) {
  return trajectory.logMultiplier === null
    ? { label: 'forward', stable: null, multiplier: null, stabilityMargin: null }
    : periodicLabel(trajectory, index, count);
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
