/** The arithmetic of a grid: nodes from their numbers alone, so that any worker may compute any of them. */
import { SimError } from '../../error.ts';
import { batchOf } from '../../models/batchOf.ts';
import { models } from '../../models/index.ts';
import { inUnit } from '../../quantity/index.ts';
import { type GridPlanCase, type GridSetup, planGrid, valuesAt } from './plan.ts';

/** Rows [from, to): the axes in the units in which they were typed, then the findings of every case; NaN where undefined. */
export function nodesCalculator(setup: GridSetup) {
  const plan = planGrid(setup);
  const solve = plan.cases.map(caseSolver);
  return (from: number, to: number) => {
    const column = () => new Float64Array(to - from).fill(Number.NaN);
    const axes = plan.axes.map(column);
    const findings = plan.cases.map((one) => one.findings.map(column));
    const failures: { draw: number; message: string }[] = [];
    for (let node = from; node < to; node++) {
      const values = valuesAt(plan.axes, node);
      for (const [k, { along }] of plan.axes.entries()) axes[k][node - from] = inUnit(values[k], along.unit);
      const messages = plan.cases.flatMap(({ over }, c) => {
        const message = solve[c](values, findings[c], node - from);
        return message === null ? [] : [plan.cases.length === 1 ? message : `${over.name}: ${message}`];
      });
      if (messages.length > 0) failures.push({ draw: node, message: messages.join('; ') });
    }
    return { columns: [...axes, ...findings.flat()], failures };
  };
}

/** Writes the findings at a node into a row of the case's columns; gives why there are none. */
function caseSolver({ over, batch, findings }: GridPlanCase) {
  const row = new Float64Array(batch.columns.length);
  const names = findings.map(({ name }) => name);
  return (values: readonly number[], columns: readonly Float64Array[], at: number): string | null => {
    try {
      const { world, options, windows } = over.builtAt(values);
      const own = over.windowsVary ? batchOf(models[over.model], options, windows, world, names) : batch;
      if (!own.into(world, row)) return `the state is not known to the tolerance of ${options.tolerance}`;
    } catch (error) {
      if (error instanceof SimError) return `${error.where}: ${error.what}`;
      throw error;
    }
    for (let i = 0; i < columns.length; i++) columns[i][at] = row[i];
    return null;
  };
}
