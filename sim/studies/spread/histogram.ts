/** Counts of draws in bins of equal width, over the middle 99 % of them: the few beyond are counted, and do not squeeze the rest. */
import { quantilesInto } from './percentiles.ts';
import type { Histogram } from './spreadReport.ts';

const bins = 48;

/** Shape: values in any order with NaN where undefined, left alone; scratch at least as long, overwritten. Null for fewer than two values, or equal ones. */
export function histogramOf(
  values: Float64Array,
  scratch: Float64Array = new Float64Array(values.length),
): Histogram | null {
  let count = 0;
  for (let i = 0; i < values.length; i++) if (!Number.isNaN(values[i])) scratch[count++] = values[i];
  if (count < 2) return null;
  const [from, to] = quantilesInto(scratch.subarray(0, count), [0.005, 0.995]);
  if (!(to - from > 1e-12 * Math.max(Math.abs(from), Math.abs(to)))) return null;
  const counts = new Array<number>(bins).fill(0);
  let beyond = 0;
  for (let i = 0; i < values.length; i++) {
    if (Number.isNaN(values[i])) continue;
    if (values[i] < from || values[i] > to) beyond++;
    else counts[Math.min(bins - 1, Math.floor(((values[i] - from) / (to - from)) * bins))]++;
  }
  return { from, to, counts, beyond };
}
