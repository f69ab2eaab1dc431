/** Which input matters to a finding: by Sobol' indices where inputs are drawn apart, by ranks where posterior samples keep them together. */
import type { Resamples } from './bootstrap.ts';
import { designValues } from './indexDesign.ts';
import { type RankOrder, rankMeasure } from './rankMeasure.ts';
import { sobolIndices } from './sobolIndices.ts';
import type { Importance } from './spreadReport.ts';

export interface DesignColumns {
  /** Of the draws, (rows or more,). */
  readonly draws: Float64Array;
  /** Of the further runs, (rows · (dimensions + 1),). */
  readonly further: Float64Array;
  readonly dimensions: number;
  /** Dimension of each input of the case. */
  readonly own: readonly number[];
}

export function noImportance(reason: string): Importance {
  return { first: null, total: null, ranks: null, reason };
}

/** One index for each dimension of `own`. */
export function importanceByDesign({ draws, further, dimensions, own }: DesignColumns, again: Resamples): Importance {
  const { a, b, ab } = designValues(draws, further, dimensions);
  const { first, total, reason } = sobolIndices({ a, b, ab: own.map((dimension) => ab[dimension]) }, again);
  return { first, total, ranks: null, ...(reason === undefined ? {} : { reason }) };
}

/** `rows`: which sample each draw took, so that repeats do not count as independent. */
export function importanceByRanks(
  inputs: readonly RankOrder[],
  finding: RankOrder,
  rows: ArrayLike<number>,
): Importance {
  const measures = inputs.map((input) => rankMeasure(input, finding, rows));
  const ranks = measures.map(({ value, chanceLevel }) => ({ value, chanceLevel }));
  if (ranks.every(({ value }) => value === null)) return noImportance(measures[0]?.reason ?? 'no input is drawn');
  return {
    first: null,
    total: null,
    ranks: ranks.map(({ value, chanceLevel }) => ({ value: value ?? 0, chanceLevel: chanceLevel ?? 0 })),
  };
}
