/** Maxima of rows that go round an orbit. Pure. */
import type { Seconds } from '../../sim/si.ts';
import { topOfParabola } from '../../sim/solve/parabola.ts';

export interface Rows {
  readonly time: Float64Array;
  readonly period: Seconds;
  at(row: number): number;
}

/** Times of all local maxima, each at the top of the parabola through its row and both neighbours; 0 ≤ t < period. */
export function peakTimes(rows: Rows): Seconds[] {
  const { time, period } = rows;
  const count = time.length;
  const found: Seconds[] = [];
  for (let row = 0; row < count; row++) {
    const before = rows.at((row + count - 1) % count) - rows.at(row);
    const after = rows.at((row + 1) % count) - rows.at(row);
    if (before < 0 && after <= 0) found.push(wrapped(time[row]! + topAt(rows, row, before, after), period));
  }
  return found;
}

/** Time of the greatest maximum; null for rows that are all alike. */
export function highestPeak(rows: Rows): Seconds | null {
  const count = rows.time.length;
  let best = 0;
  let least = 0;
  for (let row = 1; row < count; row++) {
    if (rows.at(row) > rows.at(best)) best = row;
    if (rows.at(row) < rows.at(least)) least = row;
  }
  if (!(rows.at(best) > rows.at(least))) return null;
  const before = rows.at((best + count - 1) % count) - rows.at(best);
  const after = rows.at((best + 1) % count) - rows.at(best);
  return wrapped(rows.time[best]! + topAt(rows, best, before, after), rows.period);
}

/** Time since the nearest of `times` before `moment`, going round. A lead by rounding is no lag of a whole orbit. */
export function timeSince(times: readonly Seconds[], moment: Seconds, period: Seconds): Seconds | null {
  if (times.length === 0) return null;
  const rounding = 1e-6 * period;
  return Math.max(0, Math.min(...times.map((time) => wrapped(moment - time + rounding, period) - rounding)));
}

/** From its row; within the neighbours. `before` and `after` are their values less its own. */
function topAt({ time, period }: Rows, row: number, before: number, after: number): Seconds {
  const count = time.length;
  const left = wrapped(time[row]! - time[(row + count - 1) % count]!, period);
  const right = wrapped(time[(row + 1) % count]! - time[row]!, period);
  return topOfParabola(left, right, before, after);
}

function wrapped(time: Seconds, period: Seconds): Seconds {
  return time - period * Math.floor(time / period);
}
