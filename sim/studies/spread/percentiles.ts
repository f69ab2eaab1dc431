/** Mean and percentiles of one column of draws. Draws without a value stand as NaN in the column and are left out. */
import { selectRanks } from './select.ts';

export const percentileLevels = ['2.5', '16', '50', '84', '97.5'] as const;
export type Percentiles = Readonly<Record<(typeof percentileLevels)[number], number>>;

export interface Summary {
  /** Null where there is nothing to tell, with the reason. */
  readonly mean: number | null;
  readonly percentiles: Percentiles | null;
  /** Share of the draws that have a value. */
  readonly defined: number;
  readonly reason?: string;
}

/** A sum that goes on over the parts of a column: the same bits however it is cut. */
export interface RunningSum {
  sum: number;
  count: number;
}

/** Adds what is not NaN, one by one in draw order. */
export function addInOrder(total: RunningSum, values: Float64Array): void {
  let { sum, count } = total;
  for (let i = 0; i < values.length; i++) {
    if (Number.isNaN(values[i])) continue;
    sum += values[i];
    count++;
  }
  total.sum = sum;
  total.count = count;
}

/**
 * Shape:  values (draws,) in draw order, left alone; scratch at least as long, overwritten: allocates nothing of that size when given.
 * Units:  those of the values; `defined` 1.
 */
export function summarise(values: Float64Array, scratch: Float64Array = new Float64Array(values.length)): Summary {
  const total: RunningSum = { sum: 0, count: 0 };
  addInOrder(total, values);
  if (total.count === 0) return undefinedSummary(0, 'no draw has a value');
  const percentiles = percentilesInto(definedInto(values, scratch));
  return { mean: total.sum / total.count, percentiles, defined: total.count / values.length };
}

export function undefinedSummary(defined: number, reason: string): Summary {
  return { mean: null, percentiles: null, defined, reason };
}

/** What is not NaN, moved to the front of scratch. */
export function definedInto(values: Float64Array, scratch: Float64Array): Float64Array {
  let count = 0;
  for (let i = 0; i < values.length; i++) if (!Number.isNaN(values[i])) scratch[count++] = values[i];
  return scratch.subarray(0, count);
}

/** Percentiles of values without NaN, at least one, whose order is lost. */
export function percentilesInto(values: Float64Array): Percentiles {
  return Object.fromEntries(
    quantilesInto(
      values,
      percentileLevels.map(Number).map((level) => level / 100),
    ).map((value, i) => [percentileLevels[i], value]),
  ) as Percentiles;
}

/**
 * Quantiles by straight lines between the sorted values: the share s stands at place (n − 1)·s from 0.
 * Shape:  values (n ≥ 1,) without NaN, reordered in place; shares rising, 0 … 1.
 * Source: Hyndman & Fan (1996) Am. Stat. 50, 361, definition 7: the default of numpy and R.
 */
export function quantilesInto(values: Float64Array, shares: readonly number[]): number[] {
  const places = shares.map((share) => (values.length - 1) * share);
  selectRanks(
    values,
    places.flatMap((place) => [Math.floor(place), Math.ceil(place)]),
  );
  return places.map((place) => between(values[Math.floor(place)], values[Math.ceil(place)], place % 1));
}

/** From the nearer end, so that it never leaves the interval by a rounding. */
function between(low: number, high: number, share: number): number {
  return share < 0.5 ? low + (high - low) * share : high - (high - low) * (1 - share);
}
