/** Some rows computed: timed, and looked through before anyone relies on them. */
import { performance } from 'node:perf_hooks';
import type { Calculate, Failure, Range, Rows } from './job.ts';

export interface Chunk extends Range, Rows {
  /** How long it took. */
  readonly seconds: number;
}

/**
 * Rows [from, to) by `calculate`. An infinite number is no result: its row is a failed one, and all of it becomes NaN, so that what is
 * counted as failed is in no percentile. (The studies see to it themselves, case by case: this is the net below them.)
 * `names` are those of the columns. Errors: when the columns are not those of the table.
 */
export function computeChunk(calculate: Calculate, { from, to }: Range, names: readonly string[]): Chunk {
  const start = performance.now();
  const { columns, failures } = calculate(from, to);
  if (columns.length !== names.length || columns.some(({ length }) => length !== to - from))
    throw new Error(`rows ${from} to ${to - 1} have another shape than the table`);
  const checked = withoutInfinities(columns, failures, names, from);
  return { from, to, columns, failures: checked, seconds: (performance.now() - start) / 1000 };
}

function withoutInfinities(
  columns: readonly Float64Array[],
  failures: readonly Failure[],
  names: readonly string[],
  from: number,
): readonly Failure[] {
  const found = new Map<number, string>();
  for (const [index, values] of columns.entries()) {
    for (let row = 0; row < values.length; row++) {
      if (Math.abs(values[row]!) === Infinity && !found.has(from + row))
        found.set(from + row, `${names[index]} is not finite`);
    }
  }
  if (found.size === 0) return failures;
  for (const values of columns) for (const draw of found.keys()) values[draw - from] = NaN;
  for (const { draw, message } of failures) found.set(draw, message);
  return [...found].sort(([a], [b]) => a - b).map(([draw, message]) => ({ draw, message }));
}
