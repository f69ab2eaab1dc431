/**
 * Sobol' indices of independent inputs: which unknown matters most.
 * First order: the share of the finding's variance that knowing this input alone would remove. Total: the share that would be left if
 * all other inputs were known; it counts every interaction that the input takes part in.
 * Equations, with V the variance over A and B together and f measured from its mean c (any constant c is allowed and a near one
 * quiets the sum):
 *   first  S_i = (1/N) Σ_j (f(B)_j − c) (f(AB_i)_j − f(A)_j) / V     Saltelli et al. (2010) Comput. Phys. Commun. 181, 259, table 2 (b)
 *   total  T_i = (1/2N) Σ_j (f(A)_j − f(AB_i)_j)² / V                Jansen (1999) Comput. Phys. Commun. 117, 35; there (f)
 * Intervals: percentiles over resampled rows. Rows of Sobol' points are more even than the independent rows that resampling
 * supposes, so for them the intervals are rather too wide than too narrow. An index whose truth is 0 may come out below 0.
 */
import { type Resamples, resampledSums } from './bootstrap.ts';
import type { DesignValues } from './indexDesign.ts';
import { quantilesInto } from './percentiles.ts';

export interface SobolIndex {
  readonly value: number;
  /** Bootstrap percentiles. */
  readonly percentiles: {
    readonly '2.5': number;
    readonly '16': number;
    readonly '84': number;
    readonly '97.5': number;
  };
}

export interface SobolIndices {
  /** One for each input, in order; null where there are none, with the reason. */
  readonly first: readonly SobolIndex[] | null;
  readonly total: readonly SobolIndex[] | null;
  /** Share of the rows left out whole because one of their runs failed or lacks the finding. */
  readonly leftOut: number;
  readonly reason?: string;
}

/** Fewer rows make no index. */
const leastRows = 64;

/** Deviation relative to the largest value below which a finding differs by rounding alone. */
const negligible = 1e-10;

/**
 * Share of the variance that every resample must have. One without the few odd rows of a finding that is else constant has none: an
 * index would be the accident of these rows, and its interval 0/0.
 */
const leastOfVariance = 1e-9;

/**
 * Shape:  values of one finding; again: resamples of as many rows, shared by all findings.
 * Units:  any in, 1 out.
 */
export function sobolIndices(values: DesignValues, again: Resamples): SobolIndices {
  const whole = wholeRows(values);
  const rows = whole.reduce((sum, is) => sum + is, 0);
  const leftOut = 1 - rows / whole.length;
  if (rows < leastRows) return noIndices(leftOut, `fewer than ${leastRows} rows of runs have this finding throughout`);
  const columns = estimatorColumns(values, whole, rows);
  if (columns === null) return noIndices(leftOut, 'the finding is the same in every run');
  const totals = columns.map((column) => column.reduce((sum, x) => sum + x, 0));
  const once = estimates(totals, 0, values.ab.length);
  const sums = resampledSums(again, columns);
  const starts = Array.from({ length: again.replicates }, (_, replicate) => replicate * columns.length);
  const least = leastOfVariance * varianceOf(totals, 0);
  if (starts.some((from) => !(varianceOf(sums, from) > least)))
    return noIndices(leftOut, 'the finding is the same in nearly every run');
  const replicates = starts.map((from) => estimates(sums, from, values.ab.length));
  const withInterval = (kind: 'first' | 'total') =>
    once[kind].map((value, input) =>
      interval(
        value,
        replicates.map((replicate) => replicate[kind][input]),
      ),
    );
  return { first: withInterval('first'), total: withInterval('total'), leftOut };
}

function noIndices(leftOut: number, reason: string): SobolIndices {
  return { first: null, total: null, leftOut, reason };
}

/** 1 for rows all of whose runs have the finding, else 0. */
function wholeRows({ a, b, ab }: DesignValues): Float64Array {
  return a.map((_, row) => ([a, b, ...ab].some((column) => Number.isNaN(column[row])) ? 0 : 1));
}

/**
 * What the estimators sum over rows, 0 in rows left out: one for each row counted; f(A) + f(B) and their squares; then first and total
 * of each input. Null when the finding is constant.
 */
function estimatorColumns({ a, b, ab }: DesignValues, whole: Float64Array, rows: number): Float64Array[] | null {
  const over = (term: (row: number) => number) => whole.map((is, row) => (is === 1 ? term(row) : 0));
  const sum = (column: Float64Array) => column.reduce((total, x) => total + x, 0);
  const mean = sum(over((row) => a[row] + b[row])) / (2 * rows);
  const both = over((row) => a[row] - mean + (b[row] - mean));
  const squares = over((row) => (a[row] - mean) ** 2 + (b[row] - mean) ** 2);
  const largest = over((row) => Math.max(Math.abs(a[row]), Math.abs(b[row]))).reduce((most, x) => Math.max(most, x), 0);
  if (!(Math.sqrt(sum(squares) / (2 * rows)) > negligible * largest)) return null;
  const first = ab.map((column) => over((row) => (b[row] - mean) * (column[row] - a[row])));
  const total = ab.map((column) => over((row) => (a[row] - column[row]) ** 2 / 2));
  return [whole, both, squares, ...first, ...total];
}

/** V from the columns' sums, which begin at `from`. */
function varianceOf(sums: ArrayLike<number>, from: number): number {
  const runs = 2 * sums[from];
  return sums[from + 2] / runs - (sums[from + 1] / runs) ** 2;
}

/** The indices of all inputs from the columns' sums, which begin at `from`. */
function estimates(sums: ArrayLike<number>, from: number, inputs: number): { first: number[]; total: number[] } {
  const rows = sums[from];
  const variance = varianceOf(sums, from);
  const shares = (begin: number) =>
    Array.from({ length: inputs }, (_, input) => sums[from + begin + input] / (rows * variance));
  return { first: shares(3), total: shares(3 + inputs) };
}

function interval(value: number, replicates: readonly number[]): SobolIndex {
  const [p2, p16, p84, p97] = quantilesInto(Float64Array.from(replicates), [0.025, 0.16, 0.84, 0.975]);
  return { value, percentiles: { '2.5': p2, '16': p16, '84': p84, '97.5': p97 } };
}
