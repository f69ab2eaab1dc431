/** Values of inputs to a row of findings: what a draw and a node of a grid have in common. */
import { SimError } from '../error.ts';
import { batchOf } from '../models/batchOf.ts';
import { models } from '../models/index.ts';
import type { Batch } from '../models/model.ts';
import type { Varied } from '../scenario/varied.ts';
import type { SolveOptions } from '../world.ts';

/** A case that can be built at any values. */
export interface Buildable extends Varied {
  readonly model: string;
  readonly options: SolveOptions;
  readonly windowsVary: boolean;
}

/**
 * Writes the findings at a case's inputs into row `at` of its columns; gives why there are none, and then leaves them.
 * `batch`: for the windows of the scenario; a case whose windows vary makes its own with the same findings.
 * Errors: those that are not the input's fault.
 */
export function rowSolver(
  one: Buildable,
  batch: Batch,
): (values: ArrayLike<number>, columns: readonly Float64Array[], at: number) => string | null {
  const row = new Float64Array(batch.columns.length);
  const names = batch.columns.map(({ name }) => name);
  return (values, columns, at) => {
    const kept = caught(() => {
      if (!one.windowsVary) return batch.into(one.worldAt(values), row);
      const { world, options, windows } = one.builtAt(values);
      return batchOf(models[one.model], options, windows, world, names).into(world, row);
    });
    if (typeof kept === 'string') return kept;
    if (!kept) return `the state is not known to the tolerance of ${one.options.tolerance}`;
    const infinite = infinityIn(row);
    if (infinite >= 0) return notFinite(batch.columns[infinite].label);
    for (let i = 0; i < columns.length; i++) columns[i][at] = row[i];
    return null;
  };
}

/** Place of the first number that is infinite; −1 where none is. */
export function infinityIn(row: Float64Array): number {
  for (let i = 0; i < row.length; i++) if (Math.abs(row[i]) === Number.POSITIVE_INFINITY) return i;
  return -1;
}

/** A number beyond all bounds is no result, and the rest of its row not to be trusted. */
export function notFinite(what: string): string {
  return `${what} is not finite`;
}

/** What the work gives, or in words why the values are no sound planet. Other errors are our own, and pass. */
export function caught<T>(work: () => T): T | string {
  try {
    return work();
  } catch (error) {
    if (error instanceof SimError) return `${error.where}: ${error.what}`;
    throw error;
  }
}
