/** Which input matters to a finding: by Sobol' indices where inputs are drawn apart, by ranks where posterior samples keep them together. */
import type { Resamples } from './bootstrap.ts';
import { designValues } from './indexDesign.ts';
import { type RankMeasure, type RankOrder, rankMeasure } from './rankMeasure.ts';
import { sobolIndices } from './sobolIndices.ts';
import type { Importance, RankImportance } from './spreadReport.ts';

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
  return { first: null, total: null, ranks: null, leftOut: 0, reason };
}

/** One index for each dimension of `own`. */
export function importanceByDesign({ draws, further, dimensions, own }: DesignColumns, again: Resamples): Importance {
  const { a, b, ab } = designValues(draws, further, dimensions);
  const { first, total, leftOut, reason } = sobolIndices({ a, b, ab: own.map((dimension) => ab[dimension]) }, again);
  return { first, total, ranks: null, leftOut, ...(reason === undefined ? {} : { reason }) };
}

/** `rows`: which sample each draw took, so that repeats do not count as independent. */
export function importanceByRanks(
  inputs: readonly RankOrder[],
  finding: RankOrder,
  rows: ArrayLike<number>,
): Importance {
  const ranks = inputs.map((input) => rankImportance(rankMeasure(input, finding, rows)));
  const known = ranks.filter(({ value }) => value !== null);
  if (known.length > 0) return { first: null, total: null, ranks, leftOut: 0 };
  return noImportance(ranks.map((one) => (one.value === null ? one.reason : ''))[0] ?? 'no input is drawn');
}

function rankImportance({ value, chanceLevel, reason }: RankMeasure): RankImportance {
  if (value === null || chanceLevel === null)
    return { value: null, chanceLevel: null, reason: reason ?? 'not defined' };
  return { value, chanceLevel };
}
