/** Windows as figures shade them: bands of temperature, and stretches of time when the instellation lies inside. Pure. */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { Seconds } from '../../sim/si.ts';
import type { Window } from '../../sim/world.ts';
import type { Column } from '../words/columns.ts';
import type { Span } from './orbitSpan.ts';
import { values } from './variables.ts';

export interface Stretch {
  readonly from: Seconds;
  readonly to: Seconds;
}

/** Windows of one kind that can be evaluated, each once even where every case repeats it. */
export function distinctWindows(columns: readonly Column[], of: Window['of']): Window[] {
  const windows = columns.flatMap((column) => column.windows).filter((w) => w.of === of && w.unavailable === undefined);
  return [...new Map(windows.map((window) => [`${window.name}\n${window.from}\n${window.to}`, window])).values()];
}

/** Stretches of the span when the instellation lies within [from, to]; crossings by straight lines between rows. */
export function stretchesInside(dataset: Dataset, span: Span, window: Window): Stretch[] {
  return stretchesBetween(values(dataset, 'instellation'), span, window);
}

/** The same for any variable's numbers. */
export function stretchesBetween(data: Float64Array, span: Span, window: Pick<Window, 'from' | 'to'>): Stretch[] {
  const inside = (row: number): boolean => data[row]! >= window.from && data[row]! <= window.to;
  const stretches: Stretch[] = [];
  let from: Seconds | null = inside(span.rows[0]!) ? span.time[0]! : null;
  for (let at = 1; at < span.rows.length; at++) {
    for (const crossing of crossings(span, data, at, window)) {
      if (from === null) from = crossing;
      else {
        stretches.push({ from, to: crossing });
        from = null;
      }
    }
  }
  if (from !== null) stretches.push({ from, to: span.time.at(-1)! });
  return stretches;
}

/** Times between row `at` − 1 and row `at` when the window is entered or left, in order. */
function crossings(span: Span, data: Float64Array, at: number, { from, to }: Pick<Window, 'from' | 'to'>): Seconds[] {
  const start = data[span.rows[at - 1]!]!;
  const end = data[span.rows[at]!]!;
  const shares = [from, to]
    .filter((bound) => (bound === from ? start < bound !== end < bound : start <= bound !== end <= bound))
    .map((bound) => (bound - start) / (end - start));
  const length = span.time[at]! - span.time[at - 1]!;
  return shares.sort((a, b) => a - b).map((share) => span.time[at - 1]! + share * length);
}
