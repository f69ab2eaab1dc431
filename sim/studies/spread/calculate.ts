/** The arithmetic of a spread's tables: rows from their numbers alone, so that any worker may compute any of them. */
import { caught, infinityIn, notFinite, rowSolver } from '../rowSolver.ts';
import { bandSampler } from './bandSampler.ts';
import { designPlace } from './indexDesign.ts';
import { planSpread, type SpreadPlan, type SpreadSetup } from './plan.ts';

/** Rows [from, to): a column each, NaN where undefined, and the rows that failed. */
export interface TableRows {
  readonly columns: readonly Float64Array[];
  readonly failures: readonly { readonly draw: number; readonly message: string }[];
}

export type CalculateRows = (from: number, to: number) => TableRows;

/** The draws: inputs, then findings of every case. */
export function drawsCalculator(setup: SpreadSetup): CalculateRows {
  const plan = planSpread(setup);
  const solve = plan.cases.map(({ drawn, batch }) => rowSolver(drawn, batch));
  return (from, to) => {
    const table = emptyTable(plan, to - from);
    const failed = failureList(plan);
    const { values } = drawnValues(plan, from, to);
    for (let row = 0; row < to - from; row++) {
      for (const [c, inputs] of values.entries()) {
        const message = solve[c](inputs[row], table.findings[c], row);
        if (message !== null) failed.add(from + row, c, message);
      }
    }
    fillInputs(plan, values, table.inputs);
    return { columns: [...table.inputs, ...table.findings.flat()], failures: failed.list() };
  };
}

/**
 * The further runs of Sobol' indices, (dimensions + 1) a row of the design. A case without the input that a run changes has the run
 * of A again: it is left out, NaN.
 */
export function indicesCalculator(setup: SpreadSetup): CalculateRows {
  const plan = planSpread(setup);
  const solve = plan.cases.map(({ drawn, batch }) => rowSolver(drawn, batch));
  const count = plan.dimensions.length;
  return (from, to) => {
    const table = emptyTable(plan, to - from);
    const failed = failureList(plan);
    const values = plan.cases.map((): Float64Array[] => []);
    for (let run = from; run < to; run++) {
      const { row, changed } = designPlace(run, count);
      for (const [c, { inputs }] of plan.cases.entries()) {
        const drawn = Float64Array.from(inputs, ({ dimension, at }) => {
          const isFromB = changed === 'all' || changed === dimension;
          return at(plan.draws.at(row, isFromB ? count + dimension : dimension));
        });
        values[c].push(drawn);
        const isRunOfA = changed !== 'all' && inputs.every(({ dimension }) => dimension !== changed);
        const message = isRunOfA ? null : solve[c](drawn, table.findings[c], run - from);
        if (message !== null) failed.add(run, c, message);
      }
    }
    fillInputs(plan, values, table.inputs);
    return { columns: [...table.inputs, ...table.findings.flat()], failures: failed.list() };
  };
}

/** The first draws again, as curves: temperature through the orbit, and along latitude where there is one. */
export function bandsCalculator(setup: SpreadSetup): CalculateRows {
  const plan = planSpread(setup);
  const samplers = plan.cases.map(({ drawn, inputs }) =>
    bandSampler(
      drawn,
      inputs.map(({ centre }) => centre),
    ),
  );
  return (from, to) => {
    const columns = samplers.map((sampler) => sampler.columns.map(() => new Float64Array(to - from).fill(Number.NaN)));
    const failed = failureList(plan);
    const { values } = drawnValues(plan, from, to);
    for (let row = 0; row < to - from; row++) {
      for (const [c, sampler] of samplers.entries()) {
        if (sampler.columns.length === 0) continue;
        const curve = caught(() => sampler.at(values[c][row]));
        const isInfinite = typeof curve !== 'string' && infinityIn(curve) >= 0;
        const found = isInfinite ? notFinite('the temperature') : curve;
        if (typeof found === 'string') failed.add(from + row, c, found);
        else for (let i = 0; i < found.length; i++) columns[c][i][row] = found[i];
      }
    }
    return { columns: columns.flat(), failures: failed.list() };
  };
}

/** SI values of every case's inputs for draws from … to − 1. */
function drawnValues({ cases, draws, dimensions }: SpreadPlan, from: number, to: number) {
  const shares = dimensions.map((_, dimension) => {
    const column = new Float64Array(to - from);
    draws.fillInto(dimension, from, column);
    return column;
  });
  const values = cases.map(({ inputs }) =>
    Array.from({ length: to - from }, (_, row) => {
      return Float64Array.from(inputs, ({ dimension, at }) => at(shares[dimension][row]));
    }),
  );
  return { values };
}

function emptyTable({ cases, inputColumns }: SpreadPlan, rows: number) {
  const column = () => new Float64Array(rows).fill(Number.NaN);
  return { inputs: inputColumns.map(column), findings: cases.map(({ findings }) => findings.map(column)) };
}

function fillInputs(
  { cases, inputColumns }: SpreadPlan,
  values: readonly (readonly Float64Array[])[],
  into: readonly Float64Array[],
): void {
  for (const [index, { of }] of inputColumns.entries()) {
    const { case: c, input } = of[0];
    const about = cases[c].inputs[input];
    for (let row = 0; row < into[index].length; row++) into[index][row] = about.shown(values[c][row][input]);
  }
}

/** One line a draw, with every case in which it failed. */
function failureList({ cases }: SpreadPlan) {
  const found = new Map<number, string[]>();
  return {
    add(draw: number, c: number, message: string): void {
      const told = cases.length === 1 ? message : `${cases[c].drawn.name}: ${message}`;
      found.set(draw, [...(found.get(draw) ?? []), told]);
    },
    list: () =>
      [...found].sort(([a], [b]) => a - b).map(([draw, messages]) => ({ draw, message: messages.join('; ') })),
  };
}
