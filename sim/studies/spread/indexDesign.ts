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

export interface DesignInput {
  /** Of the draws in A; in B it is as many further as A has dimensions. */
  readonly dimension: number;
  /** Value at a number in (0, 1). */
  at(share: number): number;
}

/**
 * From a place to the values of some inputs there, in scratch: one at a time. Runs of a row that follow one another share its draws.
 * Shape:  dimensions: of A; a dimension may serve no input, or several.
 */
export function designRuns(
  draws: UniformDraws,
  dimensions: number,
  inputs: readonly DesignInput[],
): (place: DesignPlace) => Float64Array {
  const values = () => new Float64Array(inputs.length);
  const [a, b, mixed] = [values(), values(), values()];
  let current = -1;
  return ({ row, changed }) => {
    for (const [i, { dimension, at }] of inputs.entries()) {
      if (row !== current) {
        a[i] = at(draws.at(row, dimension));
        b[i] = at(draws.at(row, dimensions + dimension));
      }
      mixed[i] = changed === 'all' || changed === dimension ? b[i] : a[i];
    }
    current = row;
    return mixed;
  };
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
