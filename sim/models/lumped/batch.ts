/** Many lumped worlds straight to their findings. */
import { emptySheet } from '../../findings/sheet.ts';
import type { SolveOptions, Window } from '../../world.ts';
import { columnNumbers } from '../columnNumbers.ts';
import type { Batch } from '../model.ts';
import { lumpedColumns, wantedOf } from './columns.ts';
import { lumpedSolver } from './solver.ts';

export function lumpedBatch(options: SolveOptions, windows: readonly Window[], only?: readonly string[]): Batch {
  const solver = lumpedSolver();
  const all = lumpedColumns(options.start, windows);
  const numbers = columnNumbers(all, only);
  const wanted = wantedOf(numbers);
  const sheet = emptySheet(all.length);
  return {
    columns: numbers.map((column) => all[column]),
    into(world, row) {
      const converged = solver.findingsInto(world, options, windows, wanted, sheet);
      for (let i = 0; i < numbers.length; i++) row[i] = sheet.value[numbers[i]];
      return converged;
    },
  };
}
