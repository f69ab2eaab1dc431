/**
 * Which runs Sobol' indices need. Row j of matrix A is draw j, with one dimension for each uncertain input; row j of B takes as many
 * further dimensions of the same draw; A with column i from B is AB_i. The runs of A are those of the spread itself.
 * Runs beyond A are numbered row by row, so that a part of them holds whole rows: for each row first B, then AB_1 … AB_d.
 * Source: Saltelli et al. (2010) Comput. Phys. Commun. 181, 259, §3.
 */
import type { UniformDraws } from './uniformDraws.ts';

/** Runs beyond A: rows · (inputs + 1). */
export function furtherRuns(rows: number, inputs: number): number {
  return rows * (inputs + 1);
}

export interface DesignPlace {
  /** Draw number of the row. */
  readonly row: number;
  /** Input that is taken from B; 'all' for B itself. */
  readonly changed: number | 'all';
}

export function designPlace(run: number, inputs: number): DesignPlace {
  const block = run % (inputs + 1);
  return { row: Math.floor(run / (inputs + 1)), changed: block === 0 ? 'all' : block - 1 };
}

/**
 * Numbers in (0, 1) of one input for the further runs first, first + 1, …
 * Shape:  input 0 … inputs − 1 has dimension `input` in A and `inputs + input` in B; out (runs,) is overwritten.
 */
export function designInto(draws: UniformDraws, inputs: number, input: number, first: number, out: Float64Array): void {
  for (let j = 0; j < out.length; j++) {
    const { row, changed } = designPlace(first + j, inputs);
    const isFromB = changed === 'all' || changed === input;
    out[j] = draws.at(row, isFromB ? inputs + input : input);
  }
}

/**
 * One finding's values by their place in the design; NaN where a run failed or the finding does not exist. What runs in a circle is
 * to be unwrapped around one centre for all (`unwrapTurn`), or its jump is taken for variance.
 */
export interface DesignValues {
  /** (rows,) each. */
  readonly a: Float64Array;
  readonly b: Float64Array;
  readonly ab: readonly Float64Array[];
}

/** Shape: fromA (rows,) or longer: the spread's own draws; further (rows · (inputs + 1),) in run order. */
export function designValues(fromA: Float64Array, further: Float64Array, inputs: number): DesignValues {
  const rows = further.length / (inputs + 1);
  const block = (which: number) => Float64Array.from({ length: rows }, (_, row) => further[row * (inputs + 1) + which]);
  return {
    a: fromA.subarray(0, rows),
    b: block(0),
    ab: Array.from({ length: inputs }, (_, input) => block(input + 1)),
  };
}
