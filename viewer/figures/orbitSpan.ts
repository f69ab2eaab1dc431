/** Which rows of a Dataset a line through time shows, and where on the time axis they stand. Pure. */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { Seconds } from '../../sim/si.ts';
import { values } from './variables.ts';

export interface Span {
  /** Seconds on the axis, increasing. */
  readonly time: readonly Seconds[];
  /** The Dataset's row behind each point. */
  readonly rows: readonly number[];
}

/** An orbit is shown from a quarter before periapsis to three quarters after: the peak and its lag stand clear of the edge. */
export const quarterBefore = 0.25;

/**
 * One whole orbit of a periodic state from −¼ to +¾ period: every row, or the chosen ones. The rows next to both ends are
 * repeated a period away, so that a line reaches the edges.
 */
export function orbitSpan(dataset: Dataset, period: Seconds, chosen?: readonly number[]): Span {
  const time = values(dataset, 'time');
  const all = chosen ?? Array.from(time, (_, row) => row);
  const split = firstAtOrAfter(all, time, (1 - quarterBefore) * period);
  const early = all.slice(Math.max(0, split - 1)).map((row) => ({ row, at: time[row]! - period }));
  const late = all.slice(0, split).map((row) => ({ row, at: time[row]! }));
  const after = all[split];
  const next = after === undefined ? { row: all[0]!, at: time[all[0]!]! + period } : { row: after, at: time[after]! };
  const points = [...early, ...late, next];
  return { time: points.map(({ at }) => at), rows: points.map(({ row }) => row) };
}

/** Every row as it stands: a run forward from a start. */
export function wholeSpan(dataset: Dataset): Span {
  const time = Array.from(values(dataset, 'time'));
  return { time, rows: time.map((_, row) => row) };
}

function firstAtOrAfter(rows: readonly number[], time: Float64Array, cut: Seconds): number {
  const place = rows.findIndex((row) => time[row]! >= cut);
  return place < 0 ? rows.length : place;
}
