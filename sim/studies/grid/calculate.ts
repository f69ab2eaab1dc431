/** The arithmetic of a grid: nodes from their numbers alone, so that any worker may compute any of them. */
import { inUnit } from '../../quantity/index.ts';
import { rowSolver } from '../rowSolver.ts';
import { type GridSetup, planGrid, valuesAt } from './plan.ts';

/** Rows [from, to): the axes in the units in which they were typed, then the findings of every case; NaN where undefined. */
export function nodesCalculator(setup: GridSetup) {
  const plan = planGrid(setup);
  const solve = plan.cases.map(({ over, batch }) => rowSolver(over, batch));
  return (from: number, to: number) => {
    const column = () => new Float64Array(to - from).fill(Number.NaN);
    const axes = plan.axes.map(column);
    const findings = plan.cases.map((one) => one.findings.map(column));
    const failures: { draw: number; message: string }[] = [];
    for (let node = from; node < to; node++) {
      const values = valuesAt(plan.axes, node);
      for (const [k, { along }] of plan.axes.entries()) axes[k][node - from] = inUnit(values[k], along.unit);
      const messages = plan.cases.flatMap(({ name }, c) => {
        const message = solve[c](values, findings[c], node - from);
        return message === null ? [] : [plan.cases.length === 1 ? message : `${name}: ${message}`];
      });
      if (messages.length > 0) failures.push({ draw: node, message: messages.join('; ') });
    }
    return { columns: [...axes, ...findings.flat()], failures };
  };
}
