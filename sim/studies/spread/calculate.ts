/** The arithmetic of a spread's tables: rows from their numbers alone, so that any worker may compute any of them. */
import { caught, infinityIn, notFinite, rowSolver } from '../rowSolver.ts';
import { bandSampler } from './bandSampler.ts';
import { designPlace, designRuns } from './indexDesign.ts';
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
    const drawn = drawnInputs(plan, from, to);
    for (let row = 0; row < to - from; row++) {
      for (let c = 0; c < solve.length; c++) {
        const message = solve[c](drawn.values(c, row), table.findings[c], row);
        if (message !== null) failed.add(from + row, c, message);
      }
    }
    fillInputs(plan, drawn.columns, table.inputs);
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
  const valuesAt = plan.cases.map(({ inputs }) => designRuns(plan.draws, count, inputs));
  return (from, to) => {
    const table = emptyTable(plan, to - from);
    const failed = failureList(plan);
    const columns = plan.cases.map(({ inputs }) => inputs.map(() => new Float64Array(to - from)));
    for (let run = from; run < to; run++) {
      const place = designPlace(run, count);
      for (const [c, { inputs }] of plan.cases.entries()) {
        const values = valuesAt[c](place);
        for (let i = 0; i < values.length; i++) columns[c][i][run - from] = values[i];
        const isRunOfA = place.changed !== 'all' && inputs.every(({ dimension }) => dimension !== place.changed);
        const message = isRunOfA ? null : solve[c](values, table.findings[c], run - from);
        if (message !== null) failed.add(run, c, message);
      }
    }
    fillInputs(plan, columns, table.inputs);
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
    const drawn = drawnInputs(plan, from, to);
    for (let row = 0; row < to - from; row++) {
      for (const [c, sampler] of samplers.entries()) {
        if (sampler.columns.length === 0) continue;
        const curve = caught(() => sampler.at(drawn.values(c, row)));
        const isInfinite = typeof curve !== 'string' && infinityIn(curve) >= 0;
        const found = isInfinite ? notFinite('the temperature') : curve;
        if (typeof found === 'string') failed.add(from + row, c, found);
        else for (let i = 0; i < found.length; i++) columns[c][i][row] = found[i];
      }
    }
    return { columns: columns.flat(), failures: failed.list() };
  };
}

/** SI values of every case's inputs for draws from … to − 1: by column, and those of one draw, in scratch of their own. */
function drawnInputs({ cases, draws, dimensions }: SpreadPlan, from: number, to: number) {
  const shares = dimensions.map((_, dimension) => {
    const column = new Float64Array(to - from);
    draws.fillInto(dimension, from, column);
    return column;
  });
  const columns = cases.map(({ inputs }) =>
    inputs.map(({ dimension, at }) => shares[dimension].map((share) => at(share))),
  );
  const scratch = cases.map(({ inputs }) => new Float64Array(inputs.length));
  return {
    columns,
    values(c: number, row: number): Float64Array {
      const values = scratch[c];
      for (let i = 0; i < values.length; i++) values[i] = columns[c][i][row];
      return values;
    },
  };
}

function emptyTable({ cases, inputColumns }: SpreadPlan, rows: number) {
  const column = () => new Float64Array(rows).fill(Number.NaN);
  return { inputs: inputColumns.map(column), findings: cases.map(({ findings }) => findings.map(column)) };
}

function fillInputs(
  { cases, inputColumns }: SpreadPlan,
  columns: readonly (readonly Float64Array[])[],
  into: readonly Float64Array[],
): void {
  for (const [index, { of }] of inputColumns.entries()) {
    const { case: c, input } = of[0];
    const about = cases[c].inputs[input];
    const values = columns[c][input];
    for (let row = 0; row < values.length; row++) into[index][row] = about.shown(values[row]);
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
